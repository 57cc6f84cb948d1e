import type pg from 'pg'
import type { z } from 'zod'
import type { Environment } from '../keys/key.ts'
import { DomainError } from '../../solvers/errors.ts'
import { invalidParameter } from '../problems.ts'
import { FIRST_DAY } from '../texts.ts'
import { accountStatus } from './account-status.ts'
import type { Group, usageQuery } from './schemas.ts'

const MAX_DAYS = 400
const DAY = 86_400_000
const columns: Record<Group, string> = {
  day: 'day',
  key: 'key_id',
  case: 'case_id',
  environment: 'environment',
  reference: 'reference',
}

const usage = (groups: readonly Group[]) => {
  const by = groups.map((group) => columns[group]).join(', ')
  return `
    SELECT ${by}, sum(calls)::int AS calls, sum(points)::bigint AS points, sum(refused)::int AS refused
      ${groups.includes('key') ? ', (SELECT name FROM keys k WHERE k.id = u.key_id) AS key_name' : ''}
    FROM (
      SELECT day::text, key_id, case_id, environment, reference, sum(CASE kind WHEN 'charge' THEN 1 ELSE -1 END) AS calls,
        sum(points) AS points, 0 AS refused
      FROM ledger WHERE account_id = $1 AND day BETWEEN $2 AND $3 GROUP BY day, key_id, case_id, environment, reference
      UNION ALL
      SELECT (at AT TIME ZONE 'UTC')::date::text, g.key_id, g.case_id, k.environment, g.reference, 0, 0, count(*)
      FROM log g LEFT JOIN keys k ON k.id = g.key_id WHERE g.account_id = $1 AND status >= 400 AND status <> 499
        AND at >= $2::date::timestamp AT TIME ZONE 'UTC' AND at < ($3::date + 1)::timestamp AT TIME ZONE 'UTC'
      GROUP BY 1, 2, 3, 4, 5
    ) u
    GROUP BY ${by} ORDER BY ${by}`
}

/** Usage of an account from the ledger, and its refused calls from the log. */
export async function readUsage(pool: pg.Pool, accountId: string, query: z.output<typeof usageQuery>) {
  const now = await pool.query("SELECT now() AS now, (now() AT TIME ZONE 'UTC')::date::text AS today")
  const { from, to } = rangeOf(query, now.rows[0].today)
  const groups = [...new Set(query.groupBy.split(','))] as Group[]
  const [status, result] = await Promise.all([
    accountStatus(pool, accountId),
    pool.query(usage(groups), [accountId, from, to]),
  ])
  const rows = result.rows.map((row) => ({
    ...(groups.includes('day') ? { day: row.day as string } : {}),
    ...(groups.includes('key') ? { keyId: row.key_id as string | null, keyName: row.key_name as string | null } : {}),
    ...(groups.includes('case') ? { case: row.case_id as string | null } : {}),
    ...(groups.includes('environment') ? { environment: row.environment as Environment | null } : {}),
    ...(groups.includes('reference') ? { reference: row.reference as string | null } : {}),
    calls: row.calls as number,
    points: Number(row.points),
    refused: row.refused as number,
  }))
  const sum = (name: 'calls' | 'points' | 'refused') => rows.reduce((total, row) => total + row[name], 0)
  const total = { calls: sum('calls'), points: sum('points'), refused: sum('refused') }
  return { from, to, asOf: now.rows[0].now.toISOString(), groupBy: groups, account: status, rows, total }
}

function rangeOf(
  query: { from?: string | undefined; to?: string | undefined },
  today: string,
): { from: string; to: string } {
  const to = query.to ?? today
  const monthBefore = new Date(Date.parse(to) - 29 * DAY).toISOString().slice(0, 10)
  const from = query.from ?? (monthBefore < FIRST_DAY ? FIRST_DAY : monthBefore)
  const days = (Date.parse(to) - Date.parse(from)) / DAY + 1
  if (days >= 1 && days <= MAX_DAYS) return { from, to }
  const detail = days < 1 ? 'from is later than to.' : `The range has ${days} days.`
  throw invalidParameter(
    new DomainError([
      { pointer: '#/from', code: 'out-of-range', detail, accepted: `at most ${MAX_DAYS} days, ending with to` },
    ]).issues,
  )
}
