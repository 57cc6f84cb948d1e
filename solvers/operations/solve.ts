import { createHash } from 'node:crypto'
import { type Case, type Resolved, outputNamesOf, outputOf } from '../case.ts'
import { cautions } from '../cautions.ts'
import { DomainError, type Issue } from '../errors.ts'
import { readLists } from '../number-lists.ts'
import type { OutputName, Shape } from '../outputs.ts'
import { issuesOf, kindOf } from '../validate.ts'
import { SOLVER_VERSION } from '../version.ts'
import type { Warning } from '../warnings.ts'
import type { Call, CaseOperation } from './index.ts'
import { answeredShape, answerSchema, compactSchema, inputOf } from './solve-schemas.ts'
import { unusualValues } from './unusual-values.ts'

/** Longer series of the input are echoed as count and digest; the axes hold them whole. */
const ECHO_LIMIT = 100

/** An output that the case lacks is refused with the reason, and with those it has. */
function withReason(c: Case, body: unknown, issue: Issue): Issue {
  const match = /^#\/outputs\/(\d+)$/.exec(issue.pointer)
  if (!match || issue.code !== 'not-in-list') return issue
  const given = (body as { outputs: unknown[] }).outputs[Number(match[1])]
  const name = typeof given === 'string' ? given.slice(0, 60) : kindOf(given)
  const reason = Object.hasOwn(c.absentOutputs, name)
    ? c.absentOutputs[name as OutputName]
    : 'the case has no output of this name.'
  const accepted = outputNamesOf(c).join(', ')
  return { ...issue, code: 'output-not-defined', detail: `"${name}": ${reason}`, accepted }
}

function prepare(c: Case, body: unknown, defaultDetail: 'full' | 'compact'): Call {
  const schema = inputOf(c)
  const { body: brief, lists, issues } = readLists(schema, body)
  const parsed = schema.safeParse(brief, { reportInput: true })
  if (!parsed.success) issues.unshift(...issuesOf(schema, parsed.error).map((issue) => withReason(c, body, issue)))
  if (!parsed.success || issues.length > 0) throw new DomainError(issues)
  const { detail = defaultDetail, ...input } = { ...parsed.data, ...lists } as Record<string, unknown> & {
    detail?: 'full' | 'compact'
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
  const size = Math.max(values, resolved.times.length, resolved.depths?.length ?? 0)
  return { values, size, points, run: () => answer(c, resolved, points, detail === 'compact') }
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
      note: 'Inputs and model decide the real error; this bound is of the arithmetic alone.',
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
