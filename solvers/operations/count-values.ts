import { type Case, type Resolved, countOfPlaces } from '../case.ts'
import type { OutputName, Shape } from '../outputs.ts'
import { answeredShape } from './solve-schemas.ts'

/** How many numbers an input asks for, each output weighed by what a number of it costs. */
export function countValues(
  c: Case,
  input: Resolved,
  costOf: (name: OutputName) => number = () => 1,
  parameters = 0,
): number {
  const places = countOfPlaces(input)
  const counts: Record<Shape, number> = {
    grid: input.times.length * places,
    grids: input.times.length * (c.places === 'none' ? 1 : places) * parameters,
    times: input.times.length,
    places,
    single: 1,
  }
  return input.outputs.reduce((sum, name) => sum + costOf(name) * counts[answeredShape(c, name)], 0)
}
