import type { Start } from '../../statement/initial-profile.ts'
import type { OutputName } from '../../outputs.ts'
import type { Side } from '../../statement/side.ts'
import type { Solution } from '../../solution.ts'
import type { TwoSidedProblem } from '../../bodies/two-sided.ts'
import { solveTwoSided, twoSidedScale } from '../../bodies/two-sided-outputs.ts'

export type TwoSidesInput = Start & {
  conductivity: number
  volumetricHeatCapacity: number
  diffusivity: number
  thickness: number
  left: Side
  right: Side
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

export const problemOf = (input: TwoSidesInput): TwoSidedProblem => ({
  ...input,
  length: input.thickness,
  start: input,
})

/**
 * Slab between two sides that are each held at a temperature, in a fluid, heated by a flux, or insulated from time 0 on.
 *
 *   T = T∞(x) + Σ cₙ·φₙ(x/d)·e^(−zₙ²Fo),   φₙ = cos zₙX + (Bi₁/zₙ) sin zₙX,   zₙ − nπ − atan(Bi₁/zₙ) − atan(Bi₂/zₙ) = 0
 *   Bi = hd/k of either side, 0 or infinite too;  Fo = at/d²
 *
 * and below Fo 0.1 by the Laplace transform. While the slowest part has hardly begun it is kept apart from the steady profile.
 *
 * Shapes    depths: n, from the left face;  times: m;  grids have m rows of n;  steady temperature n.
 * Units     SI, temperatures in °C; heat per m2 of wall.
 * Domain    k, ρc, a, thickness > 0;  h ≥ 0;  0 ≤ depth ≤ thickness;  t ≥ 0. Bi 0, 1e-22..1e18 or infinite, Fo 0..1e38.
 * Accuracy  temperatures 1e-12 of the spread of all temperatures and rises beside the rounding of inputs and result; fluxes and
 *           heat 1e-11 of the largest that one drive does, relative with one drive. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.10 and §12.5.
 */
export function solve(input: TwoSidesInput): Solution {
  const problem = problemOf(input)
  return solveTwoSided(problem, input.outputs, twoSidedScale(problem))
}
