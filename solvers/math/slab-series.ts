import { type Estimate, EPS, TINY } from './rounding.ts'
import type { FilmedBody, Moment } from './unit-body.ts'
import { slabEigenvalues } from './slab-eigenvalues.ts'
import { oneMinusFirst, oneMinusFirstMean } from './slab-first-term.ts'

/** Terms are kept until e^(−50) of the first. */
const DECAY = 50

/**
 * A slab behind a film by its eigenfunctions.
 *
 *   θ = Σ wₙ·(zₙ cos zₙδ + Bi sin zₙδ)·e^(−zₙ²Fo),   wₙ = 2Bi/(zₙ(zₙ² + Bi² + Bi)),   zₙ tan zₙ = Bi
 *
 * which is Σ Cₙ cos(zₙ(1 − δ))·e^(−zₙ²Fo) with the signs of sin zₙ and cos zₙ multiplied out: every factor is positive
 * at the face, so nothing cancels there however large Bi is. The error of each answer sums, term by term, what the
 * rounding of up to ten inputs and operations may move, and the neglected tail.
 *
 * Source   H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.11.
 */
export class SlabSeries {
  readonly weights: Float64Array
  private readonly body: FilmedBody
  private readonly roots: Float64Array
  private readonly cosines: Float64Array[]
  private readonly sines: Float64Array[]

  /** `shortest` is the smallest Fourier number to be asked for; it decides how many roots are found. */
  constructor(body: FilmedBody, shortest: number) {
    const { biot: B, deltas } = body
    this.body = body
    this.roots = slabEigenvalues(B, termsAt(shortest) + 1)
    this.weights = this.roots.map((z) => (2 * B) / (z * (z * z + B * B + B)))
    this.cosines = Array.from(deltas, (d) => this.roots.map((z) => Math.cos(z * d)))
    this.sines = Array.from(deltas, (d) => this.roots.map((z) => Math.sin(z * d)))
  }

  remaining(j: number, m: Moment): Estimate {
    const { value, error } = this.sum(j, m, 0)
    return { value: Math.min(1, Math.max(0, value)), error, method: 'eigen-series' }
  }

  completed(j: number, m: Moment): Estimate {
    const z = this.roots[0]!
    const B = this.body.biot
    const first = this.weights[0]! * (z * this.cosines[j]![0]! + B * this.sines[j]![0]!)
    const done = -Math.expm1(-z * z * m.fourier)
    const start = oneMinusFirst(z, this.body.inner[j]!, first)
    const rest = this.sum(j, m, 1)
    const value = start.value + first * done - rest.value
    const error = start.error + 36 * EPS * first * done + rest.error
    return { value: Math.min(1, Math.max(0, value)), error, method: 'eigen-series' }
  }

  heatFraction(m: Moment): Estimate {
    const z = this.roots[0]!
    const first = (this.weights[0]! * this.body.biot) / z
    const done = -Math.expm1(-z * z * m.fourier)
    const start = oneMinusFirstMean(z, first)
    const rest = this.meanSum(m, 1)
    const value = start.value + first * done - rest.value
    const error = start.error + 36 * EPS * first * done + rest.error
    return { value: Math.min(1, Math.max(0, value)), error, method: 'eigen-series' }
  }

  meanRemaining(m: Moment): Estimate {
    const { value, error } = this.meanSum(m, 0)
    return { value: Math.min(1, value), error, method: 'eigen-series' }
  }

  flux(j: number, m: Moment): Estimate {
    const B = this.body.biot
    const delta = this.body.deltas[j]!
    const shift = this.body.shifts[j]!
    const { roots, weights } = this
    const count = Math.min(termsAt(m.fourier), roots.length - 1)
    let value = 0
    let error = 0
    for (let n = 0; n < count; n++) {
      const z = roots[n]!
      const decay = z * z * m.fourier
      const w = weights[n]! * z * Math.exp(-decay)
      const c = this.cosines[j]![n]!
      const s = (z / B) * this.sines[j]![n]!
      value += w * (c - s)
      error +=
        w *
        ((14 + 16 * decay) * (Math.abs(c) + Math.abs(s)) +
          z * (6 * delta + shift) * (Math.abs(this.sines[j]![n]!) + (z / B) * Math.abs(c)))
    }
    const z = roots[count]!
    const size = weights[count]! * z * (1 + (z / B) * Math.min(1, z * delta))
    const tail = (size * Math.exp(-z * z * m.fourier)) / -Math.expm1(-Math.PI * z * m.fourier)
    return { value: this.body.inner[j] === 0 ? 0 : value, error: EPS * error + tail + TINY, method: 'eigen-series' }
  }

  /** Σ from term `first` on, of θ and of how far rounding and inputs may move it. */
  private sum(j: number, m: Moment, first: number): { value: number; error: number } {
    const B = this.body.biot
    const delta = this.body.deltas[j]!
    const { roots, weights } = this
    const cosines = this.cosines[j]!
    const sines = this.sines[j]!
    const count = Math.min(termsAt(m.fourier), roots.length - 1)
    let value = 0
    let error = 0
    for (let n = first; n < count; n++) {
      const z = roots[n]!
      const decay = z * z * m.fourier
      const w = weights[n]! * Math.exp(-decay)
      const c = z * cosines[n]!
      const s = B * sines[n]!
      value += w * (c + s)
      error +=
        w *
        ((12 + 16 * decay) * (Math.abs(c) + Math.abs(s)) +
          6 * z * delta * (z * Math.abs(sines[n]!) + B * Math.abs(cosines[n]!)))
    }
    return { value, error: EPS * error + this.tail(j, m, count) + TINY }
  }

  /** Bound on what the terms from `count` on add, by the geometric series of the first two. */
  private tail(j: number, m: Moment, count: number): number {
    const z = this.roots[count]!
    const size = this.weights[count]! * (z + this.body.biot * Math.min(1, z * this.body.deltas[j]!))
    return (size * Math.exp(-z * z * m.fourier)) / -Math.expm1(-Math.PI * z * m.fourier)
  }

  /** Weights of the mean: 2Bi²/(z²(z² + Bi² + Bi)) = wₙ·Bi/zₙ. */
  private meanSum(m: Moment, first: number): { value: number; error: number } {
    const B = this.body.biot
    const count = Math.min(termsAt(m.fourier), this.roots.length - 1)
    let value = 0
    let error = 0
    for (let n = first; n <= count; n++) {
      const z = this.roots[n]!
      const decay = z * z * m.fourier
      const term = ((this.weights[n]! * B) / z) * Math.exp(-decay)
      if (n === count) error += (term / EPS) * 2
      else {
        value += term
        error += (14 + 16 * decay) * term
      }
    }
    return { value, error: EPS * error + TINY }
  }
}

/** Terms whose exponent is within DECAY of the first's: ((n − 1)π)² − (π/2)² ≥ DECAY/Fo. */
export function termsAt(fourier: number): number {
  return 2 + Math.floor(Math.sqrt(DECAY / fourier + 2.4674011002723395) / Math.PI)
}
