/**
 * Roots of z·tan z = Bi, the eigenvalues of a slab with a film at one face and no heat at the other.
 *
 *   z − mπ − atan2(Bi, z) = 0,   m = 0, 1, 2, …   solved by Newton; the slope 1 + Bi/(Bi² + z²) never vanishes
 *
 * Shapes    the root number m, in (mπ, mπ + π/2).
 * Units     none.
 * Domain    Bi > 0, from 1e-25 to 1e20; m ≥ 0.
 * Accuracy  relative error ≤ 3ε.
 * Errors    none. The loop ends after at most 12 steps; from the start below six suffice.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.11 and appendix IV, table I.
 */
export function slabEigenvalue(biot: number, m: number): number {
  const base = m * Math.PI
  let z = m === 0 ? firstGuess(biot) : base + Math.atan2(biot, base + 0.5)
  for (let step = 0; step < 12; step++) {
    const next = z - (z - base - Math.atan2(biot, z)) / (1 + biot / (biot * biot + z * z))
    if (Math.abs(next - z) <= 4e-16 * z) return next
    z = next
  }
  return z
}

/** Right at both ends: √Bi for a small one, π/2 for a large one. */
function firstGuess(biot: number): number {
  return Math.sqrt(biot / (1 + biot / 2.4674011002723395))
}
