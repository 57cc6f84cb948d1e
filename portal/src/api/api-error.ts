import { type FormWords, inFormWords } from './form-words.ts'
import type { Refusal } from './refusal.ts'
import type { Who } from './signed-in.ts'

/** What the service says of a call it refused or failed. */
export interface ProblemBody {
  code: string
  title: string
  status: number
  detail: string
  retryable: boolean
  requestId?: string
  errors?: readonly ProblemIssue[]
}

export interface ProblemIssue {
  code: string
  detail: string
  accepted?: string
  pointer?: string
  parameter?: string
}

/** The one kind of failure a query or a change can have. */
export class ApiError extends Error {
  /** Undefined where no answer arrived. */
  readonly problem: ProblemBody | undefined
  /** Seconds to wait before the same call may succeed. */
  readonly retryAfter: number | undefined
  /** Whose session the call was made with. */
  readonly who: Who
  readonly at = Date.now()
  constructor(problem: ProblemBody | undefined, retryAfter?: number, who: Who = 'member') {
    super(problem?.detail ?? 'No answer arrived.')
    this.name = 'ApiError'
    this.problem = problem
    this.retryAfter = retryAfter
    this.who = who
  }
  get status(): number {
    return this.problem?.status ?? 0
  }
  /** When the same call may be sent again; 0 for at once. */
  get notBefore(): number {
    return this.retryAfter === undefined ? 0 : this.at + this.retryAfter * 1000
  }
  /** Whether the very same call may succeed later. */
  get worthRepeating(): boolean {
    return !this.problem || this.problem.retryable || this.status >= 500
  }
}

interface Result<D> {
  data?: D
  error?: unknown
  response: Response
}

/** The data of an answer, or an ApiError. */
export const unwrap = async <D>(call: Promise<Result<D>>): Promise<D> => (await unwrapTagged(call)).data

/** The same with the tag of its version, which a change of it names. */
export async function unwrapTagged<D>(call: Promise<Result<D>>): Promise<{ data: D; etag: string }> {
  const result = await call.catch((cause: unknown) => {
    if (cause instanceof DOMException && cause.name === 'AbortError') throw cause
    throw new ApiError(undefined)
  })
  const { ok, headers } = result.response
  if (ok) return { data: result.data as D, etag: headers.get('etag') ?? '' }
  throw new ApiError(problemOf(result.error, result.response), secondsOf(result.response), whoseCall(result.response))
}

function whoseCall({ url }: Response): Who {
  return new URL(url, globalThis.location.origin).pathname.startsWith('/support/') ? 'staff' : 'member'
}

function problemOf(error: unknown, response: Response): ProblemBody {
  if (typeof error === 'object' && error !== null && 'code' in error) return error as ProblemBody
  const title = `The service answered ${response.status}`
  return { code: 'unknown', title, status: response.status, detail: `${title}.`, retryable: response.status >= 500 }
}

function secondsOf(response: Response): number | undefined {
  const seconds = Number(response.headers.get('retry-after') ?? NaN)
  return Number.isFinite(seconds) ? seconds : undefined
}

export function refusalsOf(error: unknown, words: FormWords): Refusal[] {
  const issues = error instanceof ApiError ? (error.problem?.errors ?? []) : []
  return issues.map(({ pointer, detail, accepted }) => ({
    path: pointer?.replace(/^#?\/?/, '') ?? '',
    text: inFormWords(accepted ? `${detail} Accepted: ${accepted}.` : detail, words),
  }))
}

/** The refusal of each field, by the first part of its pointer, in the words of the form. */
export function issuesByField(error: unknown, words: FormWords): Record<string, string> {
  const fields: Record<string, string> = {}
  for (const { path, text } of refusalsOf(error, words)) fields[path.split('/')[0] ?? ''] ??= text
  return fields
}
