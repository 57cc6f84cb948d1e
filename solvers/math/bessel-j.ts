/**
 * Bessel functions J₀ and J₁ of one real argument.
 *
 *   J_(k−1) = (2k/x)·J_k − J_(k+1)   downward from where J_k is negligible, normalised by J₀ + 2·(J₂ + J₄ + …) = 1
 *
 * Shapes    a number in, two out.
 * Units     none.
 * Domain    0 ≤ x ≤ 1000.
 * Accuracy  absolute error ≤ ε(8 + x)·√(J₀² + J₁²): what the rounding of x itself moves; of J₁ below 1 relative 8ε.
 * Errors    none. The recurrence takes about x + 7x^(1/3) + 18 steps.
 * Source    M. Abramowitz, I. A. Stegun, Handbook of Mathematical Functions (1964), 9.1.27, 9.1.46 and 9.12, example 1 (from memory).
 */
export function besselJ01(x: number): { j0: number; j1: number } {
  if (x < 1e-4) return { j0: 1 - (x * x) / 4, j1: (x / 2) * (1 - (x * x) / 8) }
  let above = 0
  let here = 1e-300
  let evens = 0
  for (let k = 2 * Math.ceil((x + 18 + 7 * Math.cbrt(x)) / 2); k > 0; k--) {
    if (k % 2 === 0) evens += 2 * here
    const below = ((2 * k) / x) * here - above
    above = here
    here = below
    if (Math.abs(here) > 1e250) {
      above *= 1e-250
      here *= 1e-250
      evens *= 1e-250
    }
  }
  return { j0: here / (evens + here), j1: above / (evens + here) }
}
