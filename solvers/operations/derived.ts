import type { Case, Resolved } from '../case.ts'
import { DomainError } from '../errors.ts'
import { lastPlaces } from '../math/rounding.ts'
import type { OutputName } from '../outputs.ts'
import { stencilOf } from '../rate.ts'
import type { Output, Solution } from '../solution.ts'
import { courseOf } from './course.ts'
import type { Read } from './places.ts'
import { refuseSensitivities, type Sensitivities, sensitivitiesOf } from './sensitivities/sensitivities.ts'

/* Outputs that follow from the temperatures of any case; the cases know nothing of them. */

/** Refuses what there is none of: a rate at the change itself, and where what drives the case changes its law. */
export function refuseDerived(c: Case, asked: Read, input: Resolved): void {
  if (input.outputs.includes('rate')) refuseRate(c, input)
  if (input.outputs.includes('sensitivities')) refuseSensitivities(c, asked)
}

function refuseRate(c: Case, input: Resolved): void {
  const { instants } = courseOf(c, { ...input }, input)
  const issues = input.times.flatMap((time, i) => {
    if (!(time === 0 && !c.clock) && !instants.includes(time)) return []
    const detail = 'The temperature has no one rate at the time at which what drives it changes.'
    return [{ pointer: `#/times/${i}`, code: 'no-rate-at-change' as const, detail, accepted: 'a time before or after' }]
  })
  if (issues.length > 0) throw new DomainError(issues)
}

const derived: readonly OutputName[] = ['rate', 'sensitivities']

/** The solution of a case with what follows from it. */
export interface WithDerived extends Omit<Solution, 'outputs'> {
  outputs: Partial<Record<OutputName, Output | Sensitivities>>
}

export function solveWithDerived(c: Case, asked: Read, input: Resolved): WithDerived {
  const own = input.outputs.filter((name) => !derived.includes(name))
  if (own.length === input.outputs.length) return c.solve(input)
  const solution = c.solve({ ...input, outputs: own })
  return {
    ...solution,
    outputs: {
      ...solution.outputs,
      ...(input.outputs.includes('rate') ? { rate: rateOf(c, input) } : {}),
      ...(input.outputs.includes('sensitivities') ? { sensitivities: sensitivitiesOf(c, asked) } : {}),
    },
  }
}

function rateOf(c: Case, input: Resolved): Output {
  const { instants, period } = courseOf(c, { ...input }, input)
  const changes = [...(c.clock ? [] : [0]), ...instants]
  const { asked, slope } = stencilOf(input.times, (t) => {
    const room = changes.reduce((least, change) => Math.min(least, Math.abs(t - change)), Infinity)
    return Math.min(room, period ?? Infinity) / 8
  })
  const { values, bound } = c.solve({ ...input, times: asked, outputs: ['temperature'] }).outputs.temperature!
  const rows = values as number[][] | number[]
  const worst = { absolute: 0, relative: 0 }
  const at = (i: number, valueAt: (k: number) => number): number => {
    const { value, error } = slope(i, valueAt, bound.absolute)
    worst.absolute = Math.max(worst.absolute, error + lastPlaces(value))
    return value
  }
  const placed = Array.isArray(rows[0])
  const rates = input.times.map((_, i) =>
    placed
      ? (rows as number[][])[0]!.map((__, j) => at(i, (k) => (rows as number[][])[k]![j]!))
      : at(i, (k) => (rows as number[])[k]!),
  )
  return { values: rates as Output['values'], bound: worst }
}
