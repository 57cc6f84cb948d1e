import type { Numbers } from '../case.ts'

/* What it takes for a face that is held to stand for one in a fluid. Source: own comparison of both series, all three shapes. */

/** 2/(Bi + 2) of the time is 1 % from there on. */
const BIOT = 198
/** 1 − u of the surface of a half space is 1/(√π·h√(at)/k), 1 % from there on. */
const REACHED = 56.41895835477563

/** Of a slab, cylinder or sphere, and of products by their least size. */
export function heldNumbers(
  { conductivity, surfaceTemperature }: { conductivity: number; surfaceTemperature?: number },
  length: number,
): Numbers {
  return surfaceTemperature === undefined ? {} : { filmForHeldFace: (BIOT * conductivity) / length }
}

/** Of a half space, from the first time asked for on. */
export function heldHalfSpaceNumbers(input: {
  conductivity: number
  diffusivity: number
  times: readonly number[]
}): Numbers {
  const first = input.times.reduce((least, t) => (t > 0 ? Math.min(least, t) : least), Infinity)
  const film = (REACHED * input.conductivity) / (Math.sqrt(input.diffusivity) * Math.sqrt(first))
  return first < Infinity && Number.isFinite(film) ? { filmForHeldFace: film } : {}
}
