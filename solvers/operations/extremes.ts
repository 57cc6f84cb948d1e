import { z } from 'zod'
import type { Case } from '../case.ts'
import { DomainError, type Issue } from '../errors.ts'
import { type Curve, overTime } from './curve/curve.ts'
import { timeGrid } from './curve/grid.ts'
import { reserveOf, type Scan, scan, type Turn, turnAt, turnsIn } from './curve/scan.ts'
import { compactOf, detailField } from './envelope.ts'
import { partsOf } from './example.ts'
import { foundAnswer, foundSchema } from './found.ts'
import type { Call, CaseOperation } from './index.ts'
import { once } from './once.ts'
import { basePrice, placeInputs, type Question, quantitiesOf, quantityField, questionOf } from './question.ts'
import { readBody } from './read-body.ts'
import { refuseLongCycles, seconds, work } from './span.ts'
import { echoedOf } from './time-to-reach.ts'

const inputSchema = once((c: Case) =>
  z.strictObject({
    ...c.fields,
    ...placeInputs(c),
    quantity: quantityField(c),
    from: seconds('From', 'the first time looked at; default 0', c.clock ? -1e17 : 0).optional(),
    until: seconds('Until', 'the last time looked at', c.clock ? -1e17 : 0),
    detail: detailField,
  }),
)

function prepare(c: Case, body: unknown, defaultDetail: 'full' | 'compact'): Call {
  const read = readBody(inputSchema(c), body)
  const [from, until] = [(read['from'] as number | undefined) ?? 0, read['until'] as number]
  const told = (issue: Issue): Issue =>
    issue.pointer.startsWith('#/times')
      ? { ...issue, pointer: issue.pointer.endsWith('/0') ? '#/from' : '#/until' }
      : issue
  const q = questionOf(c, read, [from, until], told)
  if (!(from < until)) {
    const detail = `The span from ${from} s until ${until} s holds no time.`
    throw new DomainError([{ pointer: '#/until', code: 'out-of-range', detail, accepted: `a time after ${from} s` }])
  }
  refuseLongCycles(q.course, from, until)
  const points = 24 * basePrice(c, q.places)
  const compact = (read['detail'] ?? defaultDetail) === 'compact'
  return {
    values: 2,
    size: work(c, q.course, until - from),
    points,
    run: () => answer(c, q, from, until, points, compact),
  }
}

/** Which side is to be taken depends on what hangs on it. */
const CONSERVATIVE =
  'The larger maximum against a limit from above, the smaller minimum against one from below; with a bound, the bound added.'

function answer(c: Case, q: Question, from: number, until: number, points: number, compact: boolean) {
  const curve = overTime(c, q.asked, q.output)
  const looked = scan(curve, timeGrid(q.course, from, until))
  const [maximum, minimum] = [extremeOf(curve, looked, 1), extremeOf(curve, looked, -1)]
  const told = ({ value, at }: Turn) => ({ value, time: at, atEnd: at === from || at === until })
  const result = { maximum: told(maximum), minimum: told(minimum) }
  const larger = (a: number, b: number) => ({ absolute: Math.max(a, b), relative: 0 })
  const bound = { value: larger(maximum.bound, minimum.bound), time: larger(maximum.atBound, minimum.atBound) }
  const resolved = c.resolve({ ...q.asked, times: [maximum.at, minimum.at], outputs: [q.output] })
  const echoed = echoedOf(c, q, { quantity: q.output, from, until })
  const unit = q.places.length === 2 && q.unit === 'Cel' ? 'K' : q.unit
  return foundAnswer(c, 'extremes', {
    points,
    compact,
    echoed,
    resolved,
    units: { value: unit, time: 's' },
    result,
    bound,
    conservativeSide: CONSERVATIVE,
  })
}

/** Turns of one curve that are looked at closely. */
const MOST_TURNS = 40

/** The largest value (sign 1) or the least (-1): at an end, at a kink or where the derivative is zero. */
export function extremeOf(curve: Curve, looked: Scan, sign: 1 | -1): Turn {
  const { points, values, bounds } = looked
  const last = points.length - 1
  const end = (i: number): Turn => ({ at: points[i]!, value: values[i]!, bound: bounds[i]!, atBound: 0 })
  const best = (a: Turn, b: Turn) => (sign * (b.value - a.value) > 0 ? b : a)
  const ends = best(end(0), end(last))
  const top = values.reduce((m, v) => Math.max(m, sign * v), -Infinity)
  const turns = turnsIn(looked, sign)
    .filter((i) => sign * values[i]! + reserveOf(looked, i) >= top)
    .slice(0, MOST_TURNS)
    .map((i) => turnAt(curve, looked, i, sign))
  if (turns.length === 0) return ends
  const highest = turns.reduce(best)
  // Of turns that cannot be told apart the first; of an end and a turn, the end.
  const first = turns.find((turn) => sign * (highest.value - turn.value) <= turn.bound + highest.bound) ?? highest
  return sign * (first.value - ends.value) > first.bound + ends.bound ? first : ends
}

const one = z.strictObject({
  value: z.number(),
  time: z.number().meta({ description: 'Unit s.' }),
  atEnd: z.boolean().meta({ description: 'Whether it stands at an end of the span, where it may not be a turn.' }),
})

const answerSchema = once((c: Case) => foundSchema(c, 'extremes', { maximum: one, minimum: one }, ['value', 'time']))

export const extremes: CaseOperation = {
  id: 'extremes',
  title: 'Extremes',
  summary: 'The largest and the least value of a place, a mean or the difference of two places in a span of time.',
  applies: (c) => quantitiesOf(c).length > 0,
  price: (c) => `24 times that of one number, ${24 * basePrice(c, [])} points`,
  input: inputSchema,
  answer: answerSchema,
  compactAnswer: (c) => compactOf(answerSchema(c)),
  example: once((c) => {
    const { fields, axis, place, last } = partsOf(c)
    const name = axis && { depths: 'depth', radii: 'radius', points: 'point' }[axis]
    const placed = axis ? (name! in c.fields ? { [axis]: [place] } : { [name!]: place }) : {}
    return { ...fields, ...placed, until: last }
  }),
  prepare,
}
