import { z } from 'zod'
import { type Case, type Point, type Resolved, outputOf, placeFields } from '../case.ts'
import { DomainError, type Issue } from '../errors.ts'
import { pointsOf } from '../statement/fields.ts'
import { type OutputName } from '../outputs.ts'
import { quantities, quantity } from '../statement/quantity.ts'
import { courseOf } from './course.ts'
import type { Asked } from './curve/curve.ts'
import type { Course } from './curve/grid.ts'
import { placesOutside } from './places.ts'
import { answeredShape } from './solve-schemas.ts'

/* What the operations that look along a curve take beside the case's own fields: one place, or the difference of two. */

type Axis = 'depths' | 'radii' | 'points'
const oneOf = { depths: 'depth', radii: 'radius', points: 'point' } as const

/** Quantities whose course over time may be asked for. */
const quantityNames = [
  'temperature',
  'meanTemperature',
  'remainingFraction',
  'completedFraction',
  'heatFraction',
  'frontDepth',
]

export function quantitiesOf(c: Case): OutputName[] {
  return quantityNames.filter(
    (name): name is OutputName =>
      Object.hasOwn(c.outputs, name) && ['grid', 'times'].includes(answeredShape(c, name as OutputName)),
  )
}

export const isTemperature = (output: OutputName) => output === 'temperature' || output === 'meanTemperature'

/** The axes of a case; where its radius is a field of its own, a radius is asked for by the list. */
function axesOf(c: Case): { axis: Axis; one: string | undefined }[] {
  return placeFields[c.places].map((axis) => ({ axis, one: oneOf[axis] in c.fields ? undefined : oneOf[axis] }))
}

const depthOf = (c: Case) =>
  ({ symbol: 'x', unit: 'm', label: 'Depth', min: c.signedDepths ? -1e5 : 0, max: 1e5 }) as const
const radius = { symbol: 'r', unit: 'm', label: 'Radius', min: 0, max: 1e5, hint: 'from the axis or centre' } as const
const pair = 'one place, or two: the first less the second'

/** The fields of the place, all optional: a mean has none. */
export function placeInputs(c: Case): Record<string, z.ZodType> {
  const depth = depthOf(c)
  const schemas: Record<Axis, { one: z.ZodType; list: z.ZodType }> = {
    depths: {
      one: quantity({ ...depth, hint: 'of one place' }).optional(),
      list: quantities({ ...depth, label: 'Depths', hint: pair }, 2).optional(),
    },
    radii: {
      one: quantity(radius).optional(),
      list: quantities({ ...radius, label: 'Radii', hint: pair }, 2).optional(),
    },
    points: pointInputs(c),
  }
  return Object.fromEntries(
    axesOf(c).flatMap(({ axis, one }) => [
      ...(one ? [[one, schemas[axis].one] as const] : []),
      [axis, schemas[axis].list] as const,
    ]),
  )
}

function pointInputs(c: Case) {
  const axes = (c.pointAxes ?? []).join(', ')
  const element = pointsOf(c.pointAxes ?? [], c.optionalAxes).element
  const accepted = `a point {${axes}}, in m`
  return {
    one: element.optional().meta({ title: 'Point', description: `Point: ${accepted}.`, 'x-accepted': accepted }),
    list: z
      .array(element)
      .min(1)
      .max(2)
      .optional()
      .meta({ title: 'Points', description: `Points: ${pair}.`, 'x-accepted': `1 to 2 points {${axes}}, in m` }),
  }
}

export function quantityField(c: Case) {
  const names = quantitiesOf(c)
  return z
    .enum(names as [OutputName, ...OutputName[]])
    .optional()
    .meta({
      title: 'Quantity',
      description: `Quantity: ${names.join(', ')}. Default ${names[0]}.`,
      'x-accepted': names.join(', '),
    })
}

/** A case with its place and output chosen, all refusals of the domain made. */
export interface Question {
  /** The input as the case takes it, without times and outputs. */
  asked: Asked
  output: OutputName
  axis?: Axis
  places: (number | Point)[]
  resolved: Resolved
  course: Course
  unit: string
}

interface Placed {
  axis?: Axis
  places: (number | Point)[]
  /** Names in the pointers of a resolved input, and what they are in this one. */
  names: Record<string, string>
}

type Refuse = (issue: Issue) => void

function placedOf(c: Case, read: Record<string, unknown>, output: OutputName, refuse: Refuse): Placed {
  const axes = axesOf(c)
  const given = axes.flatMap(({ axis, one }) => [
    ...(one && read[one] !== undefined ? [{ axis, name: one, places: [read[one]] }] : []),
    ...(read[axis] !== undefined ? [{ axis, name: axis as string, places: read[axis] as unknown[] }] : []),
  ])
  const accepted = axes.map(({ axis, one }) => (one ? `${one} or ${axis}` : axis)).join(', or ')
  const placed = answeredShape(c, output) === 'grid'
  const [first, second] = given
  if (placed && !first) {
    const pointer = `#/${axes[0]?.one ?? axes[0]?.axis}`
    refuse({ pointer, code: 'missing-field', detail: `${output} needs a place.`, accepted })
  }
  if (second) {
    const detail = `The place is given twice: by ${first!.name} and by ${second.name}.`
    refuse({ pointer: `#/${second.name}`, code: 'conflicting-fields', detail, accepted: `one of ${accepted}` })
  }
  if (first && !placed) {
    const detail = `${output} is of the whole body and has no place.`
    refuse({ pointer: `#/${first.name}`, code: 'conflicting-fields', detail, accepted: 'no place' })
  }
  if (!first || !placed) return { places: [], names: {} }
  const { axis, name, places } = first
  const names: Record<string, string> = name === axis ? {} : { [`#/${axis}/0`]: `#/${name}` }
  return { axis, places: places as (number | Point)[], names }
}

/** Issues of a resolved input, told by the names that this body has. */
export function renamed(issue: Issue, names: Record<string, string>): Issue {
  const found = Object.entries(names).find(([from]) => issue.pointer === from || issue.pointer.startsWith(`${from}/`))
  return found ? { ...issue, pointer: found[1] + issue.pointer.slice(found[0].length) } : issue
}

/** Names that a body of these operations has beside the case's own fields. */
const own = [
  'depth',
  'radius',
  'point',
  'depths',
  'radii',
  'points',
  'quantity',
  'target',
  'sense',
  'time',
  'from',
  'until',
  'detail',
]

/**
 * Reads the place and the output, and lets the case resolve its input at some times, so that it refuses what it must.
 * `told` says how an issue of those times is told.
 */
export function questionOf(
  c: Case,
  read: Record<string, unknown>,
  times: number[],
  told: (issue: Issue) => Issue,
): Question {
  const output = (read['quantity'] as OutputName | undefined) ?? quantitiesOf(c)[0]!
  const issues: Issue[] = []
  const { axis, places, names } = placedOf(c, read, output, (issue) => issues.push(issue))
  if (issues.length > 0) throw new DomainError(issues)
  const own_ = own.filter((name) => !(name in c.fields))
  const fields = Object.fromEntries(Object.entries(read).filter(([name]) => !own_.includes(name)))
  const asked: Asked = { ...fields, ...(axis ? { [axis]: places } : {}) }
  const tell = (issue: Issue) => told(renamed(issue, { ...names, '#/outputs/0': '#/quantity' }))
  const outside = placesOutside(c, asked)
  if (outside.length > 0) throw new DomainError(outside.map(tell))
  const resolved = resolveTold(c, { ...asked, times, outputs: [output] }, tell)
  const unit = c.unitOf?.(output, resolved) ?? outputOf(c, output).unit
  return { asked, output, ...(axis ? { axis } : {}), places, resolved, course: courseOf(c, asked, resolved), unit }
}

export function resolveTold(c: Case, input: Record<string, unknown>, tell: (issue: Issue) => Issue): Resolved {
  try {
    return c.resolve(input)
  } catch (error) {
    if (error instanceof DomainError) throw new DomainError(error.issues.map(tell))
    throw error
  }
}

/** Priced points of one number of the answer, or of the two of a difference. */
export const basePrice = (c: Case, places: readonly unknown[]) => c.weight * Math.max(1, places.length) + c.setUp
