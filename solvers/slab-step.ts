import type { SlabBody, SlabMoment } from './math/slab-body.ts'
import type { Estimate } from './math/rounding.ts'
import type { OutputName } from './outputs.ts'
import type { Solution } from './solution.ts'
import { exactly, scaled, type StepResponse, stepOutputs } from './step-response.ts'

/** What the slab cases share: a uniform body, one drive, one exposed face or two alike. */
export interface SlabStepInput {
  conductivity: number
  volumetricHeatCapacity: number
  diffusivity: number
  thickness: number
  exposedFaces: 1 | 2
  initialTemperature: number
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

/** A slab of length 1 after a unit step, whatever drives its face. The last place is the face itself. */
export interface UnitSlab {
  remaining(j: number, m: SlabMoment): Estimate
  completed(j: number, m: SlabMoment): Estimate
  /** Share of the unit of flux, positive away from the face. */
  flux(j: number, m: SlabMoment): Estimate
  heatFraction(m: SlabMoment): Estimate
  meanRemaining(m: SlabMoment): Estimate
  terms(m: SlabMoment): number
}

/** Half the thickness when both faces are exposed, all of it when one is. */
export function characteristicLength(input: Pick<SlabStepInput, 'thickness' | 'exposedFaces'>): number {
  return input.thickness / input.exposedFaces
}

/** The body in units of its length, with the face as the place after the last. */
export function slabPlaces(input: SlabStepInput): Omit<SlabBody, 'biot'> {
  const length = characteristicLength(input)
  const places = [...input.depths, 0].map((depth) => placeOf(input, depth))
  return {
    deltas: Float64Array.from(places, ({ near }) => Math.min(1, near / length)),
    inner: Float64Array.from(places, ({ near }) => Math.max(0, (length - near) / length)),
    shifts: Float64Array.from(places, ({ mirrored }) => (mirrored ? 6 : 0)),
  }
}

/** Behind the mid-plane a body with two exposed faces mirrors its front. */
function placeOf({ thickness, exposedFaces }: SlabStepInput, depth: number): { near: number; mirrored: boolean } {
  const mirrored = exposedFaces === 2 && depth > thickness / 2
  return { near: mirrored ? thickness - depth : depth, mirrored }
}

export function slabMoments(input: SlabStepInput): SlabMoment[] {
  const length = characteristicLength(input)
  return input.times.map((time) => ({
    // √a·√t, since a·t can vanish; a/L² first for the same reason.
    root: (Math.sqrt(input.diffusivity) * Math.sqrt(time)) / length,
    fourier: (input.diffusivity / (length * length)) * time,
  }))
}

interface Drive {
  /** Temperature that the body ends at. */
  temperature: number
  /** Flux that a response of 1 stands for, W/(m2.K). */
  fluxUnit: number
  /** Flux share at time 0 at the face, where it has a limit. */
  fluxAtStart: number
}

export function solveSlab(
  input: SlabStepInput,
  unit: UnitSlab,
  moments: readonly SlabMoment[],
  drive: Drive,
): Solution {
  const { initialTemperature: initial, times, depths, outputs } = input
  const step = { times, places: depths.length, outputs, initial, drive: drive.temperature }
  const terms = moments.reduce((most, m) => Math.max(most, m.fourier > 0 ? unit.terms(m) : 0), 0)
  const scale = Math.abs(drive.temperature - initial)
  return { ...stepOutputs(step, responseOf(input, unit, moments, drive)), terms, scale }
}

function responseOf(input: SlabStepInput, unit: UnitSlab, moments: readonly SlabMoment[], drive: Drive): StepResponse {
  const { thickness, exposedFaces, depths } = input
  const face = depths.length
  const capacity = input.volumetricHeatCapacity * characteristicLength(input)
  const started = (i: number) => input.times[i]! > 0
  const isFace = (j: number) => depths[j] === 0 || (exposedFaces === 2 && depths[j] === thickness)
  const unitAt = (j: number) => (exposedFaces === 2 && depths[j]! > thickness / 2 ? -1 : 1) * drive.fluxUnit
  return {
    share(i, j) {
      if (!started(i)) return { ...exactly(0), of: 'completed' }
      const m = moments[i]!
      return m.fourier < 0.03
        ? { ...unit.completed(j, m), of: 'completed' }
        : { ...unit.remaining(j, m), of: 'remaining' }
    },
    remaining: (i, j) => (started(i) ? unit.remaining(j, moments[i]!) : exactly(1)),
    completed: (i, j) => (started(i) ? unit.completed(j, moments[i]!) : exactly(0)),
    // At time 0 the limit from above: the drive's whole flux at the face, none inside.
    flux: (i, j) =>
      scaled(unitAt(j), started(i) ? unit.flux(j, moments[i]!) : exactly(isFace(j) ? drive.fluxAtStart : 0)),
    surfaceFlux: (i) => scaled(drive.fluxUnit, started(i) ? unit.flux(face, moments[i]!) : exactly(drive.fluxAtStart)),
    heat: (i) => scaled(capacity, started(i) ? unit.heatFraction(moments[i]!) : exactly(0)),
    heatFraction: (i) => (started(i) ? unit.heatFraction(moments[i]!) : exactly(0)),
    meanRemaining: (i) => (started(i) ? unit.meanRemaining(moments[i]!) : exactly(1)),
  }
}
