import { type Case, placeFields } from '../case.ts'
import { courseOf } from './course.ts'
import { LONGEST } from './end-state.ts'
import { DomainError } from '../errors.ts'
import { quantitiesOf } from './question.ts'
import { latestOf } from '../math/latest.ts'

/** The last time of the case's example, the place that lies deepest, and its fields. */
export function partsOf(c: Case) {
  const { times, outputs: _, detail: __, ...rest } = c.example as Record<string, unknown> & { times: number[] }
  const axis = placeFields[c.places].find((name) => rest[name] !== undefined)
  const places = axis ? (rest[axis] as unknown[]) : []
  const fields = Object.fromEntries(Object.entries(rest).filter(([name]) => name !== axis))
  return { fields, axis, place: places.at(-1), last: latestOf(times) }
}

/** A number between two others, away from both, with as few digits as that allows. */
export function between(a: number, b: number): number {
  const [low, high] = [Math.min(a, b), Math.max(a, b)]
  const [middle, least] = [(a + b) / 2, 0.2 * (high - low)]
  for (let digits = 1; digits < 15; digits++) {
    const rounded = Number(middle.toPrecision(digits))
    if (rounded - low >= least && high - rounded >= least) return rounded
  }
  return middle
}

/** The case's own example, asked when the value is half way to where it is at the last time. */
export function exampleOf(c: Case): Record<string, unknown> {
  const { fields, axis, place, last } = partsOf(c)
  const output = quantitiesOf(c)[0]!
  const asked = { ...fields, ...(axis ? { [axis]: [place] } : {}) }
  const input = c.resolve({ ...asked, times: [0, last], outputs: [output] })
  const values = c.solve(input).outputs[output]!.values as number[] | number[][]
  const [start, end] = values.flat()
  const one = axis && { depths: 'depth', radii: 'radius', points: 'point' }[axis]
  const placed = axis ? (one! in c.fields ? { [axis]: [place] } : { [one!]: place }) : {}
  const until = goesOn(c, asked) ? { until: last } : {}
  return { ...fields, ...placed, target: between(start!, end!), ...until }
}

/** Whether what drives the case changes for ever, or is known for a while only. */
function goesOn(c: Case, asked: Record<string, unknown>): boolean {
  try {
    const resolved = c.resolve({ ...asked, times: [LONGEST], outputs: [quantitiesOf(c)[0]!] })
    return c.clock === true || courseOf(c, asked, resolved).period !== undefined
  } catch (error) {
    if (error instanceof DomainError) return true
    throw error
  }
}
