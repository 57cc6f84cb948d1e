import { createHash } from 'node:crypto'
import type { z } from 'zod'
import { type Case, type Resolved, outputNamesOf, outputOf } from '../case.ts'
import { cautions } from '../cautions.ts'
import { DomainError } from '../errors.ts'
import type { OutputName, Shape } from '../outputs.ts'
import { issuesOf } from '../validate.ts'
import { SOLVER_VERSION } from '../version.ts'
import type { Warning } from '../warnings.ts'
import type { Call, CaseOperation } from './index.ts'
import { answeredShape, answerSchema, compactSchema, inputOf } from './solve-schemas.ts'
import { unusualValues } from './unusual-values.ts'

/** Longer series of the input are echoed as count and digest; the axes hold them whole. */
const ECHO_LIMIT = 100

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
  refuseOutside(c, input)
  const resolved = c.resolve(input)
  const values = countValues(c, resolved)
  const points = c.weight * values + c.setUp
  return { values, points, run: () => answer(c, resolved, points, detail === 'compact') }
}

function refuseOutside(c: Case, input: Record<string, unknown> & { depths?: number[] }): void {
  const end = c.depthsEndAt && input[c.depthsEndAt]
  if (typeof end !== 'number') return
  const issues = (input.depths ?? []).flatMap((depth, j) => {
    if (depth <= end) return []
    const detail = `The body ends at ${end} m; this depth is ${depth} m.`
    return [{ pointer: `#/depths/${j}`, code: 'depth-outside-body' as const, detail, accepted: `0 to ${end} m` }]
  })
  if (issues.length > 0) throw new DomainError(issues)
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

function shortened(value: unknown): unknown {
  if (!Array.isArray(value) || value.length <= ECHO_LIMIT) return value
  return { count: value.length, digest: 'sha-256=' + createHash('sha256').update(JSON.stringify(value)).digest('hex') }
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
