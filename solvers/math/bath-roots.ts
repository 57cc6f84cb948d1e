/** A slab and a bath of finite capacity: ratio of the capacities (bath over slab), and the Biot number of the film between. */
export interface Bath {
  gamma: number
  /** Infinite where the face is at the temperature of the bath. */
  biot: number
}

/** Modes of slab and bath together. */
export interface BathModes {
  roots: Float64Array
  /** 1 − γq²/Bi. */
  lags: Float64Array
  /** √((γq)² + (1 − γq²/Bi)²). */
  sizes: Float64Array
  /** γ + γ²q²/Bi + the square of the size: all positive. */
  divisors: Float64Array
}

/**
 * Roots of tan q = γq·Bi/(γq² − Bi), the eigenvalues of a slab that exchanges heat with a stirred bath of finite capacity.
 *
 *   q − (n − 1)π − atan2(γq, γq²/Bi − 1) = 0,  n = 1, 2, 3, …   by Newton inside ((n − 1)π, nπ); the left side rises
 *
 * Shapes    `count` of each.
 * Units     none.
 * Domain    γ > 0 from 1e-23 to 1e23; Bi > 0 from 1e-25 to 1e20, or infinite.
 * Accuracy  relative error of the roots ≤ 4ε.
 * Errors    none. The loop ends after at most 200 steps; Newton takes fewer than ten where it is let.
 * Source    J. Crank, The Mathematics of Diffusion, 2nd ed. 1975, §4.3.5, with a film added.
 */
export function bathModes({ gamma, biot }: Bath, count: number): BathModes {
  const empty = () => new Float64Array(count)
  const modes = { roots: empty(), lags: empty(), sizes: empty(), divisors: empty() }
  for (let n = 0; n < count; n++) {
    const q = rootOf(gamma, biot, n)
    const mixed = (gamma * q * q) / biot
    const size = Math.hypot(gamma * q, 1 - mixed)
    modes.roots[n] = q
    modes.lags[n] = 1 - mixed
    modes.sizes[n] = size
    modes.divisors[n] = gamma + gamma * mixed + size * size
  }
  return modes
}

function rootOf(gamma: number, biot: number, n: number): number {
  const base = n * Math.PI
  let low = base
  let high = base + Math.PI
  // The slowest may be far below π where the film is weak: q² = Bi·(1 + γ)/γ then.
  let q = n === 0 ? Math.min(0.9 * Math.PI, Math.sqrt((biot * (1 + gamma)) / gamma)) : base + Math.PI / 2
  for (let step = 0; step < 200; step++) {
    const mixed = (gamma * q * q) / biot
    const value = q - base - Math.atan2(gamma * q, mixed - 1)
    const size = Math.hypot(gamma * q, 1 - mixed)
    const slope = 1 + (gamma / size) * ((1 + mixed) / size)
    if (value > 0) high = q
    else low = q
    const next = q - value / slope
    if (Math.abs(next - q) <= 2e-16 * q) return next
    q = next > low && next < high ? next : middleOf(low, high)
  }
  return q
}

/** Between, by decades where one end is 0 or far below the other. */
function middleOf(low: number, high: number): number {
  return high > 4 * low ? Math.sqrt(Math.max(low, 1e-30) * high) : (low + high) / 2
}
