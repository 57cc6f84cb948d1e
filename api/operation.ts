import { z } from 'zod'
import type { Material } from '../solvers/materials/material.ts'
import { readBody } from '../solvers/operations/read-body.ts'
import { parse } from '../solvers/statement/validate.ts'
import type { Deps } from './deps.ts'
import type { Environment } from './keys/key.ts'
import type { Permission, Reach, Role, Scope, StaffPermission, StaffRole } from './permissions.ts'
import type { ProblemCode } from './problems.ts'

export interface KeyCaller {
  kind: 'key'
  keyId: string
  secretId: string
  accountId: string
  environment: Environment
}
export interface MemberCaller {
  kind: 'session'
  personId: string
  accountId: string
  role: Role
  /** How far the operation's permission reaches for this role. */
  reach: Reach
}
export interface StaffCaller {
  kind: 'staff'
  staffId: string
  role: StaffRole
}
interface Callers {
  public: { kind: 'public' }
  key: KeyCaller
  session: MemberCaller
  staff: StaffCaller
}
export type Access = keyof Callers
export type Caller = Callers[Access]

/** What the request log keeps of a call beside status and time; handlers add to it. */
export interface CallRecord {
  requestId: string
  accountId?: string
  keyId?: string
  secretId?: string
  caseId?: string
  operation?: string
  points?: number
  bytesIn?: number
  problem?: object
  /** Bytes of an answer whose length is not known before. */
  bytesOut?: number
  /** Done when an answer of many lines is written, or is not to be. */
  streaming?: Promise<void>
  /** The caller's own tag of the call. */
  reference?: string
  traceId?: string
  /** It is the answer of a call before, computed again and not charged again. */
  replayed?: boolean
  /** Headers of the limits that the call counted against, on its answer whatever that is. */
  limits?: Record<string, string>
}

/** A session as sign-in and sign-out see it. */
export interface SessionHandle {
  start(content: Record<string, string>): Promise<void>
  end(): Promise<void>
}

export interface Context<P, Q, B, A extends Access> {
  params: P
  query: Q
  body: B
  caller: Callers[A]
  call: CallRecord
  session: SessionHandle
  /** The header If-Match, where the operation is conditional. */
  ifMatch?: string
  deps: Deps
}

export interface Reply {
  body?: unknown
  /** The body as JSON text, where it was written elsewhere. */
  text?: string
  etag?: string
  /** Lines of an answer that is written while it is made. */
  lines?: AsyncIterable<string>
  headers?: Record<string, string>
}

/** Materials of the caller's account, by id. */
export type OwnMaterials = ReadonlyMap<string, Material>

export interface Body<B> {
  schema: z.ZodType
  /** Bytes that it may have, after decompression. */
  limit: number
  /** It may name materials of the account, which are looked up before it is parsed. */
  materials?: true
  /** Throws DomainError. */
  parse(raw: unknown, own: OwnMaterials): B
  /** Reads the bytes of a long body away from the event loop. Throws what the parser and `parse` throw. */
  parseLong?(bytes: Uint8Array, deps: Deps, own: OwnMaterials): Promise<B>
}

/** A body that is a text of its own kind. */
export interface Upload<B> {
  kind: 'text/csv' | 'application/x-ndjson'
  limit: number
  description: string
  example: string
  /** It may name materials of the account, as a body may. */
  materials?: true
  /** Throws DomainError. */
  parse(text: string, own: OwnMaterials): B
}

export type Method = 'get' | 'post' | 'put' | 'delete'
export type LimiterName = 'sign-up' | 'sign-in' | 'staff-sign-in' | 'try' | 'leak-report'

export type Tag =
  'Catalogue' | 'Cases' | 'Usage' | 'Requests' | 'Health' | 'Session' | 'Keys' | 'Materials' | 'Batches' | 'Try'

/** An operation that will go: since when that is known, when it ends, and what to use instead. */
export interface Deprecation {
  since: Date
  sunset: Date
  successor?: string
}

interface Description<P, Q, B, A extends Access> {
  id: string
  document: 'openapi' | 'portal' | 'support'
  method: Method
  /** OpenAPI form: `/v1/cases/{caseId}`. */
  path: string
  tag: Tag
  summary: string
  description?: string
  access: A
  /** What a key must be allowed. */
  scope?: A extends 'key' ? Scope : never
  permission?: A extends 'session' ? Permission : A extends 'staff' ? StaffPermission : never
  /** Starts or ends a session although it needs none. */
  session?: boolean
  metered?: boolean
  deprecated?: Deprecation
  limiter?: LimiterName
  params?: z.ZodObject & z.ZodType<P>
  query?: z.ZodObject & z.ZodType<Q>
  body?: Body<B>
  /** In place of a JSON body. */
  upload?: Upload<B>
  /** A change that must state by If-Match which version it is of. */
  conditional?: true
  status: 200 | 201 | 204
  answer?: z.ZodType
  /** In place of a JSON answer: what its lines are. */
  answersLines?: string
  /** Problems of its own, beside those that follow from access, body and query. */
  problems?: readonly ProblemCode[]
  example?: { params?: Record<string, string>; body?: Record<string, unknown> }
  caseId?: string
  caseOperation?: string
  handle(context: Context<P, Q, B, A>): Promise<Reply> | Reply
}

export type Operation = Omit<Description<unknown, unknown, unknown, Access>, 'handle' | 'permission' | 'scope'> & {
  permission?: Permission | StaffPermission
  scope?: Scope
  handle(context: Context<unknown, unknown, unknown, Access>): Promise<Reply> | Reply
}

/** An endpoint, described once: routes, documents and common tests are made from it. */
export function operation<P, Q, B, A extends Access>(description: Description<P, Q, B, A>): Operation {
  const { id, access, permission, scope } = description
  if ((access === 'session' || access === 'staff') && !permission) throw new Error(`${id} names no permission`)
  if (access === 'key' && !scope) throw new Error(`${id} names no scope`)
  return description as unknown as Operation
}

/** Bytes of a form. */
const SHORT = 16 * 1024

/** A short JSON body that its schema describes whole. */
export function jsonBody<S extends z.ZodObject>(schema: S): Body<z.output<S>> {
  return { schema, limit: SHORT, parse: (raw) => parse(schema, raw) }
}

/** A short JSON body with quantities, which may be stated with their units. */
export function statedBody<S extends z.ZodObject>(schema: S): Body<z.output<S>> {
  return { schema, limit: SHORT, parse: (raw) => readBody(schema, raw) as z.output<S> }
}

/** Needs the cookie of a session, to read or to change it. */
export function usesSession(o: Operation): boolean {
  return o.session === true || o.access === 'session' || o.access === 'staff'
}

/** What a key can be refused for, whatever it asks. */
const ofKeys: readonly ProblemCode[] = [
  'key-missing',
  'key-unknown',
  'key-expired',
  'address-refused',
  'origin-refused',
  'scope-missing',
  'rate-limited',
  'too-many-at-once',
]

/** What a body is that cannot be read, by its kind. */
export const malformed = {
  'application/json': 'malformed-json',
  'application/x-ndjson': 'malformed-json',
  'text/csv': 'malformed-csv',
} as const satisfies Record<string, ProblemCode>

/** True where a client may send the same call twice, with a key, for one effect. */
export const takesIdempotencyKey = (o: Operation) => o.access === 'key' && o.method === 'post'

/** Every problem an operation can answer: its own, and those of its access, body, query and limits. */
export function problemsOf(o: Operation): ProblemCode[] {
  const codes: ProblemCode[] = ['method-not-allowed', 'not-acceptable', 'internal', 'unavailable', 'malformed-request']
  codes.push('invalid-parameter', 'header-too-large', 'request-timeout', 'expectation-failed')
  if (o.access === 'key') codes.push(...ofKeys)
  if (o.access === 'session' || o.access === 'staff') codes.push('sign-in-needed', 'forbidden')
  if (takesIdempotencyKey(o)) codes.push('call-in-flight', 'idempotency-key-reused')
  if (usesSession(o) && o.method !== 'get') codes.push('cross-site')
  if (o.params) codes.push('not-found')
  if (o.body)
    codes.push(
      'malformed-json',
      'duplicate-name',
      'too-deep',
      'too-many-parts',
      'body-too-large',
      'unsupported-media-type',
      'invalid-input',
    )
  if (o.upload) codes.push(malformed[o.upload.kind], 'body-too-large', 'unsupported-media-type', 'invalid-input')
  if (o.conditional) codes.push('precondition-required', 'precondition-failed')
  if (o.metered) codes.push('quota-exceeded', 'too-many-points', 'solve-too-slow')
  if (o.limiter) codes.push('rate-limited')
  return [...new Set([...codes, ...(o.problems ?? [])])].sort()
}
