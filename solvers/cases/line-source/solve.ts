import { fieldOutputs, grid } from '../../bodies/field-outputs.ts'
import { exponentialIntegral } from '../../math/exponential-integral.ts'
import { leastError } from '../../math/half-space-pulse.ts'
import { EPS, type Estimate } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import type { Solution } from '../../solution.ts'
import { exactly, scaled } from '../../bodies/step-response.ts'
import { latestOf } from '../../math/latest.ts'

export interface LineSourceInput {
  conductivity: number
  diffusivity: number
  /** W/m, of any sign. */
  linePower: number
  initialTemperature: number
  radii: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

/**
 * Endless medium at one temperature in which a straight line of no thickness releases heat evenly from time 0 on.
 *
 *   T = Tᵢ + P/(4πk)·E₁(u),   q = P/(2πr)·e^(−u),   u = r²/(4at)
 *
 * Shapes    radii: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; P in W/m; fluxes positive outward.
 * Domain    k, a, r > 0;  t ≥ 0;  P of any sign.
 * Accuracy  temperatures 1e-12·|P|/(4πk)·max(1, E₁) beside the rounding of inputs and result; fluxes relative
 *           (30 + 17u)ε. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §10.4.
 */
export function solve(input: LineSourceInput): Solution {
  const { conductivity: k, diffusivity: a, linePower, initialTemperature, radii, times, outputs } = input
  const unit = linePower / (4 * Math.PI * k)
  // As the square of r/(2√a√t), since a·t can vanish.
  const argument = (time: number, radius: number) => (radius / (2 * Math.sqrt(a) * Math.sqrt(time))) ** 2
  const rise = (i: number, j: number): Estimate => {
    if (times[i] === 0) return exactly(0)
    const u = argument(times[i]!, radii[j]!)
    const value = exponentialIntegral(u)
    return { value, error: value * EPS * (45 + 17 * Math.min(u, 800)) + least(u), method: 'closed-form' }
  }
  const flux = (i: number, j: number): Estimate => {
    if (times[i] === 0) return exactly(0)
    const u = argument(times[i]!, radii[j]!)
    const value = Math.exp(-u) / (2 * Math.PI * radii[j]!)
    const error = value * EPS * (20 + 17 * Math.min(u, 800)) + least(u) / radii[j]!
    return { value, error, method: 'closed-form' }
  }
  const fields = {
    temperature: grid((i, j) => {
      const { value, error, method } = scaled(unit, rise(i, j))
      return { value: initialTemperature + value, error: error + EPS * Math.abs(initialTemperature), method }
    }),
    heatFlux: grid((i, j) => scaled(linePower, flux(i, j)), 'relative'),
  }
  const latest = latestOf(times)
  const nearest = radii.reduce((least, r) => Math.min(least, r), Infinity)
  const most = latest === 0 ? 0 : exponentialIntegral(argument(latest, nearest))
  const scale = Math.abs(unit) * Math.max(1, most)
  return { ...fieldOutputs({ times, places: radii.length, outputs }, fields), terms: 0, scale }
}

/** Where e^(−u) has lost its digits. */
const least = (u: number) => leastError(Math.sqrt(u))
