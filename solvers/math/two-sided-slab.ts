import { EPS, type Estimate } from './rounding.ts'
import type { Load, Moment, Place, TwoSidedBody } from './two-sided-body.ts'
import { crossingFlux } from './two-sided-crossing.ts'
import { EarlyValues } from './two-sided-early.ts'
import { LateSlab, termsAt } from './two-sided-late.ts'
import { modeAt } from './two-sided-modes.ts'
import { LateValues } from './two-sided-late-values.ts'

/** What a slab between two faces is asked at one time. */
export interface SlabValues {
  /** Above the reference. */
  temperature(place: Place): Estimate
  /** −∂θ/∂X. */
  flux(place: Place): Estimate
  /** Into the body, as slopes per thickness. */
  leftFlux(): Estimate
  rightFlux(): Estimate
  /** Of the mean temperature, since the start. */
  gain(): Estimate
}

/** Where the series needs seven terms and a wave has faded by e^(−6) on its way across. */
export const SERIES_FROM = 0.1

/** A slab between two faces that anything linear may drive, from time 0 on and over the whole domain. */
export class TwoSidedSlab {
  private readonly late: LateSlab
  private readonly body: TwoSidedBody
  private readonly load: Load

  constructor(body: TwoSidedBody, load: Load) {
    this.body = body
    this.load = load
    this.late = new LateSlab(body, load, SERIES_FROM)
  }

  at(m: Moment): SlabValues {
    if (m.fourier < SERIES_FROM) return new EarlyValues(this.body, this.load, m)
    return new LateValues(this.late, this.late.stateAt(m.fourier))
  }

  /** The flux at a face that the other alone drives; undefined where the series has all its digits. */
  crossing(face: 'left' | 'right', m: Moment): Estimate | undefined {
    if (m.fourier >= SERIES_FROM) return undefined
    const { left, right } = this.body
    if (face === 'right') return crossingFlux(left, this.load.left, right, m)
    return crossingFlux(right, this.load.right, left, m)
  }

  /**
   * After a drive that acted for a while and then stopped: at `m` since it began and `since` it ended, `ratio` the one time
   * over the other. A short pulse long ago is not the difference of two like numbers: the change is reckoned as one.
   */
  afterPulse(m: Moment, since: Moment, ratio: number): SlabValues {
    if (since.fourier >= SERIES_FROM)
      return new LateValues(this.late, this.late.stateAt(since.fourier, since.fourier * ratio))
    if (ratio < 0.4) return new EarlyValues(this.body, this.load, since, ratio)
    return differenceOf(this.at(m), this.at(since))
  }

  /** The end state, where there is one: with faces that pass no heat, what the start and balanced fluxes leave. */
  steady({ near }: Pick<Place, 'near'>): Estimate {
    const { steady, apart, modes, start } = this.late
    if (steady) return { value: steady.at(near), error: steady.error, method: 'closed-form' }
    const { size, rate } = this.load.source
    const released = rate > 0 ? size / rate : 0
    const value = start / modes.norms[0]! + apart.at(near) + released
    return { value, error: apart.error + 24 * EPS * (Math.abs(start) + Math.abs(released)), method: 'closed-form' }
  }

  /** The n-th mode: z², what it is at a place at time 0, and the most it is anywhere. */
  mode(n: number) {
    const { modes, amounts } = this.late
    const [z, amount] = [modes.roots[n]!, amounts[n]!]
    return {
      square: z * z,
      at: ({ near }: Pick<Place, 'near'>) => amount * modeAt(this.body.left, z, near),
      most: Math.abs(amount) * modes.sizes[n]!,
    }
  }

  terms(m: Moment): number {
    return m.fourier < SERIES_FROM ? 0 : termsAt(m.fourier)
  }
}

function differenceOf(a: SlabValues, b: SlabValues): SlabValues {
  const minus = (x: Estimate, y: Estimate): Estimate => ({
    value: x.value - y.value,
    error: x.error + y.error,
    method: x.method,
  })
  return {
    temperature: (place) => minus(a.temperature(place), b.temperature(place)),
    flux: (place) => minus(a.flux(place), b.flux(place)),
    leftFlux: () => minus(a.leftFlux(), b.leftFlux()),
    rightFlux: () => minus(a.rightFlux(), b.rightFlux()),
    gain: () => minus(a.gain(), b.gain()),
  }
}
