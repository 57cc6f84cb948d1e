import type pg from 'pg'
import { instantOf } from '../ids.ts'

const DAY = 86_400_000

/* Account before key, as charges lock them. */
const lockForRefund = {
  name: 'lock-for-refund',
  text: `
    SELECT l.day::text AS day FROM ledger l
    JOIN key_periods kp ON kp.key_id = l.key_id AND kp.period = period_of(l.environment, l.day)
    JOIN periods p ON p.account_id = l.account_id AND p.environment = l.environment AND p.period = kp.period
    WHERE l.request_id = $1 AND l.kind = 'charge' AND l.day = ANY($2::date[])
    FOR UPDATE OF p, kp`,
}

const giveBack = {
  name: 'give-back',
  text: `
    WITH refund AS (
      INSERT INTO ledger (day, request_id, kind, account_id, key_id, environment, case_id, points, reference)
      SELECT day, request_id, 'refund', account_id, key_id, environment, case_id, -coalesce($3::bigint, points), reference
      FROM ledger WHERE day = $2 AND request_id = $1 AND kind = 'charge'
      ON CONFLICT DO NOTHING
      RETURNING *),
    by_key AS (UPDATE key_periods kp SET used = kp.used + r.points
               FROM refund r WHERE kp.key_id = r.key_id AND kp.period = period_of(r.environment, r.day))
    UPDATE periods p SET used = p.used + r.points
    FROM refund r WHERE p.account_id = r.account_id AND p.environment = r.environment
      AND p.period = period_of(r.environment, r.day)`,
}

/**
 * Counters a charge in its own period, whole or in part, once however often asked. True where it did something.
 */
export async function refundCharge(client: pg.ClientBase, requestId: string, points?: number): Promise<boolean> {
  await closeCharges(client, [requestId])
  const { rows } = await client.query({ ...lockForRefund, values: [requestId, daysOf(requestId)] })
  if (rows.length === 0) return false
  const result = await client.query({ ...giveBack, values: [requestId, rows[0].day, points ?? null] })
  return result.rowCount === 1
}

/* A charge's day is the database's, which the clock of a process may miss by a little. */
function daysOf(requestId: string): string[] {
  const at = instantOf(requestId)
  if (!at) throw new Error(`${requestId} is no request id`)
  return [-DAY, 0, DAY].map((shift) => new Date(at.getTime() + shift).toISOString().slice(0, 10))
}

const close = {
  name: 'close-charges',
  text: 'DELETE FROM open_charges WHERE request_id = ANY($1) RETURNING request_id',
}

/** Lets open charges stand from now on; gives those that were still open. Of a close and a refund, only one finds it. */
export async function closeCharges(client: pg.ClientBase, requestIds: readonly string[]): Promise<Set<string>> {
  const { rows } = await client.query<{ request_id: string }>({ ...close, values: [requestIds] })
  return new Set(rows.map((row) => row.request_id))
}
