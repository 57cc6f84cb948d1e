import { momentsOf } from '../../bodies/body-step.ts'
import { SlabFixed } from '../../math/slab-fixed.ts'
import { characteristicLength, slabPlaces, type SlabStepInput, solveSlab } from '../../bodies/slab-step.ts'
import type { Solution } from '../../solution.ts'

export interface SlabInput extends SlabStepInput {
  surfaceTemperature: number
}

/**
 * Slab at one temperature whose exposed faces, one or both alike, are held at another from time 0 on.
 *
 *   θ = (T − Tₛ)/(Tᵢ − Tₛ) = Σ (2/zₙ)·sin(zₙx/L)·e^(−zₙ²Fo),   zₙ = (n + ½)π,   Fo = at/L²,   L = thickness/exposedFaces
 *
 * Shapes    depths: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; heat per m2 of one exposed face.
 * Domain    k, ρc, a, thickness > 0;  0 ≤ depth ≤ thickness;  t ≥ 0, fluxes at a face t > 0.
 * Accuracy  temperatures 1e-12·|Tₛ − Tᵢ| beside the rounding of inputs and result; fractions, fluxes and heats
 *           1e-11 relative. Each output carries its bound; images up to Fo 0.07, the series above.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.3 and §3.4.
 */
export function solve(input: SlabInput): Solution {
  const length = characteristicLength(input)
  const drive = { temperature: input.surfaceTemperature, fluxUnit: input.conductivity / length, fluxAtStart: 0 }
  return solveSlab(input, new SlabFixed(slabPlaces(input)), momentsOf(input, length), drive)
}
