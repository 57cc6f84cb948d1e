import type { SolveTask } from '../compute/compute.ts'
import type { Deps } from '../deps.ts'
import type { CallRecord, KeyCaller, Reply } from '../operation.ts'
import { FLOOR } from './limits.ts'

export function priceOf(points: number): number {
  return Math.max(FLOOR, Math.ceil(points))
}

/** Spends, then solves. A call that cannot be answered after it was charged gets its points back. */
export async function solveMetered(task: SolveTask, caller: KeyCaller, call: CallRecord, deps: Deps): Promise<Reply> {
  const points = priceOf(task.call.points)
  const { requestId } = call
  const { remaining } = await deps.meter.spend({
    requestId,
    accountId: caller.accountId,
    keyId: caller.keyId,
    caseId: task.case,
    points,
  })
  call.points = points
  try {
    const { text, etag } = await deps.compute.solve(task)
    return { text, etag, headers: { 'Points-Charged': String(points), 'Points-Remaining': String(remaining) } }
  } catch (error) {
    await deps.meter.refund(requestId)
    call.points = 0
    throw error
  }
}
