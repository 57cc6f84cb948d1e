import { z } from 'zod'
import type { Case } from '../case.ts'
import { DomainError, type Issue } from '../errors.ts'
import { quantity } from '../statement/quantity.ts'
import { crossingsOf } from './curve/crossing.ts'
import { type Curve, overTime } from './curve/curve.ts'
import { timeGrid } from './curve/grid.ts'
import { scan } from './curve/scan.ts'
import { endOf, LONGEST } from './end-state.ts'
import { compactOf, detailField } from './envelope.ts'
import { exampleOf } from './example.ts'
import { foundAnswer, foundSchema } from './found.ts'
import type { Call, CaseOperation } from './index.ts'
import {
  basePrice,
  isTemperature,
  placeInputs,
  type Question,
  quantitiesOf,
  quantityField,
  questionOf,
} from './question.ts'
import { readBody } from './read-body.ts'
import { refuseLongCycles, seconds, untilNeeded, work } from './span.ts'
import { once } from './once.ts'

type Sense = 'rises-to' | 'falls-to'

export const targetField = quantity({
  symbol: 'T*',
  unit: 'Cel',
  label: 'Target',
  min: -2e4,
  max: 2e4,
  hint: 'a fraction from 0 to 1, a depth in m, or the difference of two places in K is a plain number',
})

const senseField = z.enum(['rises-to', 'falls-to']).optional().meta({
  title: 'Sense',
  description: 'Sense: rises-to or falls-to. Default: from the value at time 0 towards the target.',
  'x-accepted': 'rises-to or falls-to',
})

const inputSchema = once((c: Case) =>
  z.strictObject({
    ...c.fields,
    ...placeInputs(c),
    quantity: quantityField(c),
    target: targetField,
    sense: senseField,
    until: c.clock
      ? seconds('Until', 'the last time looked at')
      : seconds('Until', 'the last time looked at; needed for a cycle or a history').optional(),
    detail: detailField,
  }),
)

function prepare(c: Case, body: unknown, defaultDetail: 'full' | 'compact'): Call {
  const read = readBody(inputSchema(c), body)
  const until = read['until'] as number | undefined
  const told = (issue: Issue): Issue =>
    !issue.pointer.startsWith('#/times') ? issue : until === undefined ? untilNeeded : { ...issue, pointer: '#/until' }
  const q = questionOf(c, read, [until ?? LONGEST], told)
  if (until === undefined && q.course.period !== undefined) throw new DomainError([untilNeeded])
  refuseLongCycles(q.course, 0, until)
  const target = read['target'] as number
  refuseForm(body, q)
  const curve = overTime(c, q.asked, q.output)
  const end = endOf(c, q)
  refuseAtEnd(curve, target, end, until ?? LONGEST)
  const points = 12 * basePrice(c, q.places)
  const compact = (read['detail'] ?? defaultDetail) === 'compact'
  const asked = { target, sense: read['sense'] as Sense | undefined, until, end }
  return { values: 1, size: work(c, q.course, until), points, run: () => answer(c, q, curve, asked, points, compact) }
}

/** A target with a unit is a temperature; a difference would take its zero along, and a fraction has none. */
function refuseForm(body: unknown, q: Question): void {
  const target = (body as { target: unknown }).target
  if (typeof target === 'number' || (isTemperature(q.output) && q.places.length < 2)) return
  const what = q.places.length === 2 ? 'A difference' : q.output
  throw new DomainError([
    {
      pointer: '#/target',
      code: 'unit-not-accepted',
      detail: `${what} is a plain number here, without a unit.`,
      accepted: 'a number',
    },
  ])
}

/** The value comes ever nearer to its end: whether it reaches a target that near cannot be told. */
function refuseAtEnd(curve: Curve, target: number, end: number | null, until: number): void {
  if (end === null) return
  const bound = curve.sample([until]).bounds[0]!
  if (Math.abs(target - end) > bound) return
  throw new DomainError([
    {
      pointer: '#/target',
      code: 'target-at-asymptote',
      detail: `The target is ${target}, which is what the value tends to: it is reached after infinite time.`,
      accepted: `a target that differs from ${end} by more than ${bound}`,
    },
  ])
}

interface Target {
  target: number
  sense: Sense | undefined
  until: number | undefined
  end: number | null
}

/** Which side is to be taken depends on what hangs on it. */
const CONSERVATIVE =
  'The later time where the target must have been reached by then, the earlier where it must not have been.'

function answer(c: Case, q: Question, curve: Curve, asked: Target, points: number, compact: boolean) {
  const { target, until, end } = asked
  const looked = scan(curve, timeGrid(q.course, 0, until ?? LONGEST))
  // The value at the start is what the input says, not computed.
  if (!q.course.settled) looked.bounds[0] = 0
  const start = looked.values[0]!
  const sense: Sense = asked.sense ?? (target > start ? 'rises-to' : 'falls-to')
  const holds = sense === 'rises-to' ? start >= target : start <= target
  const crossings = crossingsOf(curve, looked, target)
  const times = crossings.map(({ at }) => at)
  const rate = crossings[0]?.slope
  const result = {
    outcome: holds ? 'already' : crossings.length > 0 ? 'reached' : 'never',
    crossings: times,
    directions: crossings.map(({ direction }) => direction),
    asymptote: end,
    ...(rate === undefined ? {} : { rateAtTarget: rate }),
    ...(rate && isTemperature(q.output) ? { timePerTenthKelvin: 0.1 / Math.abs(rate) } : {}),
  }
  const absolute = crossings.reduce((most, { bound }) => Math.max(most, bound), 0)
  const bound = { crossings: { absolute, relative: 0 } }
  // Without a time that is answered, numbers and checks are told at the last that was looked at.
  const resolved = times.length > 0 ? c.resolve({ ...q.asked, times, outputs: [q.output] }) : q.resolved
  const own = { quantity: q.output, target, sense, ...(until === undefined ? {} : { until }) }
  const echoed = echoedOf(c, q, own)
  const found = { points, compact, echoed, resolved, units: unitsOf(q), result, bound, conservativeSide: CONSERVATIVE }
  return foundAnswer(c, 'time-to-reach', found)
}

/** The input as the case echoes it, with the fields of the operation in place of times, places and outputs. */
export function echoedOf(c: Case, q: Question, own: Record<string, unknown>): Record<string, unknown> {
  const echoed = c.echo?.(q.resolved) ?? { ...q.resolved }
  const rest = Object.entries(echoed).filter(([name]) => !replaced.includes(name))
  return { ...Object.fromEntries(rest), ...(q.axis && q.places.length > 0 ? { [q.axis]: q.places } : {}), ...own }
}
const replaced = ['times', 'outputs', 'depths', 'radii', 'points']

const rateUnits: Record<string, string> = { Cel: 'K/s', '1': '/s', m: 'm/s' }

function unitsOf({ unit, output, places }: Question): Record<string, string> {
  const value = places.length === 2 && unit === 'Cel' ? 'K' : unit
  const units = { crossings: 's', target: value, asymptote: value, rateAtTarget: rateUnits[unit] ?? `${unit}/s` }
  return isTemperature(output) ? { ...units, timePerTenthKelvin: 's' } : units
}

const answerSchema = once((c: Case) =>
  foundSchema(
    c,
    'time-to-reach',
    {
      outcome: z.enum(['reached', 'already', 'never']).meta({
        description:
          'reached; already: the value is on the far side of the target at time 0; never: it is not reached, or not before until.',
      }),
      crossings: z.array(z.number()).meta({ description: 'Every time at which the value passes the target, s.' }),
      directions: z.array(z.enum(['rising', 'falling'])),
      asymptote: z
        .number()
        .nullable()
        .meta({ description: 'What the value tends to; null where it grows without end or goes on changing.' }),
      rateAtTarget: z.number().optional().meta({ description: 'Rate of change at the first crossing.' }),
      timePerTenthKelvin: z
        .number()
        .optional()
        .meta({ description: '0.1 K over that rate: what a tenth of a kelvin in the target moves the time, s.' }),
    },
    ['crossings'],
  ),
)

export const timeToReach: CaseOperation = {
  id: 'time-to-reach',
  title: 'Time to reach',
  summary: 'When a place, a mean or the difference of two places reaches a value, with the rate of change there.',
  applies: (c) => quantitiesOf(c).length > 0,
  price: (c) => `12 times that of one number, ${12 * basePrice(c, [])} points`,
  input: inputSchema,
  answer: answerSchema,
  compactAnswer: (c) => compactOf(answerSchema(c)),
  example: once(exampleOf),
  prepare,
}
