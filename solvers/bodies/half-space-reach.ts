import type { Check } from '../case.ts'
import { latestOf } from '../math/latest.ts'

/** 1 % of a step at the surface has arrived at so many times √(at): erfc(1.8214) = 0.01. */
export const REACH = 3.642772

/** Depth at which 1 % of a step at the surface has arrived after the latest time. */
export function penetrationDepth(diffusivity: number, times: readonly number[]): number {
  const longest = latestOf(times)
  return REACH * Math.sqrt(diffusivity) * Math.sqrt(longest)
}

/** Whether the change has come as far as the deepest place asked for; where it has not, the answer is the start. */
export function changeHasArrived(input: {
  diffusivity: number
  times: readonly number[]
  depths: readonly number[]
}): Check {
  const limit = penetrationDepth(input.diffusivity, input.times)
  const value = input.depths.reduce((most, depth) => Math.max(most, depth), 0)
  const text = 'The deepest position lies within the depth that 1 % of a surface step has reached at the last time.'
  return { id: 'change-has-arrived', holds: value <= limit, value, limit, text }
}
