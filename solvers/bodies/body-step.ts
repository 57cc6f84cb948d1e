import type { Estimate } from '../math/rounding.ts'
import type { Moment, UnitBody } from '../math/unit-body.ts'
import type { OutputName } from '../outputs.ts'
import type { Solution } from '../solution.ts'
import { exactly, scaled, type StepResponse, stepOutputs } from './step-response.ts'

/** What the cases of one body and one drive share: slab, cylinder, sphere and what is made of them. */
export interface BodyStepInput {
  conductivity: number
  volumetricHeatCapacity: number
  diffusivity: number
  initialTemperature: number
  times: readonly number[]
  outputs: readonly OutputName[]
}

/** A body of real size. The places of its unit body are those asked for, and after them its face. */
export interface RealBody {
  /** Heat per kelvin of the whole body, on the basis that its heat is told by. */
  capacity: number
  /** Of each place asked for: whether it is at an exposed face. */
  faces: readonly boolean[]
  /** Of each place: −1 where the flux away from the nearest face is against the direction that fluxes are told in. */
  directions: readonly (1 | -1)[]
}

export interface Drive {
  /** Temperature that the body ends at. */
  temperature: number
  /** Flux that a response of 1 stands for, W/(m2.K). */
  fluxUnit: number
  /** Flux share at time 0 at the face, where it has a limit. */
  fluxAtStart: number
}

/** Fourier numbers for a body of this size. */
export function momentsOf({ diffusivity, times }: BodyStepInput, size: number): Moment[] {
  return times.map((time) => ({
    // √a·√t, since a·t can vanish; a/L² first for the same reason.
    root: (Math.sqrt(diffusivity) * Math.sqrt(time)) / size,
    fourier: (diffusivity / (size * size)) * time,
  }))
}

export function solveBody(
  input: BodyStepInput,
  body: RealBody,
  unit: UnitBody,
  moments: readonly Moment[],
  drive: Drive,
): Solution {
  const { initialTemperature: initial, times, outputs } = input
  const step = { times, places: body.faces.length, outputs, initial, drive: drive.temperature }
  const terms = moments.reduce((most, m) => Math.max(most, m.fourier > 0 ? unit.terms(m) : 0), 0)
  const scale = Math.abs(drive.temperature - initial)
  return { ...stepOutputs(step, responseOf(input, body, unit, moments, drive)), terms, scale }
}

function responseOf(
  { times }: BodyStepInput,
  { capacity, faces, directions }: RealBody,
  unit: UnitBody,
  moments: readonly Moment[],
  drive: Drive,
): StepResponse {
  const face = faces.length
  const started = (i: number) => times[i]! > 0
  const fluxThere = (i: number, j: number): Estimate =>
    // At time 0 the limit from above: the drive's whole flux at the face, none inside.
    started(i) ? unit.flux(j, moments[i]!) : exactly(faces[j] ? drive.fluxAtStart : 0)
  return {
    share: (i, j) => (started(i) ? unit.share(j, moments[i]!) : { ...exactly(0), of: 'completed' }),
    remaining: (i, j) => (started(i) ? unit.remaining(j, moments[i]!) : exactly(1)),
    completed: (i, j) => (started(i) ? unit.completed(j, moments[i]!) : exactly(0)),
    flux: (i, j) => scaled(directions[j]! * drive.fluxUnit, fluxThere(i, j)),
    surfaceFlux: (i) => scaled(drive.fluxUnit, started(i) ? unit.flux(face, moments[i]!) : exactly(drive.fluxAtStart)),
    heat: (i) => scaled(capacity, started(i) ? unit.heatFraction(moments[i]!) : exactly(0)),
    heatFraction: (i) => (started(i) ? unit.heatFraction(moments[i]!) : exactly(0)),
    meanRemaining: (i) => (started(i) ? unit.meanRemaining(moments[i]!) : exactly(1)),
  }
}
