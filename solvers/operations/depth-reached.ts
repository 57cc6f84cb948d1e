import { z } from 'zod'
import { type Case, placeFields } from '../case.ts'
import type { Issue } from '../errors.ts'
import { quantity } from '../statement/quantity.ts'
import { courseOf, extentOf, jointsOf } from './course.ts'
import { type Crossing, crossingsOf } from './curve/crossing.ts'
import { overPlaces } from './curve/curve.ts'
import { placeGrid } from './curve/grid.ts'
import { type Scan, scan } from './curve/scan.ts'
import { compactOf, detailField } from './envelope.ts'
import { between, partsOf } from './example.ts'
import { foundAnswer, foundSchema } from './found.ts'
import type { Call, CaseOperation } from './index.ts'
import { once } from './once.ts'
import { basePrice, type Question, renamed, resolveTold } from './question.ts'
import { readBody } from './read-body.ts'
import { seconds, work } from './span.ts'
import { answeredShape } from './solve-schemas.ts'
import { echoedOf } from './time-to-reach.ts'

type Axis = 'depths' | 'radii'

/** The axis that places are found along: depths where there are any. */
const axisOf = (c: Case): Axis | undefined =>
  (placeFields[c.places] as readonly string[]).find((name): name is Axis => name === 'depths' || name === 'radii')

const words = {
  depths: { all: 'depths', one: 'depth', perTenth: 'depthPerTenthKelvin' },
  radii: { all: 'radii', one: 'radius', perTenth: 'radiusPerTenthKelvin' },
} as const

const clockTime = quantity({ symbol: 't', unit: 's', label: 'Time', min: -1e17, max: 1e17, hint: 'of the clock' })

const inputSchema = once((c: Case) =>
  z.strictObject({
    ...c.fields,
    time: c.clock ? clockTime : seconds('Time', 'after the change'),
    target: quantity({ symbol: 'T*', unit: 'Cel', label: 'Target', min: -273.15, max: 1e4 }),
    detail: detailField,
  }),
)

interface Asked {
  axis: Axis
  time: number
  target: number
  extent: [number, number]
}

function prepare(c: Case, body: unknown, defaultDetail: 'full' | 'compact'): Call {
  const { time, target, detail = defaultDetail, ...asked } = readBody(inputSchema(c), body)
  const axis = axisOf(c)!
  const told = (issue: Issue) => renamed(issue, { '#/times/0': '#/time', '#/outputs/0': '#/target' })
  const extent = extentOf(c, asked, axis)
  const input = { ...asked, times: [time], outputs: ['temperature'] }
  const resolved = resolveTold(c, { ...input, [axis]: extent }, told)
  const course = courseOf(c, asked, resolved)
  const q: Question = { asked, output: 'temperature', axis, places: [], resolved, course, unit: 'Cel' }
  const found: Asked = { axis, time: time as number, target: target as number, extent }
  const points = 12 * basePrice(c, [])
  return { values: 1, size: work(c, course), points, run: () => answer(c, q, found, points, detail === 'compact') }
}

/** Which side is to be taken depends on what hangs on it. */
const CONSERVATIVE =
  'The greater depth where a place must lie beyond the change, the lesser where the change must come as far.'

function answer(c: Case, q: Question, asked: Asked, points: number, compact: boolean) {
  const { axis, time, target, extent } = asked
  const { all, one, perTenth } = words[axis]
  const curve = overPlaces(c, q.asked, axis, time)
  const looked = scan(
    curve,
    placeGrid([
      ...extent,
      ...jointsOf(q.asked).filter((d) => d > extent[0] && d < extent[1]),
      ...(extent[0] < 0 ? [0] : []),
    ]),
  )
  const crossings = atFace(looked, target) ?? crossingsOf(curve, looked, target)
  const deepest = crossings.at(-1)
  const gradient = deepest?.slope
  const places = crossings.map(({ at }) => at)
  const result = {
    outcome: deepest ? 'reached' : outcomeOf(c, q, asked, looked),
    [all]: places,
    ...(deepest ? { [one]: deepest.at } : {}),
    ...(gradient === undefined ? {} : { gradient }),
    ...(gradient ? { [perTenth]: 0.1 / Math.abs(gradient) } : {}),
  }
  const absolute = crossings.reduce((most, { bound }) => Math.max(most, bound), 0)
  const bound = { [all]: { absolute, relative: 0 } }
  // Without a place that is answered, numbers and checks are told of the whole body.
  const found = { ...q.asked, [axis]: places, times: [time], outputs: ['temperature'] }
  const resolved = deepest ? c.resolve(found) : q.resolved
  const echoed = echoedOf(c, q, { time, target })
  return foundAnswer(c, 'depth-reached', {
    points,
    compact,
    echoed,
    resolved,
    units: { [all]: 'm', target: 'Cel', gradient: 'K/m', [perTenth]: 'm' },
    result,
    bound,
    conservativeSide: CONSERVATIVE,
  })
}

/** The face itself, where it is held at the target and the body is not. */
function atFace({ points, values }: Scan, target: number): Crossing[] | undefined {
  if (values[0] !== target) return undefined
  const next = values.find((value) => value !== target)
  const passed = values.some((value) => next !== undefined && (value - target) * (next - target) < 0)
  if (next === undefined || passed) return undefined
  return [{ at: points[0]!, bound: 0, direction: next > target ? 'rising' : 'falling' }]
}

/** Everywhere: the whole body has left its start beyond the target; nowhere: none of it has. */
function outcomeOf(c: Case, q: Question, asked: Asked, { values }: Scan): 'everywhere' | 'nowhere' {
  const { axis, target, extent } = asked
  // A settled cycle has no start; what it leaves alone lies deepest.
  const start = c.clock
    ? values.at(-1)!
    : c.solve(c.resolve({ ...q.asked, [axis]: [extent[0]], times: [0], outputs: ['temperature'] })).outputs.temperature!
        .values
  const before = typeof start === 'number' ? start : (start as number[][])[0]![0]!
  const now = values[0]!
  if (before === target) return 'everywhere'
  return (now - target) * (before - target) > 0 ? 'nowhere' : 'everywhere'
}

const answerSchema = once((c: Case) => {
  const { all, one, perTenth } = words[axisOf(c)!]
  return foundSchema(
    c,
    'depth-reached',
    {
      outcome: z.enum(['reached', 'everywhere', 'nowhere']).meta({
        description:
          'reached; everywhere: the whole body is beyond the target; nowhere: none of it is, seen from its start.',
      }),
      [all]: z.array(z.number()).meta({ description: 'Every place at which the temperature is the target, m.' }),
      [one]: z.number().optional().meta({ description: 'The deepest of them, m.' }),
      gradient: z.number().optional().meta({ description: 'Gradient of the temperature there, inward, K/m.' }),
      [perTenth]: z
        .number()
        .optional()
        .meta({ description: '0.1 K over that gradient: what a tenth of a kelvin in the target moves it, m.' }),
    },
    [all],
  )
})

/** The case's own example, asked for the temperature half way between its first and last place at the last time. */
const exampleFor = once((c: Case): Record<string, unknown> => {
  const { fields, last } = partsOf(c)
  const axis = axisOf(c)!
  const extent = extentOf(c, fields, axis)
  const given = (c.example as Record<string, unknown>)[axis] as number[] | undefined
  const ends = [given?.[0] ?? extent[0], given?.at(-1) ?? extent[1]]
  const resolved = c.resolve({ ...fields, [axis]: ends, times: [last], outputs: ['temperature'] })
  const [near, far] = (c.solve(resolved).outputs.temperature!.values as number[][])[0]!
  return { ...fields, time: last, target: between(near!, far!) }
})

export const depthReached: CaseOperation = {
  id: 'depth-reached',
  title: 'Depth reached',
  summary: 'How deep a temperature has come at a time, with the gradient there.',
  applies: (c) =>
    axisOf(c) !== undefined && c.outputs.temperature !== undefined && answeredShape(c, 'temperature') === 'grid',
  price: (c) => `12 times that of one number, ${12 * basePrice(c, [])} points`,
  input: inputSchema,
  answer: answerSchema,
  compactAnswer: (c) => compactOf(answerSchema(c)),
  example: exampleFor,
  prepare,
}
