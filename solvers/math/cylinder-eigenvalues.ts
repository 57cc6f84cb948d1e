import { besselJ01 } from './bessel-j.ts'

/** First zero of J₀, squared. */
const FIRST_ZERO_SQUARED = 5.783185962946785

/**
 * Roots of z·J₁(z) = Bi·J₀(z), the eigenvalues of a cylinder with a film; those of J₀(z) = 0 where Bi is Infinity.
 *
 *   φ(z) − mπ − atan2(Bi, z) = 0,   m = 0, 1, 2, …   with the phase φ = atan2(J₁, J₀), continued from φ(0) = 0
 *
 * solved by Newton. The slope 1 − J₀J₁/(z(J₀² + J₁²)) + Bi/(Bi² + z²) never vanishes, so no bracket is needed.
 *
 * Shapes    the root number m, counted from 0, with the amplitude √(J₀² + J₁²) there.
 * Units     none.
 * Domain    Bi > 0, from 1e-25 to Infinity; m from 0 to 200.
 * Accuracy  relative error ≤ 4ε.
 * Errors    none. The loop ends after at most 12 steps; from the starts below seven suffice.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §7.7 and appendix IV, tables III and IV.
 */
export function cylinderEigenvalue(biot: number, m: number): { root: number; amplitude: number } {
  const root = eigenvalue(biot, m)
  return { root, amplitude: phaseAt(root).amplitude }
}

function eigenvalue(biot: number, m: number): number {
  const base = m * Math.PI
  let z = m === 0 ? firstGuess(biot) : base + Math.PI / 4 + Math.atan2(biot, base + 0.8)
  for (let step = 0; step < 12; step++) {
    const { phase, slope } = phaseAt(z)
    const next = z - (phase - base - Math.atan2(biot, z)) / (slope + 1 / (biot + (z * z) / biot))
    if (Math.abs(next - z) <= 4e-16 * z) return next
    z = next
  }
  return z
}

/** Right at both ends: √(2Bi) for a small one, the first zero of J₀ for a large one. */
function firstGuess(biot: number): number {
  return Math.sqrt(2 / (1 / biot + 2 / FIRST_ZERO_SQUARED))
}

function phaseAt(z: number): { phase: number; slope: number; amplitude: number } {
  const { j0, j1 } = besselJ01(z)
  const principal = Math.atan2(j1, j0)
  // φ is within π/4 of z − π/4, so that tells how many turns are behind it.
  const turns = Math.round((z - Math.PI / 4 - principal) / (2 * Math.PI))
  const square = j0 * j0 + j1 * j1
  return {
    phase: principal + 2 * Math.PI * turns,
    slope: 1 - (j0 * j1) / (z * square),
    amplitude: Math.sqrt(square),
  }
}
