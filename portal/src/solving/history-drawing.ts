import { even } from '../figure/grid.ts'
import { type Series } from '../figure/history-figure.tsx'
import { inMeasure, lengthMeasure } from '../figure/measures.ts'
import { type Asked, type Described, numberIn, numbersOf, twelve } from './described.ts'
import { gridValues } from './grid-values.ts'
import type { Body } from './body.ts'
import type { Answer } from './solve.ts'

export interface HistoryDrawing {
  kind: 'history'
  times: readonly number[]
  series: readonly Series[]
  levels: readonly number[]
  start: { time: number }
  asked: Asked
}

/** Histories that are drawn together. */
const MOST = 4
const STEPS = 240

interface Span {
  from: number
  to: number
  /** Where the reading stands first. */
  time: number
  asked: Asked
}

/** The temperature over time at the first places that were asked for, or of the whole body. */
export async function historyDrawing(
  c: Described,
  body: Body,
  answer: Answer,
  { from, to, time, asked }: Span,
  signal: AbortSignal,
): Promise<HistoryDrawing> {
  const { outputs: _, detail: __, ...rest } = body
  const places = placesIn(body)
  const steps = c.weight > 10 ? STEPS / 2 : STEPS
  const named = asked.times.filter((t) => t >= from && t <= to).slice(0, 15)
  const times = [...new Set([...even(to, steps, from), ...named.map(twelve)])].sort((a, b) => a - b)
  const values = await gridValues(c.id, { ...rest, ...places.body, times }, signal)
  const series =
    places.names.length === 0
      ? [{ name: 'temperature', values: values as unknown as number[] }]
      : places.names.map((name, j) => ({ name, values: values.map((row) => row[j]!) }))
  const initial = numberIn(answer, 'initialTemperature')
  const drive = numberIn(answer, c.drive)
  return {
    kind: 'history',
    times,
    series,
    levels: [initial, drive].filter((level) => level !== undefined),
    start: { time },
    asked: { places: [], times: asked.times.map(twelve) },
  }
}

/** The first places with what they are called; none where a body has one temperature. */
function placesIn(body: Body): { body: Body; names: string[] } {
  const points = Array.isArray(body['points']) ? (body['points'] as Record<string, number>[]).slice(0, MOST) : []
  if (points.length > 0) {
    const measure = lengthMeasure(Math.max(...points.flatMap(Object.values).map(Math.abs)))
    const name = (point: Record<string, number>) =>
      Object.entries(point)
        .map(([axis, value]) => `${axis} ${inMeasure(value, measure)}`)
        .join(', ')
    return { body: { points }, names: points.map((point) => `${name(point)} ${measure.unit}`) }
  }
  for (const field of ['depths', 'radii']) {
    const list = numbersOf(body[field]).slice(0, MOST)
    if (list.length === 0) continue
    const measure = lengthMeasure(Math.max(...list.map(Math.abs)))
    return { body: { [field]: list }, names: list.map((place) => `${inMeasure(place, measure)} ${measure.unit}`) }
  }
  return { body: {}, names: [] }
}
