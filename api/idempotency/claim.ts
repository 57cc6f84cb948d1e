import type pg from 'pg'
import { Problem } from '../problems.ts'

/** A call that its client may send again. */
export interface Attempt {
  accountId: string
  key: string
  /** Of method, address and body: the same key may not ask something else. */
  fingerprint: Buffer
  requestId: string
}

/** An answer that was kept whole, since what it told cannot be done again. */
export interface KeptAnswer {
  text: string | null
  etag: string | null
  headers: Record<string, string>
}

export type Claim = 'first' | 'computed before' | KeptAnswer

/** Hours for which a key is remembered. */
const KEPT_HOURS = 24
/* No call takes so long: one that still has neither an answer nor a charge after it has died with its process. */
const ABANDONED = "interval '2 minutes'"

/* What the call that has the key was charged, less refunds, where that is something; an open charge may still be refunded. */
const charge = `
  SELECT FROM ledger l WHERE l.request_id = i.request_id AND l.day BETWEEN i.day - 1 AND i.day + 1 HAVING sum(l.points) > 0`

const claim = {
  name: 'claim-idempotency',
  text: `
    INSERT INTO idempotency AS i (account_id, key, fingerprint, request_id) VALUES ($1, $2, $3, $4)
    ON CONFLICT (account_id, key) DO UPDATE
    SET fingerprint = excluded.fingerprint, request_id = excluded.request_id, at = now(), day = excluded.day, answer = NULL
    WHERE i.at < now() - interval '${KEPT_HOURS} hours'
      OR (i.at < now() - ${ABANDONED} AND i.fingerprint = excluded.fingerprint AND i.answer IS NULL AND NOT EXISTS (${charge}))
    RETURNING 1`,
}

const look = {
  name: 'look-up-idempotency',
  text: `
    SELECT i.fingerprint = $3 AS same, i.answer,
      EXISTS (${charge}) AND NOT EXISTS (SELECT FROM open_charges o WHERE o.request_id = i.request_id) AS charged
    FROM idempotency i WHERE i.account_id = $1 AND i.key = $2`,
}

interface Found {
  same: boolean
  answer: KeptAnswer | null
  charged: boolean
}

const inFlight = () => new Problem('call-in-flight', undefined, { headers: { 'Retry-After': '1' } })

/** Takes a key for a call, or says what became of the call that has it. */
export async function claimKey(pool: pg.Pool, { accountId, key, fingerprint, requestId }: Attempt): Promise<Claim> {
  const { rowCount } = await pool.query({ ...claim, values: [accountId, key, fingerprint, requestId] })
  if (rowCount === 1) return 'first'
  const { rows } = await pool.query<Found>({ ...look, values: [accountId, key, fingerprint] })
  const found = rows[0]
  /* The call that had the key has just failed and given it back. */
  if (!found) throw inFlight()
  if (!found.same) throw new Problem('idempotency-key-reused')
  if (found.answer) return found.answer
  if (found.charged) return 'computed before'
  throw inFlight()
}

/** Gives a key back, since its call came to nothing and may be sent again. */
export async function releaseKey(pool: pg.Pool, { accountId, key, requestId }: Attempt): Promise<void> {
  await pool.query('DELETE FROM idempotency WHERE account_id = $1 AND key = $2 AND request_id = $3', [
    accountId,
    key,
    requestId,
  ])
}

/** Keys that are remembered no longer. */
export async function forgetKeys(pool: pg.Pool): Promise<void> {
  await pool.query(`DELETE FROM idempotency WHERE at < now() - interval '${KEPT_HOURS} hours'`)
}
