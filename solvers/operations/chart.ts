import { z } from 'zod'
import type { Case } from '../case.ts'
import { cautions } from '../cautions.ts'
import { quantities } from '../statement/quantity.ts'
import { type Kind, kindsOf } from './chart/curves.ts'
import { drawingOf } from './chart/drawing.ts'
import { type Fields, MOST_CURVES, type Paper, type Planned, planOf } from './chart/plan.ts'
import { accuracyScope, boundSchema, echoOf, headed, headOf, scopeOf, tail, warningsOf } from './envelope.ts'
import { partsOf } from './example.ts'
import type { Call, CaseOperation } from './index.ts'
import { once } from './once.ts'
import { readBody } from './read-body.ts'
import { inputOf } from './solve-schemas.ts'

const plain = (title: string, description: string, accepted: string) => ({
  title,
  description: `${title}: ${description}.`,
  'x-accepted': accepted,
})
const whole = (min: number, max: number) => z.number().int().min(min).max(max)

const paper = {
  biotValues: quantities(
    {
      symbol: 'Bi',
      unit: '1',
      label: 'Biot numbers',
      min: 1e-9,
      max: 1e9,
      hint: 'a curve for each, of the classic kinds',
    },
    MOST_CURVES,
  ).optional(),
  from: z
    .number()
    .min(-1e17)
    .max(1e17)
    .optional()
    .meta(plain('From', 'where the curves begin: m, s, or a Fourier number', 'a number in the unit of the axis')),
  until: z
    .number()
    .min(-1e17)
    .max(1e17)
    .optional()
    .meta(plain('Until', 'where the curves end: m, s, or a Fourier number', 'a number in the unit of the axis')),
  points: whole(50, 400)
    .default(100)
    .meta(plain('Points', 'points of each curve, default 100', '50 to 400')),
  logTime: z
    .boolean()
    .optional()
    .meta(plain('Logarithmic time', 'whether the axis of time is logarithmic', 'true or false')),
  width: whole(320, 2400)
    .default(720)
    .meta(plain('Width', 'of the drawing, default 720', '320 to 2400')),
  height: whole(240, 2400)
    .default(480)
    .meta(plain('Height', 'of the drawing, default 480', '240 to 2400')),
  title: z
    .string()
    .max(120)
    .optional()
    .meta(plain('Title', 'default the title of the case', 'a text of at most 120 characters')),
}

/** What is drawn of a body stands in `input`, as a solve takes it; the classic kinds need no body. */
const inputSchema = once((c: Case) => {
  const kinds = kindsOf(c)
  const { outputs: _, detail: __, times, ...fields } = inputOf(c).shape as Record<string, z.ZodType>
  const input = z.strictObject({ ...fields, times: times!.optional() }).meta({
    title: 'Input',
    description: 'Input: as of a solve; for profiles with times and without places, for histories the other way round.',
    'x-accepted': 'the input of a solve, without outputs',
  })
  return z.strictObject({
    kind: z.enum(kinds).meta(plain('Kind', kinds.join(', '), kinds.join(', '))),
    input: input.optional(),
    ...paper,
  })
})

function prepare(c: Case, body: unknown): Call {
  const { input = {}, ...own } = readBody(inputSchema(c), body) as unknown as Paper & { input?: Fields }
  const planned = planOf(c, own, input)
  const drawn = planned.count * own.points
  const points = c.weight * drawn + 50
  return { values: drawn, size: 2 * drawn, points, run: () => answer(c, own, planned, points) }
}

function answer(c: Case, own: Paper, planned: Planned, points: number) {
  const { series, x, y, units, bound, error } = planned.draw()
  const title = own.title ?? c.title
  const description = `${summaryOf[own.kind]} ${error} Inputs and model decide the real error.`
  const svg = drawingOf({ title, description, x, y, width: own.width, height: own.height, series })
  const { input } = planned
  const echoed = input ? { ...(c.echo?.(input) ?? input) } : {}
  const rest = Object.entries({ ...own, title }).filter(([, value]) => value !== undefined)
  return {
    ...headed(c, 'chart', points, { ...Object.fromEntries(rest), ...(input ? { input: echoOf(echoed) } : {}) }),
    units,
    result: { series, lengthUsed: planned.length, svg },
    accuracy: { bound: { y: bound }, error, ...scopeOf },
    warnings: input ? warningsOf(c, input, echoed) : [],
    cautions: c.cautions.map((id) => ({ id, ...cautions[id] })),
    sources: [...c.sources],
  }
}

const summaryOf: Record<Kind, string> = {
  profiles: 'Temperature along the body, a curve for each time.',
  histories: 'Temperature over time, a curve for each place.',
  'dimensionless-centre': 'Remaining fraction at the centre over the Fourier number, a curve for each Biot number.',
  'position-correction':
    'What the remaining fraction of a place is of that of the centre, a curve for each Biot number.',
  'heat-fraction': 'Share of the heat that is exchanged over the Fourier number, a curve for each Biot number.',
}

const series = z.array(z.number())
const answerSchema = once((c: Case) =>
  z.strictObject({
    ...headOf(c, 'chart'),
    units: z.strictObject({ x: z.string(), y: z.string() }).meta({ description: 'UCUM codes of the axes.' }),
    result: z.strictObject({
      series: z.array(z.strictObject({ label: z.string(), x: series, y: series })),
      lengthUsed: z.number().nullable().meta({
        description:
          'Length L of the Biot and Fourier numbers, m; 1 where the chart is of every body, null where there is none.',
      }),
      svg: z.string().meta({ description: 'The chart as an SVG document.' }),
    }),
    accuracy: z.strictObject({
      bound: z.strictObject({ y: boundSchema }),
      error: z.string().meta({ description: 'What the chart is off by, in words, as it is printed on it.' }),
      ...accuracyScope,
    }),
    warnings: tail.warnings,
    cautions: tail.cautions,
    sources: tail.sources,
  }),
)

export const chart: CaseOperation = {
  id: 'chart',
  title: 'Chart',
  summary: 'Curves as a drawing (SVG) and as numbers, drawn from exact values and labelled with their own error.',
  applies: (c) => c.outputs.temperature !== undefined,
  price: (c) => `${c.weight} ${c.weight === 1 ? 'point' : 'points'} a point drawn and 50`,
  input: inputSchema,
  answer: answerSchema,
  example: once((c) => {
    const { fields, axis, place, last } = partsOf(c)
    const given = (c.example as Record<string, unknown>)[axis ?? ''] as unknown[] | undefined
    const places = axis ? { [axis]: given?.slice(0, MOST_CURVES) ?? [place] } : {}
    return { kind: 'histories', input: { ...fields, ...places }, until: last }
  }),
  prepare,
}
