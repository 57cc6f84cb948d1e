import type { components } from '../openapi.d.ts'

/** One call of a batch. */
export interface BatchLine {
  /** Repeated in the answer to the line. */
  id: string
  case: string
  /** solve unless it is named. */
  operation?: string
  input: Record<string, unknown>
}

/** The answer to a line of a batch; id is null where the line could not be read. */
export type BatchAnswer =
  | { id: string; status: 200; points: number; answer: Record<string, unknown> }
  | { id: string | null; status: number; problem: Problem }

export interface BatchSummary {
  ok: number
  failed: number
  points: number
}

/** What the service says of a call that it refuses, by RFC 9457. Match `code`; the texts may change. */
export type Problem = components['schemas']['Problem']

/** A call that was refused. */
export class ProblemError extends Error {
  override readonly name = 'ProblemError'
  readonly problem: Problem

  constructor(problem: Problem) {
    super(problem.detail)
    this.problem = problem
  }
}

/** An answer of many lines that ended before its summary. What came before it is right, and the batch was charged. */
export class CutError extends Error {
  override readonly name = 'CutError'

  constructor(cause?: unknown) {
    super('The answer ended before its summary.', { cause })
  }
}

export const linesOf = (lines: Iterable<BatchLine>): string =>
  Array.from(lines, (line) => `${JSON.stringify(line)}\n`).join('')

/** The answers as they come, and the summary in the end. Throws a CutError where there is none. */
export async function* readBatch(response: Response): AsyncGenerator<BatchAnswer, BatchSummary> {
  for await (const line of linesIn(response)) {
    const value = JSON.parse(line) as BatchAnswer | { summary: BatchSummary }
    if ('summary' in value) return value.summary
    yield value
  }
  throw new CutError()
}

async function* linesIn(response: Response): AsyncGenerator<string> {
  const decoder = new TextDecoder()
  const reader = response.body?.getReader()
  let rest = ''
  try {
    for (let part = await reader?.read(); part && !part.done; part = await reader?.read()) {
      const lines = (rest + decoder.decode(part.value, { stream: true })).split('\n')
      rest = lines.pop() ?? ''
      yield* lines
    }
  } catch (error) {
    throw new CutError(error)
  } finally {
    // A connection that broke cannot be cancelled, and was told of above.
    await reader?.cancel().catch(() => undefined)
  }
}
