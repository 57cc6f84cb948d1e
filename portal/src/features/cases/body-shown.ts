import { actingOn, shapeOf } from '../../figure/sketch/shapes.ts'
import { sidesIn } from '../../solving/edges.ts'
import type { Body } from '../../solving/body.ts'
import type { Case } from './described.ts'

/** What the drawing of a body shows of the last solve. */
export interface Shown {
  body: string
  boundary: string
  wide: boolean
  /** What acts on the first face and on the second; the second only where there is one. */
  first: string
  second: string
  both: boolean
  /** Two equal faces, so that the mid-plane is one of symmetry. */
  mirrored: boolean
  /** Depths may lie in another body. */
  signed: boolean
  /** The first position inside, as parts of what is drawn. */
  place: { along: number; across: number }
  /** "T(x, t)". */
  reading: string
  symbols: Readonly<Record<string, string>>
  /** Symbols of what acts. */
  drivers: readonly string[]
  text: string
}

/** Quantities that act on a body, in the order in which they are written beside it. */
const driving =
  'filmCoefficient ambientTemperature surfaceTemperature imposedHeatFlux rampRate cycleMean amplitude bathTemperature contactConductance linePower power energy powerDensity'.split(
    ' ',
  )

const words: Record<string, string> = {
  temperature: 'a temperature held at the face',
  convection: 'a fluid before the face',
  flux: 'a heat flux into the face',
  ramp: 'a rising temperature at the face',
  cycle: 'a cycle at the face',
  contact: 'the two meet at a joint',
  source: 'heat is set free inside',
  bath: 'a stirred bath before the face',
  insulated: 'a face that no heat passes',
}

export function shownOf(c: Case, body: Body): Shown {
  const kind = c.sketch.body
  const { boundary } = c.sketch
  const sides = sidesIn(c, body)
  const flux = boundary === 'flux' && kind === 'slab'
  const named = actingOn(kind, boundary)
  const [a, b] = sides.map((side) => String(side['kind']))
  const first = flux ? 'flux' : (a ?? named.first)
  const second = (flux ? a : b) ?? (body['exposedFaces'] === 2 ? named.first : named.second)
  const mirrored = body['exposedFaces'] === 2
  const symbols = Object.fromEntries(c.fields.flatMap(({ name, symbol }) => (symbol ? [[name, symbol] as const] : [])))
  const both = kind !== 'slab' || mirrored || sides.length > 0
  const acting = [first, both && second !== first ? second : ''].filter(Boolean).map((one) => words[one] ?? one)
  return {
    body: kind,
    boundary,
    wide: shapeOf(kind).wide ?? false,
    first,
    second,
    both,
    mirrored,
    signed: kind === 'two-bodies',
    place: placeIn(c, body),
    reading: readingOf(c, body),
    symbols,
    drivers: driversOf(c, body),
    text: `${shapeOf(kind).text}; ${acting.join(', ')}${mirrored ? ', both faces alike' : ''}; one position marked`,
  }
}

/** Symbols of the quantities that act, those of the sides among them, each once. */
function driversOf({ fields }: Case, body: Body): string[] {
  const of = (list: Case['fields'][number]['fields'] & object, given: Body) =>
    driving.filter((name) => name in given).flatMap((name) => list.find((field) => field.name === name)?.symbol ?? [])
  const inside = fields.flatMap(({ name, kinds = [] }) => {
    const given = (body[name] ?? {}) as Body
    const own = kinds.find(({ kind }) => kind === given['kind'])
    return own ? of(own.fields, given) : []
  })
  return [...new Set([...of(fields, body), ...inside])]
}

function readingOf(c: Case, body: Body): string {
  const places = c.places === 'points' ? c.pointAxes : c.places === 'none' ? [] : body['radii'] ? ['r'] : ['x']
  return `T(${[...places, 't'].join(', ')})`
}

const inside = (part: number) => Math.min(1, Math.max(0.04, part))

/** The first position that does not lie on the face, to scale where the body's size is given. */
function placeIn(c: Case, body: Body): Shown['place'] {
  const number = (name: string) => (typeof body[name] === 'number' ? (body[name] as number) : undefined)
  const list = (name: string) => (Array.isArray(body[name]) ? (body[name] as number[]) : [])
  const end = c.depthsEndAt === null ? undefined : number(c.depthsEndAt)
  const depths = list('depths').map((depth) => (c.sketch.body === 'two-bodies' ? Math.abs(depth) : depth))
  const depth = depths.find((one) => one > 0)
  if (depth !== undefined) return { along: inside(depth / (end ?? 2 * Math.max(...depths))), across: 0 }
  const radii = list('radii')
  const [from, to] = [number('innerRadius') ?? number('radius') ?? 0, end ?? 1.25 * Math.max(...radii)]
  const radius = radii.find((one) => one > from)
  // Round bodies without a hole are marked from the surface inwards.
  if (radius !== undefined && c.places === 'depths-or-radii') return { along: inside(1 - radius / to), across: 0 }
  if (radius !== undefined) return { along: inside((radius - from) / (to - from)), across: 0 }
  return c.places === 'points' ? { along: 0.45, across: 0.4 } : { along: 0.32, across: 0 }
}
