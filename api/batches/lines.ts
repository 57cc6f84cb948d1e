import { z } from 'zod'
import { cases } from '../../solvers/cases/index.ts'
import { DomainError } from '../../solvers/errors.ts'
import { withOwnMaterials } from '../../solvers/materials/own-material.ts'
import { type Call, operationsOf } from '../../solvers/operations/index.ts'
import { MAX_POINTS } from '../../solvers/operations/price.ts'
import { parse } from '../../solvers/statement/validate.ts'
import { parseJson } from '../http/json.ts'
import { readable } from '../http/readable.ts'
import type { OwnMaterials } from '../operation.ts'
import { invalidInput, Problem, type ProblemDetails, problemDetails } from '../problems.ts'

/** Lines that one batch may hold. */
export const MOST_LINES = 10_000

/** Lines of a batch as they stand in its body, and what reading them needs. */
export interface LineTask {
  lines: readonly string[]
  own: OwnMaterials
  publicUrl: string
}

export interface Counts {
  ok: number
  failed: number
  points: number
}

export interface AnsweredLines extends Counts {
  /** The answers, a line each. */
  text: string
  /** What went wrong in a solver, for the log. */
  faults: string[]
}

/** The answer to one line; a problem of a line has no request of its own. */
export type LineAnswer =
  | { id: string | null; status: 200; points: number; answer: object }
  | { id: string | null; status: number; problem: ProblemDetails }

/** One call of a batch, before its own input is read. */
const lineSchema = z.strictObject({
  id: z.string().min(1).max(200),
  case: z.string().max(100),
  operation: z.string().max(100).default('solve'),
  input: z.record(z.string(), z.unknown()),
})

/** A refused line, with its id where that could be read. */
class LineProblem extends Error {
  readonly id: string | null
  readonly problem: Problem

  constructor(id: string | null, problem: Problem) {
    super(problem.message)
    this.id = id
    this.problem = problem
  }
}

interface Read {
  id: string | null
  call: Call
}

/** A line as a call, validated whole and priced. Throws a LineProblem. */
function readLine(text: string, own: OwnMaterials): Read {
  let id: string | null = null
  try {
    const raw = parseJson(new TextEncoder().encode(text))
    id = idOf(raw)
    return { id, call: callOf(raw, own) }
  } catch (error) {
    if (error instanceof DomainError) throw new LineProblem(id, invalidInput(error.issues))
    if (error instanceof Problem) throw new LineProblem(id, error)
    throw error
  }
}

/** The id is given back even where the rest of the line is refused. */
function idOf(raw: unknown): string | null {
  const parsed = z.object({ id: lineSchema.shape.id }).safeParse(raw)
  return parsed.success ? parsed.data.id : null
}

function callOf(raw: unknown, own: OwnMaterials): Call {
  const line = parse(lineSchema, raw)
  const c = cases.find(({ id }) => id === line.case)
  if (!c) throw new Problem('not-found', `There is no case "${line.case}".`)
  const o = operationsOf(c).find(({ id }) => id === line.operation)
  if (!o) throw new Problem('not-found', `There is no operation "${line.operation}" of ${c.id}.`)
  const call = within('#/input', () => o.prepare(c, withOwnMaterials(line.input, own), 'compact'))
  if (call.points > MAX_POINTS)
    throw new Problem('too-many-points', `The line needs ${call.points} points; one line may need ${MAX_POINTS}.`)
  return call
}

/** A line's pointers start at the line, so that those of a refused input pass through its member. */
function within<T>(prefix: string, prepare: () => T): T {
  try {
    return prepare()
  } catch (error) {
    if (!(error instanceof DomainError)) throw error
    throw new DomainError(error.issues.map((issue) => ({ ...issue, pointer: prefix + issue.pointer.slice(1) })))
  }
}

export function refusedLine(id: string | null, problem: Problem, publicUrl: string): LineAnswer {
  return { id, status: problem.status, problem: readable(problemDetails(problem, publicUrl)) }
}

/** Answers one line; what fails in a solver fails alone, and is told to `onFault`. */
export function answerLine(
  text: string,
  { own, publicUrl }: Pick<LineTask, 'own' | 'publicUrl'>,
  onFault: (error: unknown) => void,
): LineAnswer {
  let id: string | null = null
  try {
    const read = readLine(text, own)
    id = read.id
    return { id, status: 200, points: read.call.points, answer: read.call.run() }
  } catch (error) {
    if (error instanceof LineProblem) return refusedLine(error.id, error.problem, publicUrl)
    onFault(error)
    return refusedLine(id, new Problem('internal'), publicUrl)
  }
}

/** Counts an answer into a sum. */
export function count(sum: Counts, answered: LineAnswer): void {
  if ('answer' in answered) {
    sum.ok++
    sum.points += answered.points
  } else sum.failed++
}

/** Reads and prices lines; a line that is refused counts as failed and costs nothing. */
export function priceLines({ lines, own }: LineTask): Counts {
  const counts: Counts = { ok: 0, failed: 0, points: 0 }
  for (const text of lines)
    try {
      counts.points += readLine(text, own).call.points
      counts.ok++
    } catch (error) {
      if (!(error instanceof LineProblem)) throw error
      counts.failed++
    }
  return counts
}

/** Answers lines, a line each, in their order. */
export function answerLines(task: LineTask): AnsweredLines {
  const counts: Counts = { ok: 0, failed: 0, points: 0 }
  const faults: string[] = []
  const texts = task.lines.map((text) => {
    const answered = answerLine(text, task, (error) => faults.push((error as Error).stack ?? String(error)))
    count(counts, answered)
    return `${JSON.stringify(answered)}\n`
  })
  return { ...counts, faults, text: texts.join('') }
}

/** The lines of a body: as they stand, blank ones passed over. */
export function linesOf(text: string): string[] {
  return text.split(/\r?\n/).filter((line) => line.trim() !== '')
}
