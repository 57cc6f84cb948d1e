import { unwrap } from '../api/api-error.ts'
import { portalApi } from '../api/clients.ts'
import type { Body } from './body.ts'
import type { paths } from '../../../openapi/portal.d.ts'

type TryPath = Extract<keyof paths, `/portal/v1/try/${string}`>
type SolvePath = Extract<TryPath, `${string}/solve`>
/** Answers by dimensionless numbers have fractions alone; the pages never ask for them. */
type WithTemperature<A> = A extends { result: infer R } ? ('temperature' extends keyof R ? A : never) : never
type AnyAnswer = WithTemperature<paths[SolvePath]['post']['responses'][200]['content']['application/json']>

/** An answer in full. */
export type Answer = Extract<AnyAnswer, { case: string }>
export type CompactAnswer = Exclude<AnyAnswer, { case: string }>

/** Solves without a key. The path names the case; that its body fits is for the service to say. */
export function trySolve(caseId: string, body: Body, signal?: AbortSignal): Promise<AnyAnswer> {
  const path = `/portal/v1/try/${caseId}/solve` as SolvePath
  return unwrap(portalApi.POST(path, { body: body as never, ...(signal ? { signal } : {}) })) as Promise<AnyAnswer>
}

/** Asks another question of a case without a key. What its answer holds depends on the question. */
export function tryQuestion(caseId: string, operationId: string, body: Body): Promise<unknown> {
  const path = `/portal/v1/try/${caseId}/${operationId}` as TryPath
  return unwrap(portalApi.POST(path, { body: body as never }))
}

export function isFull(answer: AnyAnswer): answer is Answer {
  return 'case' in answer
}
