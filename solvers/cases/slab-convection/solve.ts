import type { SlabMoment } from '../../math/slab-body.ts'
import { SlabFilm } from '../../math/slab-film.ts'
import type { OutputName } from '../../outputs.ts'
import type { Solution } from '../../solution.ts'
import { exactly, scaled, type StepResponse, stepOutputs, untouched } from '../../step-response.ts'

export interface SlabInput {
  conductivity: number
  volumetricHeatCapacity: number
  diffusivity: number
  thickness: number
  exposedFaces: 1 | 2
  filmCoefficient: number
  initialTemperature: number
  ambientTemperature: number
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

/** Half the thickness when both faces are exposed, all of it when one is. */
export function characteristicLength(input: Pick<SlabInput, 'thickness' | 'exposedFaces'>): number {
  return input.thickness / input.exposedFaces
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
  const { initialTemperature, ambientTemperature, times, depths, outputs } = input
  const scale = Math.abs(ambientTemperature - initialTemperature)
  const step = { times, places: depths.length, outputs, initial: initialTemperature, drive: ambientTemperature }
  if (input.filmCoefficient === 0) return { ...stepOutputs(step, untouched), terms: 0, scale }
  const moments = times.map((time) => momentOf(input, time))
  const solver = solverOf(input, moments)
  const terms = moments.reduce((most, m) => Math.max(most, m.fourier > 0 ? solver.terms(m) : 0), 0)
  return { ...stepOutputs(step, responseOf(input, moments, solver)), terms, scale }
}

function momentOf(input: SlabInput, time: number): SlabMoment {
  const length = characteristicLength(input)
  // √a·√t, since a·t can vanish; a/L² first for the same reason.
  return {
    root: (Math.sqrt(input.diffusivity) * Math.sqrt(time)) / length,
    fourier: (input.diffusivity / (length * length)) * time,
  }
}

/** Behind the mid-plane a body with two exposed faces mirrors its front. */
function placeOf({ thickness, exposedFaces }: SlabInput, depth: number): { near: number; mirrored: boolean } {
  const mirrored = exposedFaces === 2 && depth > thickness / 2
  return { near: mirrored ? thickness - depth : depth, mirrored }
}

function solverOf(input: SlabInput, moments: readonly SlabMoment[]): SlabFilm {
  const length = characteristicLength(input)
  const biot = (input.filmCoefficient * length) / input.conductivity
  const places = [...input.depths, 0].map((depth) => placeOf(input, depth))
  const deltas = Float64Array.from(places, ({ near }) => Math.min(1, near / length))
  const inner = Float64Array.from(places, ({ near }) => Math.max(0, (length - near) / length))
  const shifts = Float64Array.from(places, ({ mirrored }) => (mirrored ? 6 : 0))
  const shortest = moments.reduce((least, m) => Math.min(least, m.fourier), Infinity)
  return new SlabFilm({ biot, deltas, inner, shifts }, shortest)
}

function responseOf(input: SlabInput, moments: readonly SlabMoment[], solver: SlabFilm): StepResponse {
  const { filmCoefficient: h, thickness, exposedFaces } = input
  const face = input.depths.length // the solver's last place is the face itself
  const capacity = input.volumetricHeatCapacity * characteristicLength(input)
  const started = (i: number) => input.times[i]! > 0
  const isFace = (j: number) => input.depths[j] === 0 || (exposedFaces === 2 && input.depths[j] === thickness)
  const mirrored = (j: number) => (exposedFaces === 2 && input.depths[j]! > thickness / 2 ? -1 : 1)
  return {
    share(i, j) {
      if (!started(i)) return { ...exactly(0), of: 'completed' }
      const m = moments[i]!
      return m.fourier < 0.03
        ? { ...solver.completed(j, m), of: 'completed' }
        : { ...solver.remaining(j, m), of: 'remaining' }
    },
    remaining: (i, j) => (started(i) ? solver.remaining(j, moments[i]!) : exactly(1)),
    completed: (i, j) => (started(i) ? solver.completed(j, moments[i]!) : exactly(0)),
    flux(i, j) {
      // At time 0 the limit from above: the film's whole flux at the face, none inside.
      if (!started(i)) return scaled(mirrored(j) * h, exactly(isFace(j) ? 1 : 0))
      return scaled(mirrored(j) * h, solver.flux(j, moments[i]!))
    },
    surfaceFlux: (i) => scaled(h, started(i) ? solver.remaining(face, moments[i]!) : exactly(1)),
    heat: (i) => scaled(capacity, started(i) ? solver.heatFraction(moments[i]!) : exactly(0)),
    heatFraction: (i) => (started(i) ? solver.heatFraction(moments[i]!) : exactly(0)),
    meanRemaining: (i) => (started(i) ? solver.meanRemaining(moments[i]!) : exactly(1)),
  }
}
