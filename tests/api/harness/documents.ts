import { readFileSync } from 'node:fs'
import { Ajv2020 } from 'ajv/dist/2020.js'
import type { Operation } from '../../../api/operation.ts'
import type { Answer } from './client.ts'

type Json = Record<string, unknown>

const names = ['openapi', 'portal', 'support'] as const
export const documents = Object.fromEntries(
  names.map((name) => [
    name,
    JSON.parse(readFileSync(new URL(`../../../openapi/${name}.json`, import.meta.url), 'utf8')) as Json,
  ]),
) as Record<Operation['document'], Json>

/* Formats and the words of ours beside the schema say nothing that a validator could check. */
const ajv = new Ajv2020({ strict: false, validateFormats: false, allErrors: true })
for (const name of names) ajv.addSchema(documents[name], name)

function faultsAt(document: string, pointer: string[], value: unknown): string[] {
  const path = pointer.map((part) => encodeURIComponent(part.replaceAll('~', '~0').replaceAll('/', '~1'))).join('/')
  const validate = ajv.getSchema(`${document}#/${path}`)
  if (!validate) return [`the document has no schema at ${pointer.join(' / ')}`]
  return validate(value)
    ? []
    : (validate.errors ?? []).map((e) => `${e.instancePath} ${e.message ?? ''} ${JSON.stringify(e.params)}`)
}

/** What the document has to say against a body that an operation is sent. */
export function bodyFaults(o: Operation, body: unknown): string[] {
  return faultsAt(o.document, ['paths', o.path, o.method, 'requestBody', 'content', 'application/json', 'schema'], body)
}

/** Where a document describes an answer; failures are described once for all operations and referred to. */
function responseAt(o: Operation, status: number): { at: string[]; response: Json | undefined } {
  const find = (at: string[]) =>
    at.reduce<unknown>((value, part) => (value as Json | undefined)?.[part], documents[o.document]) as Json | undefined
  const at = ['paths', o.path, o.method, 'responses', String(status)]
  const response = find(at)
  const shared = (response?.['$ref'] as string | undefined)?.slice('#/'.length).split('/')
  return shared ? { at: shared, response: find(shared) } : { at, response }
}

/** What the document has to say against an answer: status, kind, headers and body. */
export function answerFaults(o: Operation, answer: Answer): string[] {
  const { at, response } = responseAt(o, answer.status)
  if (!response) return [`the document has no answer ${answer.status}`]
  const content = response['content'] as Json | undefined
  if (!content) return answer.text === '' ? [] : ['the document has no body for this answer']
  const [kind = ''] = Object.keys(content)
  const faults =
    answer.headers.get('content-type') === `${kind}; charset=utf-8`
      ? []
      : [`the kind is ${answer.headers.get('content-type')}`]
  if (!answer.headers.get('request-id')) faults.push('there is no Request-Id')
  return [...faults, ...faultsAt(o.document, [...at, 'content', kind, 'schema'], answer.json ?? answer.text)]
}
