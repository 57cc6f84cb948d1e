import { type Case, placeFields } from '../../../solvers/case.ts'
import { DomainError, type Issue } from '../../../solvers/errors.ts'
import { EPS } from '../../../solvers/math/rounding.ts'
import { caseOperations } from '../../../solvers/operations/index.ts'
import type { OutputName } from '../../../solvers/outputs.ts'
import { caseOf } from '../ask.ts'

type Bounds = Record<string, { absolute: number; relative: number }>

export interface Answer<R> {
  points: number
  input: Record<string, unknown>
  units: Record<string, string>
  result: R
  accuracy: { bound: Bounds }
  numbers: Record<string, unknown>
  warnings: unknown[]
}

export interface Reached {
  outcome: string
  crossings: number[]
  directions: string[]
  asymptote: number | null
  rateAtTarget?: number
  timePerTenthKelvin?: number
}

export interface Depths {
  outcome: string
  depths?: number[]
  depth?: number
  radii?: number[]
  gradient?: number
  depthPerTenthKelvin?: number
}

interface Extreme {
  value: number
  time: number
  atEnd: boolean
}
export interface Extremes {
  maximum: Extreme
  minimum: Extreme
}

export function prepared(operation: string, caseId: string, body: Record<string, unknown>) {
  const o = caseOperations.find(({ id }) => id === operation)
  if (!o) throw new Error(`no operation ${operation}`)
  return o.prepare(caseOf(caseId), body, 'full')
}

export function askOperation<R>(operation: string, caseId: string, body: Record<string, unknown>): Answer<R> {
  return prepared(operation, caseId, body).run() as Answer<R>
}

/** The issues that a call is refused with; a call that is answered has none. */
export function refusalOf(operation: string, caseId: string, body: Record<string, unknown>): readonly Issue[] {
  try {
    prepared(operation, caseId, body)
  } catch (error) {
    if (error instanceof DomainError) return error.issues
    throw error
  }
  return []
}

/** One value straight from the solver, with what it may be off. */
export function valueAt(c: Case, fields: Record<string, unknown>, output: OutputName, time: number) {
  const { values, bound } = c.solve(c.resolve({ ...fields, times: [time], outputs: [output] })).outputs[output]!
  const row = (values as (number | number[])[])[0]!
  const value = typeof row === 'number' ? row : row[0]!
  return { value, bound: bound.absolute + bound.relative * Math.abs(value) + 4 * EPS * Math.abs(value) }
}

/** An input apart: its fields, and one place, within those that it names, under the name that it has. */
export function partsOf(c: Case, input: Record<string, unknown>) {
  const own = ['times', 'outputs', 'detail']
  const axis = placeFields[c.places].find((name) => input[name] !== undefined)
  const fields = Object.fromEntries(Object.entries(input).filter(([name]) => !own.includes(name) && name !== axis))
  const placed = axis ? { [axis]: [within(input[axis] as unknown[])] } : {}
  return { axis, fields, placed, times: input['times'] as number[] }
}

function within(places: readonly unknown[]): unknown {
  const [first, last] = [places[0], places.at(-1)]
  return typeof first === 'number' && typeof last === 'number' ? first + 0.37 * (last - first) : last
}
