import { Decays, type Faded } from './decays.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'
import type { FilmedBody, Moment } from './unit-body.ts'
import { slabEigenvalue } from './slab-eigenvalues.ts'
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
  readonly weights: number[] = []
  private readonly body: FilmedBody
  private readonly roots: number[] = []
  /** By place, as far as asked for. */
  private readonly cosines: number[][]
  private readonly sines: number[][]
  private readonly decays = new Decays((n) => this.roots[n]!)

  constructor(body: FilmedBody) {
    this.body = body
    this.cosines = Array.from(body.deltas, () => [])
    this.sines = Array.from(body.deltas, () => [])
  }

  /** How many terms count at a time; the one after them, which bounds the rest, is found as well. */
  private countAt({ fourier }: Moment): { count: number } & Faded {
    const count = termsAt(fourier)
    const B = this.body.biot
    for (let n = this.roots.length; n <= count; n++) {
      const z = slabEigenvalue(B, n)
      this.roots.push(z)
      this.weights.push((2 * B) / (z * (z * z + B * B + B)))
    }
    const { exponents, factors } = this.decays.at(fourier, count)
    return { count, exponents, factors }
  }

  /** cos zδ and sin zδ of one place for as many terms. */
  private wavesAt(j: number, count: number): { cosines: readonly number[]; sines: readonly number[] } {
    const cosines = this.cosines[j]!
    const sines = this.sines[j]!
    const delta = this.body.deltas[j]!
    for (let n = cosines.length; n < count; n++) {
      cosines.push(Math.cos(this.roots[n]! * delta))
      sines.push(Math.sin(this.roots[n]! * delta))
    }
    return { cosines, sines }
  }

  remaining(j: number, m: Moment): Estimate {
    const { value, error } = this.sum(j, m, 0)
    return { value: Math.min(1, Math.max(0, value)), error, method: 'eigen-series' }
  }

  completed(j: number, m: Moment): Estimate {
    const rest = this.sum(j, m, 1)
    const z = this.roots[0]!
    const B = this.body.biot
    const first = this.weights[0]! * (z * this.cosines[j]![0]! + B * this.sines[j]![0]!)
    const done = -Math.expm1(-z * z * m.fourier)
    const start = oneMinusFirst(z, this.body.inner[j]!, first)
    const value = start.value + first * done - rest.value
    const error = start.error + 36 * EPS * first * done + rest.error
    return { value: Math.min(1, Math.max(0, value)), error, method: 'eigen-series' }
  }

  heatFraction(m: Moment): Estimate {
    const rest = this.meanSum(m, 1)
    const z = this.roots[0]!
    const first = (this.weights[0]! * this.body.biot) / z
    const done = -Math.expm1(-z * z * m.fourier)
    const start = oneMinusFirstMean(z, first)
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
    const { count, exponents, factors } = this.countAt(m)
    const { cosines, sines } = this.wavesAt(j, count)
    const { roots, weights } = this
    let value = 0
    let error = 0
    for (let n = 0; n < count; n++) {
      const z = roots[n]!
      const w = weights[n]! * z * factors[n]!
      const c = cosines[n]!
      const s = (z / B) * sines[n]!
      value += w * (c - s)
      error +=
        w *
        ((14 + 16 * exponents[n]!) * (Math.abs(c) + Math.abs(s)) +
          z * (6 * delta + shift) * (Math.abs(sines[n]!) + (z / B) * Math.abs(c)))
    }
    const z = roots[count]!
    const size = weights[count]! * z * (1 + (z / B) * Math.min(1, z * delta))
    const tail = (size * factors[count]!) / -Math.expm1(-Math.PI * z * m.fourier)
    return { value: this.body.inner[j] === 0 ? 0 : value, error: EPS * error + tail + TINY, method: 'eigen-series' }
  }

  /** Σ from term `first` on, of θ and of how far rounding and inputs may move it. */
  private sum(j: number, m: Moment, first: number): { value: number; error: number } {
    const B = this.body.biot
    const delta = this.body.deltas[j]!
    const { count, exponents, factors } = this.countAt(m)
    const { cosines, sines } = this.wavesAt(j, count)
    const { roots, weights } = this
    let value = 0
    let error = 0
    for (let n = first; n < count; n++) {
      const z = roots[n]!
      const w = weights[n]! * factors[n]!
      const c = z * cosines[n]!
      const s = B * sines[n]!
      value += w * (c + s)
      error +=
        w *
        ((12 + 16 * exponents[n]!) * (Math.abs(c) + Math.abs(s)) +
          6 * z * delta * (z * Math.abs(sines[n]!) + B * Math.abs(cosines[n]!)))
    }
    // What the terms from `count` on add, by the geometric series of the first two.
    const z = roots[count]!
    const size = weights[count]! * (z + B * Math.min(1, z * delta))
    const tail = (size * factors[count]!) / -Math.expm1(-Math.PI * z * m.fourier)
    return { value, error: EPS * error + tail + TINY }
  }

  /** Weights of the mean: 2Bi²/(z²(z² + Bi² + Bi)) = wₙ·Bi/zₙ. */
  private meanSum(m: Moment, first: number): { value: number; error: number } {
    const B = this.body.biot
    const { count, exponents, factors } = this.countAt(m)
    let value = 0
    let error = 0
    for (let n = first; n <= count; n++) {
      const z = this.roots[n]!
      const term = ((this.weights[n]! * B) / z) * factors[n]!
      if (n === count) error += (term / EPS) * 2
      else {
        value += term
        error += (14 + 16 * exponents[n]!) * term
      }
    }
    return { value, error: EPS * error + TINY }
  }
}

/** Terms whose exponent is within DECAY of the first's: ((n − 1)π)² − (π/2)² ≥ DECAY/Fo. */
export function termsAt(fourier: number): number {
  return 2 + Math.floor(Math.sqrt(DECAY / fourier + 2.4674011002723395) / Math.PI)
}
