import type { Compute } from '../compute/compute.ts'
import { Problem } from '../problems.ts'
import { type AnsweredLines, type Counts, type LineTask, refusedLine } from './lines.ts'

/** Lines that a thread reads at a time: some ten milliseconds. */
const CHUNK = 200
/** Chunks of one batch that are computed at once, so that others find a thread as well. */
const AT_ONCE = 3

function chunksOf(batch: LineTask): LineTask[] {
  const count = Math.ceil(batch.lines.length / CHUNK)
  return Array.from({ length: count }, (_, n) => ({
    ...batch,
    lines: batch.lines.slice(n * CHUNK, (n + 1) * CHUNK),
  }))
}

/** Does work for a list, a few at once, and gives what comes of it in the order of the list. */
async function* inOrder<T, R>(list: readonly T[], work: (one: T) => Promise<R>): AsyncGenerator<R> {
  const begun: Promise<R>[] = []
  const begin = (one: T) => {
    const result = work(one)
    // It is waited for later, maybe never where an earlier one failed.
    result.catch(() => undefined)
    begun.push(result)
  }
  for (const one of list) {
    begin(one)
    if (begun.length === AT_ONCE) yield await (begun.shift() as Promise<R>)
  }
  for (const result of begun) yield await result
}

/** Reads all lines and sums their price. */
export async function priceBatch(batch: LineTask, compute: Compute): Promise<Counts> {
  const sum: Counts = { ok: 0, failed: 0, points: 0 }
  for await (const counts of inOrder(chunksOf(batch), compute.priceLines)) add(sum, counts)
  return sum
}

/** Milliseconds that the lines of a batch may take together; those that are not answered by then fail. */
const LIMIT = 60_000

/** Answers all lines in their order, piece by piece. */
export function answerBatch(batch: LineTask, compute: Compute, limit = LIMIT): AsyncGenerator<AnsweredLines> {
  const end = performance.now() + limit
  return inOrder(chunksOf(batch), async (task) =>
    performance.now() < end ? answerLines(task, compute) : failedLines(task, new Problem('solve-too-slow')),
  )
}

export function add(sum: Counts, { ok, failed, points }: Counts): void {
  sum.ok += ok
  sum.failed += failed
  sum.points += points
}

/* Where a chunk takes too long its halves are asked for, so that a line fails for itself alone. */
async function answerLines(task: LineTask, compute: Compute): Promise<AnsweredLines> {
  try {
    return await compute.answerLines(task)
  } catch (error) {
    if (!(error instanceof Problem)) throw error
    if (error.code !== 'solve-too-slow' || task.lines.length === 1) return failedLines(task, error)
    const middle = Math.ceil(task.lines.length / 2)
    const [first, second] = [
      await answerLines({ ...task, lines: task.lines.slice(0, middle) }, compute),
      await answerLines({ ...task, lines: task.lines.slice(middle) }, compute),
    ]
    const both = { ...first, text: first.text + second.text, faults: [...first.faults, ...second.faults] }
    add(both, second)
    return both
  }
}

function failedLines({ lines, publicUrl }: LineTask, problem: Problem): AnsweredLines {
  const texts = lines.map((line) => `${JSON.stringify(refusedLine(idIn(line), problem, publicUrl))}\n`)
  return { ok: 0, failed: lines.length, points: 0, faults: [], text: texts.join('') }
}

/* The line was not read here; whatever else is wrong with it, its id may be right. */
function idIn(line: string): string | null {
  try {
    const { id } = JSON.parse(line) as { id?: unknown }
    return typeof id === 'string' ? id : null
  } catch {
    return null
  }
}
