import { z } from 'zod'
import type { Check, Numbers, Point, PointAxis, Resolved } from '../case.ts'
import type { Issue } from '../errors.ts'
import { exposedFaces, initialTemperature, solid } from '../statement/fields.ts'
import { type LateCourse, lateNumbers, productCourse, productValidFrom } from './late-course.ts'
import type { ProductInput } from './product-step.ts'
import { quantity } from '../statement/quantity.ts'
import { figure } from '../statement/validate.ts'

/* What the descriptions of products share. */

export type ProductResolved = ProductInput & Resolved

export const productFields = { ...solid, initialTemperature }

const size = { unit: 'm', min: 1e-9, max: 1e5, typical: [0.005, 1] } as const
export const width = quantity({ ...size, symbol: 'w', label: 'Width', hint: 'along x; whole, never half' })
export const height = quantity({ ...size, symbol: 'h', label: 'Height', hint: 'whole, never half' })
export const length = quantity({ ...size, symbol: 'l', label: 'Length', hint: 'along z; whole, never half' })

/** How many of the two faces across a direction meet the drive; no default. */
export function facesAcross(direction: string) {
  const label = `Faces across the ${direction}`
  return z.union([z.literal(1), z.literal(2)]).meta({
    ...exposedFaces.meta(),
    title: label,
    description: `${label}: 1 (the other is insulated) or 2 (both alike). No default: the wrong one changes times by up to a factor of four.`,
    'x-hint': '1: points from the insulated face; 2: from the mid-plane',
  })
}

export const productOutputs = {
  temperature: {},
  remainingFraction: {},
  completedFraction: {},
}

/** A body that ends has a mean and a heat. */
export function closedOutputs(heat: string) {
  return { ...productOutputs, heatGained: { unit: heat }, meanTemperature: {}, heatFraction: {} }
}

export const absentFluxes = {
  heatFlux:
    'The flux has a direction of its own at each point; the case answers temperatures and the heat of the whole.',
  surfaceHeatFlux: 'The flux varies over the surface; the heat gained is that of all of it.',
  steadyTemperature: 'The body ends at the temperature that drives it, so there is nothing to compute.',
  timeConstant: 'The body has many time constants; only a body with one temperature has one.',
}

export const absentHeat = {
  ...absentFluxes,
  heatGained: 'The body has no end, so the heat that it takes up has none either.',
  meanTemperature: 'The body has no end, so its mean stays the initial temperature.',
  heatFraction: 'The heat that a body without end takes up in all is infinite.',
}

/** From and to of each coordinate. */
export type PointRanges = Partial<Record<PointAxis, readonly [number, number]>>

/** Across a direction: either side of the mid-plane, or from the insulated face on. */
export function rangeAcross(span: number, faces: 1 | 2): readonly [number, number] {
  return faces === 2 ? [-span / 2, span / 2] : [0, span]
}

/** Beyond, no place is accepted even where the body goes on. */
export const ENDLESS: readonly [number, number] = [0, 1e5]

/** Points outside the body, with a coordinate too many or too few. */
export function refusePoints(points: readonly Point[], ranges: PointRanges, refuse: (issue: Issue) => void): void {
  const axes = Object.keys(ranges) as PointAxis[]
  points.forEach((point, j) => {
    for (const axis of axes) refuseCoordinate(`#/points/${j}/${axis}`, axis, point[axis], ranges[axis]!, refuse)
    for (const axis of Object.keys(point) as PointAxis[]) {
      if (ranges[axis] || point[axis] === undefined) continue
      const detail = `A point of this body has no ${axis}.`
      refuse({ pointer: `#/points/${j}/${axis}`, code: 'unknown-field', detail, accepted: axes.join(', ') })
    }
  })
}

function refuseCoordinate(
  pointer: string,
  axis: PointAxis,
  value: number | undefined,
  [from, to]: readonly [number, number],
  refuse: (issue: Issue) => void,
): void {
  const accepted = `${figure(from)} to ${figure(to)} m`
  if (value === undefined)
    refuse({ pointer, code: 'missing-field', detail: `A point of this body needs ${axis}.`, accepted })
  else if (value < from || value > to)
    refuse({
      pointer,
      code: 'depth-outside-body',
      detail: `The body lies at ${axis} from ${from} to ${to} m; this point is at ${value} m.`,
      accepted,
    })
}

/** What the slowest modes of all directions say of their product. */
export function productLateNumbers(directions: readonly LateCourse[]): Numbers {
  return { ...lateNumbers(productCourse(directions)), ...productValidFrom(directions) }
}

export function pointsCheck({ points }: ProductInput, limit: number): Check {
  return {
    id: 'points-inside-body',
    holds: true,
    value: points.reduce((most, point) => Math.max(most, ...Object.values(point).map(Math.abs)), 0),
    limit,
    text: 'Every point lies inside the body.',
  }
}
