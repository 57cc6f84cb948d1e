import { type Case, type Resolved, countOfPlaces, outputNamesOf, outputOf, placeFields } from '../case.ts'
import type { Issue } from '../errors.ts'
import type { OutputName } from '../outputs.ts'
import { kindOf } from '../statement/validate.ts'
import { countValues } from './count-values.ts'
import { refuseDerived, solveWithDerived } from './derived.ts'
import { asksDimensionless, dimensionlessAnswer, dimensionlessInput, prepareDimensionless } from './dimensionless.ts'
import { headed, scopeOf, tailOf, warningsOf } from './envelope.ts'
import type { Call, CaseOperation } from './index.ts'
import { type Read, refusePlaces } from './places.ts'
import { readBody } from './read-body.ts'
import { countParameters } from './sensitivities/parameters.ts'
import { answerSchema, compactSchema, inputOf } from './solve-schemas.ts'

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
  if (asksDimensionless(c, body)) return prepareDimensionless(c, body, defaultDetail)
  const read = readBody(inputOf(c), body, (issue) => withReason(c, body, issue))
  const { detail = defaultDetail, ...input } = read as Read & { detail?: 'full' | 'compact' }
  input.outputs = [...new Set(input.outputs)]
  refusePlaces(c, input)
  const resolved = c.resolve(input)
  refuseDerived(c, input, resolved)
  const parameters = resolved.outputs.includes('sensitivities') ? countParameters(c, input) : 0
  const values = countValues(c, resolved, () => 1, parameters)
  const solved = countValues(c, resolved, (name) => outputOf(c, name).cost ?? 1, parameters)
  const points = c.weight * solved + c.setUp
  const size = Math.max(solved, resolved.times.length, countOfPlaces(resolved))
  return { values, size, points, run: () => answer(c, input, resolved, points, detail === 'compact') }
}

function answer(c: Case, asked: Read, input: Resolved, points: number, compact: boolean) {
  const solution = solveWithDerived(c, asked, input)
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
  const warnings = warningsOf(c, input, echoed)
  if (compact) return { result, accuracy: { bound }, warnings: warnings.map((w) => w.code) }
  const given = placeFields[c.places].filter((name) => input[name] !== undefined)
  units['times'] = 's'
  for (const name of given) units[name] = 'm'
  const { methods: method, terms, scale } = solution
  return {
    ...headed(c, 'solve', points, echoed),
    axes: { times: input.times, ...Object.fromEntries(given.map((name) => [name, input[name]])) },
    units,
    result,
    accuracy: { method, terms, scale, bound, ...scopeOf },
    ...tailOf(c, input, warnings),
  }
}

export const solve = {
  id: 'solve',
  title: 'Solve',
  summary: 'Answers the requested outputs at the given times and places, with their error bounds.',
  applies: () => true,
  price: ({ weight, setUp }) =>
    `${weight} ${weight === 1 ? 'point' : 'points'} a number${setUp ? ` and ${setUp} a call` : ''}, at least 10 a call`,
  input: inputOf,
  answer: answerSchema,
  compactAnswer: compactSchema,
  other: (c) => (c.dimensionless ? { input: dimensionlessInput(c), answer: dimensionlessAnswer(c) } : undefined),
  example: (c) => c.example,
  prepare,
} satisfies CaseOperation
