import { cases } from '../../solvers/cases/index.ts'
import type { Case } from '../../solvers/case.ts'
import type { OutputName } from '../../solvers/outputs.ts'
import type { Bound, Solution } from '../../solvers/solution.ts'
import { EPS } from '../../solvers/math/rounding.ts'
import { solve as operation } from '../../solvers/operations/solve.ts'

export function caseOf(id: string): Case {
  const found = cases.find((c) => c.id === id)
  if (!found) throw new Error(`no case ${id}`)
  return found
}

interface Answer {
  result: Record<string, number | number[] | number[][]>
  accuracy: { bound: Record<string, Bound>; scale: number; method: string[]; terms: number }
}

/** Through the operation, as a caller would. */
export function ask(id: string, body: Record<string, unknown>): Answer {
  return operation.prepare(caseOf(id), body, 'full').run() as Answer
}

/** The one number of an output asked at one time and place. */
export function single(values: number | number[] | number[][]): number {
  const first = Array.isArray(values) ? values[0]! : values
  return Array.isArray(first) ? first[0]! : first
}

export interface Single {
  value: number
  /** What it may be off, by its own bound. */
  bound: number
  /** The temperature scale of the answer. */
  scale: number
}

export function askSingle(id: string, body: Record<string, unknown>, output: string): Single {
  const { result, accuracy } = ask(id, { ...body, outputs: [output] })
  const value = single(result[output]!)
  const bound = accuracy.bound[output]!
  return { value, bound: bound.absolute + bound.relative * Math.abs(value), scale: accuracy.scale }
}

/** Straight to the solver, for tests that ask a great deal. */
export function solveDirect(id: string, body: Record<string, unknown>): Solution {
  const c = caseOf(id)
  return c.solve(c.resolve({ ...body }))
}

/** A number of an input, found by its names from the outside in. */
interface Leaf {
  path: readonly (string | number)[]
  name: string
  value: number
}

function leavesOf(value: unknown, path: readonly (string | number)[] = [], name = ''): Leaf[] {
  if (typeof value === 'number') return [{ path, name, value }]
  if (typeof value !== 'object' || value === null) return []
  return Object.entries(value).flatMap(([key, inner]) =>
    leavesOf(inner, [...path, Array.isArray(value) ? Number(key) : key], Array.isArray(value) ? name : key),
  )
}

function replaced(value: unknown, [first, ...rest]: readonly (string | number)[], leaf: number): unknown {
  if (first === undefined) return leaf
  if (Array.isArray(value)) return value.map((one, i) => (i === first ? replaced(one, rest, leaf) : one))
  const object = value as Record<string, unknown>
  return { ...object, [first]: replaced(object[first], rest, leaf) }
}

const isTemperature = (name: string) => /temperatures?$/i.test(name) || name === 'cycleMean' || name === 'start'
const isDrive = (name: string) =>
  /flux$|power|rate$|^amplitude$|density$|rise$|^energy$/i.test(name) && name !== 'density'
/** These may only be moved inward, and those only outward: there the body ends. */
const inward = ['depths', 'radii', 'x', 'y', 'z', 'r']
const outward = ['thickness', 'radius', 'width', 'height', 'length', 'outerRadius']

export interface Sensitivity {
  /** K = Σ |p ∂y/∂p| over the numbers of the input. */
  K: number
  /** The most that one drive alone does to the output. */
  largest: number
}

/** By central differences. */
export function sensitivity(id: string, body: Record<string, unknown>, output: OutputName): Sensitivity {
  const at = (changed: unknown) =>
    single(solveDirect(id, { ...(changed as Record<string, unknown>), outputs: [output] }).outputs[output]!.values)
  const initial = body['initialTemperature']
  let K = 0
  let largest = 0
  for (const { path, name, value: p } of leavesOf(body)) {
    if (/faces$/i.test(name) || name === 'outputs' || (p === 0 && !isTemperature(name))) continue
    const onEdge = inward.includes(name) || outward.includes(name)
    const step = isTemperature(name) ? 1e-3 * Math.max(1, Math.abs(p)) : Math.abs(p) * (onEdge ? 1e-7 : 1e-4)
    const up = inward.includes(name) ? p : p + step
    const down = outward.includes(name) ? p : p - step
    const slope = (at(replaced(body, path, up)) - at(replaced(body, path, down))) / (up - down)
    K += Math.abs(p * slope)
    if (isTemperature(name) && name !== 'initialTemperature')
      largest = Math.max(largest, Math.abs(slope * (p - (typeof initial === 'number' ? initial : 0))))
    if (isDrive(name)) largest = Math.max(largest, Math.abs(p * slope))
  }
  return { K, largest }
}

export const condition = (id: string, body: Record<string, unknown>, output: OutputName): number =>
  sensitivity(id, body, output).K

/** Every temperature that an input names. */
export const temperaturesOf = (body: Record<string, unknown>): number[] =>
  leavesOf(body)
    .filter(({ name }) => isTemperature(name))
    .map(({ value }) => value)

/** The largest error that an answer may have, by the kind of its output; `surface` is the flux at the face. */
export function contract(
  output: OutputName,
  y: number,
  K: number,
  t: { scale: number; temperatures: number[]; surface?: number },
): number {
  if (/temperature$|^amplitude$/i.test(output))
    return 1e-12 * t.scale + 4 * EPS * Math.max(Math.abs(y), ...t.temperatures.map(Math.abs)) + 2 * EPS * K
  if (/HeatFlux$|^heat(Flux|Gained)$/.test(output))
    return 1e-11 * (Math.max(Math.abs(y), Math.abs(t.surface ?? 0)) + K) + 1e-290
  return 1e-11 * (Math.abs(y) + K) + 1e-290
}
