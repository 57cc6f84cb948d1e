import { filmIn } from '../../bodies/product-films.ts'
import { type ProductInput, slabFactor, solveProduct } from '../../bodies/product-step.ts'
import type { Solution } from '../../solution.ts'

export interface BarInput extends ProductInput {
  width: number
  height: number
  widthFaces: 1 | 2
  heightFaces: 1 | 2
}

/**
 * Long rectangular bar at one temperature whose faces meet one fluid, or are held at one temperature, from time 0 on.
 *
 *   θ = θ_slab(x; width)·θ_slab(y; height),   1 − θ = u₁ + u₂ − u₁u₂
 *
 * Shapes    points: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; heat per metre of bar.
 * Domain    k, ρc, a, sizes > 0;  h ≥ 0, of its own across each direction;  points inside the bar;  t ≥ 0.
 * Accuracy  temperatures 1e-12 of the step beside the rounding of inputs and result; fractions, heats
 *           1e-11 relative. Each output carries its bound, the sum of those of the factors.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §5.6.
 */
export function solve(input: BarInput): Solution {
  const { width, height, widthFaces, heightFaces } = input
  const factors = [
    slabFactor(input, { size: width, faces: widthFaces }, 'x', filmIn(input, 'width')),
    slabFactor(input, { size: height, faces: heightFaces }, 'y', filmIn(input, 'height')),
  ]
  return solveProduct(input, factors, input.volumetricHeatCapacity * width * height)
}
