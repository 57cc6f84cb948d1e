import type { Case, Resolved } from '../../case.ts'
import { DomainError, type Issue } from '../../errors.ts'
import { extrapolated, type Slope } from '../../extrapolate.ts'
import { EPS, lastPlaces } from '../../math/rounding.ts'
import type { Bound } from '../../solution.ts'
import { placesOutside } from '../places.ts'
import { type Parameter, parametersOf, withoutMaterials, withParameter } from './parameters.ts'
import { instantNames } from '../course.ts'

/** First step of ln p, to either side or to one. */
const FIRST_STEP = 0.25
/** Steps are halved until the slopes are told to this share of what they are, or as well as the temperatures let them. */
const ENOUGH = 1e-9
const MOST_HALVINGS = 36

/** ∂T/∂ln p for each parameter, at each time and place. */
export interface Sensitivities {
  values: Record<string, number[] | number[][]>
  bound: Bound
}

type Grid = number[][]
type Fields = Record<string, unknown>

/** An instant that is a parameter has no one sensitivity at itself. */
export function refuseSensitivities(c: Case, input: Fields & { times: number[] }): void {
  const instants = parametersOf(c, input).filter(({ path }) => instantNames.includes(path.at(-1)!))
  const issues = input.times.flatMap((time, i): Issue[] => {
    const at = instants.find(({ value }) => value === time)
    if (!at) return []
    const detail = `The temperature has no one sensitivity to ${at.name} at that time itself.`
    return [{ pointer: `#/times/${i}`, code: 'no-rate-at-change', detail, accepted: 'a time before or after' }]
  })
  if (issues.length > 0) throw new DomainError(issues)
}

/**
 * Sensitivities of the temperature to each parameter that an input states, all others kept.
 *
 *   ∂T/∂ln p = lim [T(p·e^H) − T(p·e^(−H))]/(2H),   or [T(p·e^H) − T(p)]/H where the body or a place lets it grow only
 *
 * Shapes    one grid a parameter, of the shape of the temperatures.
 * Units     K, for a change of p by the factor e; a hundredth of it for one of 1 %.
 * Domain    parameters that are not 0.
 * Accuracy  about 1e-10 of the scale where the temperature bends over a factor of e or more; each slope says its error, and the bound
 *           is the largest.
 * Errors    none: the input is resolved.
 * Source    L. F. Richardson, The approximate arithmetical solution by finite differences, Phil. Trans. A 210 (1911).
 */
export function sensitivitiesOf(c: Case, asked: Fields): Sensitivities {
  const input = withoutMaterials(asked)
  const start = solvedAt(c, input)
  const bound: Bound = { absolute: 0, relative: 0 }
  const values = parametersOf(c, input).map((parameter): [string, number[] | number[][]] => {
    const slopes = slopesOf(c, input, parameter, start)
    const told = slopes.map((row) =>
      row.map(({ value, error }) => {
        bound.absolute = Math.max(bound.absolute, error + lastPlaces(value))
        return value + 0 // never −0
      }),
    )
    return [parameter.name, start.placed ? told : told.map((row) => row[0]!)]
  })
  return { values: Object.fromEntries(values), bound }
}

interface Solved {
  grid: Grid
  placed: boolean
  /** What each temperature may be off. */
  error: number
  scale: number
}

function solvedAt(c: Case, input: Fields): Solved {
  const { outputs, scale } = c.solve(resolvedAt(c, input))
  const { values, bound } = outputs.temperature!
  const rows = values as number[] | number[][]
  const placed = Array.isArray(rows[0])
  const grid = placed ? (rows as Grid) : (rows as number[]).map((T) => [T])
  return { grid, placed, error: bound.absolute, scale }
}

const resolvedAt = (c: Case, input: Fields): Resolved => c.resolve({ ...input, outputs: ['temperature'] })

/** Whether the body is still one with the parameter at a value, and every place still in it. */
function holds(c: Case, input: Fields, { path }: Parameter, value: number): boolean {
  const moved = withParameter(input, path, value)
  if (placesOutside(c, moved).length > 0) return false
  try {
    resolvedAt(c, moved)
    return true
  } catch (error) {
    if (error instanceof DomainError) return false
    throw error
  }
}

/** Which way a parameter can go: both, or one. */
type Sides = 'both' | 1 | -1

function sidesOf(c: Case, input: Fields, parameter: Parameter, step: number): Sides | undefined {
  const up = holds(c, input, parameter, parameter.value * Math.exp(step))
  const down = holds(c, input, parameter, parameter.value * Math.exp(-step))
  if (up && down) return 'both'
  return up ? 1 : down ? -1 : undefined
}

function slopesOf(c: Case, input: Fields, parameter: Parameter, start: Solved): Slope[][] {
  let step = firstStepOf(input, parameter)
  let sides = sidesOf(c, input, parameter, step)
  for (; sides === undefined && step > 1e-9; step /= 8) sides = sidesOf(c, input, parameter, step / 8)
  const quotients: Slope[][][] = start.grid.map((row) => row.map(() => []))
  const [batch, b] = sides === 'both' ? [6, 4 as const] : [12, 2 as const]
  const settled = c.clock === true
  const times = input['times'] as number[]
  let slopes: Slope[][] = []
  for (let n = 0; n < MOST_HALVINGS; n += batch) {
    for (let m = n; m < n + batch; m++)
      addQuotients(c, input, parameter, start, quotients, sides ?? 'both', step * 2 ** -m)
    slopes = quotients.map((row, i) =>
      row.map((list) => (times[i] === 0 && !settled ? { value: 0, error: 0 } : slopeOf(list, b))),
    )
    if (isEnough(slopes, start, step)) break
  }
  return slopes
}

/** Where a parameter is moved by less than its own rounding nothing can be told, and the bound says so. */
function slopeOf(quotients: readonly Slope[], b: 2 | 4): Slope {
  const told = quotients.filter(({ value, error }) => Number.isFinite(value) && Number.isFinite(error))
  return told.length === 0 ? { value: 0, error: Number.MAX_VALUE } : extrapolated(told, b)
}

/** A duration stays on its side of every time, and a period is short against the time that its cycles take. */
function firstStepOf(input: Fields, { path, value }: Parameter): number {
  const name = path.at(-1)!
  const times = input['times'] as number[]
  if (instantNames.includes(name))
    return times.reduce((room, t) => (t > 0 ? Math.min(room, Math.abs(Math.log(t / value)) / 2) : room), FIRST_STEP)
  if (name !== 'period') return FIRST_STEP
  const cycle = path.slice(0, -1).reduce((at, key) => at[key] as Fields, input)
  const instant = Number(cycle['timeOfMaximum'] ?? cycle['timeOfMinimum'])
  return times.reduce((room, t) => Math.min(room, value / (4 * Math.abs(t - instant) + value)), FIRST_STEP)
}

function addQuotients(
  c: Case,
  input: Fields,
  { path, value }: Parameter,
  start: Solved,
  quotients: Slope[][][],
  sides: Sides,
  step: number,
): void {
  const at = (moved: number) => solvedAt(c, withParameter(input, path, moved))
  const [p1, p2] = [sides === 1 ? value : value * Math.exp(-step), sides === -1 ? value : value * Math.exp(step)]
  const before = sides === 1 ? start : at(p1)
  const after = sides === -1 ? start : at(p2)
  // The two values are rounded themselves; this is their true distance.
  const width = Math.log1p((p2 - p1) / p1)
  quotients.forEach((row, i) =>
    row.forEach((list, j) => {
      const [T1, T2] = [before.grid[i]![j]!, after.grid[i]![j]!]
      const quotient = (T2 - T1) / width
      list.push({ value: quotient, error: (before.error + after.error + 4 * EPS * Math.abs(quotient)) / width })
    }),
  )
}

function isEnough(slopes: Slope[][], { error, scale }: Solved, step: number): boolean {
  const size = slopes.flat().reduce((most, { value }) => Math.max(most, Math.abs(value)), scale)
  const worst = slopes.flat().reduce((most, slope) => Math.max(most, slope.error), 0)
  return worst <= Math.max(ENOUGH * size, (100 * error) / step)
}
