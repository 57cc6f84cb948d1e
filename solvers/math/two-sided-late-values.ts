import { gaussOver } from './gauss-panels.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'
import { type Face, meanOf, type Place, sinc } from './two-sided-body.ts'
import type { LateSlab, LateState } from './two-sided-late.ts'
import { modeAt, modeSlopeAt } from './two-sided-modes.ts'
import { inwardFlux } from './two-sided-steady.ts'

/**
 * Temperatures, fluxes and heat of a slab between two faces at one time, by its eigenfunctions. Until the slowest mode has
 * fallen to 1/e it is kept apart from the steady profile, with which it would cancel; from then on the two stand whole, so
 * that a flux that dies out keeps its digits.
 */
export class LateValues {
  private readonly temperatureError: number
  private readonly slopeError: number
  private readonly slab: LateSlab
  private readonly state: LateState

  constructor(slab: LateSlab, state: LateState) {
    this.slab = slab
    this.state = state
    const { roots, sizes } = slab.modes
    let temperature = 0
    let slope = 0
    for (let n = 0; n < state.amounts.length; n++) {
      const z = roots[n]!
      const place = 4 * (1 + z) * Math.abs(state.amounts[n]!)
      temperature += (state.errors[n]! + place) * sizes[n]!
      slope += (state.errors[n]! + 1.5 * state.slacks[n]! + place) * sizes[n]! * z
    }
    this.temperatureError = EPS * temperature + state.tail + this.profileError() + TINY
    this.slopeError = EPS * slope + state.tail * roots[state.amounts.length]! + this.profileSlopeError() + TINY
  }

  /** Above the reference. */
  temperature({ near }: Place): Estimate {
    const value = this.profileAt(near) + this.sum((z) => modeAt(this.slab.body.left, z, near))
    return { value, error: this.temperatureError, method: 'eigen-series' }
  }

  /** −∂θ/∂X. */
  flux({ near, far }: Place): Estimate {
    if (near === 0) return { ...this.leftFlux(), error: this.slopeError }
    if (far === 0) return { ...this.rightFlux(), value: -this.rightFlux().value, error: this.slopeError }
    const value = -this.profileSlopeAt(near) - this.sum((z) => modeSlopeAt(this.slab.body.left, z, near))
    return { value, error: this.slopeError, method: 'eigen-series' }
  }

  leftFlux(): Estimate {
    const { body, load } = this.slab
    return this.faceFlux(body.left, load.left, 0, () => -body.left.beta)
  }

  rightFlux(): Estimate {
    const { body, load, modes } = this.slab
    return this.faceFlux(body.right, load.right, 1, (n) => -modes.ends[n]! * body.right.beta)
  }

  /** Of the mean temperature, since the start. */
  gain(): Estimate {
    const { state, slab } = this
    const { means, sizes } = slab.modes
    const apart = state.apart === 1
    const initial = apart ? deficit(slab) : meanOf(slab.load)
    let value = this.profileMean() - initial
    let error = 0
    for (let n = 0; n < state.amounts.length; n++) {
      const amount = apart && n === 0 ? state.gained : state.amounts[n]!
      const own = apart && n === 0 ? state.gainedError : state.errors[n]! + 1.5 * state.slacks[n]!
      value += amount * means[n]!
      error += (own + 8 * Math.abs(amount)) * Math.max(Math.abs(means[n]!), 1e-16 * sizes[n]!)
    }
    const rounding = EPS * (error + 8 * Math.abs(initial)) + state.tail + this.profileError() + TINY
    return { value, error: rounding, method: 'eigen-series' }
  }

  private sum(of: (z: number) => number): number {
    const { amounts } = this.state
    const { roots } = this.slab.modes
    let value = 0
    for (let n = 0; n < amounts.length; n++) value += amounts[n]! * of(roots[n]!)
    return value
  }

  private faceFlux(face: Face, drive: { value: number; slack: number }, X: 0 | 1, of: (n: number) => number): Estimate {
    const { state, slab } = this
    let value = this.faceBase(face, drive.value, X)
    let error = 0
    for (let n = 0; n < state.amounts.length; n++) {
      const factor = of(n)
      value += state.amounts[n]! * factor
      error += (state.errors[n]! + 1.5 * state.slacks[n]! + 4 * Math.abs(state.amounts[n]!)) * Math.abs(factor)
    }
    const last = state.amounts.length
    const tail = (state.tail * Math.abs(of(last))) / slab.modes.sizes[last]!
    return { value, error: EPS * error + tail + this.faceBaseError(face, drive) + TINY, method: 'eigen-series' }
  }

  /** Flux into the body of the profiles that stand beside the modes. */
  private faceBase(face: Face, drive: number, X: 0 | 1): number {
    const { steady, apart, heated } = this.slab
    const { state } = this
    const inward = X === 0 ? -1 : 1
    let value = 0
    if (state.steady) value += inward * steady!.slopeAt(X)
    if (state.apart) value += inwardFlux(face, drive, apart.at(X), inward * apart.slopeAt(X))
    if (state.heated) value += state.heated * inwardFlux(face, 0, heated!.at(X), inward * heated!.slopeAt(X))
    return value
  }

  private faceBaseError(face: Face, drive: { value: number; slack: number }): number {
    const { steady, apart, heated, load } = this.slab
    const { state } = this
    const weak = face.beta <= face.alpha
    const passed = weak ? 2 * face.beta : 4
    let error = 0
    if (state.steady) error += steady!.slopeError
    if (state.apart) {
      const slack = passed * (load.left.slack + load.right.slack) + 2 * drive.slack
      error += passed * apart.error + EPS * (8 * Math.abs(drive.value) + slack)
    }
    if (state.heated) error += passed * Math.abs(state.heated) * (heated!.error + 8 * EPS)
    return error
  }

  private profileAt(X: number): number {
    const { steady, apart, heated } = this.slab
    const { state } = this
    const settled = state.steady ? steady!.at(X) : state.apart ? apart.at(X) : 0
    return state.heated ? settled + state.heated * heated!.at(X) : settled
  }

  private profileSlopeAt(X: number): number {
    const { steady, apart, heated } = this.slab
    const { state } = this
    const settled = state.steady ? steady!.slopeAt(X) : state.apart ? apart.slopeAt(X) : 0
    return state.heated ? settled + state.heated * heated!.slopeAt(X) : settled
  }

  private profileMean(): number {
    const { steady, apart, heated } = this.slab
    const { state } = this
    const settled = state.steady ? steady!.mean : state.apart ? apart.mean : 0
    return state.heated ? settled + state.heated * heated!.mean : settled
  }

  private profileError(): number {
    const { steady, apart, heated, load } = this.slab
    const { state } = this
    const settled = state.steady ? steady!.error : state.apart ? apart.error : 0
    const source = state.heated ? Math.abs(state.heated) * (heated!.error + EPS * (8 + 8 * load.source.rate)) : 0
    return settled + source
  }

  private profileSlopeError(): number {
    const { steady, apart, heated, load } = this.slab
    const { state } = this
    const slack = EPS * 4 * (load.left.slack + load.right.slack)
    const settled = state.steady ? steady!.slopeError : state.apart ? 4 * apart.error + slack : 0
    return settled + (state.heated ? 4 * Math.abs(state.heated) * heated!.error : 0)
  }
}

/**
 * ∫f·(1 − φ₀∫φ₀/∫φ₀²), what the slowest mode does not hold of the initial mean. Where both films are weak the bracket is
 * small, and made of the differences that are left: ∫φ(ξ)(φ(ξ) − φ(X))dξ/∫φ².
 */
function deficit({ modes, body, load, start }: LateSlab): number {
  if (load.rises.length === 0) return 0
  const z = modes.roots[0]!
  if (z > 0.8) return meanOf(load) - (start * modes.means[0]!) / modes.norms[0]!
  const { alpha, beta } = body.left
  const apart = (X: number) =>
    gaussOver((xi) => {
      const half = (z * (xi + X)) / 2
      const width = (xi - X) * sinc((z * (xi - X)) / 2)
      return modeAt(body.left, z, xi) * width * (beta * Math.cos(half) - alpha * z * Math.sin(half))
    }, 1)
  const sum = load.rises.reduce((total, { from, width, start: T, rise }) => {
    if (width === 0) return total
    return total + gaussOver((X) => (T + (rise.value * (X - from)) / width) * apart(X), 1, from, width)
  }, 0)
  return sum / modes.norms[0]!
}
