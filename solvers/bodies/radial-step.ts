import { type BodyStepInput, momentsOf, solveBody } from './body-step.ts'
import type { Numbers } from '../case.ts'
import { UnitCylinder } from '../math/cylinder.ts'
import { UnitSphere } from '../math/sphere.ts'
import type { FilmedBody, UnitPlaces } from '../math/unit-body.ts'
import type { Solution } from '../solution.ts'
import { type LateCourse, lateNumbers } from './late-course.ts'
import { stepOutputs, untouched } from './step-response.ts'

/** What cylinders and spheres share: a uniform body, one drive, and places by their depths or their radii. */
export interface RadialStepInput extends BodyStepInput {
  radius: number
  depths?: readonly number[] | undefined
  radii?: readonly number[] | undefined
}

export interface FilmDrive {
  filmCoefficient: number
  ambientTemperature: number
}

export interface HeldDrive {
  surfaceTemperature: number
}

export interface Form {
  unit(body: FilmedBody): UnitCylinder | UnitSphere
  /** m³ of the body, per m of a cylinder. */
  volume(radius: number): number
  /** m² of its surface, per m of a cylinder. */
  surface(radius: number): number
  /** Unit of its heat. */
  heat: 'J/m' | 'J'
}

export const cylinder: Form = {
  unit: (body) => new UnitCylinder(body),
  volume: (R) => Math.PI * R * R,
  surface: (R) => 2 * Math.PI * R,
  heat: 'J/m',
}

export const sphere: Form = {
  unit: (body) => new UnitSphere(body),
  volume: (R) => ((4 * Math.PI) / 3) * R * R * R,
  surface: (R) => 4 * Math.PI * R * R,
  heat: 'J',
}

/** A depth keeps its digits near the face, a radius near the axis; what was given is not made from the other. */
export function radialPlaces({
  radius: R,
  depths,
  radii,
}: Pick<RadialStepInput, 'radius' | 'depths' | 'radii'>): UnitPlaces {
  const places = radii
    ? radii.map((r) => ({ delta: (R - r) / R, inner: r / R, shift: 6 }))
    : (depths ?? []).map((d) => ({ delta: d / R, inner: (R - d) / R, shift: 0 }))
  const all = [...places, { delta: 0, inner: 1, shift: 0 }]
  return {
    deltas: Float64Array.from(all, ({ delta }) => Math.min(1, Math.max(0, delta))),
    inner: Float64Array.from(all, ({ inner }) => Math.min(1, Math.max(0, inner))),
    shifts: Float64Array.from(all, ({ shift }) => shift),
  }
}

export function solveBehindFilm(form: Form, input: RadialStepInput & FilmDrive): Solution {
  const { filmCoefficient: h, ambientTemperature, initialTemperature: initial, times, outputs, radius } = input
  const scale = Math.abs(ambientTemperature - initial)
  const step = { times, places: facesOf(input).length, outputs, initial, drive: ambientTemperature }
  if (h === 0) return { ...stepOutputs(step, untouched), terms: 0, scale }
  const drive = { temperature: ambientTemperature, fluxUnit: h, fluxAtStart: 1 }
  return solveForm(form, input, (h * radius) / input.conductivity, drive)
}

export function solveHeld(form: Form, input: RadialStepInput & HeldDrive): Solution {
  const drive = {
    temperature: input.surfaceTemperature,
    fluxUnit: input.conductivity / input.radius,
    fluxAtStart: 0,
  }
  return solveForm(form, input, Infinity, drive)
}

function solveForm(
  form: Form,
  input: RadialStepInput,
  biot: number,
  drive: { temperature: number; fluxUnit: number; fluxAtStart: number },
): Solution {
  const moments = momentsOf(input, input.radius)
  const unit = form.unit({ biot, ...radialPlaces(input) })
  const faces = facesOf(input)
  const body = {
    capacity: input.volumetricHeatCapacity * form.volume(input.radius),
    faces,
    directions: faces.map(() => 1 as const),
  }
  return solveBody(input, body, unit, moments, drive)
}

/** Of each place, whether it is at the face. */
function facesOf({ radius, depths, radii }: RadialStepInput): boolean[] {
  return radii ? radii.map((r) => r === radius) : (depths ?? []).map((depth) => depth === 0)
}

/** What the slowest mode says: how fast the late change is, and how far each place is behind it. */
export const radialLateNumbers = (form: Form, input: RadialStepInput, biot: number): Numbers =>
  biot === 0 ? {} : lateNumbers(radialCourse(form, input, biot))

export function radialCourse(
  form: Form,
  input: Pick<RadialStepInput, 'radius' | 'depths' | 'radii' | 'diffusivity'>,
  biot: number,
): LateCourse {
  const places = radialPlaces(input)
  const withCentre = {
    biot,
    deltas: Float64Array.of(...places.deltas, 1),
    inner: Float64Array.of(...places.inner, 0),
    shifts: Float64Array.of(...places.shifts, 0),
  }
  const { series } = form.unit(withCentre)
  const [first, second] = [series.mode(0), series.mode(1)]
  const rateOf = (root: number) => input.diffusivity / ((input.radius / root) * (input.radius / root))
  const centre = first.parts.at(-1)!.value
  return {
    rate: rateOf(first.root),
    shares: first.parts.slice(0, -2).map(({ value }) => value),
    centre,
    second: { rate: rateOf(second.root), most: Math.abs(second.parts.at(-1)!.value) },
  }
}
