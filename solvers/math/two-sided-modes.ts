import type { Face, TwoSidedBody } from './two-sided-body.ts'

/** The eigenfunctions φₙ = α cos zX + (β/z) sin zX of a slab between two faces, by what series need of them. */
export interface Modes {
  roots: Float64Array
  /** κ: φ(1) = κ·α₂ and φ′(1) = −κ·β₂, without the cancellation of either. */
  ends: Float64Array
  /** ∫φ². */
  norms: Float64Array
  /** ∫φ. */
  means: Float64Array
  /** The largest that φ can be. */
  sizes: Float64Array
}

/**
 * Eigenvalues of a slab of length 1 between two faces, and the integrals of its eigenfunctions.
 *
 *   zₙ − nπ − atan(B₁/zₙ) − atan(B₂/zₙ) = 0,  n = 0, 1, 2, …   by Newton; the slope never vanishes
 *   z²·∫φ² = ½[α₁²z² + β₁² + α₁β₁ + κ²α₂β₂],   z²·∫φ = β₁ + κβ₂,   κ² = (α₁²z² + β₁²)/(α₂²z² + β₂²)
 *
 * Shapes    `count` of each.
 * Units     none.
 * Domain    either Biot number 0, 1e-25 to 1e20, or infinite; count ≥ 0. Two faces without film: z₀ = 0.
 * Accuracy  relative error of the roots ≤ 4ε; every sum is of numbers of one sign, the means of odd modes aside.
 * Errors    none. The loop ends after at most 40 steps; fewer than ten are taken.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.10.
 */
export function twoSidedModes({ left, right }: TwoSidedBody, count: number): Modes {
  const empty = () => new Float64Array(count)
  const modes: Modes = { roots: empty(), ends: empty(), norms: empty(), means: empty(), sizes: empty() }
  for (let n = 0; n < count; n++) {
    const z = rootOf(left, right, n)
    modes.roots[n] = z
    if (z === 0) {
      for (const list of [modes.ends, modes.norms, modes.means, modes.sizes]) list[0] = 1
      continue
    }
    const square = z * z
    const own = left.alpha * left.alpha * square + left.beta * left.beta
    const other = right.alpha * right.alpha * square + right.beta * right.beta
    modes.ends[n] = (n % 2 === 0 ? 1 : -1) * Math.sqrt(own / other)
    const crossed = left.alpha * left.beta + (own / other) * right.alpha * right.beta
    modes.norms[n] = (own + crossed) / (2 * square)
    modes.means[n] = (left.beta + modes.ends[n]! * right.beta) / square
    modes.sizes[n] = Math.sqrt(own) / z
  }
  return modes
}

function rootOf(left: Face, right: Face, n: number): number {
  const base = n * Math.PI
  let z = n === 0 ? firstGuess(left, right) : base + phase(left, base + 0.5) + phase(right, base + 0.5)
  if (z === 0) return 0
  for (let step = 0; step < 40; step++) {
    const next = z - (z - base - phase(left, z) - phase(right, z)) / (1 + slope(left, z) + slope(right, z))
    if (Math.abs(next - z) <= 4e-16 * z) return next
    z = next
  }
  return z
}

const phase = (face: Face, z: number) => Math.atan2(face.beta, face.alpha * z)
const slope = ({ alpha, beta }: Face, z: number) => (alpha * beta) / (alpha * alpha * z * z + beta * beta || 1)

/** Right where both films are weak, where either is infinite and the other absent, and where both are infinite. */
function firstGuess(left: Face, right: Face): number {
  const mixed = left.beta * right.alpha + right.beta * left.alpha
  const both = left.beta * right.beta
  return Math.sqrt((mixed + both) / (left.alpha * right.alpha + 0.40528473456935109 * mixed + both / Math.PI ** 2))
}

/** φ at a place. */
export function modeAt({ alpha, beta }: Face, z: number, X: number): number {
  if (z === 0) return alpha + beta * X
  return alpha * Math.cos(z * X) + (beta / z) * Math.sin(z * X)
}

/** φ′ at a place. */
export function modeSlopeAt({ alpha, beta }: Face, z: number, X: number): number {
  return beta * Math.cos(z * X) - alpha * z * Math.sin(z * X)
}
