import { filmIn } from '../../bodies/product-films.ts'
import {
  cylinderFactor,
  endlessFactor,
  type ProductInput,
  slabFactor,
  solveProduct,
} from '../../bodies/product-step.ts'
import type { Solution } from '../../solution.ts'

/** The section across a bar that goes on from its end: round, a plate, or a rectangle. */
export type Section =
  | { kind: 'round'; radius: number }
  | { kind: 'plate'; thickness: number; thicknessFaces: 1 | 2 }
  | { kind: 'rectangle'; width: number; height: number; widthFaces: 1 | 2; heightFaces: 1 | 2 }

export interface BarEndInput extends ProductInput {
  section: Section
}

/**
 * End of a long rod, the edge of a plate, or the end of a rectangular bar, at one temperature, whose faces meet one fluid, or are held at one temperature, from time 0 on.
 *
 *   θ = θ_half space(x)·θ_section,   1 − θ = u₁ + u₂ − u₁u₂
 *
 * Shapes    points: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C.
 * Domain    k, ρc, a, sizes > 0;  h ≥ 0, of its own at the side and the end;  0 ≤ x;  points inside the section;  t ≥ 0.
 * Accuracy  temperatures 1e-12 of the step beside the rounding of inputs and result; fractions
 *           1e-11 relative. Each output carries its bound, the sum of those of the factors.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §5.6 and §8.4.
 */
export function solve(input: BarEndInput): Solution {
  return solveProduct(input, [endlessFactor(input, 'x', filmIn(input, 'end')), ...sectionFactors(input)])
}

function sectionFactors(input: BarEndInput) {
  const { section } = input
  const film = filmIn(input, 'side')
  if (section.kind === 'round') return [cylinderFactor(input, section.radius, film)]
  if (section.kind === 'plate')
    return [slabFactor(input, { size: section.thickness, faces: section.thicknessFaces }, 'y', film)]
  return [
    slabFactor(input, { size: section.width, faces: section.widthFaces }, 'y', film),
    slabFactor(input, { size: section.height, faces: section.heightFaces }, 'z', film),
  ]
}
