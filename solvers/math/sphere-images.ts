import { gauss } from './gauss.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'
import type { SphereFace } from './sphere-faces.ts'
import type { Moment, UnitPlaces } from './unit-body.ts'

/*
 * A sphere at short times: w = ρ(1 − θ) is that of half spaces at δ and 2 − δ, with a held face at 2 + δ and 4 − δ too.
 *
 *   w = Σ P(η) − P(η′),   1 − θ = w/ρ = ∫₀¹ w′(ρt) dt,   ∂(1 − θ)/∂ρ = (w′ − w/ρ)/ρ = ∫₀¹ t·w″(ρt) dt
 *
 * The integrals are taken where two images nearly cancel towards the centre. Reflections left out are at most
 * 4e^(−(1 + δ)/Fo) of the response, or 4e^(−4/Fo), which every error below includes.
 *
 * Source   H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §9.3, §9.4 and §12.5.
 */
export class SphereImages {
  private readonly face: SphereFace
  private readonly places: UnitPlaces

  constructor(face: SphereFace, places: UnitPlaces) {
    this.face = face
    this.places = places
  }

  completed(j: number, m: Moment): Estimate {
    const value = this.response(this.places.inner[j]!, this.places.deltas[j]!, m)
    const moved = EPS * this.places.shifts[j]! * this.steepest(j, m)
    const error = value * (this.relative(j, m) + this.truncation(j, m)) + moved + TINY
    return { value: Math.min(1, value), error: Math.min(1, error), method: 'two-image' }
  }

  remaining(j: number, m: Moment): Estimate {
    const rho = this.places.inner[j]!
    const delta = this.places.deltas[j]!
    const near = delta / (2 * m.root)
    const left = rho < 0.5 ? undefined : this.face.left(near, m)
    const done = this.completed(j, m)
    if (!left) return { ...done, value: 1 - done.value, error: done.error + EPS }
    const far = (2 - delta) / (2 * m.root)
    const mirrored = this.face.mirrored(far, near, m)
    const value = (left.value - delta + mirrored) / rho
    const rounding = EPS * (40 * left.size + 8 * delta) + mirrored * errorAt(far)
    const moved = EPS * this.places.shifts[j]! * this.steepest(j, m)
    const truncated = this.truncation(j, m) * (this.face.pairs === 1 ? done.value : value)
    const error = (rounding + 8 * EPS * value) / rho + truncated + moved + TINY
    return { value: Math.min(1, Math.max(0, value)), error: Math.min(1, error), method: 'two-image' }
  }

  /** In the face's unit of flux. */
  flux(j: number, m: Moment): Estimate {
    const { deltas, inner, shifts } = this.places
    const rho = inner[j]!
    if (rho === 0) return { value: 0, error: 0, method: 'two-image' }
    const small = rho <= 2 * m.fourier
    const response = small ? 0 : this.response(rho, deltas[j]!, m)
    const value = small
      ? gauss((t) => t * this.bend(rho * t, 1 - rho * t, m, -1), 0, 1)
      : (this.slope(rho, deltas[j]!, m) - response) / rho
    const size = small ? this.bend(rho, deltas[j]!, m, 1) : (this.slope(rho, deltas[j]!, m) + response) / rho
    const shift = EPS * shifts[j]!
    const moved = shift === 0 ? 0 : this.fluxMoved(j, shift, m)
    const error = (size * (this.relative(j, m) + 4 * this.truncation(j, m)) + moved) / this.face.unit + TINY
    return { value: value / this.face.unit, error, method: 'two-image' }
  }

  heatFraction(m: Moment): Estimate {
    const { value, size } = this.face.heat(m)
    const truncated =
      this.face.pairs === 1 ? 8 * value * Math.exp(-1 / m.fourier) : 8 * value * Math.exp(-4 / m.fourier)
    return { value: Math.min(1, value), error: 40 * EPS * size + truncated + TINY, method: 'two-image' }
  }

  /** w/ρ. */
  private response(rho: number, delta: number, m: Moment): number {
    if (rho <= 2 * m.fourier) return gauss((t) => this.slope(rho * t, 1 - rho * t, m), 0, 1)
    return this.sum(rho, delta, m, (eta) => this.face.image(eta, m), -1) / rho
  }

  private slope(rho: number, delta: number, m: Moment): number {
    return this.sum(rho, delta, m, (eta) => this.face.slope(eta, m), 1)
  }

  private bend(rho: number, delta: number, m: Moment, sign: 1 | -1): number {
    return this.sum(rho, delta, m, (eta) => this.face.bend(eta, m), sign)
  }

  private sum(rho: number, delta: number, m: Moment, of: (eta: number) => number, sign: 1 | -1): number {
    const first = of(delta / (2 * m.root)) + sign * of((1 + rho) / (2 * m.root))
    if (this.face.pairs === 1) return first
    return first + of((2 + delta) / (2 * m.root)) + sign * of((3 + rho) / (2 * m.root))
  }

  private relative(j: number, m: Moment): number {
    return errorAt(this.places.deltas[j]! / (2 * m.root))
  }

  private truncation(j: number, m: Moment): number {
    return 4 * Math.exp(-(this.face.pairs === 1 ? 1 + this.places.deltas[j]! : 4) / m.fourier)
  }

  /** Nearest place within the rounding of a depth that is reckoned from a radius, where slopes are steepest. */
  private nearest(j: number): number {
    return Math.max(0, this.places.deltas[j]! - EPS * this.places.shifts[j]!)
  }

  /** The most that |∂(1 − θ)/∂δ| may be there. */
  private steepest(j: number, m: Moment): number {
    if (this.places.shifts[j] === 0) return 0
    const rho = this.places.inner[j]!
    const delta = this.nearest(j)
    if (rho <= 2 * m.fourier) return rho * this.bend(rho, delta, m, 1)
    return (1.2 * this.slope(rho, delta, m)) / rho
  }

  /** What that rounding moves the flux by: its slope, or all of it where the rounding is not small against the depth reached. */
  private fluxMoved(j: number, shift: number, m: Moment): number {
    const rho = this.places.inner[j]!
    const delta = this.nearest(j)
    if (rho <= 2 * m.fourier) return (shift * this.bend(rho, delta, m, 1)) / m.fourier
    const slope = this.slope(rho, delta, m)
    if (shift > 0.05 * m.root) return (2 * slope) / rho
    return (1.3 * shift * (this.bend(rho, delta, m, 1) + (4 * slope) / rho)) / rho
  }
}

/** η carries the rounding of up to eight decimal inputs and operations. */
function errorAt(eta: number): number {
  const near = Math.min(eta, 27.5)
  return EPS * (110 + 20 * near * near)
}
