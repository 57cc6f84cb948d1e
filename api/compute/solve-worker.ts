import { DomainError } from '../../solvers/errors.ts'
import { withOwnMaterials } from '../../solvers/materials/own-material.ts'
import { type Call, caseOperations } from '../../solvers/operations/index.ts'
import { cases } from '../../solvers/cases/index.ts'
import { parseJson } from '../http/json.ts'
import { type Rendered, render } from '../http/render.ts'
import type { OwnMaterials } from '../operation.ts'
import { Problem, invalidInput } from '../problems.ts'
import type { Priced } from './compute.ts'

/* Lines of a batch, read and answered in a thread as well. */
export { answerLines, priceLines } from '../batches/lines.ts'

interface Names {
  case: string
  operation: string
  own: OwnMaterials
}

/** A priced call, or what a Problem is made of: errors lose their kind on the way between threads. */
export type Prepared = { call: Priced } | { refusal: ConstructorParameters<typeof Problem> }

function callOf(task: Names, body: unknown): Call {
  const c = cases.find((one) => one.id === task.case)
  const o = caseOperations.find((one) => one.id === task.operation)
  if (!c || !o) throw new Error(`there is no ${task.operation} of ${task.case}`)
  return o.prepare(c, withOwnMaterials(body, task.own), 'full')
}

/** Runs in a thread: reads a body, validates it whole and prices it. */
export function prepare(task: Names & { bytes: Uint8Array }): Prepared {
  try {
    const { run: _, ...call } = callOf(task, parseJson(task.bytes))
    return { call }
  } catch (error) {
    const problem = error instanceof DomainError ? invalidInput(error.issues) : error
    if (!(problem instanceof Problem)) throw problem
    return { refusal: [problem.code, problem.message, problem.extras] }
  }
}

/** Runs in a thread: the call again from its body, and the answer as text. */
export default function solve(task: Names & { raw: unknown }): Rendered {
  return render(callOf(task, task.raw instanceof Uint8Array ? parseJson(task.raw) : task.raw).run())
}
