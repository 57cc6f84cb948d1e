import { type Estimate, EPS, lastPlaces, TINY } from '../math/rounding.ts'
import type { Share } from '../math/unit-body.ts'
import type { OutputName } from '../outputs.ts'
import type { Bound, Method, Output, Solution } from '../solution.ts'

/** Answer of a body to a unit step of its one drive, at time i and place j. Cases without places ignore j. */
export interface StepResponse {
  /** Whichever of the two is had at least cost: temperatures need only one. */
  share(i: number, j: number): Share
  remaining(i: number, j: number): Estimate
  completed(i: number, j: number): Estimate
  /** Local flux per kelvin of the step, W/(m2.K). */
  flux?(i: number, j: number): Estimate
  /** Flux into the body at the exposed face per kelvin, W/(m2.K). */
  surfaceFlux?(i: number): Estimate
  /** Heat gained per kelvin of the step. */
  heat?(i: number): Estimate
  heatFraction?(i: number): Estimate
  meanRemaining?(i: number): Estimate
}

export interface Step {
  times: readonly number[]
  /** Number of places, or undefined for a case without. */
  places: number | undefined
  outputs: readonly OutputName[]
  initial: number
  /** Temperature that the body ends at. */
  drive: number
}

/**
 * Outputs of a body with one drive, from its response to a unit step.
 *
 *   T = drive − (drive − initial)·θ = initial + (drive − initial)·(1 − θ);  fluxes and heats are (drive − initial) times the response
 *
 * Bounds: temperatures carry one absolute figure, fractions a relative one, fluxes and heats both, the absolute part
 * being what the rounding of the two temperatures moves.
 */
export function stepOutputs(step: Step, response: StepResponse): Pick<Solution, 'outputs' | 'methods'> {
  const methods = new Set<Method>()
  const outputs: Solution['outputs'] = {}
  const difference = step.drive - step.initial
  const temperatures = { initial: step.initial, drive: step.drive, difference }
  for (const name of step.outputs) {
    const one = valueOf(name, response, temperatures)
    if (!one) continue
    const bound: Bound = { absolute: 0, relative: 0 }
    const collect = (i: number, j: number): number => {
      const v = one.at(i, j)
      methods.add(v.method)
      bound.absolute = Math.max(bound.absolute, v.absolute)
      bound.relative = Math.max(bound.relative, v.relative)
      return v.value
    }
    outputs[name] = { values: fill(step, one.placed, collect), bound }
  }
  return { outputs, methods: [...methods] }
}

function fill(step: Step, placed: boolean, collect: (i: number, j: number) => number): Output['values'] {
  const { times, places } = step
  if (!placed || places === undefined) return times.map((_, i) => collect(i, 0))
  return times.map((_, i) => Array.from({ length: places }, (__, j) => collect(i, j)))
}

interface Bounded extends Bound {
  value: number
  method: Method
}
interface Temperatures {
  initial: number
  drive: number
  difference: number
}
interface Evaluator {
  placed: boolean
  at(i: number, j: number): Bounded
}

function valueOf(name: OutputName, r: StepResponse, t: Temperatures): Evaluator | undefined {
  switch (name) {
    case 'temperature':
      return { placed: true, at: (i, j) => temperature(r.share(i, j), t) }
    case 'meanTemperature':
      return (
        r.meanRemaining && { placed: false, at: (i) => temperature({ ...r.meanRemaining!(i), of: 'remaining' }, t) }
      )
    case 'remainingFraction':
      return { placed: true, at: (i, j) => fraction(r.remaining(i, j)) }
    case 'completedFraction':
      return { placed: true, at: (i, j) => fraction(r.completed(i, j)) }
    case 'heatFraction':
      return r.heatFraction && { placed: false, at: (i) => fraction(r.heatFraction!(i)) }
    case 'heatFlux':
      return r.flux && { placed: true, at: (i, j) => perKelvin(r.flux!(i, j), t, 'absolute') }
    case 'surfaceHeatFlux':
      return r.surfaceFlux && { placed: false, at: (i) => perKelvin(r.surfaceFlux!(i), t, 'relative') }
    case 'heatGained':
      return r.heat && { placed: false, at: (i) => perKelvin(r.heat!(i), t, 'relative') }
    default:
      return undefined
  }
}

function temperature(share: Share, t: Temperatures): Bounded {
  const raw = share.of === 'remaining' ? t.drive - t.difference * share.value : t.initial + t.difference * share.value
  // The maximum principle; the true value lies inside, so this can only lower the error.
  const value = Math.min(Math.max(raw, Math.min(t.initial, t.drive)), Math.max(t.initial, t.drive))
  const completed = share.of === 'completed' ? share.value : 1 - share.value
  const inputs = EPS * (Math.abs(t.initial) * (1 - completed) + Math.abs(t.drive) * completed)
  const absolute = Math.abs(t.difference) * (share.error + 2 * EPS * share.value) + inputs + lastPlaces(value)
  return { value, absolute, relative: 0, method: share.method }
}

/** Fractions are answered to a relative figure, as long as they can be told from zero at all. */
function fraction(e: Estimate): Bounded {
  const told = e.value > 1e10 * TINY
  const relative = told ? (e.error + lastPlaces(e.value)) / e.value : 0
  return { value: e.value, absolute: told ? 0 : e.error, relative, method: e.method }
}

function perKelvin(e: Estimate, t: Temperatures, kind: 'absolute' | 'relative'): Bounded {
  const value = t.difference * e.value + 0 // never −0
  const inputs = EPS * (Math.abs(t.initial) + Math.abs(t.drive)) * Math.abs(e.value) + Number.MIN_VALUE
  const own = Math.abs(t.difference) * e.error
  if (kind === 'absolute' || Math.abs(e.value) < 1e10 * TINY)
    return { value, absolute: inputs + own + lastPlaces(value), relative: 0, method: e.method }
  return { value, absolute: inputs, relative: e.error / Math.abs(e.value) + 6 * EPS, method: e.method }
}

/** A value that carries no error but its own rounding. */
export function exactly(value: number): Estimate {
  return { value, error: value === 0 ? 0 : EPS * Math.abs(value), method: 'closed-form' }
}

/** An estimate times a factor that carries the rounding of a few inputs. */
export function scaled(factor: number, e: Estimate): Estimate {
  return { ...e, value: factor * e.value, error: Math.abs(factor) * (e.error + 8 * EPS * Math.abs(e.value)) }
}

/** A body that exchanges nothing stays as it is. */
export const untouched: StepResponse = {
  share: () => ({ ...exactly(0), of: 'completed' }),
  remaining: () => exactly(1),
  completed: () => exactly(0),
  flux: () => exactly(0),
  surfaceFlux: () => exactly(0),
  heat: () => exactly(0),
  heatFraction: () => exactly(0),
  meanRemaining: () => exactly(1),
}
