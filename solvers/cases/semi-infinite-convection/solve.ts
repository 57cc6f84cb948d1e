import {
  completed,
  completedError,
  ENERGY_ERROR,
  energyFraction,
  fluxError,
  fluxFraction,
  remaining,
  REMAINING_ERROR,
} from '../../math/convective-half-space.ts'
import { EPS, TINY } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import type { Solution } from '../../solution.ts'
import { exactly, scaled, type StepResponse, stepOutputs, untouched } from '../../bodies/step-response.ts'
import { solveWithFlux } from './with-flux.ts'

export interface HalfSpaceInput {
  conductivity: number
  diffusivity: number
  filmCoefficient: number
  /** Absorbed at the face beside what the film brings; absent where there is none. */
  imposedHeatFlux?: number
  initialTemperature: number
  ambientTemperature: number
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

/**
 * Half space at one temperature whose surface meets a fluid at another from time 0 on, and may absorb a heat flux.
 *
 *   T = Tᵢ + (Tₐ − Tᵢ)·e^(−η²)·[erfcx(η) − erfcx(η + β)],   η = x/(2√(at)),   β = h√(at)/k
 *   q = h(Tₐ − Tᵢ)·e^(−η²)·erfcx(η + β),   Q = h(Tₐ − Tᵢ)t·[erfcx(β) − 1 + 2β/√π]/β²
 *   with a flux q₀ absorbed: Tₐ + q₀/h for Tₐ, and no division by h
 *
 * Shapes    depths: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; heat per m2.
 * Domain    k, a > 0;  h ≥ 0;  depth ≥ 0;  t ≥ 0;  q₀ of any sign.
 * Accuracy  temperatures 1e-12·(|Tₐ − Tᵢ| + |q₀|·min(1/h, 2√(at/π)/k)) beside the rounding of inputs and result;
 *           fractions, fluxes and heats relative (70 + 17η²)ε with η the argument of e^(−η²), the latter two of what
 *           either drive alone causes. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §2.7, in scaled functions.
 */
export function solve(input: HalfSpaceInput): Solution {
  const { initialTemperature, ambientTemperature, times, depths, outputs } = input
  const step = { times, places: depths.length, outputs, initial: initialTemperature, drive: ambientTemperature }
  const response = input.filmCoefficient === 0 ? untouched : responseOf(input)
  if (input.imposedHeatFlux) return solveWithFlux(input, input.imposedHeatFlux, response)
  return { ...stepOutputs(step, response), terms: 0, scale: Math.abs(ambientTemperature - initialTemperature) }
}

function responseOf(input: HalfSpaceInput): StepResponse {
  const { conductivity: k, diffusivity: a, filmCoefficient: h, times, depths } = input
  const roots = times.map((t) => Math.sqrt(a) * Math.sqrt(t)) // √a·√t, since a·t can vanish
  const started = (i: number) => times[i]! > 0
  const beta = (i: number) => (h / k) * roots[i]!
  const eta = (i: number, j: number) => depths[j]! / (2 * roots[i]!)
  const done = (i: number, j: number) => {
    const value = completed(eta(i, j), beta(i))
    return { value, error: completedError(eta(i, j)) * value + TINY, method: 'closed-form' as const }
  }
  const flux = (i: number, at: number) => {
    const value = fluxFraction(at, beta(i))
    return { value, error: fluxError(at) * value + TINY, method: 'closed-form' as const }
  }
  return {
    share: (i, j) => (started(i) ? { ...done(i, j), of: 'completed' } : untouched.share(i, j)),
    completed: (i, j) => (started(i) ? done(i, j) : exactly(0)),
    remaining(i, j) {
      if (!started(i)) return exactly(1)
      const value = Math.min(1, remaining(eta(i, j), beta(i)))
      return { value, error: REMAINING_ERROR * value, method: 'closed-form' }
    },
    // At time 0 the limit from above: the film's whole flux at the face, none inside.
    flux: (i, j) => scaled(h, started(i) ? flux(i, eta(i, j)) : exactly(depths[j] === 0 ? 1 : 0)),
    surfaceFlux: (i) => scaled(h, started(i) ? flux(i, 0) : exactly(1)),
    heat(i) {
      const value = h * times[i]! * energyFraction(beta(i))
      return { value, error: value * (ENERGY_ERROR + 6 * EPS), method: 'closed-form' }
    },
  }
}
