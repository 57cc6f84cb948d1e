import type { Environment } from '../keys/key.ts'

export interface Charge {
  requestId: string
  accountId: string
  keyId: string
  caseId?: string
  reference?: string
  /** 0 for a call that only counts as one. */
  points: number
  /** Charged before the work: refunded unless it is closed when the answer is there. */
  open?: boolean
  /** The instant of the entry where it is not now; only a seed gives one. */
  at?: Date
}

/** What is used of a limit; an absent limit has no end. */
export interface Tally {
  limit: number
  used: number
}

/** The locked counters of a key and its account: points of the period, and calls of the minute. */
export interface Counters {
  accountId: string
  keyId: string
  environment: Environment
  points: { account: Tally; key: Tally }
  calls: { account: Tally; key: Tally }
}

export type Level = 'account' | 'key'

/** Where a call leaves its key and account. */
export interface Standing {
  /** Points that are left to the key. */
  points: number
  /** Calls of the minute: the limit, and what is left. The key's only where it has a limit of its own. */
  calls: Partial<Record<Level, { limit: number; left: number }>>
}

export type Decision = { standing: Standing } & (
  { granted: true } | { granted: false; of: 'points' | 'calls'; level: Level; limit: number; left: number }
)

const levels = ['account', 'key'] as const
const left = ({ limit, used }: Tally) => Math.max(0, limit - used)

/** Grants charges in the order they came, each only if every limit allows; a refusal consumes nothing. */
export function grant(charges: readonly Charge[], counters: readonly Counters[]): Decision[] {
  const byKey = new Map(shared(counters).map((c) => [c.keyId, c]))
  return charges.map(({ keyId, points }) => {
    const c = byKey.get(keyId)
    if (!c) throw new Error(`no counters for ${keyId}`)
    const wanted = { calls: 1, points }
    for (const of of ['calls', 'points'] as const)
      for (const level of levels) {
        const tally = c[of][level]
        if (wanted[of] === 0 || tally.used + wanted[of] <= tally.limit) continue
        return { granted: false, of, level, limit: tally.limit, left: left(tally), standing: standingOf(c) }
      }
    for (const level of levels) {
      c.calls[level].used += 1
      c.points[level].used += points
    }
    return { granted: true, standing: standingOf(c) }
  })
}

/* The keys of an account share its counters: its calls all of them, its points those of one environment. */
function shared(counters: readonly Counters[]): Counters[] {
  const tallies = new Map<string, Tally>()
  const one = (name: string, tally: Tally) => {
    const known = tallies.get(name) ?? { ...tally }
    tallies.set(name, known)
    return known
  }
  return counters.map((c) => ({
    ...c,
    points: { account: one(`${c.accountId} ${c.environment}`, c.points.account), key: { ...c.points.key } },
    calls: { account: one(c.accountId, c.calls.account), key: { ...c.calls.key } },
  }))
}

function standingOf({ points, calls }: Counters): Standing {
  const limited = levels.filter((level) => calls[level].limit !== Infinity)
  return {
    points: Math.min(left(points.account), left(points.key)),
    calls: Object.fromEntries(limited.map((level) => [level, { limit: calls[level].limit, left: left(calls[level]) }])),
  }
}
