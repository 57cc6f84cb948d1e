import type pg from 'pg'
import type { KeyCaller } from '../operation.ts'
import { Problem } from '../problems.ts'
import { hashKey, isKey } from './key.ts'

const lookUp = {
  name: 'look-up-key',
  text: 'SELECT id, account_id, environment FROM keys WHERE hash = $1 AND revoked_at IS NULL',
}

const challenge = (error: string) => ({ headers: { 'WWW-Authenticate': `Bearer realm="soakstone"${error}` } })

/** The caller of a key, asked of the database each time, so that a revoked key ends with its next call. */
export async function authenticateKey(pool: pg.Pool, authorization: string | undefined): Promise<KeyCaller> {
  if (authorization === undefined) throw new Problem('key-missing', undefined, challenge(''))
  const key = /^Bearer +(\S+) *$/i.exec(authorization)?.[1] ?? ''
  const { rows } = isKey(key) ? await pool.query({ ...lookUp, values: [hashKey(key)] }) : { rows: [] }
  if (!rows[0]) throw new Problem('key-unknown', undefined, challenge(', error="invalid_token"'))
  return { kind: 'key', keyId: rows[0].id, accountId: rows[0].account_id, environment: rows[0].environment }
}
