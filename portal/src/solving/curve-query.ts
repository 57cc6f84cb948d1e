import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import type { Back, Field } from '../figure/field.ts'
import { gridOf } from '../figure/grid.ts'
import { niceCeiling } from '../figure/steps.ts'
import { type Answer, type Body, type CompactAnswer, isFull, trySolve } from './solve.ts'

interface Named {
  depths: readonly number[]
  times: readonly number[]
}

export interface FieldDrawing {
  kind: 'field'
  field: Field
  /** Where the cuts stand first. */
  start: { time: number; depth: number }
  asked: Named
}

export interface HistoryDrawing {
  kind: 'history'
  times: readonly number[]
  values: readonly number[]
  levels: readonly number[]
  start: { time: number }
  asked: Named
}

export type Drawing = FieldDrawing | HistoryDrawing

interface Drawn {
  id: string
  places: 'depths' | 'none'
  sketch: { body: string; boundary: string }
  depthsEndAt: string | null
  drive: string | null
  fields: readonly { name: string; schema: Readonly<Record<string, unknown>> }[]
}

/** Everything a drawing of a body's answer needs, from one solve on a grid; null where no time lies after the change. */
export const curveQuery = (c: Drawn, body: Body, answer: Answer | CompactAnswer) =>
  queryOptions({
    queryKey: ['try', c.id, body, 'curve'],
    queryFn: ({ signal }) => drawingOf(c, body, answer, signal),
    placeholderData: keepPreviousData,
    staleTime: Infinity,
  })

async function drawingOf(
  c: Drawn,
  body: Body,
  answer: Answer | CompactAnswer,
  signal: AbortSignal,
): Promise<Drawing | null> {
  const asked = { times: numbersOf(body['times']), depths: numbersOf(body['depths']) }
  const last = Math.max(0, ...asked.times)
  if (last === 0) return null
  const end = Math.min(asked.times.length > 1 ? last : niceCeiling(2 * last), largestOf(c, 'times'))
  const { detail: _, depths: __, outputs: ___, ...rest } = body
  const first = isFull(answer) ? answer : await trySolve(c.id, { ...body, detail: 'full' }, signal)
  if (!isFull(first)) throw new Error('a full answer was asked for')
  const time = asked.times.find((t) => t > 0.05 * end && t < 0.7 * end) ?? end / 4
  if (c.places === 'none') return historyOf(c, rest, first, end, time, asked, signal)
  const { extent, back } = shapeOf(c, first, asked.depths)
  const grid = gridOf({ extent, end, ...asked })
  const values = await gridValues(c.id, rest, grid, signal)
  const field = { ...grid, values, back, held: c.sketch.boundary === 'temperature', ...surroundings(c, first) }
  const depth = asked.depths.find((d) => d > 0 && d < extent) ?? extent * 0.32
  return { kind: 'field', field, start: { time, depth }, asked: rounded(asked) }
}

export async function gridValues(
  caseId: string,
  rest: Body,
  grid: { depths: number[]; times: number[] },
  signal: AbortSignal,
): Promise<number[][]> {
  const answer = await trySolve(caseId, { ...rest, ...grid, outputs: ['temperature'], detail: 'compact' }, signal)
  return answer.result.temperature as number[][]
}

async function historyOf(
  c: Drawn,
  rest: Body,
  first: Answer,
  end: number,
  time: number,
  asked: Named,
  signal: AbortSignal,
): Promise<HistoryDrawing> {
  const { times } = gridOf({ extent: 1, end, depths: [], times: asked.times })
  const answer = await trySolve(c.id, { ...rest, times, outputs: ['temperature'], detail: 'compact' }, signal)
  const { initial, drive } = surroundings(c, first)
  return {
    kind: 'history',
    times,
    values: answer.result.temperature as number[],
    levels: [initial, drive],
    start: { time },
    asked: rounded(asked),
  }
}

/** How far the drawing reaches into the body, and what lies behind. */
function shapeOf(c: Drawn, { input, numbers }: Answer, depths: readonly number[]): { extent: number; back: Back } {
  const end = c.depthsEndAt === null ? undefined : input[c.depthsEndAt]
  if (typeof end === 'number')
    return input['exposedFaces'] === 2 ? { extent: end / 2, back: 'mirror' } : { extent: end, back: 'insulated' }
  const reach = (numbers as Record<string, unknown>)['penetrationDepth']
  const shown = niceCeiling(Math.max(...depths, typeof reach === 'number' ? reach : 0) || 1)
  return { extent: Math.min(shown, largestOf(c, 'depths')), back: 'endless' }
}

/** The largest value that the contract accepts in a list. */
function largestOf({ fields }: Drawn, name: string): number {
  const items = fields.find((field) => field.name === name)?.schema['items'] as { maximum?: number } | undefined
  return items?.maximum ?? Infinity
}

function surroundings(c: Drawn, { input }: Answer): { initial: number; drive: number } {
  const initial = Number(input['initialTemperature'])
  return { initial, drive: c.drive === null ? initial : Number(input[c.drive]) }
}

const numbersOf = (value: unknown): number[] => (Array.isArray(value) ? value.filter((v) => typeof v === 'number') : [])
const rounded = ({ depths, times }: Named): Named => ({ depths: depths.map(twelve), times: times.map(twelve) })
const twelve = (value: number) => Number(value.toPrecision(12))
