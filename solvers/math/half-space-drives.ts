import erf from '@stdlib/math-base-special-erf'
import erfcx from '@stdlib/math-base-special-erfcx'
import { type After, decayOf, FAR, isSmooth, leastError, overPulse, responseError } from './half-space-pulse.ts'
import { i2erfcx } from './i2erfcx.ts'
import { ierfcx } from './ierfcx.ts'
import { EPS, type Estimate } from './rounding.ts'

/*
 * Half space at 0 while a drive acts on its face, and after the drive has ended; η = x/(2√(at)).
 *
 *   step   erfc(η)          a unit of surface temperature; of flux also the local flux it leaves
 *   root   2√t·ierfc(η)     its integral with 1/√(πt) at the face: temperature under a flux, flux under a ramp
 *   ramp   4t·i²erfc(η)     the integral of step over time: temperature under a ramp
 *
 * Accuracy  relative responseError(η), and after the drive what the rounding of t − d moves.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §2.4, §2.5, §2.9.
 */

const SQRT_PI = 1.772453850905516

const closed = (value: number, error: number): Estimate => ({ value, error, method: 'closed-form' })

export function stepDuring(eta: number): Estimate {
  const value = decayOf(eta) * erfcx(eta)
  return closed(value, responseError(eta) * value + leastError(eta))
}

export function rootDuring(eta: number, root: number): Estimate {
  const value = 2 * root * decayOf(eta) * ierfcx(eta)
  return closed(value, responseError(eta) * value + root * leastError(eta))
}

export function rampDuring(eta: number, time: number): Estimate {
  const value = 4 * time * decayOf(eta) * i2erfcx(eta)
  return closed(value, responseError(eta) * value + time * leastError(eta))
}

/** The later response less the earlier, each off by its own share, and what the rounding of t − d moves. */
function less(later: Estimate, earlier: Estimate, slack: number): Estimate {
  return closed(later.value - earlier.value, later.error + earlier.error + slack)
}

function smooth(at: After, size: number, kernel: (v: number) => number): Estimate {
  const value = size * decayOf(at.eta) * overPulse(at, kernel)
  return closed(value, responseError(at.eta) * value + size * leastError(at.eta))
}

/** ∫ (η/√π)·v^(−3/2)·e^(−η²/v) dv where smooth. */
export function stepAfter(at: After): Estimate {
  const { eta, etaSince } = at
  if (isSmooth(at)) return smooth(at, eta / SQRT_PI, (v) => 1 / (v * Math.sqrt(v)))
  // Near the face both are close to 1, and their distance from 1 is what differs.
  if (eta < 0.5) return closed(erf(etaSince) - erf(eta), 14 * EPS * (erf(etaSince) + erf(eta)) + stepSlack(at))
  return less(stepDuring(eta), stepDuring(etaSince), stepSlack(at))
}

/** ∂erfc/∂t = η·e^(−η²)/(√π·t), at its steepest; where t − d is all rounding, all that is left of the step. */
function stepSlack({ etaSince, etaLeast, slack, rootSince }: After): number {
  const all = decayOf(etaLeast) * erfcx(etaLeast)
  const since = rootSince * rootSince
  if (!(slack < 0.01 * since)) return etaSince === 0 ? 0 : all
  return Math.min(all, (1.02 * slack * etaSince * decayOf(etaLeast)) / (SQRT_PI * since))
}

/** √t·∫ v^(−1/2)·e^(−η²/v) dv/√π where smooth. */
export function rootAfter(at: After, root: number): Estimate {
  if (isSmooth(at)) return smooth(at, root / SQRT_PI, (v) => 1 / Math.sqrt(v))
  const slack = (decayOf(at.etaLeast) * at.rootSlack * 2) / SQRT_PI
  return less(rootDuring(at.eta, root), rootDuring(at.etaSince, at.rootSince), slack)
}

/** 2(√t − √(t − d))/√π, its value at the face. */
export function rootAfterAtFace(at: After, duration: number, root: number): Estimate {
  const sum = root + at.rootSince
  const value = ((duration / sum) * 2) / SQRT_PI
  return closed(value, value * (16 * EPS + at.rootSlack / sum))
}

/** t·∫ erfc(η/√v) dv where smooth. */
export function rampAfter(at: After, time: number): Estimate {
  if (isSmooth(at)) return smooth(at, time, (v) => erfcx(at.eta / Math.sqrt(v)))
  const since = at.rootSince * at.rootSince
  const slack = at.slack * decayOf(at.etaLeast) * erfcx(at.etaLeast)
  return less(rampDuring(at.eta, time), rampDuring(at.etaSince, since), slack)
}

/** η at a place and moment, kept where e^(−η²) can still be told from 0. */
export const etaOf = (depth: number, rootDiffusivity: number, root: number): number =>
  Math.min(FAR, depth / (2 * rootDiffusivity * root))
