/** From here on the asymptotic series reach double precision before their terms grow. */
const ASYMPTOTIC = 25

/**
 * Bessel functions J₀ and J₁ of one real argument.
 *
 *   below 25   J_(k−1) = (2k/x)·J_k − J_(k+1)   downward from where J_k is negligible, normalised by J₀ + 2·(J₂ + J₄ + …) = 1
 *   beyond     √(2/(πx))·(P cos χ − Q sin χ), χ = x − π/4 or x − 3π/4, with Hankel's P and Q
 *
 * Shapes    a number in, two out.
 * Units     none.
 * Domain    0 ≤ x ≤ 1000.
 * Accuracy  absolute error ≤ ε(8 + x)·√(J₀² + J₁²): what the rounding of x itself moves; of J₁ below 1 relative 8ε.
 * Errors    none. The recurrence takes about x + 7x^(1/3) + 18 steps.
 * Source    M. Abramowitz, I. A. Stegun, Handbook of Mathematical Functions (1964), 9.1.27, 9.1.46, 9.12, example 1, and 9.2.5 to 9.2.10 (from
 *           memory).
 */
export function besselJ01(x: number): { j0: number; j1: number } {
  if (x < 1e-4) return { j0: 1 - (x * x) / 4, j1: (x / 2) * (1 - (x * x) / 8) }
  return x < ASYMPTOTIC ? byRecurrence(x) : byHankel(x)
}

function byRecurrence(x: number): { j0: number; j1: number } {
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

/** The cosine and sine of χ from those of x, so that no rounding of x − π/4 turns them. */
function byHankel(x: number): { j0: number; j1: number } {
  const cos = Math.cos(x)
  const sin = Math.sin(x)
  const size = 1 / Math.sqrt(Math.PI * x)
  const zero = hankelSums(x, 0)
  const one = hankelSums(x, 4)
  return {
    j0: size * (zero.p * (cos + sin) - zero.q * (sin - cos)),
    j1: size * (one.p * (sin - cos) + one.q * (sin + cos)),
  }
}

/** P and Q, by the terms Π(4ν² − (2k − 1)²)/(k!·(8x)^k), of which every second changes its sign. */
function hankelSums(x: number, fourOrdersSquared: 0 | 4): { p: number; q: number } {
  let p = 1
  let q = 0
  let term = 1
  for (let k = 1; k <= 24; k++) {
    term *= (fourOrdersSquared - (2 * k - 1) * (2 * k - 1)) / (8 * k * x)
    const signed = (k & 2) === 0 ? term : -term
    if ((k & 1) === 0) p += signed
    else q += signed
    if (Math.abs(term) < 1e-18) break
  }
  return { p, q }
}
