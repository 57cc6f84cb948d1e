import type pg from 'pg'
import { durably } from './transaction.ts'
import { refundCharge } from './refund.ts'

/*
 * A call that was answered 5xx costs nothing. Where its charge was committed all the same (the outcome of the COMMIT
 * was unknown, or the refund failed with the database), log and ledger show it.
 */
const unsettled = `
  SELECT g.id FROM log g
  JOIN ledger l ON l.request_id = g.id AND l.kind = 'charge' AND l.period >= (now() AT TIME ZONE 'UTC')::date - 2
  WHERE g.status >= 500 AND g.at > now() - interval '1 day'
    AND NOT EXISTS (SELECT FROM ledger r WHERE r.period = l.period AND r.request_id = l.request_id AND r.kind = 'refund')
  LIMIT 500`

/** Refunds the charges of failed calls that still stand; gives their number. Any process may run it at any time. */
export async function sweep(pool: pg.Pool): Promise<number> {
  const { rows } = await pool.query<{ id: string }>(unsettled)
  let settled = 0
  for (const { id } of rows) if (await durably(pool, (client) => refundCharge(client, id))) settled++
  return settled
}
