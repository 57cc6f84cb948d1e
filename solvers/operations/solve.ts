import { createHash } from 'node:crypto'
import { z } from 'zod'
import { type Case, type Resolved, outputNamesOf, outputOf, shapeOf } from '../case.ts'
import { cautions } from '../cautions.ts'
import { DomainError } from '../errors.ts'
import { depths, times } from '../fields.ts'
import { type OutputName, type Shape } from '../outputs.ts'
import { issuesOf, metaOf } from '../validate.ts'
import { SOLVER_VERSION } from '../version.ts'
import type { Warning } from '../warnings.ts'
import type { Call, CaseOperation } from './index.ts'

/** Longer series of the input are echoed as count and digest; the axes hold them whole. */
const ECHO_LIMIT = 100

export const detailField = z.enum(['full', 'compact']).optional().meta({
  title: 'Detail',
  description: 'Detail: full, or compact (result, bound and warning codes only).',
  'x-accepted': 'full or compact',
})

function inputSchema(c: Case) {
  const names = outputNamesOf(c)
  const outputs = z
    .array(z.enum(names))
    .min(1)
    .max(names.length)
    .default(['temperature'])
    .meta({
      title: 'Outputs',
      description: `Outputs: some of ${names.join(', ')}. Default temperature.`,
      'x-accepted': names.join(', '),
    })
  return z.strictObject({
    ...c.fields,
    ...(c.places === 'depths' ? { depths: depths.optional() } : {}),
    times,
    outputs,
    detail: detailField,
  })
}

const boundSchema = z.strictObject({ absolute: z.number(), relative: z.number() })
const valuesSchema: Record<Shape, z.ZodType> = {
  grid: z.array(z.array(z.number())),
  times: z.array(z.number()),
  places: z.array(z.number()),
  single: z.number(),
}

/** Cases without places answer a grid output as one row over the times. */
function answeredShape(c: Case, name: OutputName): Shape {
  const shape = shapeOf(c, name)
  if (c.places !== 'none') return shape
  return shape === 'grid' ? 'times' : shape === 'places' ? 'single' : shape
}

function answerSchema(c: Case) {
  const names = outputNamesOf(c)
  const perOutput = (schemaOf: (name: OutputName) => z.ZodType) =>
    z.strictObject(Object.fromEntries(names.map((name) => [name, schemaOf(name).optional()])))
  const result = perOutput((name) => {
    const o = outputOf(c, name)
    return valuesSchema[answeredShape(c, name)].meta({
      title: o.label,
      description: `${o.text} Unit ${o.unit}.`,
      'x-ucum': o.unit,
    })
  })
  const series = z.array(z.number())
  return z.strictObject({
    case: z.literal(c.id),
    operation: z.literal('solve'),
    solver: z.string().meta({ description: 'Version of the numbers.' }),
    points: z.number().meta({ description: 'Priced points of this answer, before the floor of a call.' }),
    input: z
      .record(z.string(), z.unknown())
      .meta({ description: 'The input as used: SI, with defaults and derived properties.' }),
    axes: z.strictObject({ times: series, ...(c.places === 'depths' ? { depths: series.optional() } : {}) }),
    units: z.record(z.string(), z.string()).meta({ description: 'UCUM code of each output and axis.' }),
    result,
    accuracy: z.strictObject({
      method: z.array(z.string()),
      terms: z.number(),
      scale: z.number().meta({ description: 'The temperature scale of the case, K.' }),
      bound: perOutput(() => boundSchema),
      kind: z.enum(['proved', 'estimated']),
      scope: z.literal('numerical'),
      note: z.string(),
    }),
    numbers: z.strictObject({
      biot: z.number().optional(),
      fourier: series.optional(),
      length: z.number().optional(),
      penetrationDepth: z.number().optional(),
    }),
    checks: z.array(
      z.strictObject({ id: z.string(), holds: z.boolean(), value: z.number(), limit: z.number(), text: z.string() }),
    ),
    warnings: z.array(z.strictObject({ code: z.string(), text: z.string(), value: z.number() })),
    cautions: z.array(z.strictObject({ id: z.string(), version: z.number(), text: z.string() })),
    sources: z.array(z.string()),
  })
}

function compactSchema(c: Case) {
  const full = answerSchema(c)
  return z.strictObject({
    result: full.shape.result,
    accuracy: z.strictObject({ bound: full.shape.accuracy.shape.bound }),
    warnings: z.array(z.string()),
  })
}

function refuseBadInput(c: Case, schema: z.ZodType, error: z.ZodError, body: unknown): never {
  const issues = issuesOf(schema, error).map((issue) => {
    const match = /^#\/outputs\/(\d+)$/.exec(issue.pointer)
    if (!match || issue.code !== 'not-in-list') return issue
    const name = String((body as { outputs: unknown[] }).outputs[Number(match[1])]).slice(0, 60)
    const reason = c.absentOutputs[name as OutputName] ?? 'It is no output of this case.'
    return {
      ...issue,
      code: 'output-not-defined' as const,
      detail: `"${name}": ${reason}`,
      accepted: outputNamesOf(c).join(', '),
    }
  })
  throw new DomainError(issues)
}

function prepare(c: Case, body: unknown, defaultDetail: 'full' | 'compact'): Call {
  const schema = inputOf(c)
  const parsed = schema.safeParse(body, { reportInput: true })
  if (!parsed.success) refuseBadInput(c, schema, parsed.error, body)
  const { detail = defaultDetail, ...input } = parsed.data as Record<string, unknown> & {
    outputs: OutputName[]
    depths?: number[]
  }
  input.outputs = [...new Set(input.outputs)]
  const placed = input.outputs.filter((name) => ['grid', 'places'].includes(answeredShape(c, name)))
  if (placed.length > 0 && !input.depths)
    throw new DomainError([
      {
        pointer: '#/depths',
        code: 'missing-field',
        detail: `${placed[0]} needs depths.`,
        accepted: 'a list of depths in m, inward from the exposed face',
      },
    ])
  const resolved = c.resolve(input)
  const values = countValues(c, resolved)
  const points = c.weight * values + c.setUp
  return { values, points, run: () => answer(c, resolved, points, detail === 'compact') }
}

function countValues(c: Case, input: Resolved): number {
  const places = input.depths?.length ?? 0
  const counts: Record<Shape, number> = {
    grid: input.times.length * places,
    times: input.times.length,
    places,
    single: 1,
  }
  return input.outputs.reduce((sum, name) => sum + counts[answeredShape(c, name)], 0)
}

function answer(c: Case, input: Resolved, points: number, compact: boolean) {
  const solution = c.solve(input)
  const result: Record<string, unknown> = {}
  const bound: Record<string, unknown> = {}
  const units: Record<string, string> = {}
  for (const name of input.outputs) {
    const output = solution.outputs[name]
    if (!output) throw new Error(`${c.id} has no ${name}`)
    result[name] = output.values
    bound[name] = output.bound
    units[name] = c.unitOf?.(name, input) ?? outputOf(c, name).unit
  }
  const echoed = c.echo?.(input) ?? { ...input }
  const warnings: Warning[] = [...c.warnings(input), ...unusualValues(c, echoed)]
  if (compact) return { result, accuracy: { bound }, warnings: warnings.map((w) => w.code) }
  units['times'] = 's'
  if (input.depths) units['depths'] = 'm'
  return {
    case: c.id,
    operation: 'solve',
    solver: SOLVER_VERSION,
    points,
    input: Object.fromEntries(
      Object.entries(echoed)
        .filter(([, v]) => v !== undefined)
        .map(([k, v]) => [k, shortened(v)]),
    ),
    axes: { times: input.times, ...(input.depths ? { depths: input.depths } : {}) },
    units,
    result,
    accuracy: {
      method: solution.methods,
      terms: solution.terms,
      scale: solution.scale,
      bound,
      kind: 'estimated',
      scope: 'numerical',
      note: 'Inputs and model decide the real error; see uncertainty.',
    },
    numbers: c.numbers(input),
    checks: c.checks(input),
    warnings,
    cautions: c.cautions.map((id) => ({ id, ...cautions[id] })),
    sources: [...c.sources],
  }
}

/** Values outside what their field calls typical. */
function unusualValues(c: Case, input: Record<string, unknown>): Warning[] {
  return Object.entries(c.fields).flatMap(([name, schema]) => {
    const meta = metaOf(schema as z.ZodType)
    const typical = meta?.['x-typical'] as [number, number] | undefined
    const value = input[name]
    if (!typical || typeof value !== 'number' || (value >= typical[0] && value <= typical[1])) return []
    const text = `${name} is ${value} ${String(meta!['x-ucum'])}; values from ${typical[0]} to ${typical[1]} are usual.`
    return [{ code: 'outside-typical-range' as const, text, value }]
  })
}

function shortened(value: unknown): unknown {
  if (!Array.isArray(value) || value.length <= ECHO_LIMIT) return value
  return { count: value.length, digest: 'sha-256=' + createHash('sha256').update(JSON.stringify(value)).digest('hex') }
}

const inputs = new Map<string, ReturnType<typeof inputSchema>>()
/** Built once a case, since building a schema costs more than a solve. */
function inputOf(c: Case) {
  const known = inputs.get(c.id)
  if (known) return known
  const schema = inputSchema(c)
  inputs.set(c.id, schema)
  return schema
}

export const solve: CaseOperation = {
  id: 'solve',
  title: 'Solve',
  summary: 'Answers the requested outputs at the given times and places, with their error bounds.',
  input: inputOf,
  answer: answerSchema,
  compactAnswer: compactSchema,
  example: (c) => c.example,
  prepare,
}
