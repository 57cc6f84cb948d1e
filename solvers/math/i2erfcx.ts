import erfcx from '@stdlib/math-base-special-erfcx'
import { ierfcx } from './ierfcx.ts'

const TWO_OVER_SQRT_PI = 1.1283791670955126

/**
 * Scaled second integral of the complementary error function.
 *
 *   i2erfcx(x) = e^(x²)·∫ₓ^∞ ierfc(s) ds = ¼·[erfcx(x) − 2x·ierfcx(x)]
 *
 * Shapes    a number.
 * Units     none.
 * Domain    x ≥ 0; Infinity gives 0.
 * Accuracy  relative error ≤ 100ε below 1, where the difference cancels by a factor of up to 3; ≤ 8ε from there on.
 * Errors    none: for x ≥ 0 it is finite and never negative.
 * Source    M. Abramowitz, I. A. Stegun, Handbook of Mathematical Functions, 7.2.5: iⁿ⁻² = 2x·iⁿ⁻¹ + 2n·iⁿ, run
 *           backward on the ratios of neighbours, where every term is positive.
 */
export function i2erfcx(x: number): number {
  if (x < 1) return (erfcx(x) - 2 * x * ierfcx(x)) / 4
  let ratio = 0
  for (let n = ratioDepth(x); n >= 3; n--) ratio = 1 / (2 * x + 2 * n * ratio)
  const second = ratio
  const first = 1 / (2 * x + 4 * second)
  const zeroth = 1 / (2 * x + 2 * first)
  return TWO_OVER_SQRT_PI * zeroth * first * second
}

/** Levels after which the ratios no longer change in double precision. */
function ratioDepth(x: number): number {
  return Math.ceil(15 + 93 / x + 165 / (x * x))
}
