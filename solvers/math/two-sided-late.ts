import { gaussOver } from './gauss-panels.ts'
import { endOf, type Load, meanDecay, sinc, type TwoSidedBody } from './two-sided-body.ts'
import { ForcedProfile, twoDecays } from './two-sided-forced.ts'
import { type Modes, modeAt, modeSlopeAt, twoSidedModes } from './two-sided-modes.ts'
import { settles, type SteadyProfile, steadyProfile } from './two-sided-steady.ts'

/** Terms are kept until e^(−50) of the slowest. */
const DECAY = 50

/** What the modes amount to at one time, and which profiles stand beside them. */
export interface LateState {
  /** Factor of each φₙ. */
  amounts: Float64Array
  /** What each factor may be off in units of EPS: by rounding, and by the rounding of the temperatures given. */
  errors: Float64Array
  slacks: Float64Array
  /** What is left out, at most. */
  tail: number
  /** Factors of the three profiles: steady, steady less the slow mode, and of a source that decays. */
  steady: 0 | 1
  apart: 0 | 1
  heated: number
  /** The slowest mode since the start, what it has gained by drives less what it has lost of the initial profile. */
  gained: number
  gainedError: number
}

/** A slab between two faces by its eigenfunctions: all that does not depend on place or time. */
export class LateSlab {
  readonly modes: Modes
  readonly steady: SteadyProfile | undefined
  readonly apart: ForcedProfile
  readonly heated: ForcedProfile | undefined
  /** ∫fφ₀ of the initial profile. */
  readonly start: number
  readonly body: TwoSidedBody
  readonly load: Load
  /** The mode whose z² is nearest to the rate of the source. */
  private readonly resonant: number
  /** Factor of each φₙ at time 0, the drives' steady profile taken off; the slowest of two faces without film aside. */
  readonly amounts: Float64Array
  private readonly sizes: Float64Array
  private readonly slacks: Float64Array

  /** `shortest` is the smallest Fourier number to be asked for; it decides how many terms are kept. */
  constructor(body: TwoSidedBody, load: Load, shortest: number) {
    const { size, rate } = load.source
    const decays = size !== 0 && rate > 0
    const lasts = decays && rate < Math.PI ** 2 + 60 / shortest
    const count = Math.floor(Math.max(termsAt(shortest), lasts ? Math.sqrt(rate) / Math.PI + 1 : 0)) + 3
    this.body = body
    this.load = load
    this.modes = twoSidedModes(body, count)
    const source = decays ? 0 : size
    const drives = { left: load.left, right: load.right, source }
    this.steady = settles(body) ? steadyProfile(body, drives) : undefined
    this.apart = new ForcedProfile(body, this.modes, 0, 0, {
      left: load.left.value,
      right: load.right.value,
      source,
    })
    this.resonant = lasts ? nearest(this.modes.roots, Math.sqrt(rate)) : -1
    this.heated = lasts
      ? new ForcedProfile(body, this.modes, this.resonant, rate, { left: 0, right: 0, source: 1 })
      : undefined
    this.start = load.rises.reduce((sum, rise) => sum + this.partOf(rise), 0)
    this.amounts = new Float64Array(count)
    this.sizes = new Float64Array(count)
    this.slacks = new Float64Array(count)
    for (let n = 0; n < count; n++) this.coefficient(n, source)
  }

  /** At a Fourier number; with `pulse` the change since that much earlier of a slab that was idle before. */
  stateAt(fourier: number, pulse?: number): LateState {
    const { roots } = this.modes
    const count = Math.min(termsAt(fourier), roots.length - 2)
    const slow = roots[0]! ** 2
    const apart = slow * fourier <= 1 || this.steady === undefined
    const state: LateState = {
      amounts: new Float64Array(count),
      errors: new Float64Array(count),
      slacks: new Float64Array(count),
      tail: this.tailAt(count, fourier),
      steady: apart || pulse !== undefined ? 0 : 1,
      apart: apart && pulse === undefined ? 1 : 0,
      heated: 0,
      gained: 0,
      gainedError: 0,
    }
    for (let n = 0; n < count; n++) {
      const decay = roots[n]! ** 2 * fourier
      const left = Math.exp(-decay) * (pulse === undefined ? 1 : Math.expm1(-(roots[n]! ** 2) * pulse))
      state.amounts[n] = this.amounts[n]! * left
      state.errors[n] = this.sizes[n]! * Math.abs(left) * (12 + 16 * decay)
      state.slacks[n] = this.slacks[n]! * Math.abs(left)
    }
    if (apart) this.setSlowest(state, slow * fourier, fourier, pulse)
    this.heat(state, fourier)
    return state
  }

  /** The slowest mode by itself: what is left of the initial profile, and F·(1 − e^(−x))/z² of the drives. */
  private setSlowest(state: LateState, x: number, fourier: number, pulse: number | undefined): void {
    const { load, modes } = this
    const norm = modes.norms[0]!
    const slow = modes.roots[0]! ** 2
    const span = pulse === undefined ? fourier * meanDecay(x) : Math.exp(-x) * pulse * meanDecay(slow * pulse)
    const driven = (this.apart.forcing * span) / norm
    const heat = load.source.rate > 0 ? 0 : Math.abs(load.source.size * modes.means[0]!)
    const drives = (Math.abs(load.left.value) + Math.abs(modes.ends[0]! * load.right.value) + heat) * span
    const profile = load.rises.reduce((sum, r) => sum + r.width * (Math.abs(r.start) + Math.abs(r.rise.value)), 0)
    const given = load.rises.reduce((sum, r) => sum + r.width * r.rise.slack, 0)
    const slack = load.left.slack + Math.abs(modes.ends[0]!) * load.right.slack
    state.amounts[0] = (this.start * Math.exp(-x)) / norm + driven
    state.errors[0] = ((profile * Math.exp(-x) + drives) * (30 + 16 * x)) / norm
    state.slacks[0] = (given + slack * span) / norm
    state.gained = (this.start * Math.expm1(-x)) / norm + driven
    state.gainedError = ((profile * -Math.expm1(-x) + drives) * (30 + 16 * x) + slack * span) / norm
  }

  /** Adds a source that decays: σ∫φ·(e^(−λFo) − e^(−z²Fo))/(z² − λ) in each mode, the first parts of all but one in closed form. */
  private heat(state: LateState, fourier: number): void {
    const { size, rate } = this.load.source
    if (size === 0 || rate === 0) return
    const { roots, norms, means } = this.modes
    const lasts = this.heated !== undefined && (rate - roots[0]! ** 2) * fourier < 60
    if (lasts) state.heated = size * Math.exp(-rate * fourier)
    for (let n = 0; n < state.amounts.length || (lasts && n <= this.resonant); n++) {
      const square = roots[n]! ** 2
      const share = (size * means[n]!) / norms[n]!
      const added =
        lasts && n === this.resonant
          ? share * twoDecays(rate, square, fourier)
          : (-share * Math.exp(-square * fourier)) / (square - rate)
      if (n >= state.amounts.length) grow(state, n + 1)
      const error = Math.abs(added) * (20 + 16 * (Math.min(square, rate) * fourier + square * fourier))
      state.amounts[n]! += added
      state.errors[n]! += error
      if (n === 0) state.gained += added
      if (n === 0) state.gainedError += error
    }
  }

  private partOf({ from, width, start, rise }: Load['rises'][number]): number {
    if (width === 0) return 0
    const z = this.modes.roots[0]!
    return gaussOver((X) => (start + (rise.value * (X - from)) / width) * modeAt(this.body.left, z, X), 1, from, width)
  }

  /**
   * −[d₁ + κ(d₂ − β₂f(1)) + s∫φ − Σ rise·φ′(middle)·sinc(z·width/2)]/(z²·∫φ²): faces, source and rises of the profile are
   * alike to a mode.
   */
  private coefficient(n: number, source: number): void {
    const { modes, body, load } = this
    const z = modes.roots[n]!
    const kappa = modes.ends[n]!
    const end = body.right.beta * endOf(load)
    let sum = load.left.value + kappa * (load.right.value - end) + source * modes.means[n]!
    let size = Math.abs(load.left.value) + Math.abs(kappa) * (Math.abs(load.right.value) + Math.abs(end))
    size += (Math.abs(source) * (body.left.beta + Math.abs(kappa) * body.right.beta)) / (z * z || 1)
    let slack = load.left.slack + Math.abs(kappa) * load.right.slack
    for (const { from, to, width, rise } of load.rises) {
      const slope = modeSlopeAt(body.left, z, (from + to) / 2) * sinc((z * width) / 2)
      sum -= rise.value * slope
      size += Math.abs(rise.value) * z * modes.sizes[n]! * (1 + z)
      slack += rise.slack * z * modes.sizes[n]!
    }
    // The slowest mode of two faces without film has no steady part to differ from; it is answered apart.
    const scale = z * z * modes.norms[n]! || 1
    this.amounts[n] = -sum / scale
    this.sizes[n] = size / scale
    this.slacks[n] = slack / scale
  }

  private tailAt(count: number, fourier: number): number {
    const z = this.modes.roots[count]!
    const { size, rate } = this.load.source
    const heated = rate > 0 ? (Math.abs(size) * 4) / Math.max(1, Math.abs(z * z - rate)) : 0
    const largest = (this.sizes[count]! + heated) * this.modes.sizes[count]! * (1 + z)
    return (largest * Math.exp(-z * z * fourier)) / -Math.expm1(-Math.PI * z * fourier)
  }
}

function nearest(roots: Float64Array, mu: number): number {
  return roots.reduce((best, z, n) => (Math.abs(z - mu) < Math.abs(roots[best]! - mu) ? n : best), 0)
}

function grow(state: LateState, count: number): void {
  for (const name of ['amounts', 'errors', 'slacks'] as const) {
    const longer = new Float64Array(count)
    longer.set(state[name])
    state[name] = longer
  }
}

/** Terms whose exponent is within DECAY of the slowest's. */
export function termsAt(fourier: number): number {
  return 2 + Math.floor(Math.sqrt(DECAY / fourier + Math.PI ** 2) / Math.PI)
}
