import type { OutputName } from '../../outputs.ts'
import type { Side } from '../../statement/side.ts'
import type { Solution } from '../../solution.ts'
import type { TwoSidedProblem } from '../../bodies/two-sided.ts'
import { solveTwoSided, twoSidedScale } from '../../bodies/two-sided-outputs.ts'

export interface SurfaceFluxInput {
  conductivity: number
  volumetricHeatCapacity: number
  diffusivity: number
  thickness: number
  initialTemperature: number
  imposedHeatFlux: number
  /** Absent where the flux never ends. */
  pulseDuration?: number
  back: Side
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

export function problemOf(input: SurfaceFluxInput): TwoSidedProblem {
  const { imposedHeatFlux, pulseDuration, thickness, back, initialTemperature } = input
  return {
    ...input,
    length: thickness,
    left: { kind: 'flux', imposedHeatFlux },
    right: back,
    start: { initialTemperature },
    pulse: pulseDuration,
  }
}

/**
 * Slab whose face at depth 0 takes up a constant heat flux from time 0 on, for ever or for a while, and is insulated after that.
 *
 *   insulated back:  T − Tᵢ = (q₀d/k)·[Fo + (3(1 − X)² − 1)/6 − (2/π²) Σ cos(nπX)/n²·e^(−n²π²Fo)],   X = x/d,  Fo = at/d²
 *   any back:        T = T∞(x) + Σ cₙ cos(zₙX)·e^(−zₙ²Fo),   zₙ tan zₙ = Bi of the back
 *   after a pulse:   each at t less each at t − duration, reckoned as one change
 *
 * Below Fo 0.1 by the Laplace transform.
 *
 * Shapes    depths: n;  times: m;  grids have m rows of n;  steady temperature n.
 * Units     SI, temperatures in °C; heat per m2 of wall.
 * Domain    k, ρc, a, thickness, duration > 0;  h ≥ 0;  0 ≤ depth ≤ thickness;  t ≥ 0;  fluxes of any sign. Fo 0..1e38.
 * Accuracy  temperatures 1e-12 of the rise by the flux and the spread of the temperatures, beside the rounding of inputs and
 *           result; fluxes and heat 1e-11 of the largest that one drive does. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.8, §3.10 and §12.5.
 */
export function solve(input: SurfaceFluxInput): Solution {
  const problem = problemOf(input)
  return solveTwoSided(problem, input.outputs, twoSidedScale(problem))
}
