import { z } from 'zod'
import type { Case, Resolved } from '../case.ts'
import { accuracyScope, boundSchema, headed, headOf, scopeOf, tail, tailOf, warningsOf } from './envelope.ts'

/* The answer of an operation that looks along a curve for a time or a place. */

interface Found {
  points: number
  compact: boolean
  echoed: Record<string, unknown>
  /** The case at what was found, for its numbers and checks. */
  resolved: Resolved
  units: Record<string, string>
  result: Record<string, unknown>
  bound: Record<string, { absolute: number; relative: number }>
  conservativeSide: string
}

export function foundAnswer(c: Case, operation: string, found: Found) {
  const { points, compact, echoed, resolved, units, result, bound } = found
  const warnings = warningsOf(c, resolved, echoed)
  if (compact) return { result, accuracy: { bound }, warnings: warnings.map((w) => w.code) }
  return {
    ...headed(c, operation, points, echoed),
    units,
    result,
    accuracy: { method: ['root'], bound, ...scopeOf },
    ...tailOf(c, resolved, warnings, found.conservativeSide),
  }
}

/** Its schema, with a bound for each of some parts of the result. */
export const foundSchema = (c: Case, operation: string, result: z.ZodRawShape, bounded: readonly string[]) =>
  z.strictObject({
    ...headOf(c, operation),
    units: z.record(z.string(), z.string()).meta({ description: 'UCUM code of each number.' }),
    result: z.strictObject(result),
    accuracy: z.strictObject({
      method: z.array(z.string()),
      bound: z.strictObject(Object.fromEntries(bounded.map((name) => [name, boundSchema]))),
      ...accuracyScope,
    }),
    ...tail,
  })
