import { momentsOf } from '../../bodies/body-step.ts'
import { SlabFilm } from '../../math/slab-film.ts'
import { characteristicLength, slabPlaces, type SlabStepInput, solveSlab } from '../../bodies/slab-step.ts'
import type { Solution } from '../../solution.ts'
import { stepOutputs, untouched } from '../../bodies/step-response.ts'

export interface SlabInput extends SlabStepInput {
  filmCoefficient: number
  ambientTemperature: number
}

/**
 * Slab at one temperature whose exposed faces, one or both alike, meet a fluid at another from time 0 on.
 *
 *   θ = (T − Tₐ)/(Tᵢ − Tₐ) = Σ Cₙ cos(zₙX)·e^(−zₙ²Fo),   zₙ tan zₙ = Bi,   Cₙ = 4 sin zₙ/(2zₙ + sin 2zₙ)
 *   Bi = hL/k,  Fo = at/L²,  L = thickness/exposedFaces,  X = 1 − depth/L
 *
 * Shapes    depths: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; heat per m2 of one exposed face.
 * Domain    k, ρc, a, thickness > 0;  h ≥ 0;  0 ≤ depth ≤ thickness;  t ≥ 0. Bi 5e-23..1e18, Fo 0..1e38.
 * Accuracy  temperatures 1e-12·|Tₐ − Tᵢ| beside the rounding of inputs and result; fractions, fluxes and heats
 *           1e-11 relative. Each output carries its bound; below Fo 0.06 the form that errs less is taken.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.11.
 */
export function solve(input: SlabInput): Solution {
  const { filmCoefficient: h, initialTemperature, ambientTemperature, times, depths, outputs } = input
  const step = { times, places: depths.length, outputs, initial: initialTemperature, drive: ambientTemperature }
  if (h === 0)
    return { ...stepOutputs(step, untouched), terms: 0, scale: Math.abs(ambientTemperature - initialTemperature) }
  const length = characteristicLength(input)
  const moments = momentsOf(input, length)
  const unit = new SlabFilm({ biot: (h * length) / input.conductivity, ...slabPlaces(input) })
  return solveSlab(input, unit, moments, { temperature: ambientTemperature, fluxUnit: h, fluxAtStart: 1 })
}
