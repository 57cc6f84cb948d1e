export interface Charge {
  requestId: string
  accountId: string
  keyId: string
  caseId: string
  points: number
  /** Charged before the work: refunded unless it is closed when the answer is there. */
  open?: boolean
  /** The instant of the entry where it is not now; only a seed gives one. */
  at?: Date
}

/** A locked pair of counters: the account's and one of its keys'. */
export interface Counters {
  accountId: string
  keyId: string
  limit: number
  used: number
  keyLimit: number | null
  keyUsed: number
}

export type Decision =
  { granted: true; remaining: number } | { granted: false; level: 'account' | 'key'; limit: number; remaining: number }

/** Grants charges in the order they came, each only if account and key both allow; a refusal consumes nothing. */
export function grant(charges: readonly Charge[], counters: readonly Counters[]): Decision[] {
  const accounts = new Map(counters.map((c) => [c.accountId, { limit: c.limit, used: c.used }]))
  const keys = new Map(counters.map((c) => [c.keyId, { limit: c.keyLimit ?? Infinity, used: c.keyUsed }]))
  return charges.map(({ accountId, keyId, points }) => {
    const account = accounts.get(accountId)
    const key = keys.get(keyId)
    if (!account || !key) throw new Error(`no counters for ${keyId}`)
    if (account.used + points > account.limit)
      return {
        granted: false,
        level: 'account',
        limit: account.limit,
        remaining: Math.max(0, account.limit - account.used),
      }
    if (key.used + points > key.limit)
      return { granted: false, level: 'key', limit: key.limit, remaining: Math.max(0, key.limit - key.used) }
    account.used += points
    key.used += points
    return { granted: true, remaining: Math.min(account.limit - account.used, key.limit - key.used) }
  })
}
