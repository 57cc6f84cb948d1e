import { type Case, placeFields } from '../../case.ts'
import { DomainError, type Issue } from '../../errors.ts'
import { extentOf } from '../course.ts'
import { type Read, refusePlaces } from '../places.ts'
import { readBody } from '../read-body.ts'
import { inputOf } from '../solve-schemas.ts'
import {
  type Curves,
  dimensionlessCentre,
  heatFraction,
  histories,
  type Kind,
  positionCorrection,
  profiles,
  type Span,
  spaced,
} from './curves.ts'

/** Curves of one chart; more are not told apart. */
export const MOST_CURVES = 8

export interface Paper {
  kind: Kind
  biotValues?: number[]
  from?: number
  until?: number
  points: number
  logTime?: boolean
  width: number
  height: number
  title?: string
}

/** What a chart shows, priced and ready to be drawn. */
export interface Planned {
  count: number
  draw(): Curves
  /** Left out for the classic kinds, which have no body. */
  input?: ReturnType<Case['resolve']>
  length: number | null
}

const issue = (pointer: string, code: Issue['code'], detail: string, accepted: string) =>
  new DomainError([{ pointer, code, detail, accepted }])

export function planOf(c: Case, own: Paper, fields: Record<string, unknown>): Planned {
  if (own.kind === 'profiles') return planProfiles(c, own, fields)
  if (own.kind === 'histories') return planHistories(c, own, fields)
  return planClassic(c, own, own.kind, fields)
}

function planProfiles(c: Case, own: Paper, fields: Record<string, unknown>): Planned {
  const axis = (placeFields[c.places] as readonly string[]).includes('depths') ? 'depths' : 'radii'
  for (const name of ['depths', 'radii'])
    if (fields[name] !== undefined)
      throw issue(
        `#/${name}`,
        'conflicting-fields',
        'Profiles run along the body; from and until say how far.',
        'no places',
      )
  const [near, far] = extentOf(c, fields, axis)
  const asked = resolved(c, { ...fields, [axis]: [Math.max(near, own.from ?? near)] })
  const end = far < 1e5 ? far : numberOf(c.numbers(asked).penetrationDepth)
  const span = spanOf(own, { from: Math.max(near, -(end ?? 0)), until: end, log: false })
  if (span.from < near || span.until > far)
    throw issue(
      span.from < near ? '#/from' : '#/until',
      'depth-outside-body',
      'The curves would leave the body.',
      `${near} to ${far} m`,
    )
  const input = resolved(c, { ...fields, [axis]: spaced(span) })
  refuseMany('#/times', input.times.length)
  return {
    count: input.times.length,
    input,
    length: numberOf(c.numbers(input).length) ?? null,
    draw: () => profiles(c, input, axis),
  }
}

function planHistories(c: Case, own: Paper, fields: Record<string, unknown>): Planned {
  if (fields['times'] !== undefined)
    throw issue('#/times', 'conflicting-fields', 'Histories run over time; from and until say how long.', 'no times')
  const log = own.logTime ?? false
  const span = spanOf(own, { from: log && own.until ? own.until / 1e4 : 0, until: undefined, log })
  const input = resolved(c, { ...fields, times: spaced(span) })
  const places = (input.depths ?? input.radii ?? input.points ?? []).length
  refuseMany(`#/${placeFields[c.places][0]}`, places)
  return {
    count: Math.max(1, places),
    input,
    length: numberOf(c.numbers(input).length) ?? null,
    draw: () => histories(c, input, log),
  }
}

const classic = {
  'dimensionless-centre': { draw: dimensionlessCentre, from: 0, until: 10, log: false },
  'heat-fraction': { draw: heatFraction, from: 1e-3, until: 100, log: true },
  'position-correction': { draw: positionCorrection, from: 0, until: 1, log: false },
}

function planClassic(c: Case, own: Paper, kind: keyof typeof classic, fields: Record<string, unknown>): Planned {
  const [given] = Object.entries(fields).filter(([, value]) => value !== undefined)
  if (given)
    throw issue(
      `#/${given[0]}`,
      'conflicting-fields',
      `A chart of this kind is of every body; ${given[0]} has no place in it.`,
      'biotValues, from, until',
    )
  const { draw, ...usual } = classic[kind]
  const log = kind === 'position-correction' ? false : (own.logTime ?? usual.log)
  const span = spanOf(own, { ...usual, from: log ? usual.from || 1e-3 : own.logTime === false ? 0 : usual.from, log })
  if (kind === 'position-correction' && span.until > 1)
    throw issue('#/until', 'out-of-range', `The face is at 1; ${span.until} lies outside the body.`, '0 to 1')
  const biots = own.biotValues ?? [0.1, 0.3, 1, 3, 10, 100]
  return { count: biots.length, length: 1, draw: () => draw(c, biots, span) }
}

function spanOf(own: Paper, usual: { from: number; until: number | undefined; log: boolean }): Span {
  const { log } = usual
  const from = own.from ?? usual.from
  const until = own.until ?? usual.until
  if (until === undefined)
    throw issue(
      '#/until',
      'missing-field',
      'until is missing: where the curves end.',
      'a number in the unit of the axis',
    )
  if (!(from < until))
    throw issue(
      '#/until',
      'out-of-range',
      `From ${from} until ${until} there is nothing to draw.`,
      `a number above ${from}`,
    )
  if (log && !(from > 0))
    throw issue('#/from', 'out-of-range', 'A logarithmic axis begins above 0.', 'a number above 0')
  return { from, until, points: own.points, log }
}

function refuseMany(pointer: string, count: number): void {
  if (count > MOST_CURVES)
    throw issue(pointer, 'wrong-length', `${count} curves are more than are told apart.`, `1 to ${MOST_CURVES}`)
}

/** As a solve of the temperature reads it. */
function resolved(c: Case, fields: Record<string, unknown>) {
  const body = Object.fromEntries(Object.entries(fields).filter(([, value]) => value !== undefined))
  const { detail: _, ...input } = readBody(inputOf(c), { ...body, outputs: ['temperature'] })
  refusePlaces(c, input as Read)
  return c.resolve(input)
}

const numberOf = (value: number | number[] | undefined) => (typeof value === 'number' ? value : undefined)
