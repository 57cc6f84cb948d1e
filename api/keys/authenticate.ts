import type pg from 'pg'
import { gather } from '../gather.ts'
import type { KeyCaller } from '../operation.ts'
import { Problem } from '../problems.ts'
import { hashKey, isKey } from './key.ts'

const lookUp = {
  name: 'look-up-keys',
  text: `SELECT encode(hash, 'hex') AS hash, id, account_id, environment FROM keys
         WHERE hash = ANY($1) AND revoked_at IS NULL`,
}

interface Found {
  hash: string
  id: string
  account_id: string
  environment: 'trial'
}

/** Who a key is, or undefined; asked of the database each time, so that a revoked key ends with its next call. */
export type FindKey = (key: string) => Promise<KeyCaller | undefined>

/** Looks keys up together where many are asked at once. */
export function createFindKey(pool: pg.Pool): FindKey {
  const find = gather(
    async (hashes: Buffer[]) => {
      const { rows } = await pool.query<Found>({ ...lookUp, values: [hashes] })
      const byHash = new Map(rows.map((row) => [row.hash, row]))
      return hashes.map((hash) => byHash.get(hash.toString('hex')))
    },
    { atOnce: 2, most: 500 },
  )
  return async (key) => {
    const row = isKey(key) ? await find(hashKey(key)) : undefined
    return row && { kind: 'key', keyId: row.id, accountId: row.account_id, environment: row.environment }
  }
}

const challenge = (error: string) => ({ headers: { 'WWW-Authenticate': `Bearer realm="soakstone"${error}` } })

/** The caller of a key sent as a bearer token. */
export async function authenticateKey(find: FindKey, authorization: string | undefined): Promise<KeyCaller> {
  if (authorization === undefined) throw new Problem('key-missing', undefined, challenge(''))
  const caller = await find(/^Bearer +(\S+) *$/i.exec(authorization)?.[1] ?? '')
  if (!caller) throw new Problem('key-unknown', undefined, challenge(', error="invalid_token"'))
  return caller
}
