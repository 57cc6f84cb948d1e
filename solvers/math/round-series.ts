import { Decays } from './decays.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'
import type { Moment } from './unit-body.ts'

/** Terms are kept until e^(−50) of the first. */
const DECAY = 50

/** What a mode counts at one place: its value, what rounding may move it by in units of EPS, and the most it may be thereabouts. */
export interface Part {
  value: number
  slack: number
  most: number
}

/** An eigenfunction of a cylinder or sphere of radius 1 with its coefficient, and the root z that it decays by, as e^(−z²Fo). */
export interface Mode {
  root: number
  /** Of θ, one a place. */
  parts: readonly Part[]
  /** Of the flux, in the unit of flux. */
  fluxes: readonly Part[]
  /** Of the mean of θ. */
  mean: number
}

/** 1 − the coefficient of the first mode, found without cancellation. */
export interface FirstDeficit {
  at(j: number): { value: number; error: number }
  mean: { value: number; error: number }
}

/**
 * A cylinder or sphere by its eigenfunctions: θ = Σ Cₙφₙ(ρ)·e^(−zₙ²Fo).
 *
 * The error of each answer sums, term by term, what the rounding of up to ten inputs and operations may move, and the
 * neglected tail.
 */
export class RoundSeries {
  private readonly modeOf: (n: number) => Mode
  private readonly deficit: FirstDeficit
  private readonly modes: Mode[] = []
  private readonly decays = new Decays((n) => this.mode(n).root)

  /** Modes are asked for only as far as the times need them. */
  constructor(modeOf: (n: number) => Mode, deficitOf: (first: Mode) => FirstDeficit) {
    this.modeOf = modeOf
    this.deficit = deficitOf(this.mode(0))
  }

  mode(n: number): Mode {
    for (let k = this.modes.length; k <= n; k++) this.modes.push(this.modeOf(k))
    return this.modes[n]!
  }

  remaining(j: number, m: Moment): Estimate {
    return within(this.sum(m, 0, (mode) => mode.parts[j]!))
  }

  /** The first term by expm1, so that nothing cancels as Bi → 0. */
  completed(j: number, m: Moment): Estimate {
    const { value, slack } = this.mode(0).parts[j]!
    const rest = this.sum(m, 1, (mode) => mode.parts[j]!)
    return within(this.complement(m, value, slack, this.deficit.at(j), rest))
  }

  flux(j: number, m: Moment): Estimate {
    return estimate(this.sum(m, 0, (mode) => mode.fluxes[j]!))
  }

  meanRemaining(m: Moment): Estimate {
    return within(this.sum(m, 0, meanOf))
  }

  heatFraction(m: Moment): Estimate {
    const { value, slack } = meanOf(this.mode(0))
    return within(this.complement(m, value, slack, this.deficit.mean, this.sum(m, 1, meanOf)))
  }

  private complement(m: Moment, first: number, slack: number, deficit: Sum, rest: Sum): Sum {
    const z = this.mode(0).root
    const done = -Math.expm1(-z * z * m.fourier)
    const error = deficit.error + EPS * (20 * Math.abs(first) + slack) * done + rest.error
    return { value: deficit.value + first * done - rest.value, error }
  }

  /** Σ from mode `first` on. */
  private sum(m: Moment, first: number, partOf: (mode: Mode) => Part): Sum {
    const count = roundTermsAt(m.fourier)
    const { exponents, factors } = this.decays.at(m.fourier, count)
    const { modes } = this
    let value = 0
    let error = 0
    for (let n = first; n < count; n++) {
      const part = partOf(modes[n]!)
      const factor = factors[n]!
      value += factor * part.value
      error += factor * (part.slack + 18 * exponents[n]! * Math.abs(part.value))
    }
    const tail = (partOf(modes[count]!).most * factors[count]!) / -Math.expm1(-3 * modes[count]!.root * m.fourier)
    return { value, error: EPS * error + tail + TINY }
  }
}

interface Sum {
  value: number
  error: number
}

const meanOf = ({ mean }: Mode): Part => ({ value: mean, slack: 30 * mean, most: mean })
const estimate = ({ value, error }: Sum): Estimate => ({ value, error, method: 'eigen-series' })
const within = ({ value, error }: Sum): Estimate => ({
  value: Math.min(1, Math.max(0, value)),
  error: Math.min(1, error),
  method: 'eigen-series',
})

/** Terms whose exponent is within DECAY of the first's, for roots about π apart. */
export function roundTermsAt(fourier: number): number {
  return 3 + Math.floor(Math.sqrt(DECAY / fourier) / Math.PI)
}
