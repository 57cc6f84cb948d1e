import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import { niceCeiling } from '../figure/steps.ts'
import { type Asked, type Described, askedIn, hasClock, largestOf, numberIn } from './described.ts'
import { type FieldDrawing, fieldDrawing, partOf } from './field-drawing.ts'
import { type HistoryDrawing, historyDrawing } from './history-drawing.ts'
import type { Body } from './body.ts'
import { type Answer, type CompactAnswer, isFull, trySolve } from './solve.ts'

/** Why there is nothing to draw. */
interface NoDrawing {
  kind: 'none'
  why: string
}

export type Drawing = FieldDrawing | HistoryDrawing | NoDrawing

/** Everything a drawing of a body's answer needs, from one solve on a grid. */
export const curveQuery = (c: Described, body: Body, answer: Answer | CompactAnswer) =>
  queryOptions({
    queryKey: ['try', c.id, body, 'curve'],
    queryFn: ({ signal }) => drawingOf(c, body, answer, signal),
    placeholderData: keepPreviousData,
    staleTime: Infinity,
  })

async function drawingOf(
  c: Described,
  given: Body,
  answer: Answer | CompactAnswer,
  signal: AbortSignal,
): Promise<Drawing> {
  if (given['times'] === undefined) return { kind: 'none', why: 'Only an answer over times is drawn, in °C.' }
  const first = isFull(answer) ? answer : await trySolve(c.id, { ...given, detail: 'full' }, signal)
  if (!isFull(first)) throw new Error('a full answer was asked for')
  const body = { ...given, ...axesIn(given, first) }
  const asked = askedIn(body)
  if (c.places !== 'none' && !body['points'] && asked.places.length === 0 && (hasClock(c) || !mayLackPlaces(c)))
    return { kind: 'none', why: 'No place was asked for. Give one to see its history.' }
  if (hasClock(c)) return historyDrawing(c, body, first, clockSpan(first, asked), signal)
  const last = Math.max(0, ...asked.times)
  if (last === 0) return { kind: 'none', why: 'All times are 0. Ask for a time after the change to see a curve.' }
  const end = Math.min(asked.times.length > 1 ? last : niceCeiling(2 * last), largestOf(c, 'times'))
  const time = asked.times.find((t) => t > 0.05 * end && t < 0.7 * end) ?? end / 4
  const part = partOf(c, body, first)
  if (!part) return historyDrawing(c, body, first, { from: 0, to: end, time, asked }, signal)
  const { detail: _, depths: __, radii: ___, outputs: ____, ...rest } = body
  const initial = numberIn(first, 'initialTemperature')
  return fieldDrawing(c, rest, part, { end, time, asked, initial, together: broughtBy(body, first) }, signal)
}

/** Times and places as they were used, whatever unit they were given in. */
const axesIn = (given: Body, { axes }: Answer): Body =>
  Object.fromEntries(Object.entries(axes).filter(([name]) => name in given))

/** Depths are drawn from the face on, whether some were asked for or not. */
const mayLackPlaces = (c: Described): boolean => c.places === 'depths' || c.places === 'depths-or-radii'

/** Outputs by time and place that come with the temperature, whether asked for or not, and those of one list beside. */
function broughtBy(body: Body, { result }: Answer): number {
  const asked = (body['outputs'] as readonly string[] | undefined) ?? ['temperature']
  const more = Object.entries(result).filter(([name, values]) => !asked.includes(name) && Array.isArray(values))
  return 1 + more.length
}

/** The asked times and at least one period from the first of them on. */
function clockSpan(answer: Answer, asked: Asked) {
  const from = Math.min(...asked.times)
  const to = Math.max(from + (numberIn(answer, 'period') ?? 1), ...asked.times)
  return { from, to, time: asked.times.find((t) => t > from && t < to) ?? (from + to) / 2, asked }
}
