import { type Case, countOfPlaces, placeFields } from '../../case.ts'
import { DomainError, type Issue } from '../../errors.ts'
import { extentOf } from '../course.ts'
import { type Read, refusePlaces } from '../places.ts'
import { readBody } from '../read-body.ts'
import { inputOf } from '../solve-schemas.ts'
import { within } from '../within.ts'
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

export type Fields = Record<string, unknown>

export function planOf(c: Case, own: Paper, fields: Fields): Planned {
  if (own.kind === 'profiles') return planProfiles(c, own, fields)
  if (own.kind === 'histories') return planHistories(c, own, fields)
  return planClassic(c, own, own.kind, fields)
}

function planProfiles(c: Case, own: Paper, fields: Fields): Planned {
  const axis = (placeFields[c.places] as readonly string[]).includes('depths') ? 'depths' : 'radii'
  const given = placeFields[c.places].find((name) => fields[name] !== undefined)
  if (given) {
    const detail = 'Profiles run along the body; from and until say how far.'
    throw issue(`#/input/${given}`, 'conflicting-fields', detail, 'no places')
  }
  const [near, far] = extentOf(c, fields, axis)
  const first = resolved(c, { ...fields, [axis]: [Math.max(near, Math.min(far, own.from ?? near))] })
  const end = far < 1e5 ? far : numberOf(c.numbers(first).penetrationDepth)
  const span = spanOf(own, { from: Math.max(near, -(end ?? 0)), until: end, log: false })
  if (span.from < near || span.until > far) {
    const pointer = span.from < near ? '#/from' : '#/until'
    throw issue(pointer, 'depth-outside-body', 'The curves would leave the body.', `${near} to ${far} m`)
  }
  const input = resolved(c, { ...fields, [axis]: spaced(span) })
  refuseMany('#/input/times', input.times.length)
  const length = numberOf(c.numbers(input).length) ?? null
  return { count: input.times.length, input, length, draw: () => profiles(c, input, axis) }
}

function planHistories(c: Case, own: Paper, fields: Fields): Planned {
  if (fields['times'] !== undefined) {
    const detail = 'Histories run over time; from and until say how long.'
    throw issue('#/input/times', 'conflicting-fields', detail, 'no times')
  }
  const log = own.logTime ?? false
  const span = spanOf(own, { from: log && own.until ? own.until / 1e4 : 0, until: undefined, log })
  const input = resolved(c, { ...fields, times: spaced(span) })
  const places = countOfPlaces(input)
  refuseMany(`#/input/${placeFields[c.places][0]}`, places)
  const length = numberOf(c.numbers(input).length) ?? null
  return { count: Math.max(1, places), input, length, draw: () => histories(c, input, log) }
}

const classic = {
  'dimensionless-centre': { draw: dimensionlessCentre, from: 0, until: 10, log: false },
  'heat-fraction': { draw: heatFraction, from: 0, until: 100, log: true },
  'position-correction': { draw: positionCorrection, from: 0, until: 1, log: false },
}
/** Where a logarithmic axis of Fourier numbers begins, since it has no 0. */
const LEAST_FOURIER = 1e-3
const usualBiots = [0.1, 0.3, 1, 3, 10, 100]

function planClassic(c: Case, own: Paper, kind: keyof typeof classic, fields: Fields): Planned {
  const [given] = Object.keys(fields)
  if (given) {
    const detail = `A chart of this kind is of every body; ${given} has no place in it.`
    throw issue(`#/input/${given}`, 'conflicting-fields', detail, 'biotValues, from, until')
  }
  const { draw, ...usual } = classic[kind]
  const log = kind !== 'position-correction' && (own.logTime ?? usual.log)
  const span = spanOf(own, { ...usual, from: log ? LEAST_FOURIER : usual.from, log })
  const [low, high] = kind === 'position-correction' ? [0, 1] : [0, 1e17]
  if (span.from < low || span.until > high) {
    const pointer = span.from < low ? '#/from' : '#/until'
    throw issue(pointer, 'out-of-range', `The axis runs from ${low} to ${high}.`, `${low} to ${high}`)
  }
  const biots = own.biotValues ?? usualBiots
  return { count: biots.length, length: 1, draw: () => draw(c, biots, span) }
}

function spanOf(own: Paper, usual: { from: number; until: number | undefined; log: boolean }): Span {
  const { log } = usual
  const from = own.from ?? usual.from
  const until = own.until ?? usual.until
  const accepted = 'a number in the unit of the axis'
  if (until === undefined) throw issue('#/until', 'missing-field', 'until is missing: where the curves end.', accepted)
  if (!(from < until)) {
    const detail = `From ${from} until ${until} there is nothing to draw.`
    throw issue('#/until', 'out-of-range', detail, `a number above ${from}`)
  }
  if (log && !(from > 0))
    throw issue('#/from', 'out-of-range', 'A logarithmic axis begins above 0.', 'a number above 0')
  return { from, until, points: own.points, log }
}

function refuseMany(pointer: string, count: number): void {
  if (count > MOST_CURVES)
    throw issue(pointer, 'wrong-length', `${count} curves are more than are told apart.`, `1 to ${MOST_CURVES}`)
}

/** As a solve of the temperature reads it. */
function resolved(c: Case, fields: Fields) {
  return within('#/input', () => {
    const { detail: _, ...input } = readBody(inputOf(c), { ...fields, outputs: ['temperature'] })
    refusePlaces(c, input as Read)
    return c.resolve(input)
  })
}

const numberOf = (value: number | number[] | undefined) => (typeof value === 'number' ? value : undefined)
