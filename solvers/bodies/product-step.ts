import { type BodyStepInput, momentsOf } from './body-step.ts'
import type { Point, PointAxis } from '../case.ts'
import { UnitCylinder } from '../math/cylinder.ts'
import { bodyFactor, type Factor, halfSpaceFactor, idleFactor, product, union } from '../math/product.ts'
import type { Estimate } from '../math/rounding.ts'
import { SlabFilm } from '../math/slab-film.ts'
import { SlabFixed } from '../math/slab-fixed.ts'
import type { FilmedBody, Share, UnitBody } from '../math/unit-body.ts'
import { driveTemperature, type ProductDrive } from './product-films.ts'
import { type LateCourse, slabCourse } from './late-course.ts'
import { cylinder, radialCourse } from './radial-step.ts'
import type { Solution } from '../solution.ts'
import { exactly, scaled, type StepResponse, stepOutputs } from './step-response.ts'

/** What the bodies share whose answer is a product of one-dimensional ones. */
export interface ProductInput extends BodyStepInput, ProductDrive {
  points: readonly Point[]
}

/** A direction with two faces, or one and an insulated one. */
export interface Span {
  size: number
  faces: 1 | 2
}

/** Distance from the mid-plane, or from the insulated face, to a face. */
export const reachOf = ({ size, faces }: Span): number => size / faces

export type DirectionShape = 'slab' | 'cylinder'

/** One direction of a product as a body of size 1. */
export function unitAcross(shape: DirectionShape, body: FilmedBody): UnitBody {
  if (shape === 'cylinder') return new UnitCylinder(body)
  return body.biot === Infinity ? new SlabFixed(body) : new SlabFilm(body)
}

/** A slab across `span`, the points measured along `axis` from its mid-plane or insulated face. */
export function slabFactor(input: ProductInput, span: Span, axis: PointAxis, film: number): Factor {
  return factorOf(input, reachOf(span), axis, film, 'slab')
}

/** A cylinder, the points measured by their radius. */
export function cylinderFactor(input: ProductInput, radius: number, film: number): Factor {
  return factorOf(input, radius, 'r', film, 'cylinder')
}

function factorOf(input: ProductInput, size: number, axis: PointAxis, film: number, shape: DirectionShape): Factor {
  if (film === 0) return idleFactor
  const moments = momentsOf(input, size)
  const { distances, places } = differentOf(input.points.map((point) => Math.abs(point[axis]!)))
  const body = {
    biot: (film * size) / input.conductivity,
    deltas: Float64Array.from(distances, (x) => Math.min(1, Math.max(0, (size - x) / size))),
    inner: Float64Array.from(distances, (x) => Math.min(1, x / size)),
    // The depth is a difference, which keeps the rounding of the whole size.
    shifts: Float64Array.from(distances, () => 6),
  }
  return bodyFactor(unitAcross(shape, body), places, moments)
}

/** Points of a grid have few different coordinates: each once, and which of them every point has. */
function differentOf(coordinates: readonly number[]): { distances: number[]; places: number[] } {
  const known = new Map<number, number>()
  const places = coordinates.map((x) => {
    const place = known.get(x) ?? known.size
    known.set(x, place)
    return place
  })
  return { distances: [...known.keys()], places }
}

/** A direction without end, the points measured along `axis` from its face. */
export function endlessFactor(input: ProductInput, axis: PointAxis, film: number): Factor {
  if (film === 0) return idleFactor
  const reached = input.times.map((time) => Math.sqrt(input.diffusivity) * Math.sqrt(time))
  const { distances, places } = differentOf(input.points.map((point) => point[axis]!))
  return halfSpaceFactor(
    distances,
    places,
    reached,
    reached.map((length) => (film * length) / input.conductivity),
  )
}

/** `capacity` is the heat per kelvin of the whole body, where it has an end. */
export function solveProduct(input: ProductInput, factors: readonly Factor[], capacity?: number): Solution {
  const { initialTemperature: initial, times, outputs, points } = input
  const drive = driveTemperature(input)
  const step = { times, places: points.length, outputs, initial, drive }
  const started = times.flatMap((time, i) => (time > 0 ? [i] : []))
  const terms = Math.max(0, ...factors.map((f) => started.reduce((most, i) => Math.max(most, f.terms(i)), 0)))
  return {
    ...stepOutputs(step, responseOf(times, factors, capacity)),
    terms,
    scale: Math.abs(drive - initial),
  }
}

function responseOf(times: readonly number[], factors: readonly Factor[], capacity: number | undefined): StepResponse {
  const started = (i: number) => times[i]! > 0
  const remaining = (i: number, j: number): Estimate =>
    started(i) ? product(factors.map((f) => f.remaining(j, i))) : exactly(1)
  const completed = (i: number, j: number): Estimate =>
    started(i) ? union(factors.map((f) => ({ done: f.completed(j, i), left: f.remaining(j, i) }))) : exactly(0)
  const heatFraction = (i: number): Estimate =>
    started(i) ? union(factors.map((f) => ({ done: f.heatFraction!(i), left: f.meanRemaining!(i) }))) : exactly(0)
  const placed = {
    share(i: number, j: number): Share {
      const { value, error, method } = started(i) ? product(factors.map((f) => f.left(j, i))) : exactly(1)
      return { value, error, method, of: 'remaining' }
    },
    remaining,
    completed,
  }
  if (capacity === undefined) return placed
  return {
    ...placed,
    heatFraction,
    heat: (i) => scaled(capacity, heatFraction(i)),
    meanRemaining: (i) => (started(i) ? product(factors.map((f) => f.meanRemaining!(i))) : exactly(1)),
  }
}

/** A direction that passes no heat, for ever as it was. */
const still: LateCourse = { rate: 0 }

/** The late course of a slab across `span`, at the points. */
export function slabDirection(input: ProductInput, span: Span, axis: PointAxis, film: number): LateCourse {
  if (film === 0) return still
  const length = reachOf(span)
  const body = { diffusivity: input.diffusivity, length, biot: (film * length) / input.conductivity }
  return slabCourse(
    body,
    input.points.map((point) => Math.abs(point[axis]!)),
  )
}

/** The late course of a cylinder, at the points. */
export function cylinderDirection(input: ProductInput, radius: number, film: number): LateCourse {
  if (film === 0) return still
  const radii = input.points.map((point) => point.r!)
  return radialCourse(cylinder, { radius, radii, diffusivity: input.diffusivity }, (film * radius) / input.conductivity)
}
