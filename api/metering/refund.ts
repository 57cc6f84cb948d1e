import type pg from 'pg'

/* Account before key, as charges lock them. */
const lockForRefund = {
  name: 'lock-for-refund',
  text: `
    SELECT l.period::text AS period FROM ledger l
    JOIN key_periods kp ON kp.key_id = l.key_id AND kp.period = l.period
    JOIN periods p ON p.account_id = l.account_id AND p.environment = l.environment AND p.period = l.period
    WHERE l.request_id = $1 AND l.kind = 'charge'
      AND l.period BETWEEN (now() AT TIME ZONE 'UTC')::date - 2 AND (now() AT TIME ZONE 'UTC')::date
    FOR UPDATE OF p, kp`,
}

const giveBack = {
  name: 'give-back',
  text: `
    WITH refund AS (
      INSERT INTO ledger (period, request_id, kind, account_id, key_id, environment, case_id, points)
      SELECT period, request_id, 'refund', account_id, key_id, environment, case_id, -points
      FROM ledger WHERE period = $2 AND request_id = $1 AND kind = 'charge'
      ON CONFLICT DO NOTHING
      RETURNING *),
    by_key AS (UPDATE key_periods kp SET used = kp.used + r.points
               FROM refund r WHERE kp.key_id = r.key_id AND kp.period = r.period)
    UPDATE periods p SET used = p.used + r.points
    FROM refund r WHERE p.account_id = r.account_id AND p.environment = r.environment AND p.period = r.period`,
}

/** Counters a charge of the last two days in its own period, once however often asked. True where it did something. */
export async function refundCharge(client: pg.ClientBase, requestId: string): Promise<boolean> {
  const { rows } = await client.query({ ...lockForRefund, values: [requestId] })
  if (rows.length === 0) return false
  const result = await client.query({ ...giveBack, values: [requestId, rows[0].period] })
  return result.rowCount === 1
}
