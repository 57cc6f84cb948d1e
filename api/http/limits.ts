import { createHash } from 'node:crypto'
import { type RateLimitRequestHandler, type Store, ipKeyGenerator, rateLimit } from 'express-rate-limit'
import type pg from 'pg'
import type { LimiterName } from '../operation.ts'
import { Problem } from '../problems.ts'

/** Limits of who or what is asked for, beside those of the address that asks. */
type SubjectName = 'mail'
export type Limits = Readonly<Record<LimiterName | SubjectName, { windowSeconds: number; limit: number }>>

/** Calls of one address, where an IPv6 address counts with its /56 network; and sign-ins of one mail address. */
export const defaultLimits: Limits = {
  'sign-up': { windowSeconds: 3600, limit: 20 },
  'sign-in': { windowSeconds: 900, limit: 30 },
  'staff-sign-in': { windowSeconds: 900, limit: 20 },
  'leak-report': { windowSeconds: 900, limit: 100 },
  try: { windowSeconds: 60, limit: 300 },
  mail: { windowSeconds: 900, limit: 50 },
}

const count = {
  name: 'count-hit',
  text: `
    INSERT INTO rate_limits AS r (key, hits, resets_at) VALUES ($1, 1, now() + $2 * interval '1 second')
    ON CONFLICT (key) DO UPDATE SET
      hits = CASE WHEN r.resets_at <= now() THEN 1 ELSE r.hits + 1 END,
      resets_at = CASE WHEN r.resets_at <= now() THEN excluded.resets_at ELSE r.resets_at END
    RETURNING hits, resets_at`,
}

/** Counters that all processes share. */
export function createStore(pool: pg.Pool, name: string, windowSeconds: number): Store {
  const keyOf = (key: string) => `${name} ${key}`
  return {
    localKeys: false,
    async increment(key) {
      const { rows } = await pool.query({ ...count, values: [keyOf(key), windowSeconds] })
      return { totalHits: rows[0].hits, resetTime: rows[0].resets_at }
    },
    async decrement(key) {
      await pool.query('UPDATE rate_limits SET hits = greatest(hits - 1, 0) WHERE key = $1', [keyOf(key)])
    },
    async resetKey(key) {
      await pool.query('DELETE FROM rate_limits WHERE key = $1', [keyOf(key)])
    },
  }
}

/** Counters that have run out serve nobody any more. */
export async function pruneLimits(pool: pg.Pool): Promise<void> {
  await pool.query('DELETE FROM rate_limits WHERE resets_at < now()')
}

/** Counts one more call about a subject, known or not, or refuses it. The subject is kept as a hash only. */
export async function countSubject({ pool, limits }: Counting, name: SubjectName, subject: string): Promise<void> {
  const { windowSeconds, limit } = limits[name]
  const key = createHash('sha256').update(subject).digest('base64url')
  const { totalHits, resetTime } = await createStore(pool, name, windowSeconds).increment(key)
  if (totalHits <= limit) return
  const seconds = Math.max(1, Math.ceil(((resetTime?.getTime() ?? 0) - Date.now()) / 1000))
  throw new Problem('rate-limited', undefined, { headers: { 'Retry-After': String(seconds) } })
}

interface Counting {
  pool: pg.Pool
  limits: Limits
}

export function createLimiter(pool: pg.Pool, name: LimiterName, limits: Limits): RateLimitRequestHandler {
  const { windowSeconds, limit } = limits[name]
  return rateLimit({
    windowMs: windowSeconds * 1000,
    limit,
    identifier: name,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    store: createStore(pool, name, windowSeconds),
    /* Which proxies are trusted is a setting, checked with the others. */
    validate: { xForwardedForHeader: false },
    keyGenerator: (req) => ipKeyGenerator(req.ip ?? '', 56),
    handler: (_req, _res, next) => next(new Problem('rate-limited')),
  })
}
