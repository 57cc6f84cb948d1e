import { createHash } from 'node:crypto'
import { z } from 'zod'
import type { Case, Resolved } from '../case.ts'
import { cautions } from '../cautions.ts'
import { materialWarnings } from '../materials/material-warnings.ts'
import { numberCatalogue } from '../number-catalogue.ts'
import { SOLVER_VERSION } from '../version.ts'
import type { Warning } from '../warnings.ts'
import { unusualValues } from './unusual-values.ts'

/* What every answer of a case holds beside its result. */

export const detailField = z.enum(['full', 'compact']).optional().meta({
  title: 'Detail',
  description: 'Detail: full, or compact (result, bound and warning codes only).',
  'x-accepted': 'full or compact',
})

export const boundSchema = z.strictObject({ absolute: z.number(), relative: z.number() }).meta({ id: 'Bound' })

/* What is the same in every answer has a name, so that the documents hold it once. */

const numbersSchema = z
  .strictObject(
    Object.fromEntries(
      Object.entries(numberCatalogue).map(([name, { unit, series, text }]) => [
        name,
        (series ? z.array(z.number()) : z.number()).optional().meta({ description: `${text} Unit ${unit}.` }),
      ]),
    ),
  )
  .meta({ id: 'AnswerNumbers' })
const checkSchema = z
  .strictObject({ id: z.string(), holds: z.boolean(), value: z.number(), limit: z.number(), text: z.string() })
  .meta({ id: 'AnswerCheck' })
const warningSchema = z
  .strictObject({ code: z.string(), text: z.string(), value: z.number() })
  .meta({ id: 'AnswerWarning' })
const cautionSchema = z
  .strictObject({ id: z.string(), version: z.number(), text: z.string() })
  .meta({ id: 'AnswerCaution' })

/** What stands before the result of an answer, and after it. */
export const headOf = (c: Case, operation: string) => ({
  case: z.literal(c.id),
  operation: z.literal(operation),
  solver: z.string().meta({ description: 'Version of the numbers.' }),
  points: z.number().meta({ description: 'Priced points of this answer, before the floor of a call.' }),
  input: z
    .record(z.string(), z.unknown())
    .meta({ description: 'The input as used: SI, with defaults and derived properties.' }),
})

export const accuracyScope = {
  kind: z.enum(['proved', 'estimated']).meta({
    description: 'How the bound was made: proved, or counted term by term and held by tests (estimated).',
  }),
  scope: z.literal('numerical'),
  note: z.string(),
}

export const tail = {
  numbers: numbersSchema,
  checks: z.array(checkSchema),
  warnings: z.array(warningSchema),
  cautions: z.array(cautionSchema),
  sources: z.array(z.string()),
  errs: z.enum(['early', 'late']).optional().meta({
    description:
      'Where the case simplifies the body that was stated: whether its answers reach a temperature early or late.',
  }),
  conservativeSide: z
    .string()
    .optional()
    .meta({ description: 'Of a question: which side of its answer is the conservative one, by what it is asked for.' }),
}

/** The compact form of an answer whose full form is known. */
export function compactOf(full: z.ZodObject): z.ZodObject {
  const { result, accuracy } = full.shape as { result: z.ZodType; accuracy: z.ZodObject }
  return z.strictObject({
    result,
    accuracy: z.strictObject({ bound: accuracy.shape['bound'] as z.ZodType }),
    warnings: z.array(z.string()),
  })
}

/** Longer series of the input are echoed as count and digest. */
const ECHO_LIMIT = 100

export function shortened(value: unknown): unknown {
  if (!Array.isArray(value) || value.length <= ECHO_LIMIT) return value
  return { count: value.length, digest: 'sha-256=' + createHash('sha256').update(JSON.stringify(value)).digest('hex') }
}

/** The input as echoed: what is known of it, long series in short. */
export function echoOf(input: Record<string, unknown>): Record<string, unknown> {
  return Object.fromEntries(
    Object.entries(input)
      .filter(([, value]) => value !== undefined)
      .map(([name, value]) => [name, shortened(value)]),
  )
}

export const scopeOf = {
  kind: 'estimated',
  scope: 'numerical',
  note: 'Inputs and model decide the real error; see uncertainty. This bound is of the arithmetic alone.',
} as const

export function warningsOf(c: Case, input: Resolved, echoed: Record<string, unknown>): Warning[] {
  return [...c.warnings(input), ...materialWarnings(echoed), ...unusualValues(c, echoed)]
}

/** Everything that follows the accuracy of an answer. */
export function tailOf(c: Case, input: Resolved, warnings: readonly Warning[], conservativeSide?: string) {
  const errs = c.errs?.(input)
  return {
    numbers: c.numbers(input),
    checks: c.checks(input),
    warnings,
    cautions: c.cautions.map((id) => ({ id, ...cautions[id] })),
    sources: [...c.sources],
    ...(errs === undefined ? {} : { errs }),
    ...(conservativeSide === undefined ? {} : { conservativeSide }),
  }
}

export function headed(c: Case, operation: string, points: number, input: Record<string, unknown>) {
  return { case: c.id, operation, solver: SOLVER_VERSION, points, input: echoOf(input) }
}
