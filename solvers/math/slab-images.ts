import {
  completed,
  completedError,
  ENERGY_ERROR,
  energyFraction,
  fluxError,
  fluxFraction,
  remaining,
  REMAINING_ERROR,
} from './convective-half-space.ts'
import { ierfcx } from './ierfcx.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'
import type { FilmedBody, Moment } from './unit-body.ts'

/*
 * A slab behind a film at short times: two half spaces, at δ and at its mirror image 2 − δ. Both reflections beyond
 * are left out; they are at most e^(−(1 + δ)/Fo) of the response, which every error below includes.
 *
 * Source   H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §12.5 (solution for small times).
 */

interface Arguments {
  near: number
  far: number
  beta: number
  truncation: number
}

function argumentsAt({ biot, deltas, inner }: FilmedBody, j: number, m: Moment): Arguments {
  return {
    near: deltas[j]! / (2 * m.root),
    far: (1 + inner[j]!) / (2 * m.root),
    beta: biot * m.root,
    truncation: Math.exp(-(1 + deltas[j]!) / m.fourier),
  }
}

export function completedByImages(body: FilmedBody, j: number, m: Moment): Estimate {
  const { near, far, beta, truncation } = argumentsAt(body, j, m)
  const a = completed(near, beta)
  const b = completed(far, beta)
  const value = Math.min(1, a + b)
  const error = completedError(near) * a + completedError(far) * b + value * (truncation + EPS) + TINY
  return { value, error, method: 'two-image' }
}

export function remainingByImages(body: FilmedBody, j: number, m: Moment): Estimate {
  const { near, far, beta, truncation } = argumentsAt(body, j, m)
  const a = remaining(near, beta)
  const b = completed(far, beta)
  const change = completed(near, beta) + b
  const error = REMAINING_ERROR * a + completedError(far) * b + change * truncation + TINY
  return { value: Math.min(1, Math.max(0, a - b)), error, method: 'two-image' }
}

/** q/(h·ΔT). Of flux the neglected reflection is at most four times what it is of the response. */
export function fluxByImages(body: FilmedBody, j: number, m: Moment): Estimate {
  const { near, far, beta, truncation } = argumentsAt(body, j, m)
  const a = fluxFraction(near, beta)
  const b = fluxFraction(far, beta)
  const shift = EPS * body.shifts[j]! && fluxShift(body, j, m, { near, beta, a })
  const error = fluxError(near) * a + fluxError(far) * b + 4 * a * truncation + shift + TINY
  return { value: body.inner[j] === 0 ? 0 : a - b, error: Math.min(1, error), method: 'two-image' }
}

/** The largest flux within the rounding of a depth that is reckoned from the far face. */
export function steepestFlux(body: FilmedBody, j: number, m: Moment): number {
  const nearest = Math.max(0, body.deltas[j]! - EPS * body.shifts[j]!)
  return fluxFraction(nearest / (2 * m.root), body.biot * m.root) * 1.01
}

/** What that rounding moves the flux by: its slope, or all of it where the rounding is not small against the depth reached. */
function fluxShift(body: FilmedBody, j: number, m: Moment, at: { near: number; beta: number; a: number }): number {
  const shift = EPS * body.shifts[j]!
  if (shift > 0.05 * m.root) return steepestFlux(body, j, m)
  const decay = at.near > 27.5 ? 0 : Math.exp(-at.near * at.near)
  return (1.2 * shift * (at.near * at.a + decay * ierfcx(at.near + at.beta))) / m.root
}

export function heatByImages({ biot }: FilmedBody, m: Moment): Estimate {
  const value = Math.min(1, biot * m.fourier * energyFraction(biot * m.root))
  const error = value * (ENERGY_ERROR + 14 * EPS + 2 * Math.exp(-1 / m.fourier)) + TINY
  return { value, error, method: 'two-image' }
}
