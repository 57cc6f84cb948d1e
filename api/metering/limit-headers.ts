import type { Charged } from './charge.ts'
import type { Level } from './grant.ts'

const WINDOW = 60

/** Whole seconds until an instant, at least 1. */
export const secondsUntil = (end: Date, now: Date) => Math.max(1, Math.ceil((end.getTime() - now.getTime()) / 1000))

/** What a call left of its limits, as headers: the one place that knows the form of the draft for RateLimit. */
export function limitHeaders({ decision, minuteEnds, now }: Charged): Record<string, string> {
  const { calls, points } = decision.standing
  const each = Object.entries(calls) as [Level, { limit: number; left: number }][]
  const list = (item: (level: Level, of: { limit: number; left: number }) => string) =>
    each.map(([level, of]) => item(level, of)).join(', ')
  return {
    'RateLimit-Policy': list((level, { limit }) => `"${level}";q=${limit};w=${WINDOW}`),
    RateLimit: list((level, { left }) => `"${level}";r=${left};t=${secondsUntil(minuteEnds, now)}`),
    'Points-Remaining': String(points),
  }
}
