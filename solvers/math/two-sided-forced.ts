import { gaussOver } from './gauss-panels.ts'
import { EPS } from './rounding.ts'
import { type Face, meanDecay, sinc, type TwoSidedBody } from './two-sided-body.ts'
import { type Modes, modeAt } from './two-sided-modes.ts'

/**
 * What drives of the form e^(−λ·Fo) leave in a slab when the modes have died out, less its part in one mode:
 *
 *   y″ + λy + s = (F/N)·φ,   −αy′ + βy = d₁ and α₂y′ + β₂y = d₂ at the faces,   ∫yφ = 0,   F = d₁ + κd₂ + s·∫φ
 *
 * with φ the mode whose z² is nearest to λ. Taken apart, that mode is answered by F·(e^(−λFo) − e^(−z²Fo))/(z² − λ),
 * which has a limit; together with it, y would be the difference of two large numbers where λ comes near z². With λ = 0 this is
 * what keeps the digits of a slab that hardly passes heat on either side.
 *
 *   y = d₁(β − αX)/(α² + β²) − s(1 − cos μX)/λ + (F/N)·χ + A·φ(X; μ),   μ² = λ,   χ = (φ(X; z) − φ(X; μ))/(λ − z²)
 *
 * Every part keeps the law of the left face; the one at the right follows from F.
 *
 * Shapes    one place at a time.
 * Units     none.
 * Domain    λ ≥ 0 up to about 1000; d₁, d₂ ≠ 0 only with λ = 0.
 * Accuracy  `error` says what y may be off.
 * Errors    none.
 * Source    none: a solution of the equation above by its parts.
 */
export class ForcedProfile {
  /** F, what the mode is driven by. */
  readonly forcing: number
  readonly error: number
  /** ∫y. */
  readonly mean: number
  private readonly share: number
  private readonly amount: number
  private readonly mu: number
  private readonly z: number
  private readonly face: Face
  private readonly drives: { left: number; right: number; source: number }

  constructor(
    body: TwoSidedBody,
    modes: Modes,
    m: number,
    lambda: number,
    drives: { left: number; right: number; source: number },
  ) {
    this.face = body.left
    this.drives = drives
    this.mu = Math.sqrt(lambda)
    this.z = modes.roots[m]!
    this.forcing = drives.left + modes.ends[m]! * drives.right + modes.means[m]! * drives.source
    this.share = this.forcing / modes.norms[m]!
    this.amount = 0
    const mode = (X: number) => modeAt(this.face, this.z, X)
    const panels = 1 + Math.ceil((this.mu + this.z) / 4)
    const apart = gaussOver((X) => this.at(X) * mode(X), panels)
    const along = gaussOver((X) => modeAt(this.face, this.mu, X) * mode(X), panels)
    this.amount = -apart / along
    this.mean = gaussOver((X) => this.at(X), panels)
    this.error = 40 * EPS * this.size(modes.sizes[m]!)
  }

  at(X: number): number {
    const { alpha, beta } = this.face
    const { left, source } = this.drives
    const held = (left * (beta - alpha * X)) / (alpha * alpha + beta * beta)
    const half = sinc((this.mu * X) / 2)
    const heated = -0.5 * source * X * X * half * half
    return held + heated + this.share * this.resonant(X) + this.amount * modeAt(this.face, this.mu, X)
  }

  slopeAt(X: number): number {
    const { alpha, beta } = this.face
    const { left, source } = this.drives
    const held = (-left * alpha) / (alpha * alpha + beta * beta)
    const heated = -source * X * sinc(this.mu * X)
    const free = beta * Math.cos(this.mu * X) - alpha * this.mu * Math.sin(this.mu * X)
    return held + heated + this.share * this.resonantSlope(X) + this.amount * free
  }

  /** χ, by the formulas for differences of sines and cosines. */
  private resonant(X: number): number {
    const { alpha, beta } = this.face
    const { mu, z } = this
    const wide = sinc(((z + mu) * X) / 2)
    const narrow = sinc(((z - mu) * X) / 2)
    return 0.5 * alpha * X * X * wide * narrow + beta * sineShare(z, mu, X)
  }

  /** χ′ = [−α(z sin zX − μ sin μX) + β(cos zX − cos μX)]/(λ − z²). */
  private resonantSlope(X: number): number {
    const { alpha, beta } = this.face
    const { mu, z } = this
    const wide = sinc(((z + mu) * X) / 2)
    const narrow = sinc(((z - mu) * X) / 2)
    // z sin zX − μ sin μX = (z − μ) sin zX + μ (sin zX − sin μX)
    const sines = (sinc(z * X) * z * X + mu * X * narrow * Math.cos(((z + mu) * X) / 2)) / (z + mu || 1)
    const atRest = z + mu === 0 ? X : sines
    return alpha * atRest + 0.5 * beta * X * X * wide * narrow
  }

  private size(mode: number): number {
    const { alpha, beta } = this.face
    const { left, right, source } = this.drives
    const free = Math.min(alpha + beta, mode)
    return (
      Math.abs(left) + Math.abs(right) + Math.abs(source) + Math.abs(this.share) * mode + Math.abs(this.amount) * free
    )
  }
}

/** (sin μX/μ − sin zX/z)/(z² − μ²), the divided difference of sin(√w·X)/√w in w: by its power series where both are small. */
function sineShare(z: number, mu: number, X: number): number {
  const sum = z + mu
  if (Math.max(z, mu) * X < 1) return sineSeries(z * z, mu * mu, X)
  if (Math.min(z, mu) * X < 0.5) return (X * (sinc(mu * X) - sinc(z * X))) / ((z - mu) * sum)
  // Else sin μX/μ − sin zX/z = [(z − μ) sin zX − z (sin zX − sin μX)]/(μz), where the last is a product.
  const narrow = sinc(((z - mu) * X) / 2)
  return (Math.sin(z * X) - z * X * narrow * Math.cos((sum * X) / 2)) / (mu * z * sum)
}

/** X³/3!·[1] − X⁵/5!·[a + b] + X⁷/7!·[a² + ab + b²] − …, a and b the squares. */
function sineSeries(a: number, b: number, X: number): number {
  let term = (X * X * X) / 6
  let sum = 0
  let pairs = 1
  let powers = 1
  for (let k = 1; k <= 10; k++) {
    sum += term * pairs
    powers *= b
    pairs = pairs * a + powers
    term *= -(X * X) / ((2 * k + 2) * (2 * k + 3))
  }
  return sum
}

/** (e^(−pt) − e^(−qt))/(q − p), which is t·e^(−pt) where both are one. */
export function twoDecays(p: number, q: number, t: number): number {
  return Math.exp(-Math.min(p, q) * t) * t * meanDecay(Math.abs(p - q) * t)
}
