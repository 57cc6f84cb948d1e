import { type DomainCode, type Issue, domainCodes } from '../solvers/errors.ts'

interface ProblemDescription {
  status: number
  title: string
  text: string
  /** True where the same call may succeed later without a change. */
  retryable: boolean
}

/** Every problem the service can answer. Documents, error handler and the pages of the portal read this table. */
export const problems = {
  'malformed-request': {
    status: 400,
    title: 'The request cannot be read',
    text: 'The request line, path or headers are not well-formed HTTP.',
    retryable: false,
  },
  'malformed-json': {
    status: 400,
    title: 'The body is not JSON',
    text: 'The body must be one JSON value in UTF-8.',
    retryable: false,
  },
  'malformed-csv': {
    status: 400,
    title: 'The body is not CSV',
    text: 'The body must be comma-separated values as of RFC 4180, in UTF-8, with the names of the columns in its first line.',
    retryable: false,
  },
  'duplicate-name': {
    status: 400,
    title: 'A name stands twice in one object',
    text: 'JSON parsers disagree on which of two equal names counts, so neither is used.',
    retryable: false,
  },
  'too-deep': {
    status: 400,
    title: 'The body is nested too deeply',
    text: 'A body may be nested 32 levels deep. No operation needs more than a few.',
    retryable: false,
  },
  'too-many-parts': {
    status: 400,
    title: 'The body has too many parts',
    text: 'A body may have 10,000 objects and lists, and each object 10,000 names. No operation needs more than a few.',
    retryable: false,
  },
  'key-missing': {
    status: 401,
    title: 'A key is needed',
    text: 'Send a key as "Authorization: Bearer <key>". Keys are made in the portal.',
    retryable: false,
  },
  'key-unknown': {
    status: 401,
    title: 'The key is not valid',
    text: 'The key is misspelt, revoked or was never given out. A key that was lost cannot be shown again: make a new one.',
    retryable: false,
  },
  'key-expired': {
    status: 401,
    title: 'The key has expired',
    text: 'The time that was set for the key, or for its secret when it was rotated, is over. Use the new secret, or set a later end in the portal.',
    retryable: false,
  },
  'sign-in-needed': {
    status: 401,
    title: 'Sign in first',
    text: 'The session has ended or was never started.',
    retryable: false,
  },
  'sign-in-refused': {
    status: 401,
    title: 'The mail address and password do not fit',
    text: 'No account has this mail address together with this password.',
    retryable: false,
  },
  'plan-needed': {
    status: 402,
    title: 'A plan is needed',
    text: 'Metered keys belong to a plan, and the account has none. Trial keys work without one.',
    retryable: false,
  },
  'address-refused': {
    status: 403,
    title: 'The key may not be used from this address',
    text: 'The key has a list of networks, and the call came from outside of them. The list is set in the portal.',
    retryable: false,
  },
  'origin-refused': {
    status: 403,
    title: 'The key may not be used by this page',
    text: 'A browser sent the call for a page whose origin is not among those of the key. A key has none unless they are set in the portal.',
    retryable: false,
  },
  'scope-missing': {
    status: 403,
    title: 'The key does not include this',
    text: 'The operation needs a scope that the key was not given. Scopes are set in the portal.',
    retryable: false,
  },
  forbidden: {
    status: 403,
    title: 'Not allowed in this role',
    text: 'The role in this account does not include this. The owner of the account can change roles.',
    retryable: false,
  },
  'cross-site': {
    status: 403,
    title: 'The call comes from another site',
    text: 'Changes are accepted only from the pages of the portal itself.',
    retryable: false,
  },
  'not-found': {
    status: 404,
    title: 'There is nothing here',
    text: 'The path, or what it names, does not exist or belongs to another account.',
    retryable: false,
  },
  'method-not-allowed': {
    status: 405,
    title: 'The method does not apply',
    text: 'The path exists, and the Allow header lists its methods.',
    retryable: false,
  },
  'not-acceptable': {
    status: 406,
    title: 'No acceptable form of answer',
    text: 'The answer comes as application/json only, and the Accept header excludes it.',
    retryable: false,
  },
  'request-timeout': {
    status: 408,
    title: 'The request came too slowly',
    text: 'The request was not complete in time.',
    retryable: true,
  },
  'mail-in-use': {
    status: 409,
    title: 'The mail address is in use',
    text: 'Somebody signed up with this mail address before. Sign in instead.',
    retryable: false,
  },
  'key-revoked': {
    status: 409,
    title: 'The key is revoked',
    text: 'A revoked key is not changed any more. Make a new one.',
    retryable: false,
  },
  'call-in-flight': {
    status: 409,
    title: 'The same call is under way',
    text: 'A call with this Idempotency-Key is not answered yet. Send it again after the time that Retry-After states.',
    retryable: true,
  },
  'too-many-keys': {
    status: 409,
    title: 'The account has too many keys',
    text: 'An account may have 100 keys that are not revoked. Revoke one that is no longer used.',
    retryable: false,
  },
  'too-many-materials': {
    status: 409,
    title: 'The account has too many materials',
    text: 'An account may have 5,000 materials of its own. Delete some that are no longer used.',
    retryable: false,
  },
  'precondition-failed': {
    status: 412,
    title: 'It has changed meanwhile',
    text: 'If-Match names another version than the present one. Read it again, and repeat the change on what you find.',
    retryable: false,
  },
  'body-too-large': {
    status: 413,
    title: 'The body is too large',
    text: 'Each operation takes bodies up to a size of its own, counted after decompression. Its description states it.',
    retryable: false,
  },
  'too-many-points': {
    status: 413,
    title: 'Too much for one call',
    text: 'One call answers at most 200,000 priced points. Ask for fewer times or places, or split the call.',
    retryable: false,
  },
  'too-many-values': {
    status: 413,
    title: 'Too much for a trial without a key',
    text: 'Without a key, one call answers at most 10,000 numbers.',
    retryable: false,
  },
  'unsupported-media-type': {
    status: 415,
    title: 'The body is of another kind',
    text: 'Bodies are in UTF-8, and application/json unless the operation says otherwise.',
    retryable: false,
  },
  'expectation-failed': {
    status: 417,
    title: 'The expectation cannot be met',
    text: 'The Expect header may ask for 100-continue and nothing else.',
    retryable: false,
  },
  'invalid-input': {
    status: 422,
    title: 'The input is refused',
    text: 'Each entry of errors names the field, what is wrong with it and what would be accepted.',
    retryable: false,
  },
  'idempotency-key-reused': {
    status: 422,
    title: 'The Idempotency-Key belongs to another call',
    text: 'Within 24 hours the same key may only repeat the same call: method, address and body. Take a new key for each new call.',
    retryable: false,
  },
  'invalid-parameter': {
    status: 422,
    title: 'A parameter is refused',
    text: 'Each entry of errors names the query parameter or header, what is wrong with it and what would be accepted.',
    retryable: false,
  },
  'precondition-required': {
    status: 428,
    title: 'The change must say which version it is of',
    text: 'Send the ETag of the version that you read as If-Match, so that no change of somebody else is lost.',
    retryable: false,
  },
  'rate-limited': {
    status: 429,
    title: 'Too many calls in a short time',
    text: 'Wait for the time that Retry-After states.',
    retryable: true,
  },
  'too-many-at-once': {
    status: 429,
    title: 'Too many calls at once',
    text: 'A key may have 256 calls under way in a process of the service. Wait until some have been answered.',
    retryable: true,
  },
  'quota-exceeded': {
    status: 429,
    title: 'The points of this period are used up',
    text: 'The call needs more points than are left. resetsAt says when the next period starts.',
    retryable: false,
  },
  'header-too-large': {
    status: 431,
    title: 'The headers are too large',
    text: 'The request line and headers together may have at most 16 kB.',
    retryable: false,
  },
  internal: {
    status: 500,
    title: 'A fault of ours',
    text: 'The call failed for a reason that is not yours. It is on record under its request id, and costs nothing.',
    retryable: false,
  },
  'solve-too-slow': {
    status: 503,
    title: 'The solve took too long',
    text: 'A solve may take 10 seconds. The call costs nothing. Try later, or ask for fewer numbers.',
    retryable: true,
  },
  unavailable: {
    status: 503,
    title: 'The service is not ready',
    text: 'A part of the service does not answer just now. The call costs nothing.',
    retryable: true,
  },
} as const satisfies Record<string, ProblemDescription>

export type ProblemCode = keyof typeof problems
export const problemCodes = Object.keys(problems) as ProblemCode[]
export { domainCodes }

/** One entry of `errors`: what is refused, where it stands, and what would do. */
export type ProblemIssue = { code: DomainCode; detail: string; accepted?: string } & (
  { pointer: string } | { parameter: string } | { header: string }
)

interface Extras {
  errors?: readonly ProblemIssue[]
  /** Start of the next period. */
  resetsAt?: string
  headers?: Record<string, string>
}

/** A refusal or failure with a name; the error handler answers it as problem details. */
export class Problem extends Error {
  readonly code: ProblemCode
  readonly extras: Extras
  constructor(code: ProblemCode, detail?: string, extras: Extras = {}) {
    super(detail ?? problems[code].text)
    this.name = 'Problem'
    this.code = code
    this.extras = extras
  }
  get status(): number {
    return problems[this.code].status
  }
}

export interface ProblemDetails {
  type: string
  code: ProblemCode
  title: string
  status: number
  detail: string
  retryable: boolean
  requestId?: string
  resetsAt?: string
  errors?: readonly ProblemIssue[]
}

/** The body of RFC 9457 for a problem. */
export function problemDetails(problem: Problem, publicUrl: string, requestId?: string): ProblemDetails {
  const { status, title, retryable } = problems[problem.code]
  const { errors, resetsAt } = problem.extras
  return {
    type: `${publicUrl}/problems/${problem.code}`,
    code: problem.code,
    title,
    status,
    detail: problem.message,
    retryable,
    ...(requestId ? { requestId } : {}),
    ...(resetsAt ? { resetsAt } : {}),
    ...(errors ? { errors } : {}),
  }
}

/** A refused body, from the issues of a DomainError. */
export function invalidInput(issues: readonly Issue[]): Problem {
  return new Problem('invalid-input', issues[0]?.detail, { errors: issues })
}

/** A refused header. */
export function invalidHeader(header: string, detail: string, accepted: string): Problem {
  return new Problem('invalid-parameter', detail, { errors: [{ header, code: 'wrong-form', detail, accepted }] })
}

/** Refused query parameters, from the issues of a DomainError. */
export function invalidParameter(issues: readonly Issue[]): Problem {
  const errors = issues.map(({ pointer, ...rest }) => ({ parameter: parameterOf(pointer), ...rest }))
  return new Problem('invalid-parameter', issues[0]?.detail, { errors })
}

function parameterOf(pointer: string): string {
  const name = pointer.split('/')[1] ?? ''
  return name.replaceAll('~1', '/').replaceAll('~0', '~')
}
