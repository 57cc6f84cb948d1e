import type { Request } from 'express'
import type pg from 'pg'
import { gather } from '../gather.ts'
import type { KeyCaller } from '../operation.ts'
import type { Scope } from '../permissions.ts'
import { Problem } from '../problems.ts'
import { hashKey, isKey } from './key.ts'

const lookUp = {
  name: 'look-up-keys',
  text: `
    SELECT encode(s.hash, 'hex') AS hash, s.id AS "secretId", k.id AS "keyId", k.account_id AS "accountId", k.environment,
      k.scopes, k.addresses, k.origins, least(k.expires_at, s.ends_at) <= now() AS expired
    FROM secrets s JOIN keys k ON k.id = s.key_id
    WHERE s.hash = ANY($1) AND k.revoked_at IS NULL`,
}

/** A key that was sent, and where it may be used. */
export interface FoundKey extends Omit<KeyCaller, 'kind'> {
  scopes: readonly Scope[]
  addresses: readonly string[]
  origins: readonly string[]
  expired: boolean | null
}

/** What a key is, or undefined; asked of the database each time, so that a revoked key ends with its next call. */
export type FindKey = (key: string) => Promise<FoundKey | undefined>

/** Looks keys up together where many are asked at once. */
export function createFindKey(pool: pg.Pool): FindKey {
  const find = gather(
    async (hashes: Buffer[]) => {
      const { rows } = await pool.query<FoundKey & { hash: string }>({ ...lookUp, values: [hashes] })
      const byHash = new Map(rows.map((row) => [row.hash, row]))
      return hashes.map((hash) => byHash.get(hash.toString('hex')))
    },
    { atOnce: 2, most: 500 },
  )
  return async (key) => (isKey(key) ? find(hashKey(key)) : undefined)
}

const challenge = (error: string) => ({ headers: { 'WWW-Authenticate': `Bearer realm="soakstone"${error}` } })
const invalid = challenge(', error="invalid_token"')

/** The key sent as a bearer token, while it lives. */
export async function authenticateKey(find: FindKey, req: Request): Promise<FoundKey> {
  const { authorization } = req.headers
  if (authorization === undefined) throw new Problem('key-missing', undefined, challenge(''))
  const found = await find(/^Bearer +(\S+) *$/i.exec(authorization)?.[1] ?? '')
  if (!found) throw new Problem('key-unknown', undefined, invalid)
  if (found.expired) throw new Problem('key-expired', undefined, invalid)
  return found
}

/** Refuses what the key was not given. */
export function refuseOutOfScope(found: FoundKey, scope: Scope): void {
  if (found.scopes.includes(scope)) return
  throw new Problem(
    'scope-missing',
    `The operation needs the scope ${scope}, which the key was not given.`,
    challenge(`, error="insufficient_scope", scope="${scope}"`),
  )
}
