import { z } from 'zod'
import { BODY_LIMIT, MAX_POINTS } from '../api/cases/limits.ts'
import { parseJson } from '../api/http/json.ts'
import { Problem, type ProblemDetails, invalidInput, problemDetails } from '../api/problems.ts'
import { cases } from '../solvers/cases/index.ts'
import { DomainError } from '../solvers/errors.ts'
import { operationsOf } from '../solvers/operations/index.ts'
import { parse } from '../solvers/statement/validate.ts'
import { type Line, linesOf } from './lines.ts'

const lineSchema = z.strictObject({
  id: z.string().min(1).max(200),
  case: z.string().max(100),
  operation: z.string().max(100),
  input: z.record(z.string(), z.unknown()),
})

type Answer = { id: string | null; status: 200; points: number; answer: object }
type Refusal = { id: string | null; status: number; problem: ProblemDetails }

/** Answers a stream of lines, one for one and in order; the last line sums up, and a stream without it was cut. */
export async function* solveLines(input: AsyncIterable<Uint8Array>, publicUrl: string): AsyncGenerator<string> {
  const summary = { ok: 0, failed: 0, points: 0 }
  for await (const line of linesOf(input, BODY_LIMIT)) {
    const answered = answerLine(line, publicUrl)
    if ('answer' in answered) {
      summary.ok++
      summary.points += answered.points
    } else summary.failed++
    yield JSON.stringify(answered)
  }
  yield JSON.stringify({ summary })
}

function answerLine(line: Line, publicUrl: string): Answer | Refusal {
  let id: string | null = null
  try {
    const raw = read(line)
    id = idOf(raw)
    return { id, status: 200, ...solveOne(raw) }
  } catch (error) {
    const problem = problemOf(error)
    return { id, status: problem.status, problem: problemDetails(problem, publicUrl) }
  }
}

function read(line: Line): unknown {
  if ('text' in line) return parseJson(new TextEncoder().encode(line.text))
  if (line.fault === 'too-long') throw new Problem('body-too-large')
  throw new Problem('malformed-json', 'The line is not UTF-8.')
}

/** The id is given back even where the rest of the line is refused. */
function idOf(raw: unknown): string | null {
  const parsed = z.object({ id: lineSchema.shape.id }).safeParse(raw)
  return parsed.success ? parsed.data.id : null
}

function solveOne(raw: unknown): { points: number; answer: object } {
  const line = parse(lineSchema, raw)
  const asked = cases.find(({ id }) => id === line.case)
  if (!asked) throw new Problem('not-found', `There is no case "${line.case}".`)
  const operation = operationsOf(asked).find(({ id }) => id === line.operation)
  if (!operation) throw new Problem('not-found', `There is no operation "${line.operation}" of ${asked.id}.`)
  const call = within('#/input', () => operation.prepare(asked, line.input, 'compact'))
  if (call.points > MAX_POINTS)
    throw new Problem('too-many-points', `The line needs ${call.points} points; one line may need ${MAX_POINTS}.`)
  return { points: call.points, answer: call.run() }
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

function problemOf(error: unknown): Problem {
  if (error instanceof Problem) return error
  if (error instanceof DomainError) return invalidInput(error.issues)
  console.error(error)
  return new Problem('internal')
}
