import type { Call } from '../../solvers/operations/index.ts'
import { chargeOf } from '../../solvers/operations/price.ts'
import type { SolveTask } from '../compute/compute.ts'
import type { Deps } from '../deps.ts'
import type { RecordedCall } from '../http/record.ts'
import type { KeyCaller, Reply } from '../operation.ts'
import { Problem } from '../problems.ts'

/** Numbers of a call so small that it is solved before it is charged: about a millisecond, no more than its checks. */
const SMALL = 200

/** Spends and solves. Whenever the process dies, the points of a call that was not answered come back. */
export async function solveMetered(task: SolveTask, caller: KeyCaller, call: RecordedCall, deps: Deps): Promise<Reply> {
  if (call.replayed) return replay(task, caller, call, deps)
  const points = chargeOf(task.call.points)
  const { requestId, reference } = call
  const { accountId, keyId } = caller
  const charge = { requestId, accountId, keyId, caseId: task.case, points, ...(reference ? { reference } : {}) }
  const pay = isSmall(task.call) ? solveThenPay : payThenSolve
  const answer = await pay(task, charge, call, deps)
  call.points = points
  return { ...answer, headers: { 'Points-Charged': String(points) } }
}

/* Paid before, so it only counts as a call. */
async function replay(
  task: SolveTask,
  caller: KeyCaller,
  call: RecordedCall,
  { compute, meter }: Deps,
): Promise<Reply> {
  const { accountId, keyId } = caller
  call.limits = (await meter.spend({ requestId: call.requestId, accountId, keyId, points: 0 })).headers
  return { ...(await compute.solve(task)), headers: { 'Points-Charged': '0' } }
}

const isSmall = ({ size, points }: Call) => Math.max(size, points) <= SMALL

type Charge = Parameters<Deps['meter']['spend']>[0]

/* The answer is there when the charge is committed, so that nothing but its way to the client can be lost. */
async function solveThenPay(task: SolveTask, charge: Charge, call: RecordedCall, { compute, meter }: Deps) {
  const answer = await compute.solve(task)
  refuseGone(call)
  call.limits = (await meter.spend(charge)).headers
  return answer
}

/* A long solve is paid before; its charge stays open until the answer is there, and an open one is not lost. */
async function payThenSolve(task: SolveTask, charge: Charge, call: RecordedCall, { compute, meter }: Deps) {
  refuseGone(call)
  call.limits = (await meter.spend({ ...charge, open: true })).headers
  try {
    const answer = await compute.solve(task)
    await meter.close(charge.requestId)
    return answer
  } catch (error) {
    await meter.refund(charge.requestId)
    throw error
  }
}

export function refuseGone({ gone }: RecordedCall): void {
  if (gone) throw new Problem('malformed-request', 'The client hung up before the call was charged.')
}
