/** How often, and how patiently, a call is made again. */
export interface Patience {
  /** Calls after the first, 3 unless given. */
  retries?: number
  /** In place of the fetch of the platform. */
  fetch?: (request: Request) => Promise<Response>
  /** In place of a timer, for tests. */
  wait?: (milliseconds: number) => Promise<void>
}

/** Milliseconds: a longer Retry-After is not waited for but handed to the caller. */
const LONGEST_WAIT = 60_000
const FIRST_WAIT = 500

/**
 * A fetch that makes a call again where the same call may succeed later: after a lost connection, a 503, and a 409 or 429
 * whose problem says `retryable`. It waits as long as Retry-After says, else ever longer by chance. A change without a key
 * of its own (Idempotency-Key) is not made again after a lost connection, for it may have been made.
 */
export function patientFetch({ retries = 3, fetch: send = fetch, wait = sleep }: Patience = {}) {
  return async (request: Request): Promise<Response> => {
    for (let attempt = 0; ; attempt++) {
      const isLast = attempt === retries
      const response = await send(request.clone()).catch((error: unknown) => {
        if (isLast || request.signal.aborted || !isRepeatable(request)) throw error
        return undefined
      })
      const delay = delayOf(response, attempt)
      if (response && (isLast || delay > LONGEST_WAIT || !(await isRetryable(response)))) return response
      await response?.body?.cancel()
      await wait(delay)
    }
  }
}

const isRepeatable = ({ method, headers }: Request) =>
  method === 'GET' || method === 'HEAD' || headers.has('Idempotency-Key')

async function isRetryable(response: Response): Promise<boolean> {
  if (![409, 429, 503].includes(response.status)) return false
  const problem = await response
    .clone()
    .json()
    .catch(() => undefined)
  // Whatever stands in front of the service answers 503 in its own words.
  return (problem as { retryable?: boolean } | undefined)?.retryable ?? response.status === 503
}

function delayOf(response: Response | undefined, attempt: number): number {
  const told = response?.headers.get('Retry-After')
  if (told && /^\d+$/.test(told)) return Number(told) * 1000
  return FIRST_WAIT * 2 ** attempt * (0.5 + Math.random() / 2)
}

const sleep = (milliseconds: number) => new Promise<void>((resolve) => setTimeout(resolve, milliseconds))
