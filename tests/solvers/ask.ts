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
}

export function askSingle(id: string, body: Record<string, unknown>, output: string): Single {
  const { result, accuracy } = ask(id, { ...body, outputs: [output] })
  const value = single(result[output]!)
  const bound = accuracy.bound[output]!
  return { value, bound: bound.absolute + bound.relative * Math.abs(value) }
}

/** Straight to the solver, for tests that ask a great deal. */
export function solveDirect(id: string, body: Record<string, unknown>): Solution {
  const c = caseOf(id)
  return c.solve(c.resolve({ ...body }))
}

const inputsOfTemperature = ['initialTemperature', 'ambientTemperature', 'surfaceTemperature']

/** K = Σ |p ∂y/∂p| over the numbers of the input, by central differences. */
export function condition(id: string, body: Record<string, unknown>, output: OutputName): number {
  const at = (changed: Record<string, unknown>) =>
    single(solveDirect(id, { ...body, ...changed, outputs: [output] }).outputs[output]!.values)
  return Object.entries(body).reduce((sum, [name, given]) => {
    const list = Array.isArray(given)
    const p = list ? (given[0] as number) : given
    if (typeof p !== 'number' || name === 'exposedFaces' || p === 0) return sum
    // A depth can only be moved inward, and the body's end only outward.
    const oneSided = name === 'depths' || name === 'thickness'
    const step = inputsOfTemperature.includes(name) ? 1e-3 * Math.max(1, Math.abs(p)) : p * (oneSided ? 1e-7 : 1e-4)
    const up = name === 'depths' ? p : p + step
    const down = name === 'thickness' ? p : p - step
    const wrap = (v: number) => ({ [name]: list ? [v] : v })
    const slope = (at(wrap(up)) - at(wrap(down))) / (up - down)
    return sum + Math.abs(p * slope)
  }, 0)
}

/** The largest error that an answer may have, by the kind of its output; `surface` is the flux at the face. */
export function contract(
  output: OutputName,
  y: number,
  K: number,
  t: { scale: number; temperatures: number[]; surface?: number },
): number {
  if (output === 'temperature' || output === 'meanTemperature' || output === 'steadyTemperature')
    return 1e-12 * t.scale + 4 * EPS * Math.max(Math.abs(y), ...t.temperatures.map(Math.abs)) + 2 * EPS * K
  if (output === 'heatFlux') return 1e-11 * (Math.max(Math.abs(y), Math.abs(t.surface ?? 0)) + K) + 1e-290
  return 1e-11 * (Math.abs(y) + K) + 1e-290
}
