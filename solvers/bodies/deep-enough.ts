import type { Check, Numbers } from '../case.ts'
import type { Warning } from '../warnings.ts'
import { penetrationDepth, REACH } from './half-space-reach.ts'
import { latestOf } from '../math/latest.ts'

/* How long a body with an end may be taken for one without, where its thickness is given. */

export interface Thin {
  id: string
  /** "The body", "The own body". */
  name: string
  /** Time at which its end is felt by 1 %. */
  until: number
  thickness: number
}

interface Asked {
  diffusivity: number
  times: readonly number[]
  thickness?: number
}

/** Until 1 % of a step at the face has arrived at the far one: at/L² = 0.0754. */
function ownEnd({ diffusivity, thickness }: Asked): Thin[] {
  if (thickness === undefined) return []
  const root = thickness / REACH
  return [{ id: 'body-deep-enough', name: 'The body', until: (root / diffusivity) * root, thickness }]
}

export function halfSpaceNumbers(input: Asked): Numbers {
  const until = ownEnd(input).map((thin) => thin.until)
  return {
    penetrationDepth: penetrationDepth(input.diffusivity, input.times),
    ...(until.length === 0 ? {} : { validUntil: until[0]! }),
  }
}

export function deepCheck(times: readonly number[], { id, name, until }: Thin): Check {
  const value = latestOf(times)
  const text = `${name} feels less than 1 % of its far face at the last time.`
  return { id, holds: value <= until, value, limit: until, text }
}

export const deepEnough = (input: Asked): Check[] => ownEnd(input).map((thin) => deepCheck(input.times, thin))

export function thinWarnings(times: readonly number[], { name, until }: Thin): Warning[] {
  if (latestOf(times) <= until) return []
  const text = `${name} feels its far face after ${until} s; later answers are those of a deeper one. A heated or backed surface keeps rising.`
  return [{ code: 'body-too-thin', text, value: until }]
}

export const depthWarnings = (input: Asked): Warning[] =>
  ownEnd(input).flatMap((thin) => thinWarnings(input.times, thin))

/** A body that ends, its far face insulated, changes faster than one that goes on. */
export const errsIfThin = ({ thickness }: { thickness?: number }) => (thickness === undefined ? undefined : 'late')
