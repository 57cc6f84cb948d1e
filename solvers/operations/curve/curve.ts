import type { Case } from '../../case.ts'
import { EPS } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import { errorOf } from '../../solution.ts'

/** What a case answers along one of its axes, with what each value may be off. */
export interface Curve {
  sample(at: readonly number[]): Sampled
}
export interface Sampled {
  values: number[]
  bounds: number[]
}

/** The case's own input without times, places and outputs, and the places asked for. */
export type Asked = Record<string, unknown>

/** One output over time; of two places the first less the second. */
export function overTime(c: Case, asked: Asked, output: OutputName): Curve {
  return {
    sample(times) {
      const { values, bound } = c.solve(c.resolve({ ...asked, times, outputs: [output] })).outputs[output]!
      const rows = values as number[] | number[][]
      const off = (value: number) => errorOf(bound, value)
      const sampled: Sampled = { values: [], bounds: [] }
      for (const row of rows) {
        const [first, second] = typeof row === 'number' ? [row] : row
        const value = second === undefined ? first! : first! - second
        sampled.values.push(value)
        sampled.bounds.push(second === undefined ? off(value) : off(first!) + off(second) + EPS * Math.abs(value))
      }
      return sampled
    },
  }
}

/** The temperature along the depths or radii at one time. */
export function overPlaces(c: Case, asked: Asked, axis: 'depths' | 'radii', time: number): Curve {
  return {
    sample(places) {
      const input = { ...asked, [axis]: places, times: [time], outputs: ['temperature'] }
      const { values, bound } = c.solve(c.resolve(input)).outputs.temperature!
      const row = (values as number[][])[0]!
      return { values: row, bounds: row.map((value) => errorOf(bound, value)) }
    },
  }
}
