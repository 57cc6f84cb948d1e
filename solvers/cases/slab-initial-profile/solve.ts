import type { InitialProfile } from '../../statement/initial-profile.ts'
import type { Solution } from '../../solution.ts'
import type { TwoSidedProblem } from '../../bodies/two-sided.ts'
import { solveTwoSided, twoSidedScale } from '../../bodies/two-sided-outputs.ts'
import type { OutputName } from '../../outputs.ts'
import type { Side } from '../../statement/side.ts'

export interface ProfileInput {
  conductivity: number
  volumetricHeatCapacity: number
  diffusivity: number
  thickness: number
  left: Side
  right: Side
  initialProfile: InitialProfile
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

export const problemOf = (input: ProfileInput): TwoSidedProblem => ({ ...input, length: input.thickness, start: input })

/**
 * Slab that starts from a temperature that differs along it, linear between given depths and with jumps where a depth stands twice.
 *
 *   T = T∞(x) + Σ cₙ·φₙ(X)·e^(−zₙ²Fo),   cₙ = ∫(f − T∞)φₙ/∫φₙ²,   ∫fφₙ in closed form:
 *   zₙ²·∫fφₙ = f(0)·Bi₁ − f(1)·φₙ′(1) + Σ rise·φₙ′(middle)·sin(zₙw/2)/(zₙw/2)   over the pieces, w their width
 *
 * and below Fo 0.1 by the Laplace transform, where each piece sends waves to both sides: a jump is smooth at once, and nothing rings.
 *
 * Shapes    depths: n, from the left face;  times: m;  grids have m rows of n;  steady temperature n.
 * Units     SI, temperatures in °C; heat per m2 of wall.
 * Domain    k, ρc, a, thickness > 0;  h ≥ 0;  0 ≤ depth ≤ thickness;  t ≥ 0;  a profile from face to face. Fo 0..1e38.
 * Accuracy  temperatures 1e-12 of the spread of all temperatures and rises beside the rounding of inputs and result; fluxes and
 *           heat 1e-11 of the largest that one drive does. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.3, §3.10 and §12.5.
 */
export function solve(input: ProfileInput): Solution {
  const problem = problemOf(input)
  return solveTwoSided(problem, input.outputs, twoSidedScale(problem))
}
