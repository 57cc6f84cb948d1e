import type pg from 'pg'
import { type Charge, type Counters, type Decision, grant } from './grant.ts'

export interface Charged {
  decision: Decision
  /** First day of the period, and the instant at which the next begins. */
  period: string
  resetsAt: Date
}

/* The day given, or the database's own. */
const DAY = `coalesce($2::date, (now() AT TIME ZONE 'UTC')::date)`

/* Both counters of each key, locked in (account, key) order, so that two transactions never wait for each other. */
const lockCounters = {
  name: 'lock-counters',
  text: `
    SELECT p.account_id, kp.key_id, p."limit", p.used, kp."limit" AS key_limit, kp.used AS key_used,
      p.period::text AS period, ((p.period + 1)::timestamp AT TIME ZONE 'UTC') AS resets_at
    FROM key_periods kp JOIN keys k ON k.id = kp.key_id
    JOIN periods p ON p.account_id = k.account_id AND p.environment = k.environment AND p.period = kp.period
    WHERE kp.key_id = ANY($1) AND kp.period = ${DAY}
    ORDER BY p.account_id, kp.key_id
    FOR UPDATE OF p, kp`,
}

const openPeriods = {
  name: 'open-periods',
  text: `
    INSERT INTO periods (account_id, environment, period, "limit")
    SELECT DISTINCT a.id, k.environment, ${DAY}, a.trial_limit
    FROM keys k JOIN accounts a ON a.id = k.account_id WHERE k.id = ANY($1) ORDER BY a.id
    ON CONFLICT DO NOTHING`,
}

const openKeyPeriods = {
  name: 'open-key-periods',
  text: `
    INSERT INTO key_periods (key_id, period, "limit")
    SELECT id, ${DAY}, quota FROM keys WHERE id = ANY($1) ORDER BY account_id, id
    ON CONFLICT DO NOTHING`,
}

const addUsed = {
  name: 'add-used',
  text: `
    WITH spent AS (SELECT account_id, key_id, sum(points) AS points
                   FROM unnest($2::text[], $3::text[], $4::bigint[]) AS s(account_id, key_id, points)
                   GROUP BY account_id, key_id),
    by_key AS (UPDATE key_periods kp SET used = kp.used + s.points
               FROM spent s WHERE kp.key_id = s.key_id AND kp.period = $1)
    UPDATE periods p SET used = p.used + s.points
    FROM (SELECT account_id, sum(points) AS points FROM spent GROUP BY account_id) s
    WHERE p.account_id = s.account_id AND p.environment = 'trial' AND p.period = $1`,
}

const addEntries = {
  name: 'add-entries',
  text: `
    INSERT INTO ledger (period, request_id, kind, account_id, key_id, environment, case_id, points, at)
    SELECT $1, request_id, 'charge', account_id, key_id, 'trial', case_id, points, coalesce(at, now())
    FROM unnest($2::text[], $3::text[], $4::text[], $5::text[], $6::bigint[], $7::timestamptz[])
      AS e(request_id, account_id, key_id, case_id, points, at)`,
}

const openCharges = {
  name: 'open-charges',
  text: 'INSERT INTO open_charges (request_id) SELECT unnest($1::text[])',
}

/** Spends for many calls in the transaction of `client`. `day` is the period; the database's own day unless given. */
export async function chargeAll(client: pg.ClientBase, charges: readonly Charge[], day?: string): Promise<Charged[]> {
  const rows = await lockOrOpen(client, [[...new Set(charges.map((c) => c.keyId))], day ?? null])
  const { period, resets_at: resetsAt } = rows[0] as { period: string; resets_at: Date }
  const decisions = grant(charges, rows.map(toCounters))
  const granted = charges.filter((_, i) => decisions[i]?.granted)
  if (granted.length > 0) await record(client, period, granted)
  return decisions.map((decision) => ({ decision, period, resetsAt }))
}

async function lockOrOpen(client: pg.ClientBase, values: [string[], string | null]): Promise<Row[]> {
  const locked = await client.query<Row>({ ...lockCounters, values })
  if (locked.rows.length === values[0].length) return locked.rows
  await client.query({ ...openPeriods, values })
  await client.query({ ...openKeyPeriods, values })
  return (await client.query<Row>({ ...lockCounters, values })).rows
}

type Row = Record<'account_id' | 'key_id' | 'limit' | 'used' | 'key_used' | 'period', string> & {
  key_limit: string | null
  resets_at: Date
}

const toCounters = (row: Row): Counters => ({
  accountId: row.account_id,
  keyId: row.key_id,
  limit: Number(row.limit),
  used: Number(row.used),
  keyLimit: row.key_limit === null ? null : Number(row.key_limit),
  keyUsed: Number(row.key_used),
})

async function record(client: pg.ClientBase, period: string, charges: readonly Charge[]): Promise<void> {
  const column = <K extends keyof Charge>(name: K) => charges.map((c) => c[name] ?? null)
  await client.query({ ...addUsed, values: [period, column('accountId'), column('keyId'), column('points')] })
  const names = ['requestId', 'accountId', 'keyId', 'caseId', 'points', 'at'] as const
  await client.query({ ...addEntries, values: [period, ...names.map(column)] })
  const open = charges.filter((c) => c.open).map((c) => c.requestId)
  if (open.length > 0) await client.query({ ...openCharges, values: [open] })
}
