import { fieldOutputs, grid, history } from '../../bodies/field-outputs.ts'
import { etaOf, rootAfter, rootDuring, stepAfter, stepDuring } from '../../math/half-space-drives.ts'
import { afterPulse } from '../../math/half-space-pulse.ts'
import { EPS, type Estimate } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import type { Solution } from '../../solution.ts'
import { exactly, scaled } from '../../bodies/step-response.ts'

export interface HalfSpaceInput {
  conductivity: number
  diffusivity: number
  effusivity: number
  imposedHeatFlux: number
  /** Absent where the flux never ends. */
  pulseDuration?: number
  initialTemperature: number
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

const SQRT_PI = 1.772453850905516

/**
 * Half space at one temperature whose face takes up a constant heat flux from time 0 on, for ever or for a while; after
 * that the face is insulated.
 *
 *   T = Tᵢ + (q₀/e)·2√t·ierfc(η),   q = q₀·erfc(η),   Q = q₀t,   η = x/(2√(at)),   e = √(kρc)
 *   after the pulse: each at t less each at t − d
 *
 * Shapes    depths: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; heat per m2.
 * Domain    k, a > 0;  depth ≥ 0;  t ≥ 0;  flux of any sign;  d > 0.
 * Accuracy  temperatures 1e-12·2|q₀|·√(min(t, d)/π)/e beside the rounding of inputs and result; fluxes and heats relative
 *           (130 + 17η²)ε, after the pulse too, however long after. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §2.9.
 */
export function solve(input: HalfSpaceInput): Solution {
  const { diffusivity, effusivity: e, imposedHeatFlux: q, initialTemperature, depths, times, outputs } = input
  const duration = input.pulseDuration ?? Infinity
  const rootDiffusivity = Math.sqrt(diffusivity)
  const roots = times.map(Math.sqrt) // √a·√t, since a·t can vanish
  const eta = (i: number, j: number) => etaOf(depths[j]!, rootDiffusivity, roots[i]!)
  const after = (i: number, j: number) => afterPulse(times[i]!, duration, depths[j]!, rootDiffusivity)
  const rise = (i: number, j: number): Estimate => {
    if (times[i] === 0) return exactly(0)
    const root = times[i]! > duration ? rootAfter(after(i, j), roots[i]!) : rootDuring(eta(i, j), roots[i]!)
    return scaled(q / e, root)
  }
  const flux = (i: number, j: number): Estimate => {
    // At time 0 the limit from above: the whole flux at the face, none inside.
    if (times[i] === 0) return scaled(q, exactly(depths[j] === 0 ? 1 : 0))
    return scaled(q, times[i]! > duration ? stepAfter(after(i, j)) : stepDuring(eta(i, j)))
  }
  const fields = {
    temperature: grid((i, j) => {
      const { value, error, method } = rise(i, j)
      return { value: initialTemperature + value, error: error + EPS * Math.abs(initialTemperature), method }
    }),
    heatFlux: grid(flux, 'relative'),
    surfaceHeatFlux: history((i) => exactly(times[i]! > duration ? 0 : q), 'relative'),
    heatGained: history((i) => scaled(q, exactly(Math.min(times[i]!, duration))), 'relative'),
  }
  const longest = times.reduce((most, t) => Math.max(most, Math.min(t, duration)), 0)
  const scale = ((2 * Math.abs(q)) / e / SQRT_PI) * Math.sqrt(longest)
  return { ...fieldOutputs({ times, places: depths.length, outputs }, fields), terms: 0, scale }
}
