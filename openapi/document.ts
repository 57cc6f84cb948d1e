import {
  extendZodWithOpenApi,
  OpenApiGeneratorV31,
  OpenAPIRegistry,
  type RouteConfig,
} from '@asteasolutions/zod-to-openapi'
import { z } from 'zod'
import { cautions, warningCodes } from '../api/catalogue/codes.ts'
import { caseList } from '../api/catalogue/describe.ts'
import { LINES } from '../api/http/answer.ts'
import { sizeText } from '../api/http/size-text.ts'
import { type Operation, type Tag, problemsOf, takesIdempotencyKey } from '../api/operation.ts'
import { rolesWith } from '../api/permissions.ts'
import { sharedFields } from './shared-fields.ts'
import { type SessionKind, cookieName } from '../api/session-kinds.ts'
import { type ProblemCode, domainCodes, problemCodes, problems } from '../api/problems.ts'
import { withUnits } from './units.ts'

// Schemas say their names and more by .meta(); only a schema that no operation refers to needs registering.
extendZodWithOpenApi(z)

type Json = Record<string, unknown>
type SecurityScheme = { description: string } & (
  { type: 'http'; scheme: 'bearer' } | { type: 'apiKey'; in: 'cookie'; name: string }
)
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
  Materials: 'The catalogue of materials, and those that the account keeps for itself.',
  Batches: 'Many calls in one.',
  Try: 'Questions asked of a case without a key, for the pages of the portal.',
}

const security: Record<Operation['access'], Record<string, string[]>[]> = {
  public: [],
  key: [{ key: [] }],
  session: [{ session: [] }],
  staff: [{ staffSession: [] }],
}
const schemes: Record<string, SecurityScheme> = {
  key: {
    type: 'http',
    scheme: 'bearer',
    description: 'A key, made in the portal: soak_trial_ or soak_metered_ and 38 characters.',
  },
  session: cookieScheme('member'),
  staffSession: cookieScheme('staff'),
}

function cookieScheme(kind: SessionKind): SecurityScheme {
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
    header: z.string().optional().meta({ description: 'Which header.' }),
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
  const registry = new OpenAPIRegistry()
  registry.register('Problem', problemSchema)
  const used = new Set(own.flatMap((o) => security[o.access].flatMap(Object.keys)))
  for (const [scheme, description] of Object.entries(schemes))
    if (used.has(scheme)) registry.registerComponent('securitySchemes', scheme, description)
  for (const [header, description] of Object.entries(headers))
    registry.registerComponent('headers', header, description)
  for (const o of own) registry.registerPath(routeOf(o))
  const document = new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: { ...about[name], version, license: { name: 'Proprietary', identifier: 'LicenseRef-Soakstone' } },
    servers: [{ url: '/' }],
    tags: tagsOf(own),
  })
  const codes = {
    'x-problems': problems,
    'x-error-codes': domainCodes,
    'x-warnings': warningCodes,
    'x-cautions': cautions,
  }
  return {
    ...withUnits(sharedFields(sharedFailures(document as unknown as Json))),
    ...(name === 'openapi' ? codes : {}),
  }
}

/** By subject; the questions of each case stand together under its id. */
function tagsOf(own: readonly Operation[]): { name: string; description: string }[] {
  const asked = new Set(own.flatMap((o) => o.caseId ?? []))
  const subjects = [...new Set(own.flatMap((o) => (o.caseId ? [] : [o.tag])))]
  return [
    ...subjects.map((tag) => ({ name: tag, description: tags[tag] })),
    ...caseList()
      .cases.filter(({ id }) => asked.has(id))
      .map(({ id, summary }) => ({ name: id, description: summary })),
  ]
}

type Responses = Record<string, Json>
type Paths = Record<string, Record<string, { responses: Responses }>>

/** The same failures are met by most operations: each set stands once, by the codes it holds, and is referred to. */
function sharedFailures(document: Json): Json {
  const shared: Responses = {}
  const paths = document['paths'] as Paths
  for (const { responses } of Object.values(paths).flatMap((methods) => Object.values(methods)))
    for (const [status, response] of Object.entries(responses)) {
      if (Number(status) < 400) continue
      const { 'x-codes': codes, ...rest } = response
      const name = (codes as string[]).join('.')
      shared[name] = rest
      responses[status] = { $ref: `#/components/responses/${name}` }
    }
  return { ...document, components: { ...(document['components'] as Json), responses: shared } }
}

const header = (description: string, type: 'string' | 'integer' = 'string') => ({ description, schema: { type } })
const headers = {
  'Request-Id': header('Names the call, for its record and for support.'),
  ETag: header('Names the body by its bytes: equal answers have equal tags.'),
  Location: header('Path of what was made.'),
  'Idempotency-Replayed': header('true where a call before, with the same Idempotency-Key, had this effect.'),
  Deprecation: header('Since when it is known that the operation will end, as @ and seconds.'),
  Sunset: header('When the operation ends.'),
  Link: header('A page about the end of the operation, and what to use instead.'),
  RateLimit: header('What is left of each limit of calls: r calls within t seconds.'),
  'RateLimit-Policy': header('Each limit of calls: q calls in w seconds.'),
  'Points-Charged': header('Points that the call cost.', 'integer'),
  'Points-Remaining': header('Points that are left to the key in this period.', 'integer'),
  'Retry-After': header('Seconds to wait.', 'integer'),
  Allow: header('Methods of the path.'),
  'WWW-Authenticate': header('How to authenticate.'),
}
const referHeaders = (...names: string[]) =>
  Object.fromEntries(names.map((n) => [n, { $ref: `#/components/headers/${n}` }]))

function routeOf(o: Operation): RouteConfig {
  const codes = problemsOf(o)
  return {
    method: o.method,
    path: o.path,
    operationId: o.id,
    tags: [o.caseId ?? o.tag],
    summary: o.summary,
    ...(o.description ? { description: o.description } : {}),
    ...(o.deprecated ? { deprecated: true } : {}),
    security: o.scope ? [{ key: [o.scope] }] : security[o.access],
    request: requestOf(o),
    responses: { [o.status]: success(o), ...unchanged(o), ...failures(codes) },
    'x-problem-codes': codes,
    ...(o.permission ? { 'x-roles': rolesWith(o.permission) } : {}),
    ...(o.caseId ? { 'x-case': o.caseId, 'x-case-operation': o.caseOperation } : {}),
  }
}

function requestOf(o: Operation): NonNullable<RouteConfig['request']> {
  const params = o.params && withExamples(o.params, o.example?.params ?? {})
  const example = o.example?.body
  const body = o.body && {
    description: `At most ${sizeText(o.body.limit)}, counted after decompression.`,
    required: true,
    content: { 'application/json': { schema: o.body.schema, example } },
  }
  const upload = o.upload && {
    description: `${o.upload.description} At most ${sizeText(o.upload.limit)}, counted after decompression.`,
    required: true,
    content: { [o.upload.kind]: { schema: z.string(), example: o.upload.example } },
  }
  return {
    ...(params ? { params } : {}),
    ...(o.query ? { query: o.query } : {}),
    ...((body ?? upload) ? { body: body ?? upload } : {}),
    ...headersTaken(o),
  }
}

function headersTaken(o: Operation): { headers?: z.ZodObject } {
  const taken = {
    ...(o.conditional ? ifMatch.shape : {}),
    ...(takesIdempotencyKey(o) ? idempotencyKey.shape : {}),
    ...(o.access === 'key' ? clientReference.shape : {}),
  }
  return Object.keys(taken).length > 0 ? { headers: z.object(taken) } : {}
}

const idempotencyKey = z.object({
  'Idempotency-Key': z.string().min(1).max(512).optional().meta({
    description: 'Names the call, so that it can be sent again within 24 hours for one effect and one charge.',
  }),
})

const clientReference = z.object({
  'Client-Reference': z
    .string()
    .min(1)
    .max(64)
    .optional()
    .meta({ description: "The caller's own tag, kept with the call and grouped by in usage." }),
})

const ifMatch = z.object({
  'If-Match': z.string().meta({ description: 'ETag of the version that the change is of; * for whichever it is.' }),
})

function withExamples(params: z.ZodObject, examples: Record<string, string>): z.ZodObject {
  const shape = Object.entries(params.shape as Record<string, z.ZodType>)
  return z.object(
    Object.fromEntries(
      shape.map(([name, schema]) => [name, schema.meta({ ...schema.meta(), param: { example: examples[name] } })]),
    ),
  )
}

function success(o: Operation): RouteConfig['responses'][string] {
  const names = [
    'Request-Id',
    ...(o.answer ? ['ETag'] : []),
    ...(takesIdempotencyKey(o) ? ['Idempotency-Replayed'] : []),
    ...(o.deprecated ? ['Deprecation', 'Sunset', 'Link'] : []),
    ...(o.status === 201 && o.document === 'openapi' ? ['Location'] : []),
    ...(o.metered ? ['Points-Charged'] : []),
    ...(o.access === 'key' ? ['Points-Remaining', 'RateLimit', 'RateLimit-Policy'] : []),
  ]
  return {
    description: o.status === 204 ? 'Done.' : o.status === 201 ? 'Made.' : 'The answer.',
    headers: referHeaders(...names),
    ...(o.answer ? { content: { 'application/json': { schema: o.answer } } } : {}),
    ...(o.answersLines ? { content: { [LINES]: { schema: z.string().meta({ description: o.answersLines }) } } } : {}),
  }
}

function unchanged(o: Operation): RouteConfig['responses'] {
  if (o.method !== 'get' || !o.answer) return {}
  const description = 'The answer has not changed: its tag is among those of If-None-Match.'
  return { 304: { description, headers: referHeaders('Request-Id', 'ETag') } }
}

const headersOf: Partial<Record<ProblemCode, keyof typeof headers>> = {
  'key-missing': 'WWW-Authenticate',
  'key-unknown': 'WWW-Authenticate',
  'key-expired': 'WWW-Authenticate',
  'scope-missing': 'WWW-Authenticate',
  'method-not-allowed': 'Allow',
  'rate-limited': 'Retry-After',
  'call-in-flight': 'Retry-After',
  'too-many-at-once': 'Retry-After',
  'quota-exceeded': 'Points-Remaining',
  'solve-too-slow': 'Retry-After',
  unavailable: 'Retry-After',
}

function failures(codes: readonly ProblemCode[]): RouteConfig['responses'] {
  const byStatus: Record<string, ProblemCode[]> = {}
  for (const code of codes) (byStatus[problems[code].status] ??= []).push(code)
  return Object.fromEntries(
    Object.entries(byStatus).map(([status, list]) => {
      const extra = new Set(list.flatMap((code) => headersOf[code] ?? []))
      const narrowed = {
        allOf: [
          { $ref: '#/components/schemas/Problem' },
          { type: 'object' as const, properties: { code: { enum: list } } },
        ],
      }
      return [
        status,
        {
          'x-codes': list,
          description: list.map((code) => `${problems[code].title} (${code}).`).join(' '),
          headers: referHeaders('Request-Id', ...extra),
          content: { 'application/problem+json': { schema: narrowed } },
        },
      ]
    }),
  )
}
