import { z } from 'zod'
import { type Case, outputOf, placeFields } from '../case.ts'
import { DomainError, type Issue } from '../errors.ts'
import { MAX_POSITIONS, MAX_TIMES } from '../statement/fields.ts'
import type { OutputName } from '../outputs.ts'
import { quantities, quantity } from '../statement/quantity.ts'
import { countValues } from './count-values.ts'
import { accuracyScope, boundSchema, detailField, headed, headOf, scopeOf, tail, tailOf } from './envelope.ts'
import type { Call } from './index.ts'
import { readBody } from './read-body.ts'
import { answeredShape } from './solve-schemas.ts'

/*
 * A body asked by its dimensionless numbers alone: biot, fourier and positionRatio in, shares of the change out. It is
 * solved as the body whose length, conductivity and heat capacity are 1, so that nothing is computed twice.
 */

/** What needs no temperatures. */
const fractions = ['remainingFraction', 'completedFraction', 'heatFraction'] as const satisfies OutputName[]
type Fraction = (typeof fractions)[number]

const one = { unit: '1' } as const
const biot = quantity({ ...one, symbol: 'Bi', label: 'Biot number', min: 1e-9, max: 1e9, zero: true, hint: 'hL/k' })
const fourier = quantities(
  { ...one, symbol: 'Fo', label: 'Fourier numbers', min: 0, max: 1e17, hint: 'at/L²' },
  MAX_TIMES,
)
const positionRatio = quantities(
  {
    ...one,
    symbol: 'X',
    label: 'Position ratios',
    min: 0,
    max: 1,
    hint: '0 at the centre or insulated face, 1 at the exposed surface',
  },
  MAX_POSITIONS,
)

const isFilmed = (c: Case) => 'filmCoefficient' in c.fields

/** Whether a body is asked by dimensionless numbers, where the case can be. */
export function asksDimensionless(c: Case, body: unknown): body is Record<string, unknown> {
  if (!c.dimensionless || typeof body !== 'object' || body === null) return false
  return ['biot', 'fourier', 'positionRatio'].some((name) => Object.hasOwn(body, name))
}

function inputSchema(c: Case) {
  return z.strictObject({
    ...(isFilmed(c) ? { biot } : {}),
    fourier,
    positionRatio: positionRatio.optional(),
    outputs: z
      .array(z.enum(fractions))
      .min(1)
      .max(fractions.length)
      .default(['remainingFraction'])
      .meta({
        title: 'Outputs',
        description: `Outputs: some of ${fractions.join(', ')}. Default remainingFraction.`,
        'x-accepted': fractions.join(', '),
      }),
    detail: detailField,
  })
}

const inputs = new Map<string, z.ZodObject>()
export function dimensionlessInput(c: Case): z.ZodObject {
  const known = inputs.get(c.id) ?? inputSchema(c)
  inputs.set(c.id, known)
  return known
}

const series = z.array(z.number())
const shapes = { remainingFraction: z.array(series), completedFraction: z.array(series), heatFraction: series }

export function dimensionlessAnswer(c: Case) {
  const perOutput = (schemaOf: (name: Fraction) => z.ZodType) =>
    z.strictObject(Object.fromEntries(fractions.map((name) => [name, schemaOf(name).optional()])))
  return z.strictObject({
    ...headOf(c, 'solve'),
    axes: z.strictObject({ fourier: series, positionRatio: series.optional() }),
    units: z.record(z.string(), z.string()).meta({ description: 'UCUM code of each output and axis: all are 1.' }),
    result: perOutput((name) => shapes[name].meta({ title: outputOf(c, name).label, 'x-ucum': '1' })),
    accuracy: z.strictObject({
      method: z.array(z.string()),
      terms: z.number(),
      scale: z.number().meta({ description: 'The whole change, 1.' }),
      bound: perOutput(() => boundSchema),
      ...accuracyScope,
    }),
    ...tail,
  })
}

interface Read {
  biot?: number
  fourier: number[]
  positionRatio?: number[]
  outputs: OutputName[]
  detail?: 'full' | 'compact'
}

export function prepareDimensionless(c: Case, body: Record<string, unknown>, defaultDetail: 'full' | 'compact'): Call {
  const read = readBody(dimensionlessInput(c), body, (issue) => withReason(body, issue)) as unknown as Read
  const input = { ...read, outputs: [...new Set(read.outputs)] }
  refuseNoPlace(c, input)
  const resolved = c.resolve(unitInput(c, input))
  const { detail = defaultDetail, ...asked } = input
  const values = countValues(c, resolved)
  const points = c.weight * values + c.setUp
  const size = Math.max(values, input.fourier.length, input.positionRatio?.length ?? 0)
  return { values, size, points, run: () => answer(c, asked, resolved, points, detail === 'compact') }
}

/** Other outputs are refused with what they would need. */
function withReason(body: Record<string, unknown>, issue: Issue): Issue {
  const match = /^#\/outputs\/(\d+)$/.exec(issue.pointer)
  const name = match && (body['outputs'] as unknown[])[Number(match[1])]
  if (typeof name !== 'string') return issue
  const detail = `"${name.slice(0, 60)}": dimensionless numbers answer shares of the change only; state the body, its sizes and temperatures for more.`
  return { ...issue, code: 'output-not-defined', detail, accepted: fractions.join(', ') }
}

function refuseNoPlace(c: Case, { outputs, positionRatio: places }: Read): void {
  const placed = outputs.find((name) => answeredShape(c, name) === 'grid')
  if (!placed || places) return
  const detail = `${placed} needs positionRatio.`
  const accepted = 'a list of shares of the length, from 0 at the centre or insulated face to 1 at the exposed surface'
  throw new DomainError([{ pointer: '#/positionRatio', code: 'missing-field', detail, accepted }])
}

/** The body of length 1 that changes by 1. A radius is the ratio itself; a depth is what is left of it. */
function unitInput(
  c: Case,
  { biot: film, fourier: times, positionRatio: ratios, outputs }: Read,
): Record<string, unknown> {
  const byRadius = (placeFields[c.places] as readonly string[]).includes('radii')
  return {
    conductivity: 1,
    volumetricHeatCapacity: 1,
    ...c.dimensionless,
    initialTemperature: 0,
    [c.drive as string]: 1,
    ...(film === undefined ? {} : { filmCoefficient: film }),
    ...(byRadius ? { radii: ratios ?? [] } : { depths: (ratios ?? []).map((ratio) => 1 - ratio) }),
    times,
    outputs,
  }
}

function answer(c: Case, asked: Read, input: ReturnType<Case['resolve']>, points: number, compact: boolean) {
  const solution = c.solve(input)
  const pick = <T>(of: (name: OutputName) => T) => Object.fromEntries(asked.outputs.map((name) => [name, of(name)]))
  const result = pick((name) => solution.outputs[name]?.values)
  const bound = pick((name) => solution.outputs[name]?.bound)
  if (compact) return { result, accuracy: { bound }, warnings: [] }
  const { fourier: axis, positionRatio: ratios } = asked
  const axes = { fourier: axis, ...(ratios ? { positionRatio: ratios } : {}) }
  const { methods: method, terms, scale } = solution
  const { numbers, ...rest } = tailOf(c, input, [])
  return {
    ...headed(c, 'solve', points, { ...asked }),
    axes,
    units: Object.fromEntries([...asked.outputs, ...Object.keys(axes)].map((name) => [name, '1'])),
    result,
    accuracy: { method, terms, scale, bound, ...scopeOf },
    numbers: { ...(numbers.biot === undefined ? {} : { biot: numbers.biot }), fourier: axis },
    ...rest,
  }
}
