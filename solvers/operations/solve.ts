import { createHash } from 'node:crypto'
import { type Case, type Resolved, countOfPlaces, outputNamesOf, outputOf, placeFields } from '../case.ts'
import { cautions } from '../cautions.ts'
import { DomainError, type Issue } from '../errors.ts'
import { readLists, withLists } from '../number-lists.ts'
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

type Read = Record<string, unknown> & Pick<Resolved, 'depths' | 'radii' | 'points' | 'times' | 'outputs'>

function prepare(c: Case, body: unknown, defaultDetail: 'full' | 'compact'): Call {
  const schema = inputOf(c)
  const { body: brief, lists, issues } = readLists(schema, body)
  const parsed = schema.safeParse(brief, { reportInput: true })
  if (!parsed.success) issues.unshift(...issuesOf(schema, parsed.error).map((issue) => withReason(c, body, issue)))
  if (!parsed.success || issues.length > 0) throw new DomainError(issues)
  const { detail = defaultDetail, ...input } = withLists(parsed.data, lists) as unknown as Read & {
    detail?: 'full' | 'compact'
  }
  input.outputs = [...new Set(input.outputs)]
  refusePlaces(c, input)
  const resolved = c.resolve(input)
  const values = countValues(c, resolved)
  const points = c.weight * values + c.setUp
  const size = Math.max(values, resolved.times.length, countOfPlaces(resolved))
  return { values, size, points, run: () => answer(c, resolved, points, detail === 'compact') }
}

const placesAccepted = {
  depths: 'a list of depths in m, inward from the exposed face',
  radii: 'a list of radii in m',
  'depths-or-radii': 'exactly one of depths (m, inward from the face) and radii (m)',
  points: 'a list of points',
  none: 'no places',
}

/** Places that are missing, given in two ways, or outside the body. */
function refusePlaces(c: Case, input: Read): void {
  const names = placeFields[c.places]
  const given = names.filter((name) => input[name] !== undefined)
  const accepted = placesAccepted[c.places]
  if (given.length > 1) {
    const detail = 'The places are given twice: by depths and by radii.'
    throw new DomainError([{ pointer: '#/radii', code: 'conflicting-fields', detail, accepted }])
  }
  const placed = input.outputs.find((name) => ['grid', 'places'].includes(answeredShape(c, name)))
  if (placed && given.length === 0) {
    const detail = `${placed} needs ${names.join(' or ')}.`
    throw new DomainError([{ pointer: `#/${names[0]}`, code: 'missing-field', detail, accepted }])
  }
  refuseOutside(c, input)
}

function refuseOutside(c: Case, input: Read): void {
  const end = c.depthsEndAt && input[c.depthsEndAt]
  if (typeof end !== 'number') return
  const issues = (['depths', 'radii'] as const).flatMap((name) =>
    (input[name] ?? []).flatMap((place, j) => {
      if (place <= end) return []
      const detail = `The body ends at ${end} m; this ${name === 'depths' ? 'depth' : 'radius'} is ${place} m.`
      return [{ pointer: `#/${name}/${j}`, code: 'depth-outside-body' as const, detail, accepted: `0 to ${end} m` }]
    }),
  )
  if (issues.length > 0) throw new DomainError(issues)
}

function countValues(c: Case, input: Resolved): number {
  const places = countOfPlaces(input)
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
  const given = placeFields[c.places].filter((name) => input[name] !== undefined)
  units['times'] = 's'
  for (const name of given) units[name] = 'm'
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
    axes: { times: input.times, ...Object.fromEntries(given.map((name) => [name, input[name]])) },
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
