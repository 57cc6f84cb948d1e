import type pg from 'pg'
import type { Environment } from '../keys/key.ts'
import { type Charge, type Counters, type Decision, grant } from './grant.ts'

export interface Charged {
  decision: Decision
  /** The instants at which the next period and the next minute begin, and the database's now. */
  resetsAt: Date
  minuteEnds: Date
  now: Date
}

/* The day given, or the database's own. */
const DAY = `coalesce($2::date, (now() AT TIME ZONE 'UTC')::date)`

/*
 * The counters of each key, locked in (account, key) order and the account's calls first, so that two transactions
 * never wait for each other. A transaction that waited here may be of the minute before: the later minute counts.
 */
const lockCounters = {
  name: 'lock-counters',
  text: `
    SELECT k.account_id, k.id AS key_id, k.environment, ${DAY}::text AS day, p.period::text AS period,
      p."limit", p.used, kp."limit" AS key_limit, kp.used AS key_used,
      a.rate, ra.calls, ra.minute, k.rate AS key_rate, rk.calls AS key_calls, rk.minute AS key_minute,
      date_trunc('minute', now()) AS this_minute, clock_timestamp() AS now, period_end(k.environment, ${DAY}) AS resets_at
    FROM keys k JOIN accounts a ON a.id = k.account_id
    JOIN rates ra ON ra.subject = k.account_id JOIN rates rk ON rk.subject = k.id
    JOIN key_periods kp ON kp.key_id = k.id AND kp.period = period_of(k.environment, ${DAY})
    JOIN periods p ON p.account_id = k.account_id AND p.environment = k.environment AND p.period = kp.period
    WHERE k.id = ANY($1)
    ORDER BY k.account_id, k.id
    FOR UPDATE OF ra, p, kp, rk`,
}

interface Row extends Record<'account_id' | 'key_id' | 'day' | 'period' | 'limit' | 'used' | 'key_used', string> {
  environment: Environment
  key_limit: string | null
  rate: number
  calls: number
  key_rate: number | null
  key_calls: number
  minute: Date
  key_minute: Date
  this_minute: Date
  now: Date
  resets_at: Date
}

const open = [
  {
    name: 'open-rates',
    takesDay: false,
    text: `
      INSERT INTO rates (subject, minute)
      SELECT subject, date_trunc('minute', now()) FROM keys, unnest(ARRAY[account_id, id]) AS s(subject)
      WHERE id = ANY($1)
      GROUP BY subject ORDER BY subject ON CONFLICT DO NOTHING`,
  },
  {
    name: 'open-periods',
    takesDay: true,
    text: `
      INSERT INTO periods (account_id, environment, period, "limit")
      SELECT DISTINCT a.id, k.environment, period_of(k.environment, ${DAY}),
        CASE k.environment WHEN 'trial' THEN a.trial_limit ELSE a.metered_limit END
      FROM keys k JOIN accounts a ON a.id = k.account_id WHERE k.id = ANY($1) ORDER BY a.id, k.environment
      ON CONFLICT DO NOTHING`,
  },
  {
    name: 'open-key-periods',
    takesDay: true,
    text: `
      INSERT INTO key_periods (key_id, period, "limit")
      SELECT id, period_of(environment, ${DAY}), quota FROM keys WHERE id = ANY($1) ORDER BY account_id, id
      ON CONFLICT DO NOTHING`,
  },
]

/* All that granted calls change, as one statement. */
const record = {
  name: 'record-charges',
  text: `
    WITH spent AS MATERIALIZED (
      SELECT * FROM unnest($2::text[], $3::text[], $4::text[], $5::text[], $6::date[], $7::text[], $8::bigint[], $9::timestamptz[], $10::bool[], $12::text[])
        AS s(request_id, account_id, key_id, environment, period, case_id, points, at, open, reference)),
    counted AS (
      UPDATE rates r SET minute = $1, calls = CASE WHEN r.minute = $1 THEN r.calls ELSE 0 END + c.calls
      FROM (SELECT subject, count(*) AS calls FROM spent, unnest(ARRAY[account_id, key_id]) AS s(subject) GROUP BY subject) c
      WHERE r.subject = c.subject),
    entered AS (
      INSERT INTO ledger (day, request_id, kind, account_id, key_id, environment, case_id, points, at, reference)
      SELECT $11::date, request_id, 'charge', account_id, key_id, environment, case_id, points, coalesce(at, now()), reference
      FROM spent WHERE points > 0),
    opened AS (INSERT INTO open_charges (request_id) SELECT request_id FROM spent WHERE open),
    by_key AS (
      UPDATE key_periods kp SET used = kp.used + s.points
      FROM (SELECT key_id, period, sum(points) AS points FROM spent GROUP BY key_id, period) s
      WHERE kp.key_id = s.key_id AND kp.period = s.period AND s.points > 0)
    UPDATE periods p SET used = p.used + s.points
    FROM (SELECT account_id, environment, period, sum(points) AS points FROM spent GROUP BY account_id, environment, period) s
    WHERE p.account_id = s.account_id AND p.environment = s.environment AND p.period = s.period AND s.points > 0`,
}

const MINUTE = 60_000

/** Spends for many calls in the transaction of `client`. `day` is that of the entries; the database's own unless given. */
export async function chargeAll(client: pg.ClientBase, charges: readonly Charge[], day?: string): Promise<Charged[]> {
  const rows = await lockOrOpen(client, [[...new Set(charges.map((c) => c.keyId))], day ?? null])
  const minute = Math.max(...rows.flatMap((r) => [r.this_minute, r.minute, r.key_minute].map(Number)))
  const decisions = grant(
    charges,
    rows.map((row) => toCounters(row, minute)),
  )
  const byKey = new Map(rows.map((row) => [row.key_id, row]))
  const rowOf = (charge: Charge) => byKey.get(charge.keyId) as Row
  const granted = charges.filter((_, i) => decisions[i]?.granted)
  if (granted.length > 0) await client.query({ ...record, values: valuesOf(granted, rowOf, minute) })
  const minuteEnds = new Date(minute + MINUTE)
  return charges.map((charge, i) => {
    const { resets_at: resetsAt, now } = rowOf(charge)
    return { decision: decisions[i] as Decision, resetsAt, minuteEnds, now }
  })
}

async function lockOrOpen(client: pg.ClientBase, values: [string[], string | null]): Promise<Row[]> {
  const locked = await client.query<Row>({ ...lockCounters, values })
  if (locked.rows.length === values[0].length) return locked.rows
  for (const { name, text, takesDay } of open)
    await client.query({ name, text, values: takesDay ? values : values.slice(0, 1) })
  return (await client.query<Row>({ ...lockCounters, values })).rows
}

function toCounters(row: Row, minute: number): Counters {
  const callsIn = (calls: number, at: Date) => (at.getTime() === minute ? calls : 0)
  return {
    accountId: row.account_id,
    keyId: row.key_id,
    environment: row.environment,
    points: {
      account: { limit: Number(row.limit), used: Number(row.used) },
      key: { limit: Number(row.key_limit ?? Infinity), used: Number(row.key_used) },
    },
    calls: {
      account: { limit: row.rate, used: callsIn(row.calls, row.minute) },
      key: { limit: row.key_rate ?? Infinity, used: callsIn(row.key_calls, row.key_minute) },
    },
  }
}

function valuesOf(charges: readonly Charge[], rowOf: (charge: Charge) => Row, minute: number): unknown[] {
  const rows = charges.map(rowOf)
  const column = <K extends keyof Charge>(name: K) => charges.map((c) => c[name] ?? null)
  return [
    new Date(minute),
    ...[column('requestId'), column('accountId'), column('keyId')],
    ...[rows.map((row) => row.environment), rows.map((row) => row.period)],
    ...[column('caseId'), column('points'), column('at'), charges.map((c) => c.open === true)],
    rows[0]?.day,
    column('reference'),
  ]
}
