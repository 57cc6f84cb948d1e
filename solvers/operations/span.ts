import type { Case } from '../case.ts'
import { DomainError, type Issue } from '../errors.ts'
import { quantity } from '../statement/quantity.ts'
import type { Course } from './curve/grid.ts'

/* The span of time that is looked at. */

export const seconds = (label: string, hint: string, min = 0) =>
  quantity({ symbol: 't', unit: 's', label, min, max: 1e17, typical: [60, 1e8], hint })

export const untilNeeded: Issue = {
  pointer: '#/until',
  code: 'missing-field',
  detail: 'What drives the case goes on changing; until says how long to look.',
  accepted: 'a time in s, within the history where there is one',
}

/** So many periods are looked at in one call: a year of days, in about half a second. */
const MOST_PERIODS = 400

export function refuseLongCycles({ period }: Course, from: number, until: number | undefined): void {
  if (period === undefined || until === undefined || until - from <= MOST_PERIODS * period) return
  const accepted = `at most ${MOST_PERIODS} periods, ${MOST_PERIODS * period} s`
  const detail = `The span holds ${Math.ceil((until - from) / period)} periods.`
  throw new DomainError([{ pointer: '#/until', code: 'out-of-range', detail, accepted }])
}

/** About how many values a curve is looked at by over a span, in those of a weight of 1. */
export function work(c: Case, { instants, period }: Course, span = 0): number {
  const periods = period === undefined ? 0 : Math.ceil(span / period)
  return Math.min(MOST_WORK, c.weight * (400 + 8 * instants.length + 100 * periods))
}
/** Below what a call without a key may ask for. */
const MOST_WORK = 10_000
