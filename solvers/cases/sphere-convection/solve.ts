import { sphere, type FilmDrive, type RadialStepInput, solveBehindFilm } from '../../bodies/radial-step.ts'
import type { Solution } from '../../solution.ts'

export type SphereInput = RadialStepInput & FilmDrive

/**
 * A sphere at one temperature whose surface meets a fluid at another from time 0 on.
 *
 *   θ = (T − Tₐ)/(Tᵢ − Tₐ) = Σ Cₙ·sin(zₙr/R)/(zₙr/R)·e^(−zₙ²Fo),   1 − zₙ cot zₙ = Bi
 *   Bi = hR/k,  Fo = at/R²
 *
 * Shapes    depths or radii: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; heat of the whole sphere, fluxes per m2.
 * Domain    k, ρc, a, R > 0;  h ≥ 0;  0 ≤ depth, radius ≤ R;  t ≥ 0. Bi 1e-22..1e18, Fo 0..1e38.
 * Accuracy  temperatures 1e-12·|Tₐ − Tᵢ| beside the rounding of inputs and result; fractions, fluxes and heats
 *           1e-11 relative. Each output carries its bound; below Fo 0.06 the form that errs less, images or series.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §9.3, §9.4 and §12.5.
 */
export function solve(input: SphereInput): Solution {
  return solveBehindFilm(sphere, input)
}
