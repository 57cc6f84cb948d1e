import erfcx from '@stdlib/math-base-special-erfcx'

const INVERSE_SQRT_PI = 0.5641895835477563

/**
 * Scaled first integral of the complementary error function, which is −erfcx′/2.
 *
 *   ierfcx(x) = 1/√π − x·erfcx(x) = e^(x²)·∫ₓ^∞ erfc(s) ds
 *
 * Shapes    a number.
 * Units     none.
 * Domain    x ≥ −26; Infinity gives 0.
 * Accuracy  relative error ≤ 100ε below 1.5, where the difference cancels by a factor of up to 7; ≤ 6ε from there on. Below 0 nothing cancels.
 * Errors    none: it is finite and never negative.
 * Source    M. Abramowitz, I. A. Stegun, Handbook of Mathematical Functions, 7.1.14 (continued fraction), 7.2.5.
 */
export function ierfcx(x: number): number {
  if (x < 1.5) return INVERSE_SQRT_PI - x * erfcx(x)
  // √π·erfcx(x) = 1/(x + w) with the continued fraction w = (1/2)/(x + 1/(x + (3/2)/(x + …))); so 1 − x/(x + w) = w/(x + w).
  let tail = 0
  for (let k = fractionDepth(x); k >= 1; k--) tail = k / 2 / (x + tail)
  return (INVERSE_SQRT_PI * tail) / (x + tail)
}

/** Levels after which the continued fraction no longer changes in double precision. */
function fractionDepth(x: number): number {
  return Math.ceil(8 + 62 / x + 110 / (x * x))
}
