import { type InitialProfile, profileOf, type Start } from '../statement/initial-profile.ts'
import { EPS, type Estimate } from '../math/rounding.ts'
import { type Drive, faceOf, type Load, type Moment, type Place } from '../math/two-sided-body.ts'
import { type SlabValues, TwoSidedSlab } from '../math/two-sided-slab.ts'
import { meanOf, placeOf, risesOf, slopesAt, startAtFaces, temperatureIn, withoutEdges } from './profile-along.ts'
import { fluxOf, passesNoHeat, type Side, sideBiot, temperatureOf } from '../statement/side.ts'
import { exactly, scaled } from './step-response.ts'

/** A slab between two sides, in SI and degrees Celsius: what the cases with two sides, a flux or a source share. */
export interface TwoSidedProblem {
  conductivity: number
  diffusivity: number
  volumetricHeatCapacity: number
  /** From the left side to the right. */
  length: number
  left: Side
  right: Side
  start: Start
  /** Heat released in the body from time 0 on: K/s at time 0, falling by e^(−t/timeConstant) if there is one. */
  source?: { rate: number; timeConstant?: number }
  /** The flux of the left side acts for so long, then it is insulated. */
  pulse?: number | undefined
  depths: readonly number[]
  /** Depths that are differences: reckoned from another face, they keep the rounding of the thickness. */
  mirrored?: readonly boolean[]
  times: readonly number[]
}

/** The answers of a slab at one time, in SI. Fluxes are positive from left to right, those of the faces into the body. */
export interface TwoSidedMoment {
  temperature(j: number): Estimate
  flux(j: number): Estimate
  leftFlux(): Estimate
  rightFlux(): Estimate
  heat(): Estimate
  mean(): Estimate
}

export class TwoSided {
  readonly problem: TwoSidedProblem
  readonly profile: InitialProfile
  readonly reference: number
  readonly places: Place[]
  readonly lasting: TwoSidedSlab
  private readonly pulsed: TwoSidedSlab | undefined
  /** What the rounding of the temperatures given may move any temperature by. */
  private readonly rounding: number
  private readonly moments = new Map<number, TwoSidedMoment>()

  constructor(problem: TwoSidedProblem) {
    const { left, right, length, conductivity, start } = problem
    this.problem = problem
    this.profile = profileOf(start, length)
    const inside = withoutEdges(this.profile)
    this.reference = inside.temperatures[0]!
    const given = [...this.profile.temperatures, temperatureOf(left) ?? 0, temperatureOf(right) ?? 0]
    this.rounding = 3 * EPS * given.reduce((most, T) => Math.max(most, Math.abs(T)), 0)
    const rises = risesOf(inside, length)
    this.places = problem.depths.map((depth, j) => {
      const place = placeOf(depth, inside, length, this.reference)
      return problem.mirrored?.[j] ? { ...place, shift: 8 } : place
    })
    const body = {
      left: faceOf(sideBiot(left, length, conductivity)),
      right: faceOf(sideBiot(right, length, conductivity)),
    }
    const rate = this.rateOf()
    const load: Load = {
      left: this.driveOf(left),
      right: this.driveOf(right),
      rises,
      source: { size: ((problem.source?.rate ?? 0) / problem.diffusivity) * length * length, rate },
    }
    const idle = { value: 0, slack: 0 }
    const whileIdle = { ...load, left: idle }
    this.lasting = new TwoSidedSlab(body, problem.pulse === undefined ? load : whileIdle)
    if (problem.pulse !== undefined) {
      const only = { left: load.left, right: idle, rises: [], source: { size: 0, rate: 0 } }
      this.pulsed = new TwoSidedSlab(body, only)
    }
  }

  /** How many of the sides, fluxes, profile and source move the body. With one alone, fluxes keep their relative digits. */
  drives(): number {
    const { left, right, source, start } = this.problem
    const apart = (side: Side) => Number((temperatureOf(side) ?? this.reference) !== this.reference)
    const fluxes = [left, right].filter((side) => fluxOf(side) !== 0).length
    const profile = 'initialProfile' in start ? 2 : 0
    return apart(left) + apart(right) + fluxes + profile + Number((source?.rate ?? 0) !== 0)
  }

  /** Whether something acts at a face itself or all along the body. */
  driven(face: 'left' | 'right'): boolean {
    const side = face === 'left' ? this.problem.left : this.problem.right
    const apart = (temperatureOf(side) ?? this.reference) !== this.reference
    return apart || fluxOf(side) !== 0 || (this.problem.source?.rate ?? 0) !== 0
  }

  /** Whether all that comes to a face is what the other alone drives, with no rounding of its own. */
  crosses(face: 'left' | 'right'): boolean {
    const { left, right, source, start, pulse } = this.problem
    const own = face === 'left' ? left : right
    if (this.reference !== 0 || 'initialProfile' in start || pulse !== undefined || (source?.rate ?? 0) !== 0)
      return false
    return (temperatureOf(own) ?? 0) === 0 && fluxOf(own) === 0
  }

  at(i: number): TwoSidedMoment {
    const known = this.moments.get(i)
    if (known) return known
    // One time at a time: its waves take more room than its answers.
    this.moments.clear()
    const time = this.problem.times[i]!
    const moment = time === 0 ? this.atStart() : this.after(time)
    this.moments.set(i, moment)
    return moment
  }

  terms(): number {
    return this.problem.times.reduce((most, t) => Math.max(most, t > 0 ? this.lasting.terms(this.momentOf(t)) : 0), 0)
  }

  /** The end state, where there is one. */
  steady(j: number): Estimate {
    const { value, error, method } = this.lasting.steady(this.places[j]!)
    return { value: this.reference + value, error: error + this.rounding, method }
  }

  private after(time: number): TwoSidedMoment {
    const { conductivity: k, length, volumetricHeatCapacity, left, right, pulse } = this.problem
    const values = this.valuesAt(time)
    const unit = k / length
    const celsius = ({ value, error, method }: Estimate): Estimate => ({
      value: this.reference + value,
      error: error + this.rounding,
      method,
    })
    const heat = () => scaled(volumetricHeatCapacity * length, values.gain())
    const known = (side: Side, acting: boolean, flux: () => Estimate) =>
      passesNoHeat(side) ? exactly(acting ? fluxOf(side) : 0) : scaled(unit, flux())
    const crossing = (face: 'left' | 'right') => this.crosses(face) && this.lasting.crossing(face, this.momentOf(time))
    const leftFlux = () =>
      known(left, pulse === undefined || time <= pulse, () => crossing('left') || values.leftFlux())
    const rightFlux = () => known(right, true, () => crossing('right') || values.rightFlux())
    const mean = meanOf(this.profile, length, this.reference)
    return {
      temperature: (j) => celsius(values.temperature(this.places[j]!)),
      flux: (j) => {
        const { near, far } = this.places[j]!
        if (near === 0 && passesNoHeat(left)) return leftFlux()
        if (far === 0 && passesNoHeat(right)) return { ...rightFlux(), value: -rightFlux().value }
        return scaled(unit, values.flux(this.places[j]!))
      },
      leftFlux,
      rightFlux,
      heat,
      mean: () => {
        const gain = values.gain()
        return celsius({ ...gain, value: mean + gain.value, error: gain.error + 4 * EPS * Math.abs(mean) })
      },
    }
  }

  private valuesAt(time: number): SlabValues {
    const { pulse } = this.problem
    const lasting = this.lasting.at(this.momentOf(time))
    if (pulse === undefined) return lasting
    const pulsed = this.pulsed!
    const own =
      time <= pulse
        ? pulsed.at(this.momentOf(time))
        : pulsed.afterPulse(this.momentOf(time), this.momentOf(time - pulse), pulse / (time - pulse))
    return sumOf(lasting, own)
  }

  /** The initial state, and the fluxes just after it. */
  private atStart(): TwoSidedMoment {
    const { conductivity: k, length, left, right, depths } = this.problem
    const { profile } = this
    const { first, last } = startAtFaces(profile)
    const slopes = (depth: number) => slopesAt(profile, depth)
    const into = (side: Side, T: number, sign: 1 | -1, slope: Estimate): Estimate => {
      if (side.kind === 'temperature') return scaled(-sign * k, slope)
      const film = side.kind === 'convection' ? side.filmCoefficient * (side.ambientTemperature - T) : 0
      const given =
        side.kind === 'convection' ? side.filmCoefficient * (Math.abs(side.ambientTemperature) + Math.abs(T)) : 0
      const value = film + fluxOf(side)
      return { value, error: EPS * (4 * given + 4 * Math.abs(fluxOf(side))), method: 'closed-form' }
    }
    const leftFlux = () => into(left, first, 1, slopes(0).after)
    const rightFlux = () => into(right, last, -1, slopes(length).before)
    return {
      temperature: (j) => {
        const T = temperatureIn(profile, depths[j]!)
        return { value: T, error: this.rounding, method: 'closed-form' }
      },
      flux: (j) => {
        const depth = depths[j]!
        if (depth === 0) return leftFlux()
        if (depth === length) return { ...rightFlux(), value: -rightFlux().value }
        const { before, after } = slopes(depth)
        const middle = { ...before, value: (before.value + after.value) / 2, error: before.error + after.error }
        return scaled(-k, middle)
      },
      leftFlux,
      rightFlux,
      heat: () => exactly(0),
      mean: () => {
        const value = this.reference + meanOf(profile, length, this.reference)
        return { value, error: this.rounding, method: 'closed-form' }
      },
    }
  }

  private momentOf(time: number): Moment {
    const { diffusivity, length } = this.problem
    return {
      // √a·√t, since a·t can vanish; a/L² first for the same reason.
      root: (Math.sqrt(diffusivity) * Math.sqrt(time)) / length,
      fourier: (diffusivity / (length * length)) * time,
    }
  }

  private rateOf(): number {
    const { source, diffusivity, length } = this.problem
    return source?.timeConstant === undefined ? 0 : (length * length) / diffusivity / source.timeConstant
  }

  /** What a side drives the body by: α·qL/k + β·(T − reference). */
  private driveOf(side: Side): Drive {
    const { length, conductivity } = this.problem
    const { alpha, beta } = faceOf(sideBiot(side, length, conductivity))
    const temperature = temperatureOf(side)
    const flux = alpha * ((fluxOf(side) * length) / conductivity)
    const driven = temperature === undefined ? 0 : beta * (temperature - this.reference)
    const slack = temperature === undefined ? 0 : beta * (Math.abs(temperature) + Math.abs(this.reference))
    return { value: flux + driven, slack: slack + 4 * Math.abs(flux) + 4 * Math.abs(driven) }
  }
}

function sumOf(a: SlabValues, b: SlabValues): SlabValues {
  const plus = (x: Estimate, y: Estimate): Estimate => ({
    value: x.value + y.value,
    error: x.error + y.error,
    method: y.method,
  })
  return {
    temperature: (place) => plus(a.temperature(place), b.temperature(place)),
    flux: (place) => plus(a.flux(place), b.flux(place)),
    leftFlux: () => plus(a.leftFlux(), b.leftFlux()),
    rightFlux: () => plus(a.rightFlux(), b.rightFlux()),
    gain: () => plus(a.gain(), b.gain()),
  }
}
