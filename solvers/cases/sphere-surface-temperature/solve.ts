import { sphere, type HeldDrive, type RadialStepInput, solveHeld } from '../../bodies/radial-step.ts'
import type { Solution } from '../../solution.ts'

export type SphereInput = RadialStepInput & HeldDrive

/**
 * A sphere at one temperature whose surface is held at another from time 0 on.
 *
 *   θ = (T − Tₛ)/(Tᵢ − Tₛ) = 2 Σ (−1)^(n+1)·sin(nπr/R)/(nπr/R)·e^(−n²π²Fo)
 *   Fo = at/R²
 *
 * Shapes    depths or radii: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; heat of the whole sphere, fluxes per m2.
 * Domain    k, ρc, a, R > 0;  0 ≤ depth, radius ≤ R;  t ≥ 0, fluxes at the face t > 0.
 * Accuracy  temperatures 1e-12·|Tₛ − Tᵢ| beside the rounding of inputs and result; fractions, fluxes and heats
 *           1e-11 relative. Each output carries its bound; below Fo 0.06 the form that errs less, images or series.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §9.3, §9.4 and §12.5.
 */
export function solve(input: SphereInput): Solution {
  return solveHeld(sphere, input)
}
