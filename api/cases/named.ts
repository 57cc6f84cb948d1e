import type { Case } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { type CaseOperation, operationsOf } from '../../solvers/operations/index.ts'

/** A case by an id that is known to be one. */
export function caseNamed(id: string): Case {
  const found = cases.find((c) => c.id === id)
  if (!found) throw new Error(`there is no case ${id}`)
  return found
}

/** An operation of a case; undefined where the case has none of this id. */
export const operationNamed = (c: Case, id: string): CaseOperation | undefined =>
  operationsOf(c).find((o) => o.id === id)
