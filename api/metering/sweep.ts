import type pg from 'pg'
import { durably } from './transaction.ts'
import { closeCharges, refundCharge } from './refund.ts'

/*
 * A charge is open while its call is computed, at most 10 seconds and some waiting. One that is still open after two
 * minutes belongs to a process that has died or a refund that failed: nobody saw an answer.
 */
const leftOpen = `SELECT request_id AS id FROM open_charges WHERE at < now() - interval '2 minutes' ORDER BY at LIMIT 500`

/*
 * A call logged without points costs nothing. Where its charge was committed all the same (the outcome of the COMMIT
 * was unknown, or the refund failed with the database), log and ledger show it.
 */
const loggedWithoutPoints = `
  SELECT g.id FROM log g CROSS JOIN generate_series(-1, 1) AS near(days)
  JOIN ledger l ON l.day = (g.at AT TIME ZONE 'UTC')::date + near.days AND l.request_id = g.id AND l.kind = 'charge'
  WHERE g.status >= 499 AND g.points = 0 AND g.at > now() - interval '3 days'
    AND NOT EXISTS (SELECT FROM ledger r WHERE r.day = l.day AND r.request_id = l.request_id AND r.kind = 'refund')
  LIMIT 500`

/** Refunds the charges of calls that were not answered; gives their number. Any process may run it at any time. */
export async function sweep(pool: pg.Pool): Promise<number> {
  const open = await refundEach(pool, leftOpen, refundOpen)
  return open + (await refundEach(pool, loggedWithoutPoints, refundCharge))
}

async function refundEach(pool: pg.Pool, find: string, refund: typeof refundCharge): Promise<number> {
  const { rows } = await pool.query<{ id: string }>(find)
  let refunded = 0
  for (const { id } of rows) if (await durably(pool, (client) => refund(client, id))) refunded++
  return refunded
}

/* The process may live after all and close the charge at this instant: then it stands. */
async function refundOpen(client: pg.ClientBase, id: string): Promise<boolean> {
  return (await closeCharges(client, [id])).has(id) && (await refundCharge(client, id))
}
