import type { z } from 'zod'
import type { Case } from '../case.ts'
import { chart } from './chart.ts'
import { costOf } from './cost.ts'
import { depthReached } from './depth-reached.ts'
import { extremes } from './extremes.ts'
import { solve } from './solve.ts'
import { timeToReach } from './time-to-reach.ts'

/** One call, validated whole and priced, not yet computed. */
export interface Call {
  /** Numbers it will answer. */
  values: number
  /** Numbers it will compute or write, or its axes where they are longer: whether it is worth a thread. */
  size: number
  /** Priced points, before the floor of an HTTP call. */
  points: number
  run(): object
}

/** Something that can be asked of a case, written once for all of them. */
export interface CaseOperation {
  id: string
  title: string
  summary: string
  /** Whether it makes sense for the case, by its description alone. */
  applies(c: Case): boolean
  /** Its price in words; 'free' where nothing is charged. */
  price(c: Case): string
  input(c: Case): z.ZodObject
  answer(c: Case): z.ZodType
  /** Absent where there is nothing to leave out. */
  compactAnswer?(c: Case): z.ZodType
  /** A second way to ask, with an answer of its own; absent where the case has none. */
  other?(c: Case): { input: z.ZodObject; answer: z.ZodObject } | undefined
  example(c: Case): Record<string, unknown>
  /** Throws DomainError for anything the call may not ask; after it, run() cannot refuse. */
  prepare(c: Case, body: unknown, defaultDetail: 'full' | 'compact'): Call
}

const priced = [solve, timeToReach, depthReached, extremes, chart]

export const caseOperations: readonly CaseOperation[] = [...priced, costOf(priced)]

export function operationsOf(c: Case): CaseOperation[] {
  return caseOperations.filter((o) => o.applies(c))
}
