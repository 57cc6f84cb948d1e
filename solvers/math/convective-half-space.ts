import erf from '@stdlib/math-base-special-erf'
import erfcx from '@stdlib/math-base-special-erfcx'
import { gauss } from './gauss.ts'
import { ierfcx } from './ierfcx.ts'
import { EPS } from './rounding.ts'

/*
 * Response of a half space at 0 whose fluid steps to 1, in η = x/(2√(at)) and β = h√(at)/k.
 *
 *   completed  u = erfc(η) − e^(2ηβ + β²)·erfc(η + β) = e^(−η²)·[erfcx(η) − erfcx(η + β)]
 *   perFilm    u/β, 2·ierfc(η) where β = 0: what a flux absorbed at the face does, in units of √(at)/k
 *   remaining  1 − u = erf(η) + e^(−η²)·erfcx(η + β)
 *   flux       q/(h·ΔT) = e^(−η²)·erfcx(η + β)
 *   energy     Q/(h·ΔT·t) = [erfcx(β) − 1 + 2β/√π]/β²
 *
 * Source   H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §2.7. The book's form overflows
 *          for β > 26; the scaled one does not.
 */

const TWO_OVER_SQRT_PI = 1.1283791670955126

/** e^(−η²) underflows beyond. */
const FAR = 27.5

/** u(η, β). Relative error within completedError(η). Domain η ≥ 0, β ≥ 0. */
export function completed(eta: number, beta: number): number {
  if (eta > FAR) return 0
  return Math.exp(-eta * eta) * scaledDifference(eta, beta)
}

/** u/β without dividing by a β that may be 0. Relative error within completedError(η). */
export function completedPerFilm(eta: number, beta: number): number {
  if (eta > FAR) return 0
  const decay = Math.exp(-eta * eta)
  if (beta >= Math.max(0.7, eta)) return (decay * (erfcx(eta) - erfcx(eta + beta))) / beta
  return decay * 2 * (beta === 0 ? ierfcx(eta) : gauss(ierfcx, eta, beta) / beta)
}

/** erfcx(η) − erfcx(η + β), by quadrature of −erfcx′ = 2·ierfcx where the difference would cancel. */
function scaledDifference(eta: number, beta: number): number {
  if (beta >= Math.max(0.7, eta)) return erfcx(eta) - erfcx(eta + beta)
  return 2 * gauss(ierfcx, eta, beta)
}

export function remaining(eta: number, beta: number): number {
  return erf(eta) + fluxFraction(eta, beta)
}

export function fluxFraction(eta: number, beta: number): number {
  if (eta > FAR) return 0
  return Math.exp(-eta * eta) * erfcx(eta + beta)
}

/** Q/(h·ΔT·t); 1 where β = 0. */
export function energyFraction(beta: number): number {
  if (beta >= 1) return (erfcx(beta) - 1 + TWO_OVER_SQRT_PI * beta) / beta / beta
  // Σ (−β)ⁿ/Γ(n/2 + 2): the three terms above cancel as β → 0, the series does not.
  let even = 1
  let odd = -beta / 1.329340388179137
  let sum = even + odd
  for (let n = 2; n < 60; n += 2) {
    even *= (beta * beta) / (n / 2 + 1)
    odd *= (beta * beta) / ((n + 1) / 2 + 1)
    sum += even + odd
    if (even < EPS * sum) break
  }
  return sum
}

/*
 * Largest relative errors. η and β carry the rounding of up to eight decimal inputs and operations: 8ε and 10ε.
 * Beside it stands the library's own error, amplified where two terms are subtracted.
 */
export function completedError(eta: number): number {
  const near = Math.min(eta, FAR)
  return EPS * (70 + 17 * near * near)
}
export function fluxError(eta: number): number {
  const near = Math.min(eta, FAR)
  return EPS * (24 + 17 * near * near)
}
export const REMAINING_ERROR = 24 * EPS
export const ENERGY_ERROR = 36 * EPS
