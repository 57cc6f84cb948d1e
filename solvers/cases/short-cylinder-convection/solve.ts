import { filmIn } from '../../bodies/product-films.ts'
import { cylinderFactor, type ProductInput, slabFactor, solveProduct } from '../../bodies/product-step.ts'
import { cylinder } from '../../bodies/radial-step.ts'
import type { Solution } from '../../solution.ts'

export interface ShortCylinderInput extends ProductInput {
  radius: number
  height: number
  heightFaces: 1 | 2
}

/**
 * Short cylinder at one temperature whose side and ends meet one fluid, or are held at one temperature, from time 0 on.
 *
 *   θ = θ_cylinder(r; radius)·θ_slab(z; height),   1 − θ = u₁ + u₂ − u₁u₂
 *
 * Shapes    points: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; heat of the whole cylinder.
 * Domain    k, ρc, a, sizes > 0;  h ≥ 0, of its own at the side and the ends;  points inside the cylinder;  t ≥ 0.
 * Accuracy  temperatures 1e-12 of the step beside the rounding of inputs and result; fractions, heats
 *           1e-11 relative. Each output carries its bound, the sum of those of the factors.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §8.4.
 */
export function solve(input: ShortCylinderInput): Solution {
  const { radius, height, heightFaces } = input
  const factors = [
    cylinderFactor(input, radius, filmIn(input, 'side')),
    slabFactor(input, { size: height, faces: heightFaces }, 'z', filmIn(input, 'ends')),
  ]
  return solveProduct(input, factors, input.volumetricHeatCapacity * cylinder.volume(radius) * height)
}
