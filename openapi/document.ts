import { z } from 'zod'
import { cautions, warningCodes } from '../api/catalogue/codes.ts'
import { type Operation, type Tag, problemsOf } from '../api/operation.ts'
import { rolesWith } from '../api/permissions.ts'
import { type SessionKind, cookieName } from '../api/session-kinds.ts'
import { type ProblemCode, domainCodes, problemCodes, problems } from '../api/problems.ts'

type Json = Record<string, unknown>
type DocumentName = Operation['document']

const about: Record<DocumentName, { title: string; description: string }> = {
  openapi: {
    title: 'Soakstone',
    description:
      'Transient heat conduction: how temperature moves through a body over time, and how sure the answer is.',
  },
  portal: {
    title: 'Soakstone portal',
    description: 'What the pages of the portal call, with the session of a person.',
  },
  support: {
    title: 'Soakstone support',
    description: 'What staff call, with a session of their own. Every look at an account is on record.',
  },
}

const tags: Record<Tag, string> = {
  Catalogue: 'The cases: what they are for, their fields, formulas, sources and prices.',
  Cases: 'Questions asked of a case. They are metered.',
  Usage: 'What was used, from the ledger.',
  Requests: 'Calls that were made, from the log and the ledger.',
  Health: 'The state of the service.',
  Session: 'Opening an account, signing in and out.',
  Keys: 'Keys of the account.',
  Try: 'Questions asked of a case without a key, for the pages of the portal.',
}

const security: Record<Operation['access'], Json[]> = {
  public: [],
  key: [{ key: [] }],
  session: [{ session: [] }],
  staff: [{ staffSession: [] }],
}
const schemes: Json = {
  key: { type: 'http', scheme: 'bearer', description: 'A key, made in the portal: soak_trial_ and 38 characters.' },
  session: cookieScheme('member'),
  staffSession: cookieScheme('staff'),
}

function cookieScheme(kind: SessionKind): Json {
  const description = `With https the name is ${cookieName(kind, true)}.`
  return { type: 'apiKey', in: 'cookie', name: cookieName(kind, false), description }
}

const issueSchema = z
  .strictObject({
    pointer: z
      .string()
      .optional()
      .meta({ description: 'Where in the body, as an RFC 6901 pointer such as #/times/3.' }),
    parameter: z.string().optional().meta({ description: 'Which query parameter.' }),
    code: z.enum(Object.keys(domainCodes) as (keyof typeof domainCodes)[]),
    detail: z.string(),
    accepted: z.string().optional().meta({ description: 'What would be accepted instead.' }),
  })
  .meta({ id: 'ProblemIssue' })

const problemSchema = z
  .strictObject({
    type: z.url().meta({ description: 'Address of a page about this problem.' }),
    code: z.enum(problemCodes).meta({ description: 'What clients match.' }),
    title: z.string(),
    status: z.number().int(),
    detail: z.string(),
    retryable: z.boolean().meta({ description: 'The same call may succeed later without a change.' }),
    requestId: z.string().optional(),
    resetsAt: z.iso
      .datetime()
      .optional()
      .meta({ description: 'Start of the next period, where the points of this one are used up.' }),
    errors: z.array(issueSchema).max(50).optional(),
  })
  .meta({ id: 'Problem', description: 'RFC 9457 problem details.' })

/** One of the three OpenAPI documents, from the list of operations. */
export function documentOf(name: DocumentName, operations: readonly Operation[], version: string): Json {
  const own = operations.filter((o) => o.document === name)
  const schemas: Json = {}
  const refer = (schema: z.ZodType, io: 'input' | 'output') => schemaOf(schema, io, schemas)
  refer(problemSchema, 'output')
  const paths: Record<string, Json> = {}
  for (const o of own) paths[o.path] = { ...paths[o.path], [o.method]: operationObject(o, refer) }
  const used = new Set(
    own
      .map((o) => o.access)
      .filter((access) => access !== 'public')
      .map((access) => Object.keys(security[access][0] ?? {})[0]),
  )
  return {
    openapi: '3.1.0',
    info: { ...about[name], version, license: { name: 'Proprietary', identifier: 'LicenseRef-Soakstone' } },
    servers: [{ url: '/' }],
    tags: [...new Set(own.map((o) => o.tag))].map((name) => ({ name, description: tags[name] })),
    paths,
    components: {
      schemas: Object.fromEntries(Object.entries(schemas).sort(([a], [b]) => (a < b ? -1 : 1))),
      securitySchemes: Object.fromEntries(Object.entries(schemes).filter(([scheme]) => used.has(scheme))),
      headers,
    },
    ...(name === 'openapi'
      ? { 'x-problems': problems, 'x-error-codes': domainCodes, 'x-warnings': warningCodes, 'x-cautions': cautions }
      : {}),
  }
}

const header = (description: string, type = 'string'): Json => ({ description, schema: { type } })
const headers: Json = {
  'Request-Id': header('Names the call, for its record and for support.'),
  ETag: header('Names the body by its bytes: equal answers have equal tags.'),
  'Points-Charged': header('Points that the call cost.', 'integer'),
  'Points-Remaining': header('Points that are left to the key in this period.', 'integer'),
  'Retry-After': header('Seconds to wait.', 'integer'),
  Allow: header('Methods of the path.'),
  'WWW-Authenticate': header('How to authenticate.'),
}
const referHeaders = (...names: string[]) =>
  Object.fromEntries(names.map((n) => [n, { $ref: `#/components/headers/${n}` }]))

/* Named schemas move to the components; the rest stays where it stands. */
function schemaOf(schema: z.ZodType, io: 'input' | 'output', schemas: Json): Json {
  const {
    $schema: _,
    $defs = {},
    ...whole
  } = z.toJSONSchema(schema, { io, target: 'draft-2020-12' }) as Json & { $defs?: Json }
  for (const [id, definition] of Object.entries($defs)) schemas[id] = rebase(definition)
  const id = schema.meta()?.id
  if (!id || '$ref' in whole) return rebase(whole) as Json
  schemas[id] = rebase(whole)
  return { $ref: `#/components/schemas/${id}` }
}

function rebase(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(rebase)
  if (typeof value !== 'object' || value === null) return value
  return Object.fromEntries(
    Object.entries(value).map(([name, part]) =>
      name === '$ref' ? [name, String(part).replace('#/$defs/', '#/components/schemas/')] : [name, rebase(part)],
    ),
  )
}

type Refer = (schema: z.ZodType, io: 'input' | 'output') => Json

function operationObject(o: Operation, refer: Refer): Json {
  const codes = problemsOf(o)
  return {
    operationId: o.id,
    tags: [o.tag],
    summary: o.summary,
    ...(o.description ? { description: o.description } : {}),
    security: security[o.access],
    ...parametersOf(o, refer),
    ...(o.body
      ? {
          requestBody: {
            required: true,
            content: { 'application/json': { schema: refer(o.body.schema, 'input'), example: o.example?.body } },
          },
        }
      : {}),
    responses: { [o.status]: success(o, refer), ...failures(codes) },
    'x-problem-codes': codes,
    ...(o.permission ? { 'x-roles': rolesWith(o.permission) } : {}),
    ...(o.caseId ? { 'x-case': o.caseId, 'x-case-operation': o.caseOperation } : {}),
  }
}

function parametersOf(o: Operation, refer: Refer): Json {
  const list = (place: 'path' | 'query', object: z.ZodObject | undefined) =>
    Object.entries(object?.shape ?? {}).map(([name, schema]) => {
      const { description, ...rest } = refer(schema as z.ZodType, 'input')
      const example = place === 'path' ? o.example?.params?.[name] : undefined
      return {
        name,
        in: place,
        required: place === 'path',
        ...(description ? { description } : {}),
        schema: rest,
        ...(example ? { example } : {}),
      }
    })
  const parameters = [...list('path', o.params), ...list('query', o.query)]
  return parameters.length ? { parameters } : {}
}

function success(o: Operation, refer: Refer): Json {
  const names = [
    'Request-Id',
    ...(o.answer ? ['ETag'] : []),
    ...(o.metered ? ['Points-Charged', 'Points-Remaining'] : []),
  ]
  return {
    description: o.status === 204 ? 'Done.' : o.status === 201 ? 'Made.' : 'The answer.',
    headers: referHeaders(...names),
    ...(o.answer ? { content: { 'application/json': { schema: refer(o.answer, 'output') } } } : {}),
  }
}

function failures(codes: readonly ProblemCode[]): Json {
  const byStatus: Record<string, ProblemCode[]> = {}
  for (const code of codes) (byStatus[problems[code].status] ??= []).push(code)
  return Object.fromEntries(
    Object.entries(byStatus).map(([status, list]) => {
      const extra =
        status === '401'
          ? ['WWW-Authenticate']
          : status === '405'
            ? ['Allow']
            : ['429', '503'].includes(status)
              ? ['Retry-After']
              : []
      const narrowed = {
        allOf: [{ $ref: '#/components/schemas/Problem' }, { type: 'object', properties: { code: { enum: list } } }],
      }
      return [
        status,
        {
          description: list.map((code) => `${problems[code].title} (${code}).`).join(' '),
          headers: referHeaders('Request-Id', ...extra),
          content: { 'application/problem+json': { schema: narrowed } },
        },
      ]
    }),
  )
}
