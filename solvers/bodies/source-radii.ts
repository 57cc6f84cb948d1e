import type { Check, Numbers } from '../case.ts'
import type { Issue } from '../errors.ts'

/** A source has no size: at it the temperature is infinite, so radii begin at less than an atom. */
const LEAST = 1e-12

export function refuseAtSource(radii: readonly number[], refuse: (issue: Issue) => void): void {
  radii.forEach((radius, j) => {
    if (radius >= LEAST) return
    const detail = `At the source itself there is no temperature; this radius is ${radius} m.`
    refuse({ pointer: `#/radii/${j}`, code: 'depth-outside-body', detail, accepted: `a radius from ${LEAST} m on` })
  })
}

/** Fourier numbers of the smallest radius asked for. */
export function fourierAtNearest(input: { diffusivity: number; radii: readonly number[]; times: readonly number[] }) {
  const length = input.radii.reduce((least, r) => Math.min(least, r), Infinity)
  // √a·√t/r first: a·t can vanish, and its square over r² need not.
  const fourier = input.times.map((t) => ((Math.sqrt(input.diffusivity) * Math.sqrt(t)) / length) ** 2)
  return { fourier, length }
}

/** Time from which a straight line over ln t has the right slope to 1 % at the largest radius: 4at/r² = 100. */
export function logarithmFrom({ diffusivity, radii }: { diffusivity: number; radii: readonly number[] }): Numbers {
  const farthest = radii.reduce((most, r) => Math.max(most, r), 0)
  const validFrom = ((25 * farthest) / diffusivity) * farthest
  return farthest > 0 ? { validFrom } : {}
}

/** 4at/r² of the earliest time after 0 at the largest radius, which tells how good the logarithm is. */
export function lateForLogarithm(input: {
  diffusivity: number
  radii: readonly number[]
  times: readonly number[]
}): Check[] {
  const earliest = input.times.reduce((least, t) => (t > 0 ? Math.min(least, t) : least), Infinity)
  const farthest = input.radii.reduce((most, r) => Math.max(most, r), 0)
  if (earliest === Infinity || farthest === 0) return []
  const value = ((2 * Math.sqrt(input.diffusivity) * Math.sqrt(earliest)) / farthest) ** 2
  const text =
    'At the first time and the largest radius 4at/r² is at least 100: a straight line over ln t has the right slope to 1 %. This answer holds in any case.'
  return [{ id: 'late-for-logarithm', holds: value >= 100, value, limit: 100, text }]
}
