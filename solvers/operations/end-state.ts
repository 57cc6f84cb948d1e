import type { Case } from '../case.ts'
import { DomainError } from '../errors.ts'
import type { OutputName } from '../outputs.ts'
import { extentOf } from './course.ts'
import { type Asked, overTime } from './curve/curve.ts'
import type { Question } from './question.ts'
import { answeredShape } from './solve-schemas.ts'

/** The longest time that may be asked for. */
export const LONGEST = 1e17

/** What the output asked for tends to; null where it has no end. Of two places, the difference of their ends. */
export function endOf(c: Case, q: Question): number | null {
  if (q.course.settled || q.course.period !== undefined) return null
  const ends = q.places.length === 0 ? [endAt(c, q, undefined)] : q.places.map((_, j) => endAt(c, q, j))
  const [first, second] = ends
  if (first === null || first === undefined || second === null) return null
  return second === undefined ? first : first - second
}

function endAt(c: Case, q: Question, j: number | undefined): number | null {
  switch (q.output) {
    case 'temperature':
      return temperatureAt(c, q, j)
    case 'meanTemperature':
      return meanOf(c, q)
    case 'remainingFraction':
      return isIdle(q.asked) ? 1 : 0
    case 'completedFraction':
    case 'heatFraction':
      return isIdle(q.asked) ? 0 : 1
    default:
      return null
  }
}

/** Without a film nothing drives the body, and it stays as it starts. */
function isIdle(asked: Asked): boolean {
  const films = asked['filmCoefficients']
  return asked['filmCoefficient'] === 0 || (isRecord(films) && Object.values(films).every((film) => film === 0))
}
const isRecord = (value: unknown): value is object => typeof value === 'object' && value !== null

/** Outputs that are the end state, by the names that cases give it. */
const endNames = ['steadyTemperature', 'contactTemperature', 'equilibriumTemperature'] as const

const endName = (c: Case) => endNames.find((name) => Object.hasOwn(c.outputs, name)) as OutputName | undefined

function temperatureAt(c: Case, q: Question, j: number | undefined): number | null {
  const told = c.end?.(q.resolved, j === undefined ? undefined : q.places[j])
  if (told !== undefined) return told
  const output = endName(c)
  if (output) return steadyAt(c, q.asked, output, j)
  const name = c.drive && (isIdle(q.asked) ? 'initialTemperature' : c.drive)
  const driven = name && q.asked[name]
  return typeof driven === 'number' ? driven : null
}

/** The end state as the case answers it; an input for which it refuses that has none. */
function steadyAt(c: Case, asked: Asked, output: OutputName, j: number | undefined): number | null {
  try {
    const values = c.solve(c.resolve({ ...asked, times: [0], outputs: [output] })).outputs[output]!.values
    return typeof values === 'number' ? values : ((values as number[])[j ?? 0] ?? null)
  } catch (error) {
    if (error instanceof DomainError) return null
    throw error
  }
}

/** Where each place has an end of its own, the mean's is asked of the body itself, after the longest time. */
function meanOf(c: Case, q: Question): number | null {
  const output = endName(c)
  if (c.end?.(q.resolved, undefined) !== undefined || !output || answeredShape(c, output) === 'single')
    return temperatureAt(c, q, undefined)
  const axis = c.places === 'radii' ? 'radii' : 'depths'
  const [first] = extentOf(c, q.asked, axis)
  if (steadyAt(c, { ...q.asked, [axis]: [first] }, output, 0) === null) return null
  return overTime(c, q.asked, 'meanTemperature').sample([LONGEST]).values[0]!
}
