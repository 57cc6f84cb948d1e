import { filmIn } from '../../bodies/product-films.ts'
import { endlessFactor, type ProductInput, solveProduct } from '../../bodies/product-step.ts'
import type { Solution } from '../../solution.ts'

/**
 * Corner of a body that fills an eighth of space, at one temperature, whose faces meet one fluid, or are held at one temperature, from time 0 on.
 *
 *   θ = θ_half space(x)·θ_half space(y)·θ_half space(z),   1 − θ as a sum of positive terms
 *
 * Shapes    points: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C.
 * Domain    k, ρc, a > 0;  h ≥ 0, of its own at each face;  0 ≤ x, y, z;  t ≥ 0.
 * Accuracy  temperatures 1e-12 of the step beside the rounding of inputs and result; fractions
 *           1e-11 relative. Each output carries its bound, the sum of those of the factors.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §6.2.
 */
export function solve(input: ProductInput): Solution {
  return solveProduct(input, [
    endlessFactor(input, 'x', filmIn(input, 'x')),
    endlessFactor(input, 'y', filmIn(input, 'y')),
    endlessFactor(input, 'z', filmIn(input, 'z')),
  ])
}
