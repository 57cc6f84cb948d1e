import { cylinder, type HeldDrive, type RadialStepInput, solveHeld } from '../../bodies/radial-step.ts'
import type { Solution } from '../../solution.ts'

export type CylinderInput = RadialStepInput & HeldDrive

/**
 * A long cylinder at one temperature whose surface is held at another from time 0 on.
 *
 *   θ = (T − Tₛ)/(Tᵢ − Tₛ) = Σ 2/(zₙJ₁(zₙ))·J₀(zₙr/R)·e^(−zₙ²Fo),   J₀(zₙ) = 0
 *   Fo = at/R²
 *
 * Shapes    depths or radii: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; heat per metre of cylinder, fluxes per m2.
 * Domain    k, ρc, a, R > 0;  0 ≤ depth, radius ≤ R;  t ≥ 0, fluxes at the face t > 0.
 * Accuracy  temperatures 1e-12·|Tₛ − Tᵢ| beside the rounding of inputs and result; fractions, fluxes and heats
 *           1e-11 relative. Each output carries its bound; below Fo 0.02 the inverted Laplace transform, above it the series.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §7.6, §7.7 and §13.3.
 */
export function solve(input: CylinderInput): Solution {
  return solveHeld(cylinder, input)
}
