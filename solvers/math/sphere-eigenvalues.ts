/**
 * Roots of 1 − z·cot z = Bi, the eigenvalues of a sphere with a film.
 *
 *   z − mπ − atan2(z, 1 − Bi) = 0,   m = 0, 1, 2, …   by Newton
 *   below Bi = 1 the first by z²/(3 − z²/(5 − z²/(7 − …))) = Bi, where the difference above would cancel
 *
 * Shapes    the root number m, in (mπ, mπ + π).
 * Units     none.
 * Domain    Bi > 0, from 1e-25 to 1e20; m ≥ 0.
 * Accuracy  relative error ≤ 4ε.
 * Errors    none. The loops end after at most 20 steps; from the starts below seven suffice.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §9.4; the fraction is Lambert's for tan z.
 */
export function sphereEigenvalue(biot: number, m: number): number {
  return m === 0 && biot < 1 ? smallRoot(biot) : eigenvalue(biot, m)
}

function eigenvalue(biot: number, m: number): number {
  const base = m * Math.PI
  const signed = biot - 1
  let z = base + Math.atan2(base + 2, -signed)
  for (let step = 0; step < 20; step++) {
    const next = z - (z - base - Math.atan2(z, -signed)) / (1 + signed / (signed * signed + z * z))
    if (Math.abs(next - z) <= 4e-16 * z) return next
    z = next
  }
  return z
}

/** Newton in y = z² on y·f(y) = Bi; the slope is (1 − f·(1 − yf))/2. */
function smallRoot(biot: number): number {
  let y = (3 * biot) / (1 + biot / 5)
  for (let step = 0; step < 20; step++) {
    const f = fraction(y)
    const next = y - (2 * (y * f - biot)) / (1 - f * (1 - y * f))
    if (Math.abs(next - y) <= 4e-16 * y) return Math.sqrt(next)
    y = next
  }
  return Math.sqrt(y)
}

/** (1 − z·cot z)/z² in y = z², for y up to (π/2)². */
function fraction(y: number): number {
  let below = 25
  for (let odd = 23; odd >= 3; odd -= 2) below = odd - y / below
  return 1 / below
}
