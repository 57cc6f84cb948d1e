import erf from '@stdlib/math-base-special-erf'
import erfcx from '@stdlib/math-base-special-erfcx'
import { gauss } from './gauss.ts'
import { ierfcx } from './ierfcx.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'
import type { Moment, Share, UnitBody, UnitPlaces } from './unit-body.ts'

/*
 * A slab of length 1 whose exposed face is stepped in temperature, the far plane passing no heat.
 *
 *   θ = Σ (2/z)·sin(zδ)·e^(−z²Fo),   q·L/(kΔT) = Σ 2 cos(zδ)·e^(−z²Fo),   Q/Q₀ = 1 − Σ (2/z²)·e^(−z²Fo),   z = (n + ½)π
 *
 * and at short times the images of erfc at δ, 2 − δ, −(2 + δ), −(4 − δ): four of them, so that θ keeps its digits near
 * the face, where the second and third cancel. The ones left out are at most e^(−4/Fo) of the first.
 *
 * Source   H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.3 and §3.4.
 */

/** Where both forms have all their digits: the images to e^(−4/Fo), the series with 8 terms. */
const SWITCH = 0.07
const DECAY = 50
const SQRT_PI = 1.772453850905516
const FAR = 27.5

export class SlabFixed implements UnitBody {
  private readonly body: UnitPlaces
  constructor(body: UnitPlaces) {
    this.body = body
  }

  share(j: number, m: Moment): Share {
    return m.fourier < 0.03
      ? { ...this.completed(j, m), of: 'completed' }
      : { ...this.remaining(j, m), of: 'remaining' }
  }

  remaining(j: number, m: Moment): Estimate {
    const delta = this.body.deltas[j]!
    if (m.fourier > SWITCH)
      return this.series(
        m,
        (z) => (2 / z) * Math.sin(z * delta),
        (z) => (2 / z) * slack(z, delta, this.body.shifts[j]!),
        (z) => 2 * Math.min(delta, 1 / z),
      )
    const { near, far } = this.etas(j, m)
    const a = erf(near)
    const b = imagePair(far, near)
    const shift = EPS * this.body.shifts[j]! * slopeOf(this.nearest(j, m), m)
    return {
      value: Math.min(1, Math.max(0, a - b)),
      error: Math.min(1, 14 * EPS * a + errorOf(far) * b + shift + TINY),
      method: 'two-image',
    }
  }

  completed(j: number, m: Moment): Estimate {
    if (m.fourier > SWITCH) {
      const left = this.remaining(j, m)
      return { ...left, value: 1 - left.value, error: left.error + EPS }
    }
    const { near, far } = this.etas(j, m)
    const a = erfcOf(near)
    const b = erfcOf(far)
    const c = erfcOf((2 + this.body.deltas[j]!) / (2 * m.root))
    const shift = EPS * this.body.shifts[j]! * slopeOf(this.nearest(j, m), m)
    const error = errorOf(near) * a + errorOf(far) * (b + c) + Math.exp(-4 / m.fourier) * a + shift + TINY
    return { value: Math.min(1, Math.max(0, a + b - c)), error: Math.min(1, error), method: 'two-image' }
  }

  /** q·L/(k·ΔT), positive away from the face. */
  flux(j: number, m: Moment): Estimate {
    const { deltas, inner, shifts } = this.body
    const delta = deltas[j]!
    if (m.fourier > SWITCH) {
      const found = this.series(
        m,
        (z) => 2 * Math.cos(z * delta),
        (z) => 2 * (z * (6 * delta + shifts[j]!) * Math.abs(Math.sin(z * delta)) + 4),
        () => 2,
      )
      return inner[j] === 0 ? { ...found, value: 0 } : found
    }
    const { near, far } = this.etas(j, m)
    const third = (2 + delta) / (2 * m.root)
    const scale = 1 / (SQRT_PI * m.root)
    const value = decayOf(near) - decayOf(far) - decayOf(third)
    const error = errorOf(near) * decayOf(near) + errorOf(far) * 2 * decayOf(far) + Math.exp(-4 / m.fourier)
    const nearest = this.nearest(j, m)
    const shift =
      EPS * shifts[j]! > 0.05 * m.root ? decayOf(nearest) : (1.2 * EPS * shifts[j]! * near * decayOf(near)) / m.root
    return { value: inner[j] === 0 ? 0 : scale * value, error: scale * (error + shift) + TINY, method: 'two-image' }
  }

  heatFraction(m: Moment): Estimate {
    if (m.fourier > SWITCH) {
      const left = this.meanRemaining(m)
      return { ...left, value: 1 - left.value, error: left.error + EPS }
    }
    const far = 1 / m.root
    const value = 2 * m.root * (1 / SQRT_PI - (far > FAR ? 0 : 2 * decayOf(far) * ierfcx(far)))
    return { value, error: value * (24 * EPS + Math.exp(-4 / m.fourier)) + TINY, method: 'two-image' }
  }

  meanRemaining(m: Moment): Estimate {
    if (m.fourier > SWITCH)
      return this.series(
        m,
        (z) => 2 / (z * z),
        (z) => 8 / (z * z),
        (z) => 2 / (z * z),
      )
    const heat = this.heatFraction(m)
    return { ...heat, value: 1 - heat.value, error: heat.error + EPS }
  }

  terms(m: Moment): number {
    return m.fourier > SWITCH ? termsAt(m.fourier) : 0
  }

  /** η at the nearest place within the rounding of a depth that is reckoned from the far face, where slopes are steepest. */
  private nearest(j: number, m: Moment): number {
    return Math.max(0, this.body.deltas[j]! - EPS * this.body.shifts[j]!) / (2 * m.root)
  }

  private etas(j: number, m: Moment): { near: number; far: number } {
    return { near: this.body.deltas[j]! / (2 * m.root), far: (1 + this.body.inner[j]!) / (2 * m.root) }
  }

  /** Σ size(z)·e^(−z²Fo), with what each term may be off beside its decay, and the most that its size may be. */
  private series(
    m: Moment,
    size: (z: number) => number,
    slackOf: (z: number) => number,
    most: (z: number) => number,
  ): Estimate {
    let value = 0
    let error = 0
    const count = termsAt(m.fourier)
    for (let n = 0; n < count; n++) {
      const z = (n + 0.5) * Math.PI
      const decay = z * z * m.fourier
      const weight = Math.exp(-decay)
      const term = weight * size(z)
      value += term
      error += (6 + 16 * decay) * Math.abs(term) + weight * slackOf(z)
    }
    const z = (count + 0.5) * Math.PI
    const tail = (most(z) * Math.exp(-z * z * m.fourier)) / -Math.expm1(-Math.PI * z * m.fourier)
    return { value, error: EPS * error + tail + TINY, method: 'eigen-series' }
  }
}

function slack(z: number, delta: number, shift: number): number {
  return z * (6 * delta + shift) * Math.abs(Math.cos(z * delta))
}

/** erfc(far) − erfc(far + 2·near), as one where they cancel towards the face: (2/√π)·∫ e^(−s²) ds between the two. */
function imagePair(far: number, near: number): number {
  if (near * far > 0.5) return erfcOf(far) - erfcOf(far + 2 * near)
  return (2 / SQRT_PI) * gauss(decayOf, far, 2 * near)
}

const decayOf = (eta: number) => (eta > FAR ? 0 : Math.exp(-eta * eta))
const erfcOf = (eta: number) => decayOf(eta) * erfcx(eta)
const errorOf = (eta: number) => EPS * (24 + 17 * Math.min(eta, FAR) ** 2)
/** |∂erfc/∂δ|. */
const slopeOf = (near: number, m: Moment) => decayOf(near) / (SQRT_PI * m.root)

function termsAt(fourier: number): number {
  return 2 + Math.floor(Math.sqrt(DECAY / fourier + 2.4674011002723395) / Math.PI)
}
