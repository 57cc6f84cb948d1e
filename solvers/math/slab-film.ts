import { slabEigenvalues } from './slab-eigenvalues.ts'
import {
  completed,
  completedError,
  energyFraction,
  ENERGY_ERROR,
  fluxError,
  fluxFraction,
  remaining,
  REMAINING_ERROR,
} from './convective-half-space.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'

/*
 * A slab of length 1 from its exposed face (film, Biot number Bi) to the plane where no heat flows, after a unit step of
 * the fluid. δ is the depth from the face, Fo the Fourier number.
 *
 *   θ = Σ wₙ·(zₙ cos zₙδ + Bi sin zₙδ)·e^(−zₙ²Fo),   wₙ = 2Bi/(zₙ(zₙ² + Bi² + Bi)),   zₙ tan zₙ = Bi
 *
 * which is Cₙ cos(zₙ(1 − δ)) with the signs of sin zₙ and cos zₙ multiplied out: every factor is positive at the face,
 * so nothing cancels there however large Bi is. For short times two half spaces, at δ and at its mirror image 2 − δ.
 *
 * Source   H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.11.
 */

export interface SlabFilm {
  biot: number
  /** Depth over length, 0..1, of each place. */
  deltas: Float64Array
  /** Distance to the mid-plane or insulated face over length, computed apart: 1 − δ would lose its digits. */
  inner: Float64Array
}

/** Everything at one time that does not depend on the place. */
export interface SlabMoment {
  fourier: number
  /** √Fo, computed without forming Fo, which can vanish. */
  root: number
}

/* Below SERIES_FROM only the images, above IMAGES_TO only the series; between, whichever errs less. */
const SERIES_FROM = 0.004
const IMAGES_TO = 0.06
/** Terms are kept until e^(−50) of the first. */
const DECAY = 50

export class SlabSolver {
  readonly slab: SlabFilm
  readonly roots: Float64Array
  readonly weights: Float64Array
  private readonly cosines: Float64Array[]
  private readonly sines: Float64Array[]

  /** `shortest` is the smallest Fourier number to be asked for; it decides how many roots are found. */
  constructor(slab: SlabFilm, shortest: number) {
    this.slab = slab
    const { biot: B, deltas } = slab
    this.roots = slabEigenvalues(B, termsAt(Math.max(shortest, SERIES_FROM)) + 1)
    this.weights = this.roots.map((z) => (2 * B) / (z * (z * z + B * B + B)))
    this.cosines = Array.from(deltas, (d) => this.roots.map((z) => Math.cos(z * d)))
    this.sines = Array.from(deltas, (d) => this.roots.map((z) => Math.sin(z * d)))
  }

  /** Terms of the series at this time; 0 where only the images are asked. */
  terms(m: SlabMoment): number {
    return m.fourier < SERIES_FROM ? 0 : termsAt(m.fourier)
  }

  /** θ at place j. */
  remaining(j: number, m: SlabMoment): Estimate {
    return choose(
      m,
      () => this.remainingByImages(j, m),
      () => this.remainingBySeries(j, m),
    )
  }

  /** 1 − θ at place j. */
  completed(j: number, m: SlabMoment): Estimate {
    return choose(
      m,
      () => this.completedByImages(j, m),
      () => this.completedBySeries(j, m),
    )
  }

  /** q/(h·ΔT) at place j, positive away from the face. */
  flux(j: number, m: SlabMoment): Estimate {
    return choose(
      m,
      () => this.fluxByImages(j, m),
      () => this.fluxBySeries(j, m),
    )
  }

  /** Share of the heat that the body takes up in all. */
  heatFraction(m: SlabMoment): Estimate {
    return choose(
      m,
      () => this.heatByImages(m),
      () => this.heatBySeries(m),
    )
  }

  /** Mean of θ; 1 − heatFraction without its cancellation at late times. */
  meanRemaining(m: SlabMoment): Estimate {
    if (m.fourier >= IMAGES_TO) return this.meanBySeries(m)
    const heat = this.heatFraction(m)
    return { ...heat, value: 1 - heat.value, error: heat.error + EPS }
  }

  private etas(j: number, m: SlabMoment): [number, number, number] {
    const { biot, deltas, inner } = this.slab
    return [deltas[j]! / (2 * m.root), (1 + inner[j]!) / (2 * m.root), biot * m.root]
  }

  /** What the reflections beyond the second image add, as a share of the response. */
  private truncation(j: number, m: SlabMoment): number {
    return Math.exp(-(1 + this.slab.deltas[j]!) / m.fourier)
  }

  private completedByImages(j: number, m: SlabMoment): Estimate {
    const [near, far, beta] = this.etas(j, m)
    const a = completed(near, beta)
    const b = completed(far, beta)
    const value = Math.min(1, a + b)
    const error = completedError(near) * a + completedError(far) * b + value * (this.truncation(j, m) + EPS) + TINY
    return { value, error, method: 'two-image' }
  }

  private remainingByImages(j: number, m: SlabMoment): Estimate {
    const [near, far, beta] = this.etas(j, m)
    const a = remaining(near, beta)
    const b = completed(far, beta)
    const change = completed(near, beta) + b
    const error = REMAINING_ERROR * a + completedError(far) * b + change * this.truncation(j, m) + TINY
    return { value: Math.max(0, a - b), error, method: 'two-image' }
  }

  private fluxByImages(j: number, m: SlabMoment): Estimate {
    const [near, far, beta] = this.etas(j, m)
    const a = fluxFraction(near, beta)
    const b = fluxFraction(far, beta)
    const truncation = 4 * a * this.truncation(j, m)
    const error = fluxError(near) * a + fluxError(far) * b + truncation + TINY
    return { value: this.slab.inner[j] === 0 ? 0 : a - b, error, method: 'two-image' }
  }

  private heatByImages(m: SlabMoment): Estimate {
    const beta = this.slab.biot * m.root
    const value = Math.min(1, this.slab.biot * m.fourier * energyFraction(beta))
    return {
      value,
      error: value * (ENERGY_ERROR + 14 * EPS + 2 * Math.exp(-1 / m.fourier)) + TINY,
      method: 'two-image',
    }
  }

  private remainingBySeries(j: number, m: SlabMoment): Estimate {
    const { value, error } = this.sum(j, m, 0)
    return { value: Math.min(1, Math.max(0, value)), error, method: 'eigen-series' }
  }

  /** Σ from term `first` on, of θ and of how far rounding and inputs may move it. */
  private sum(j: number, m: SlabMoment, first: number): { value: number; error: number } {
    const B = this.slab.biot
    const delta = this.slab.deltas[j]!
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
  private tail(j: number, m: SlabMoment, count: number): number {
    const z = this.roots[count]!
    const size = this.weights[count]! * (z + this.slab.biot * Math.min(1, z * this.slab.deltas[j]!))
    return (size * Math.exp(-z * z * m.fourier)) / -Math.expm1(-Math.PI * z * m.fourier)
  }

  private completedBySeries(j: number, m: SlabMoment): Estimate {
    const z = this.roots[0]!
    const B = this.slab.biot
    const first = this.weights[0]! * (z * this.cosines[j]![0]! + B * this.sines[j]![0]!)
    const done = -Math.expm1(-z * z * m.fourier)
    const start = oneMinusFirst(z, this.slab.inner[j]!, first)
    const rest = this.sum(j, m, 1)
    const value = start.value + first * done - rest.value
    const error = start.error + 36 * EPS * first * done + rest.error
    return { value: Math.min(1, Math.max(0, value)), error, method: 'eigen-series' }
  }

  private fluxBySeries(j: number, m: SlabMoment): Estimate {
    const B = this.slab.biot
    const delta = this.slab.deltas[j]!
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
          6 * z * delta * (Math.abs(this.sines[j]![n]!) + (z / B) * Math.abs(c)))
    }
    const z = roots[count]!
    const size = weights[count]! * z * (1 + (z / B) * Math.min(1, z * delta))
    const tail = (size * Math.exp(-z * z * m.fourier)) / -Math.expm1(-Math.PI * z * m.fourier)
    return { value: this.slab.inner[j] === 0 ? 0 : value, error: EPS * error + tail + TINY, method: 'eigen-series' }
  }

  /** Weights of the mean: 2Bi²/(z²(z² + Bi² + Bi)) = wₙ·Bi/zₙ. */
  private meanSum(m: SlabMoment, first: number): { value: number; error: number } {
    const B = this.slab.biot
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

  private meanBySeries(m: SlabMoment): Estimate {
    const { value, error } = this.meanSum(m, 0)
    return { value: Math.min(1, value), error, method: 'eigen-series' }
  }

  private heatBySeries(m: SlabMoment): Estimate {
    const z = this.roots[0]!
    const first = (this.weights[0]! * this.slab.biot) / z
    const done = -Math.expm1(-z * z * m.fourier)
    const start = oneMinusFirstMean(z, first)
    const rest = this.meanSum(m, 1)
    const value = start.value + first * done - rest.value
    const error = start.error + 36 * EPS * first * done + rest.error
    return { value: Math.min(1, Math.max(0, value)), error, method: 'eigen-series' }
  }
}

/** Terms whose exponent is within DECAY of the first's: ((n − 1)π)² − (π/2)² ≥ DECAY/Fo. */
function termsAt(fourier: number): number {
  return 2 + Math.floor(Math.sqrt(DECAY / fourier + 2.4674011002723395) / Math.PI)
}

function choose(m: SlabMoment, images: () => Estimate, series: () => Estimate): Estimate {
  if (m.fourier < SERIES_FROM) return images()
  if (m.fourier > IMAGES_TO) return series()
  const a = images()
  const b = series()
  return a.error <= b.error ? a : b
}

/**
 * 1 − C₁ cos(z(1 − δ)), from its power series in z where the difference would cancel; X = 1 − δ:
 * (z + sin z cos z)·(1 − A₁) = −Σ (−1)^m z^(2m+1)/(2m+1)!·[(1+X)^(2m+1) + (1−X)^(2m+1) − 4^m],  m ≥ 1
 */
function oneMinusFirst(z: number, X: number, first: number): { value: number; error: number } {
  if (z > 0.9) return { value: 1 - first, error: EPS * (24 + 12 * z) * first }
  let power = z
  let up = 1 + X
  let down = 1 - X
  let four = 1
  let sum = 0
  let size = 0
  for (let m = 1; m <= 14; m++) {
    power *= -(z * z) / (2 * m * (2 * m + 1))
    up *= (1 + X) * (1 + X)
    down *= (1 - X) * (1 - X)
    four *= 4
    const term = power * (up + down - four)
    sum -= term
    size += Math.abs(power) * (up + down + four)
  }
  const scale = z + Math.sin(z) * Math.cos(z)
  return { value: sum / scale, error: (24 * EPS * size) / scale }
}

/**
 * 1 − D₁ of the mean, D₁ = 2 sin²z/(z(z + sin z cos z)); with w = 2z:
 * z(z + sin z cos z)·(1 − D₁) = Σ_{k≥2} (−1)^k w^(2k+2)·[1/(4(2k+1)!) − 1/(2k+2)!]
 */
function oneMinusFirstMean(z: number, first: number): { value: number; error: number } {
  if (z > 0.9) return { value: 1 - first, error: 40 * EPS * first }
  const square = 4 * z * z
  let power = (square * square) / 24 // w^(2k+2)/(2k+1)! is this times w²/(2k+1) for k = 2
  let sum = 0
  let size = 0
  for (let k = 2; k <= 16; k++) {
    power *= k === 2 ? square / 5 : -square / (2 * k * (2 * k + 1))
    const term = power * (0.25 - 1 / (2 * k + 2))
    sum += term
    size += Math.abs(term)
  }
  const scale = z * (z + Math.sin(z) * Math.cos(z))
  return { value: sum / scale, error: (30 * EPS * size) / scale }
}
