import type { Body } from './body.ts'
import { trySolve } from './solve.ts'

/** Temperatures for a drawing: one row a time where there are places, one list where there are none. */
export async function gridValues(caseId: string, body: Body, signal: AbortSignal): Promise<number[][]> {
  const answer = await trySolve(caseId, { ...body, outputs: ['temperature'], detail: 'compact' }, signal)
  return answer.result.temperature as number[][]
}
