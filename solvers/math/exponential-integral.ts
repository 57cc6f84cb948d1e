const EULER = 0.5772156649015329

/**
 * Exponential integral of the first order.
 *
 *   E₁(u) = ∫ᵤ^∞ e^(−s)/s ds
 *
 * Shapes    a number.
 * Units     none.
 * Domain    u > 0, from 1e-300; Infinity gives 0.
 * Accuracy  relative error ≤ 20ε below 1, where −γ − ln u + u − u²/4 + … cancels by a factor of up to 8; ≤ 8ε from there on,
 *           beside what the rounding of u itself moves, (1 + u)ε.
 * Errors    none: it is finite and never negative.
 * Source    M. Abramowitz, I. A. Stegun, Handbook of Mathematical Functions, 5.1.11 (series), 5.1.22 (continued
 *           fraction, with every term positive).
 */
export function exponentialIntegral(u: number): number {
  if (u < 1) return series(u)
  return Math.exp(-u) * scaledExponentialIntegral(u)
}

/** e^u·E₁(u) for u ≥ 1. */
export function scaledExponentialIntegral(u: number): number {
  // 1/(u + 1/(1 + 1/(u + 2/(1 + 2/(u + …)))))
  let tail = 0
  for (let k = Math.ceil(12 + 90 / u); k >= 1; k--) tail = k / (1 + k / (u + tail))
  return 1 / (u + tail)
}

function series(u: number): number {
  let power = -1
  let sum = 0
  for (let n = 1; n < 24; n++) {
    power *= -u / n
    sum += power / n
    if (Math.abs(power) < 1e-18 * sum) break
  }
  return sum - EULER - Math.log(u)
}
