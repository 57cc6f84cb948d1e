import { and, desc, eq, isNull, sql } from 'drizzle-orm'
import { accounts, audit, keyPeriods, keys, people, secrets } from '../../drizzle/schema.ts'
import { DomainError } from '../../solvers/errors.ts'
import type { Database } from '../database.ts'
import { newId } from '../ids.ts'
import type { MemberCaller } from '../operation.ts'
import { allScopes } from '../permissions.ts'
import { Problem } from '../problems.ts'
import { type Environment, hashKey, newKey, prefixOf } from './key.ts'
import { networkOf } from './networks.ts'
import type { KeySettings } from './schemas.ts'

const MOST_KEYS = 100
export const thisPeriod = sql`period_of(${keys.environment}, (now() AT TIME ZONE 'UTC')::date)`

/* The only columns of a key that leave the service. */
const shown = {
  id: keys.id,
  name: keys.name,
  prefix: keys.prefix,
  environment: keys.environment,
  quota: keys.quota,
  rate: keys.rate,
  used: sql<number>`coalesce(${keyPeriods.used}, 0)`.mapWith(Number),
  scopes: sql<KeySettings['scopes']>`${keys.scopes}`,
  addresses: keys.addresses,
  origins: keys.origins,
  createdAt: keys.createdAt,
  createdBy: people.name,
  lastUsedAt: keys.lastUsedAt,
  expiresAt: keys.expiresAt,
  revokedAt: keys.revokedAt,
  revokedFor: keys.revokedFor,
  oldPrefix: secrets.prefix,
  oldEndsAt: secrets.endsAt,
  oldLastUsedAt: secrets.lastUsedAt,
}

const instantText = (at: Date | null) => at?.toISOString() ?? null

/** Keys of the caller's account that the caller's role reaches: the one place where that is decided. */
export function reached(caller: MemberCaller) {
  const own = caller.reach === 'own' ? eq(keys.createdBy, caller.personId) : undefined
  return and(eq(keys.accountId, caller.accountId), own)
}

export async function selectKeys(db: Pick<Database, 'select'>, caller: MemberCaller, id?: string) {
  const rows = await db
    .select(shown)
    .from(keys)
    .innerJoin(people, eq(people.id, keys.createdBy))
    .leftJoin(keyPeriods, and(eq(keyPeriods.keyId, keys.id), eq(keyPeriods.period, thisPeriod)))
    .leftJoin(secrets, and(eq(secrets.keyId, keys.id), sql`${secrets.endsAt} > now()`))
    .where(and(reached(caller), id === undefined ? undefined : eq(keys.id, id)))
    .orderBy(desc(keys.createdAt), desc(keys.id))
    .limit(1000)
  return rows.map(({ oldPrefix, oldEndsAt, oldLastUsedAt, ...row }) => ({
    ...row,
    createdAt: row.createdAt.toISOString(),
    lastUsedAt: instantText(row.lastUsedAt),
    expiresAt: instantText(row.expiresAt),
    revokedAt: instantText(row.revokedAt),
    oldSecret:
      oldPrefix && oldEndsAt
        ? { prefix: oldPrefix, endsAt: oldEndsAt.toISOString(), lastUsedAt: instantText(oldLastUsedAt) }
        : null,
  }))
}

export type NewKey = KeySettings & { environment?: Environment | undefined }

/** The columns of what was set; an end that has passed is refused. */
export function columnsOf({ name, quota, rate, scopes, expiresAt, addresses, origins }: KeySettings) {
  if (expiresAt && Date.parse(expiresAt) <= Date.now())
    throw new DomainError([
      {
        pointer: '#/expiresAt',
        code: 'out-of-range',
        detail: 'The time at which the key expires has passed.',
        accepted: 'an instant to come, such as 2099-12-31T23:00:00Z',
      },
    ])
  return {
    name,
    quota: quota ?? null,
    rate: rate ?? null,
    scopes: allScopes.filter((scope) => (scopes ?? allScopes).includes(scope)),
    expiresAt: expiresAt ? new Date(expiresAt) : null,
    addresses: once(addresses?.map((address) => networkOf(address) ?? address)),
    origins: once(origins),
  }
}

const once = (list: readonly string[] = []) => [...new Set(list)]

/** Makes a key; its secret is in what this gives back and nowhere else. */
export async function createKey(db: Database, caller: MemberCaller, { environment = 'trial', ...wish }: NewKey) {
  const secret = newKey(environment)
  const id = newId('key')
  const { accountId, personId } = caller
  const columns = columnsOf(wish)
  return db.transaction(async (tx) => {
    const [account] = await tx
      .select({ meteredLimit: accounts.meteredLimit })
      .from(accounts)
      .where(eq(accounts.id, accountId))
      .for('no key update')
    if (environment === 'metered' && !account?.meteredLimit) throw new Problem('plan-needed')
    const living = await tx.$count(keys, and(eq(keys.accountId, accountId), isNull(keys.revokedAt)))
    if (living >= MOST_KEYS) throw new Problem('too-many-keys')
    const prefix = prefixOf(secret)
    await tx.insert(keys).values({ ...columns, id, accountId, environment, prefix, createdBy: personId })
    await tx.insert(secrets).values(secretRow(id, secret))
    await tx.insert(audit).values(entry(caller, 'key created', id))
    const [key] = await selectKeys(tx, caller, id)
    return { key, secret }
  })
}

export const secretRow = (keyId: string, secret: string) => ({
  id: newId('sec'),
  keyId,
  hash: hashKey(secret),
  prefix: prefixOf(secret),
})

export const entry = (caller: MemberCaller, action: string, subject: string) => ({
  id: newId('aud'),
  actorKind: 'person' as const,
  actorId: caller.personId,
  accountId: caller.accountId,
  action,
  subject,
})
