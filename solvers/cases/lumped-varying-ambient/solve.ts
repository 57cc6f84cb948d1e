import { type Field, fieldOutputs, grid, history } from '../../bodies/field-outputs.ts'
import { type Ambient, cosineShare, rampShare, rangeSoFar, stepShare } from '../../math/lumped-response.ts'
import { EPS, type Estimate } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import type { Solution } from '../../solution.ts'

export interface VaryingInput {
  /** Heat capacity of what the heat is counted for: the body, or its m2 or m. J/K, J/(m2.K) or J/(m.K). */
  capacity: number
  /** Conductance of the film for the same, W/K, W/(m2.K) or W/(m.K); a correction is in it. */
  conductance: number
  initialTemperature: number
  ambient: Ambient
  times: readonly number[]
  outputs: readonly OutputName[]
}

/**
 * Body with one temperature in a fluid that warms or cools evenly, or in a cycle, from time 0 on.
 *
 *   C·dT/dt = hA·(Tₐ(t) − T),   T(0) = Tᵢ,   s = t·hA/C
 *   ramp:    T = Tᵢ + (Tₐ(0) − Tᵢ)·(1 − e^(−s)) + r·t·[1 − (1 − e^(−s))/s]
 *   cycle:   T = Tᵢ + (Tₘ − Tᵢ)·(1 − e^(−s)) + A·[cos(φ − ψ) − e^(−s)·cos(φ₀ − ψ)]/√(1 + W²),   W = ωC/(hA) = tan ψ
 *
 * Shapes    times: m;  every output has m numbers.
 * Units     SI, temperatures in °C.
 * Domain    capacity > 0;  conductance ≥ 0, at 0 the body stays as it is;  t ≥ 0.
 * Accuracy  temperatures 1e-12 of the spread of Tᵢ and the fluid so far, beside the rounding of inputs and result; heat
 *           the capacity times as much of what either drive alone does. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    F. P. Incropera, D. P. DeWitt, Fundamentals of Heat and Mass Transfer, ch. 5.3 (from memory).
 */
export function solve(input: VaryingInput): Solution {
  const { capacity, initialTemperature, times, outputs } = input
  const rise = (i: number) => riseAt(input, times[i]!)
  const fields: Partial<Record<OutputName, Field>> = {
    temperature: grid((i) => {
      const { value, error, method } = rise(i)
      return { value: initialTemperature + value, error: error + EPS * Math.abs(initialTemperature), method }
    }),
    heatGained: history((i) => {
      const { value, error, method } = rise(i)
      return { value: capacity * value, error: capacity * (error + 8 * EPS * Math.abs(value)), method }
    }),
  }
  const scale = times.reduce((most, t) => Math.max(most, spreadUntil(input, t)), 0)
  return { ...fieldOutputs({ times, places: undefined, outputs }, fields), terms: 0, scale }
}

function riseAt({ capacity, conductance, initialTemperature: initial, ambient }: VaryingInput, time: number): Estimate {
  const s = (time * conductance) / capacity
  const level = ambient.kind === 'ramp' ? ambient.start : ambient.cycle.cycleMean
  const step = stepShare(s)
  const driven =
    ambient.kind === 'ramp'
      ? times(ambient.rampRate * time, rampShare(s))
      : times(ambient.cycle.sign * ambient.cycle.amplitude, cosineShare(time, s, ambient.cycle, capacity / conductance))
  const difference = level - initial
  const roundings = EPS * (Math.abs(level) + Math.abs(initial)) * step.value
  const error = Math.abs(difference) * step.error + roundings + driven.error
  return { value: difference * step.value + driven.value, error, method: 'closed-form' }
}

function times(factor: number, e: Estimate): Estimate {
  return { ...e, value: factor * e.value, error: Math.abs(factor) * (e.error + 4 * EPS * Math.abs(e.value)) }
}

/** Spread of the initial temperature and of what the fluid has had until a time. */
function spreadUntil({ initialTemperature, ambient }: VaryingInput, time: number): number {
  if (ambient.kind === 'ramp') {
    const now = ambient.start + ambient.rampRate * time
    return spread([initialTemperature, ambient.start, now])
  }
  const { cycleMean, amplitude } = ambient.cycle
  const { lowest, highest } = rangeSoFar(time, ambient.cycle)
  return spread([initialTemperature, cycleMean + amplitude * lowest, cycleMean + amplitude * highest])
}

const spread = (values: readonly number[]) => Math.max(...values) - Math.min(...values)
