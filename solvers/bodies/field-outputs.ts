import { type Estimate, lastPlaces, type Method, TINY } from '../math/rounding.ts'
import type { OutputName, Shape } from '../outputs.ts'
import type { Bound, Output, Solution } from '../solution.ts'

/** How one output is found, at time i and place j; a value that has no time or no place ignores it. */
export interface Field {
  shape: Exclude<Shape, 'grids'>
  /** How the bound is told: fractions and what follows one drive alone keep their digits however small they are. */
  bound: 'absolute' | 'relative'
  at(i: number, j: number): Estimate
}

export const grid = (at: Field['at'], bound: Field['bound'] = 'absolute'): Field => ({ shape: 'grid', bound, at })
export const history = (at: (i: number) => Estimate, bound: Field['bound'] = 'absolute'): Field => ({
  shape: 'times',
  bound,
  at,
})
export const profile = (at: (j: number) => Estimate, bound: Field['bound'] = 'absolute'): Field => ({
  shape: 'places',
  bound,
  at: (_, j) => at(j),
})
export const constant = (at: () => Estimate, bound: Field['bound'] = 'absolute'): Field => ({
  shape: 'single',
  bound,
  at,
})

/** Each output asked for, with the largest error over its values as its bound. For bodies with more than one drive. */
export function fieldOutputs(
  asked: { times: readonly number[]; places: number | undefined; outputs: readonly OutputName[] },
  fields: Partial<Record<OutputName, Field>>,
): Pick<Solution, 'outputs' | 'methods'> {
  const methods = new Set<Method>()
  const outputs: Solution['outputs'] = {}
  for (const name of asked.outputs) {
    const field = fields[name]
    if (!field) continue
    const bound: Bound = { absolute: 0, relative: 0 }
    const collect = (i: number, j: number): number => {
      const { value, error, method } = field.at(i, j)
      methods.add(method)
      const own = error + lastPlaces(value)
      if (field.bound === 'relative' && Math.abs(value) > 1e10 * TINY)
        bound.relative = Math.max(bound.relative, own / Math.abs(value))
      else bound.absolute = Math.max(bound.absolute, own)
      return value + 0 // never −0
    }
    outputs[name] = { values: fill(field.shape, asked, collect), bound }
  }
  return { outputs, methods: [...methods] }
}

function fill(
  shape: Field['shape'],
  { times, places }: { times: readonly number[]; places: number | undefined },
  collect: (i: number, j: number) => number,
): Output['values'] {
  const along = (count: number, at: (k: number) => number) => Array.from({ length: count }, (_, k) => at(k))
  if (shape === 'single') return collect(0, 0)
  if (shape === 'times' || (shape === 'grid' && places === undefined)) return along(times.length, (i) => collect(i, 0))
  if (shape === 'places') return places === undefined ? collect(0, 0) : along(places, (j) => collect(0, j))
  return times.map((_, i) => along(places!, (j) => collect(i, j)))
}
