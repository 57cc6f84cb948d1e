import type { z } from 'zod'
import type { Case } from '../case.ts'
import { solve } from './solve.ts'

/** One call, validated whole and priced, not yet computed. */
export interface Call {
  /** Numbers it will answer. */
  values: number
  /** Numbers it will write: those, or its axes where they are longer. */
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
  input(c: Case): z.ZodObject
  answer(c: Case): z.ZodType
  compactAnswer(c: Case): z.ZodType
  example(c: Case): Record<string, unknown>
  /** Throws DomainError for anything the call may not ask; after it, run() cannot refuse. */
  prepare(c: Case, body: unknown, defaultDetail: 'full' | 'compact'): Call
}

export const caseOperations: readonly CaseOperation[] = [solve]
