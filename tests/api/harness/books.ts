import { setTimeout as sleep } from 'node:timers/promises'
import { expect } from 'vitest'
import { query } from './people.ts'

/* Each call's points in the log are what it left in the ledger; each charge has its row. */
const calls = `
  SELECT coalesce(l.request_id, g.id) AS call, l.points::int AS ledger, g.points::int AS log
  FROM (SELECT request_id, sum(points) AS points FROM ledger WHERE account_id = $1 GROUP BY request_id) l
  FULL JOIN (SELECT id, points FROM log WHERE account_id = $1) g ON g.id = l.request_id
  WHERE g.points IS DISTINCT FROM coalesce(l.points, 0)`

const counters = `
  WITH sums AS (SELECT account_id, environment, key_id, period_of(environment, day) AS period, sum(points) AS points
                FROM ledger WHERE account_id = $1 GROUP BY account_id, environment, key_id, 4),
  keys_used AS (SELECT kp.key_id, kp.period, kp.used FROM key_periods kp JOIN keys k ON k.id = kp.key_id
                WHERE k.account_id = $1)
  SELECT 'account' AS counter, period::text, u.used::int, s.points::int AS ledger
  FROM (SELECT environment, period, used FROM periods WHERE account_id = $1) u
  FULL JOIN (SELECT environment, period, sum(points) AS points FROM sums GROUP BY environment, period) s
    USING (environment, period)
  WHERE u.used IS DISTINCT FROM coalesce(s.points, 0)
  UNION ALL
  SELECT key_id, period::text, u.used::int, s.points::int FROM keys_used u FULL JOIN sums s USING (key_id, period)
  WHERE u.used IS DISTINCT FROM coalesce(s.points, 0)`

/** Expects that log, ledger and both counters of an account agree. Rows of the log may come a little later. */
export async function expectBooks(databaseUrl: string, accountId: string, { logged = true } = {}): Promise<void> {
  expect(await query(databaseUrl, counters, [accountId])).toEqual([])
  if (!logged) return
  for (let tries = 0; tries < 50; tries++) {
    if ((await query(databaseUrl, calls, [accountId])).length === 0) return
    await sleep(100)
  }
  expect(await query(databaseUrl, calls, [accountId])).toEqual([])
}
