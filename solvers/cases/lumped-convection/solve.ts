import { EPS, type Estimate, lastPlaces, TINY } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import type { Output, Solution } from '../../solution.ts'
import { type StepResponse, stepOutputs } from '../../bodies/step-response.ts'

export interface LumpedInput {
  /** Heat capacity of what the heat is counted for: the body, or its m2 or m. J/K, J/(m2.K) or J/(m.K). */
  capacity: number
  /** Conductance of the film for the same, W/K, W/(m2.K) or W/(m.K); a correction is in it. */
  conductance: number
  /** Heat released inside, W. */
  power: number
  initialTemperature: number
  ambientTemperature: number
  times: readonly number[]
  outputs: readonly OutputName[]
}

/** Rounding of the inputs and operations in t/τ, at worst those of a corrected sphere. */
const RATIO_ERROR = 26 * EPS

/**
 * Body with one temperature that meets a fluid at another from time 0 on, with a constant heat source inside.
 *
 *   T = Tᵢ + (Tₐ − Tᵢ)·(1 − e^(−t/τ)) + (P/hA)·(1 − e^(−t/τ)),   τ = C/(hA);   h = 0: T = Tᵢ + Pt/C
 *
 * Shapes    times: m;  every output over time has m numbers.
 * Units     SI, temperatures in °C.
 * Domain    capacity > 0;  conductance ≥ 0;  t ≥ 0;  power of any sign.
 * Accuracy  temperatures 1e-12·(|Tₐ − Tᵢ| + |P|·min(t/C, 1/hA)) beside the rounding of inputs and result; fractions
 *           relative (26·t/τ + 8)ε. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    F. P. Incropera, D. P. DeWitt, Fundamentals of Heat and Mass Transfer, ch. 5.1 to 5.3 (from memory).
 */
export function solve(input: LumpedInput): Solution {
  const { initialTemperature, ambientTemperature, power, times, outputs } = input
  const step = { times, places: undefined, outputs, initial: initialTemperature, drive: ambientTemperature }
  const { outputs: stepped, methods } = stepOutputs(step, responseOf(input))
  const solution: Solution['outputs'] = { ...stepped, ...singles(input) }
  if (power !== 0) addSource(input, solution)
  const difference = Math.abs(ambientTemperature - initialTemperature)
  const scale = times.reduce((most, t) => Math.max(most, difference + Math.abs(sourceRise(input, t).limit)), difference)
  return { outputs: solution, methods: methods.length ? methods : ['closed-form'], terms: 0, scale }
}

function ratioAt(input: LumpedInput, time: number): number {
  return (time * input.conductance) / input.capacity
}

function responseOf(input: LumpedInput): StepResponse {
  const left = (i: number): Estimate => {
    const ratio = ratioAt(input, input.times[i]!)
    const value = Math.exp(-ratio)
    return { value, error: value * (RATIO_ERROR * ratio + 4 * EPS) + TINY, method: 'closed-form' }
  }
  const done = (i: number): Estimate => {
    const value = -Math.expm1(-ratioAt(input, input.times[i]!))
    return { value, error: value * (RATIO_ERROR + 4 * EPS) + TINY, method: 'closed-form' }
  }
  return {
    share: (i) => (done(i).value < 0.5 ? { ...done(i), of: 'completed' } : { ...left(i), of: 'remaining' }),
    remaining: left,
    completed: done,
    heatFraction: done,
    heat: (i) => {
      const e = done(i)
      return { ...e, value: input.capacity * e.value, error: input.capacity * (e.error + 8 * EPS * e.value) }
    },
  }
}

/** Temperature rise by the source alone, and the larger of its two limiting forms' lesser, for the scale. */
function sourceRise(input: LumpedInput, time: number): { rise: number; limit: number } {
  const { power, capacity, conductance } = input
  const ratio = ratioAt(input, time)
  const adiabatic = (power * time) / capacity
  if (ratio === 0) return { rise: adiabatic, limit: adiabatic }
  const steady = power / conductance
  const done = -Math.expm1(-ratio)
  // P/(hA) is huge where hA is tiny, and the two forms are the same number: take the one that stays of its size.
  return ratio < 1 ? { rise: adiabatic * (done / ratio), limit: adiabatic } : { rise: steady * done, limit: steady }
}

/** Adds what the source does to temperature and heat. */
function addSource(input: LumpedInput, outputs: Solution['outputs']): void {
  const rises = input.times.map((t) => sourceRise(input, t).rise)
  const add = (output: Output | undefined, factor: number) => {
    if (!output) return
    const before = output.values as number[]
    output.values = before.map((value, i) => value + factor * rises[i]!)
    const own = rises.map(
      (rise, i) => factor * Math.abs(rise) * (RATIO_ERROR + 10 * EPS) + 2 * lastPlaces((output.values as number[])[i]!),
    )
    const relative = output.bound.relative * before.reduce((most, v) => Math.max(most, Math.abs(v)), 0)
    output.bound = {
      absolute: output.bound.absolute + relative + own.reduce((most, v) => Math.max(most, v), 0),
      relative: 0,
    }
  }
  add(outputs.temperature, 1)
  add(outputs.heatGained, input.capacity)
}

function singles(input: LumpedInput): Solution['outputs'] {
  const { capacity, conductance, power, ambientTemperature, initialTemperature } = input
  const outputs: Solution['outputs'] = {}
  if (input.outputs.includes('steadyTemperature')) {
    const rise = power === 0 ? 0 : power / conductance
    const values = (conductance === 0 ? initialTemperature : ambientTemperature) + rise
    const absolute =
      EPS * (Math.abs(ambientTemperature) + Math.abs(initialTemperature) + 16 * Math.abs(rise)) + lastPlaces(values)
    outputs.steadyTemperature = { values, bound: { absolute, relative: 0 } }
  }
  if (input.outputs.includes('timeConstant'))
    outputs.timeConstant = { values: capacity / conductance, bound: { absolute: 0, relative: 28 * EPS } }
  return outputs
}
