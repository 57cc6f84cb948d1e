import { z } from 'zod'
import type { Case } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { DomainError } from '../../solvers/errors.ts'
import { withOwnMaterials } from '../../solvers/materials/own-material.ts'
import { type Call, caseOperations, operationsOf } from '../../solvers/operations/index.ts'
import { parse } from '../../solvers/statement/validate.ts'
import { caseNamed, operationNamed } from '../cases/named.ts'
import { parseJson } from '../http/json.ts'
import { readable } from '../http/readable.ts'
import type { OwnMaterials } from '../operation.ts'
import { invalidInput, Problem, problemDetails } from '../problems.ts'

/** Lines that one batch may hold. */
export const MOST_LINES = 10_000

/** Lines of a batch as they stand in its body, and what reading them needs. */
export interface LineTask {
  lines: readonly string[]
  /** Number of the first of them in the body, from 1. */
  first: number
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

const caseIds = cases.map((c) => c.id)
const operationIds = caseOperations.map((o) => o.id)

/** One call of a batch, before its own input is read. */
export const lineSchema = z.strictObject({
  id: z.string().min(1).max(100).meta({
    title: 'Id',
    description: 'Id: the name of the line, repeated in its answer.',
    'x-accepted': '1 to 100 characters',
  }),
  case: z.enum(caseIds as [string, ...string[]]).meta({
    title: 'Case',
    description: 'Case: one of the catalogue.',
    'x-accepted': 'the id of a case',
  }),
  operation: z
    .enum(operationIds as [string, ...string[]])
    .default('solve')
    .meta({
      title: 'Operation',
      description: `Operation: ${operationIds.join(', ')}. Default solve.`,
      'x-accepted': operationIds.join(', '),
    }),
  input: z.record(z.string(), z.unknown()).meta({
    title: 'Input',
    description: 'Input: the body that the case takes for this operation. Its detail is compact unless it says full.',
    'x-accepted': 'the body of the operation, an object',
  }),
})

interface Read {
  id: string | null
  call: Call
}

/** A line as a call, validated whole and priced. Throws a LineProblem. */
function readLine(text: string, number: number, own: OwnMaterials): Read {
  let id: string | null = null
  try {
    const raw = parseJson(new TextEncoder().encode(text))
    id = idOf(raw)
    const line = parse(lineSchema, raw)
    const c = caseNamed(line.case)
    const o = operationNamed(c, line.operation)
    if (!o) throw notOfCase(c, line.operation)
    return { id, call: within('input', () => o.prepare(c, withOwnMaterials(line.input, own), 'compact')) }
  } catch (error) {
    throw new LineProblem(id, toProblem(error, number))
  }
}

class LineProblem extends Error {
  readonly id: string | null
  readonly problem: Problem

  constructor(id: string | null, problem: Problem) {
    super(problem.message)
    this.id = id
    this.problem = problem
  }
}

const idOf = (raw: unknown): string | null => {
  const id = (raw as { id?: unknown } | null)?.id
  return typeof id === 'string' && id.length <= 100 ? id : null
}

const notOfCase = (c: Case, operation: string) =>
  new DomainError([
    {
      pointer: '#/operation',
      code: 'not-in-list',
      detail: `${c.id} has no ${operation}.`,
      accepted: operationsOf(c)
        .map((o) => o.id)
        .join(', '),
    },
  ])

/** Issues of the input are told by their place in the line. */
function within<T>(name: string, work: () => T): T {
  try {
    return work()
  } catch (error) {
    if (!(error instanceof DomainError)) throw error
    throw new DomainError(error.issues.map((one) => ({ ...one, pointer: one.pointer.replace(/^#/, `#/${name}`) })))
  }
}

function toProblem(error: unknown, number: number): Problem {
  if (error instanceof DomainError) return invalidInput(error.issues)
  if (error instanceof Problem) return new Problem(error.code, `Line ${number}: ${error.message}`, error.extras)
  throw error
}

/** Reads and prices lines; a line that is refused counts as failed and costs nothing. */
export function priceLines({ lines, first, own }: LineTask): Counts {
  const counts: Counts = { ok: 0, failed: 0, points: 0 }
  lines.forEach((text, i) => {
    try {
      counts.points += readLine(text, first + i, own).call.points
      counts.ok++
    } catch (error) {
      if (!(error instanceof LineProblem)) throw error
      counts.failed++
    }
  })
  return counts
}

/** Answers lines, a line each, in their order. What fails in a solver fails alone, and its points are not counted. */
export function answerLines({ lines, first, own, publicUrl }: LineTask): AnsweredLines {
  const counts: Counts = { ok: 0, failed: 0, points: 0 }
  const faults: string[] = []
  const failed = (id: string | null, problem: Problem) => {
    counts.failed++
    return JSON.stringify({ id, status: problem.status, problem: readable(problemDetails(problem, publicUrl)) })
  }
  const answers = lines.map((text, i) => {
    let read: Read | undefined
    try {
      read = readLine(text, first + i, own)
      const answer = read.call.run()
      counts.ok++
      counts.points += read.call.points
      return JSON.stringify({ id: read.id, status: 200, points: read.call.points, answer })
    } catch (error) {
      if (error instanceof LineProblem) return failed(error.id, error.problem)
      faults.push((error as Error).stack ?? String(error))
      return failed(read?.id ?? null, new Problem('internal'))
    }
  })
  return { ...counts, faults, text: answers.map((answer) => `${answer}\n`).join('') }
}

/** The lines of a body: as they stand, blank ones passed over. */
export function linesOf(text: string): string[] {
  return text.split(/\r?\n/).filter((line) => line.trim() !== '')
}
