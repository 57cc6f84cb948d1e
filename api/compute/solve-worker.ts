import { cases } from '../../solvers/cases/index.ts'
import { caseOperations } from '../../solvers/operations/index.ts'
import { type Rendered, render } from '../http/render.ts'

/** Runs in a thread: the call again from its body, and the answer as text. */
export default function solve(task: { case: string; operation: string; raw: unknown }): Rendered {
  const c = cases.find((one) => one.id === task.case)
  const o = caseOperations.find((one) => one.id === task.operation)
  if (!c || !o) throw new Error(`there is no ${task.operation} of ${task.case}`)
  return render(o.prepare(c, task.raw, 'full').run())
}
