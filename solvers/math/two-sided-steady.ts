import { EPS } from './rounding.ts'
import type { Drive, Face, TwoSidedBody } from './two-sided-body.ts'

/** c₀ + c₁X − s·X²/2, with what its coefficients may be off. */
export interface SteadyProfile {
  at(X: number): number
  slopeAt(X: number): number
  mean: number
  error: number
  /** Of the slope; without what heat released in the body adds, which is exact. */
  slopeError: number
}

/**
 * The steady profile between two faces, of which one at least holds or passes heat. A slope that is zero by the drives is zero
 * to the last digit, so that what decays towards it can be told from it.
 *
 *   −αc₁ + βc₀ = d₁,   α₂(c₁ − s) + β₂(c₀ + c₁ − s/2) = d₂
 */
export function steadyProfile(
  { left, right }: TwoSidedBody,
  drives: { left: Drive; right: Drive; source: number },
): SteadyProfile {
  const { source } = drives
  const divisor = left.beta + left.alpha * right.beta
  const other = drives.right.value + source * (right.alpha + right.beta / 2)
  const c0 = (drives.left.value + left.alpha * other) / divisor
  const c1 = (left.beta * other - right.beta * drives.left.value) / divisor
  const size = Math.abs(drives.left.value) + Math.abs(drives.right.value) + Math.abs(source)
  const slope = Math.abs(left.beta * other) + Math.abs(right.beta * drives.left.value)
  const slack = left.beta * drives.right.slack + right.beta * drives.left.slack
  return {
    at: (X) => c0 + X * (c1 - (source * X) / 2),
    slopeAt: (X) => c1 - source * X,
    mean: c0 + c1 / 2 - source / 6,
    error: (24 * EPS * size * (1 + left.alpha)) / divisor,
    slopeError: (EPS * (24 * slope + 1.5 * slack)) / divisor + 8 * EPS * Math.abs(source),
  }
}

/** Whether there is a steady state whatever the drives: one face holds or passes heat. */
export const settles = ({ left, right }: TwoSidedBody): boolean => left.beta > 0 || right.beta > 0

/**
 * Flux into the body at a face from the temperature there, or from the slope: by the law of the face where its film is weak, since
 * the slope is then the small difference of large ones.
 */
export function inwardFlux(face: Face, drive: number, temperature: number, inward: number): number {
  return face.beta <= face.alpha ? (drive - face.beta * temperature) / face.alpha : inward
}
