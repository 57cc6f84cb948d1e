import { z } from 'zod'
import type { Case } from '../../solvers/case.ts'
import type { CaseOperation } from '../../solvers/operations/index.ts'

const pascal = (id: string) => id.replace(/(^|-)(.)/g, (_, __, letter: string) => letter.toUpperCase())

/* Named once each, so that the documents refer to them by name. */
const inputs = new Map<string, z.ZodType>()
const answers = new Map<string, z.ZodType>()

/** What is asked, or the other way to ask it. */
export function inputOf(c: Case, o: CaseOperation): z.ZodType {
  const id = `${pascal(c.id)}${pascal(o.id)}Input`
  const known = inputs.get(id) ?? withOther(o.input(c).meta({ id, example: o.example(c) }), id, o.other?.(c)?.input)
  inputs.set(id, known)
  return known
}

/** The answer in full, or compact where the body asked for that. */
export function answerOf(c: Case, o: CaseOperation): z.ZodType {
  const id = `${pascal(c.id)}${pascal(o.id)}Answer`
  const known = answers.get(id) ?? withOther(eitherOf(id, o.answer(c), o.compactAnswer?.(c)), id, o.other?.(c)?.answer)
  answers.set(id, known)
  return known
}

function eitherOf(id: string, full: z.ZodType, compact: z.ZodType | undefined): z.ZodType {
  return compact ? z.union([full.meta({ id }), compact.meta({ id: id.replace(/Answer$/, 'CompactAnswer') })]) : full
}

function withOther(schema: z.ZodType, id: string, other: z.ZodObject | undefined): z.ZodType {
  return other ? z.union([schema, other.meta({ id: id.replace(/(Input|Answer)$/, 'Dimensionless$1') })]) : schema
}
