import type { Edge, Field } from '../figure/field.ts'
import { gridOf } from '../figure/grid.ts'
import { profileTimes } from '../figure/other-profiles.tsx'
import { niceCeiling } from '../figure/steps.ts'
import { type Asked, type Described, largestOf, leastOf, numberIn, numbersOf, twelve } from './described.ts'
import { edgesOf } from './edges.ts'
import { gridValues } from './grid-values.ts'
import type { Body } from './body.ts'
import type { Answer } from './solve.ts'

export interface FieldDrawing {
  kind: 'field'
  field: Field
  /** Where the cuts stand first. */
  start: { time: number; place: number }
  asked: Asked
}

/** The part of a body that is drawn: in which field its places are asked, from where to where, and what is around. */
interface Part {
  name: 'depths' | 'radii'
  from: number
  to: number
  near: Edge
  far: Edge
}

/** At most so many numbers are asked for; fewer where each takes long to solve, or brings others with it. */
const MOST = 9_900
const MOST_OF_SLOW = 1500
const SLOW = 10

/** Nothing where places are no line through the body, or only one place of it is known. */
export function partOf(c: Described, body: Body, answer: Answer): Part | undefined {
  if (c.places === 'points' || c.places === 'none') return undefined
  const radial = c.places === 'radii' || numbersOf(body['radii']).length > 0
  const part = radial ? alongRadius(c, body, answer) : inDepth(c, body, answer)
  return part.to > part.from ? part : undefined
}

function inDepth(c: Described, body: Body, answer: Answer): Part {
  const { near, far } = edgesOf(c, answer)
  const end = numberIn(answer, c.depthsEndAt)
  if (end !== undefined) {
    if (c.places === 'depths-or-radii') return { name: 'depths', from: 0, to: end, near, far: { kind: 'centre' } }
    if (answer.input['exposedFaces'] === 2)
      return { name: 'depths', from: 0, to: end / 2, near, far: { kind: 'mirror' } }
    return { name: 'depths', from: 0, to: end, near, far: far ?? { kind: 'insulated' } }
  }
  const reach = (answer.numbers as Record<string, unknown>)['penetrationDepth']
  const depths = numbersOf(body['depths']).map(Math.abs)
  const shown = niceCeiling(Math.max(...depths, typeof reach === 'number' ? reach : 0) || 1)
  const to = Math.min(shown, largestOf(c, 'depths'))
  return { name: 'depths', from: leastOf(c, 'depths') < 0 ? -to : 0, to, near, far: far ?? { kind: 'endless' } }
}

/** Between the least and the largest radius that was asked for, and to the end of a body that has one. */
function alongRadius(c: Described, body: Body, answer: Answer): Part {
  const radii = numbersOf(body['radii'])
  const { near, far } = edgesOf(c, answer)
  const end = numberIn(answer, c.depthsEndAt)
  const whole = c.places === 'depths-or-radii' && end !== undefined
  if (whole) return { name: 'radii', from: 0, to: end, near: { kind: 'centre' }, far: near }
  const [from, to] = [Math.min(...radii), end ?? Math.max(...radii)]
  return { name: 'radii', from, to, near, far: far ?? { kind: 'endless' } }
}

interface Span {
  end: number
  /** Where the cut stands first. */
  time: number
  asked: Asked
  initial: number | undefined
  /** How many numbers a place and time brings. */
  together: number
}

export async function fieldDrawing(
  c: Described,
  rest: Body,
  part: Part,
  { end, time, asked, initial, together }: Span,
  signal: AbortSignal,
): Promise<FieldDrawing> {
  const { name, from, to, near, far } = part
  const slow = c.weight > SLOW ? { columns: 30, rows: 40 } : {}
  const most = Math.floor((c.weight > SLOW ? MOST_OF_SLOW : MOST) / together)
  const times = [...asked.times.slice(0, 10), ...profileTimes(end)]
  const close = name === 'radii' && far.kind === 'endless'
  const grid = gridOf({ from, extent: to, end, depths: asked.places, times, close, ...slow, most })
  const values = await gridValues(c.id, { ...rest, [name]: grid.depths, times: grid.times }, signal)
  const along = name === 'radii' ? 'radius' : 'depth'
  const field: Field = { places: grid.depths, along, times: grid.times, values, initial, near, far }
  const place = asked.places.find((one) => one > from && one < to) ?? from + (to - from) * 0.32
  return {
    kind: 'field',
    field,
    start: { time, place },
    asked: { places: asked.places.map(twelve), times: asked.times.map(twelve) },
  }
}
