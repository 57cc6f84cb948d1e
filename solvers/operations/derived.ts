import type { Case, Resolved } from '../case.ts'
import { DomainError } from '../errors.ts'
import { lastPlaces } from '../math/rounding.ts'
import { stencilOf } from '../rate.ts'
import type { Output, Solution } from '../solution.ts'
import { courseOf } from './course.ts'

/* Outputs that follow from the temperatures of any case; the cases know nothing of them. */

/** Refuses a rate where there is none: at the change itself, and where what drives the case changes its law. */
export function refuseDerived(c: Case, input: Resolved): void {
  if (!input.outputs.includes('rate')) return
  const { instants } = courseOf(c, { ...input }, input)
  const issues = input.times.flatMap((time, i) => {
    if (!(time === 0 && !c.clock) && !instants.includes(time)) return []
    const detail = 'The temperature has no one rate at the time at which what drives it changes.'
    return [{ pointer: `#/times/${i}`, code: 'no-rate-at-change' as const, detail, accepted: 'a time before or after' }]
  })
  if (issues.length > 0) throw new DomainError(issues)
}

/** The solution of a case with what follows from it. */
export function solveWithDerived(c: Case, input: Resolved): Solution {
  if (!input.outputs.includes('rate')) return c.solve(input)
  const own = c.solve({ ...input, outputs: input.outputs.filter((name) => name !== 'rate') })
  return { ...own, outputs: { ...own.outputs, rate: rateOf(c, input) } }
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
