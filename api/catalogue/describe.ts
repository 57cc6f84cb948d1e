import { z } from 'zod'
import { type Case, outputNamesOf, outputOf } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { cautions } from '../../solvers/cautions.ts'
import { caseOperations } from '../../solvers/operations/index.ts'
import { solve } from '../../solvers/operations/solve.ts'
import { SOLVER_VERSION } from '../../solvers/version.ts'
import { warningCodes } from '../../solvers/warnings.ts'
import { FLOOR } from '../cases/limits.ts'

/** Where an operation of a case is asked. */
export function caseOperationPath(caseId: string, operationId: string): string {
  return `/v1/cases/${caseId}/${operationId}`
}

export function summaryOf(c: Case) {
  const { id, title, summary, family, sketch, weight, setUp } = c
  const operations = caseOperations.map((o) => ({
    id: o.id,
    title: o.title,
    summary: o.summary,
    method: 'POST',
    path: caseOperationPath(id, o.id),
  }))
  return { id, title, summary, family, sketch, operations, weight, setUp, leastCharge: FLOOR }
}

function fieldsOf(c: Case) {
  const schema = z.toJSONSchema(solve.input(c), { io: 'input' })
  const required = new Set(schema.required)
  return Object.entries(schema.properties ?? {}).map(([name, property]) => {
    const field = property as Record<string, unknown>
    const entries = { title: field['title'], symbol: field['x-symbol'], unit: field['x-ucum'], hint: field['x-hint'] }
    const more = { accepted: field['x-accepted'], typical: field['x-typical'] }
    const known = Object.entries({ ...entries, ...more }).filter(([, value]) => value !== undefined)
    return { name, required: required.has(name), ...Object.fromEntries(known), schema: field }
  })
}

export function descriptionOf(c: Case) {
  return {
    ...summaryOf(c),
    notes: c.notes,
    formula: [...c.formula],
    sources: [...c.sources],
    places: c.places,
    pointAxes: [...(c.pointAxes ?? [])],
    depthsEndAt: c.depthsEndAt ?? null,
    drive: c.drive ?? null,
    fields: fieldsOf(c),
    outputs: outputNamesOf(c).map((name) => ({ name, ...outputOf(c, name) })),
    absentOutputs: Object.entries(c.absentOutputs).map(([name, reason]) => ({ name, reason })),
    cautions: c.cautions.map((id) => ({ id, ...cautions[id] })),
    warnings: Object.entries(warningCodes).map(([code, entry]) => ({ code, ...entry })),
    example: c.example,
    variants: (c.variants ?? []).map(({ title, input }) => ({ title, input })),
    solver: SOLVER_VERSION,
  }
}

export const caseSummaries = () => cases.map(summaryOf)
const descriptions = new Map<string, ReturnType<typeof descriptionOf>>()

/** The whole description of a case, made once. */
export function describedCase(id: string) {
  const c = cases.find((one) => one.id === id)
  if (!c) return undefined
  const known = descriptions.get(id) ?? descriptionOf(c)
  descriptions.set(id, known)
  return known
}
