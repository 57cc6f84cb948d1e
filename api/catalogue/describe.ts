import { type Case, outputNamesOf, outputOf } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { cautions } from '../../solvers/cautions.ts'
import { type CaseOperation, operationsOf } from '../../solvers/operations/index.ts'
import { SOLVER_VERSION } from '../../solvers/version.ts'
import { warningCodes } from '../../solvers/warnings.ts'
import { FLOOR } from '../cases/limits.ts'
import { facetsAmong, facetsOf, familyTexts } from './facets.ts'
import { type FieldEntry, fieldsOf } from './fields.ts'

/** Where an operation of a case is asked. */
export function caseOperationPath(caseId: string, operationId: string): string {
  return `/v1/cases/${caseId}/${operationId}`
}

const fieldsByCase = new Map<string, FieldEntry[]>()

function knownFieldsOf(c: Case): FieldEntry[] {
  const known = fieldsByCase.get(c.id) ?? fieldsOf(c)
  fieldsByCase.set(c.id, known)
  return known
}

function operationOf(c: Case, o: CaseOperation) {
  return { id: o.id, title: o.title, summary: o.summary, method: 'POST', path: caseOperationPath(c.id, o.id) }
}

export function summaryOf(c: Case) {
  const { id, title, summary, family, sketch, weight, setUp } = c
  const operations = operationsOf(c).map((o) => operationOf(c, o))
  const facets = facetsOf(
    c,
    knownFieldsOf(c),
    operations.map((o) => o.id),
  )
  return { id, title, summary, family, sketch, facets, operations, weight, setUp, leastCharge: FLOOR }
}

export function descriptionOf(c: Case) {
  return {
    ...summaryOf(c),
    operations: operationsOf(c).map((o) => ({ ...operationOf(c, o), example: o.example(c) })),
    notes: c.notes,
    formula: [...c.formula],
    sources: [...c.sources],
    places: c.places,
    pointAxes: [...(c.pointAxes ?? [])],
    depthsEndAt: c.depthsEndAt ?? null,
    drive: c.drive ?? null,
    fields: knownFieldsOf(c),
    outputs: outputNamesOf(c).map((name) => ({ name, ...outputOf(c, name) })),
    absentOutputs: Object.entries(c.absentOutputs).map(([name, reason]) => ({ name, reason })),
    cautions: c.cautions.map((id) => ({ id, ...cautions[id] })),
    warnings: Object.entries(warningCodes).map(([code, entry]) => ({ code, ...entry })),
    example: c.example,
    variants: (c.variants ?? []).map(({ title, input }) => ({ title, input })),
    solver: SOLVER_VERSION,
  }
}

/** Every case in short, with what the list can be grouped and narrowed by. */
export function caseList() {
  const summaries = cases.map(summaryOf)
  const families = Object.entries(familyTexts)
    .filter(([id]) => summaries.some(({ family }) => family === id))
    .map(([id, texts]) => ({ id, ...texts }))
  return { cases: summaries, families, facets: facetsAmong(summaries.map(({ facets }) => facets)) }
}

const descriptions = new Map<string, ReturnType<typeof descriptionOf>>()

/** The whole description of a case, made once. */
export function describedCase(id: string) {
  const c = cases.find((one) => one.id === id)
  if (!c) return undefined
  const known = descriptions.get(id) ?? descriptionOf(c)
  descriptions.set(id, known)
  return known
}
