import { and, desc, eq, isNull, sql } from 'drizzle-orm'
import { audit, keyPeriods, keys, people } from '../../drizzle/schema.ts'
import type { Database } from '../database.ts'
import { newId } from '../ids.ts'
import type { MemberCaller } from '../operation.ts'
import { Problem } from '../problems.ts'
import { hashKey, newKey, prefixOf } from './key.ts'

const MOST_KEYS = 100
const today = sql`(now() AT TIME ZONE 'UTC')::date`

/* The only columns of a key that leave the service. */
const shown = {
  id: keys.id,
  name: keys.name,
  prefix: keys.prefix,
  environment: keys.environment,
  quota: keys.quota,
  used: sql<number>`coalesce(${keyPeriods.used}, 0)`.mapWith(Number),
  createdAt: keys.createdAt,
  createdBy: people.name,
  lastUsedAt: keys.lastUsedAt,
  revokedAt: keys.revokedAt,
}

/** Keys of the caller's account that the caller's role reaches: the one place where that is decided. */
function reached(caller: MemberCaller) {
  const own = caller.reach === 'own' ? eq(keys.createdBy, caller.personId) : undefined
  return and(eq(keys.accountId, caller.accountId), own)
}

async function select(db: Pick<Database, 'select'>, caller: MemberCaller, id?: string) {
  const rows = await db
    .select(shown)
    .from(keys)
    .innerJoin(people, eq(people.id, keys.createdBy))
    .leftJoin(keyPeriods, and(eq(keyPeriods.keyId, keys.id), eq(keyPeriods.period, today)))
    .where(and(reached(caller), id === undefined ? undefined : eq(keys.id, id)))
    .orderBy(desc(keys.createdAt), desc(keys.id))
    .limit(1000)
  return rows.map((row) => ({
    ...row,
    createdAt: row.createdAt.toISOString(),
    lastUsedAt: row.lastUsedAt?.toISOString() ?? null,
    revokedAt: row.revokedAt?.toISOString() ?? null,
  }))
}

export function listKeys(db: Database, caller: MemberCaller) {
  return select(db, caller)
}

/** Makes a trial key; its secret is in what this gives back and nowhere else. */
export async function createKey(
  db: Database,
  caller: MemberCaller,
  wish: { name: string; quota?: number | undefined },
) {
  const secret = newKey('trial')
  const id = newId('key')
  const { accountId, personId } = caller
  return db.transaction(async (tx) => {
    await tx.execute(sql`SELECT 1 FROM accounts WHERE id = ${accountId} FOR NO KEY UPDATE`)
    const living = await tx.$count(keys, and(eq(keys.accountId, accountId), isNull(keys.revokedAt)))
    if (living >= MOST_KEYS) throw new Problem('too-many-keys')
    await tx.insert(keys).values({
      id,
      accountId,
      environment: 'trial',
      name: wish.name,
      hash: hashKey(secret),
      prefix: prefixOf(secret),
      quota: wish.quota ?? null,
      createdBy: personId,
    })
    await tx.insert(audit).values(entry(caller, 'key created', id))
    const [key] = await select(tx, caller, id)
    return { key, secret }
  })
}

/** Revokes a key for good; undefined where the caller reaches none of this id. */
export async function revokeKey(db: Database, caller: MemberCaller, id: string) {
  return db.transaction(async (tx) => {
    const where = and(reached(caller), eq(keys.id, id))
    const revoked = await tx
      .update(keys)
      .set({ revokedAt: sql`now()` })
      .where(and(where, isNull(keys.revokedAt)))
      .returning({ id: keys.id })
    if (revoked.length > 0) await tx.insert(audit).values(entry(caller, 'key revoked', id))
    const [key] = await select(tx, caller, id)
    return key
  })
}

const entry = (caller: MemberCaller, action: string, subject: string) => ({
  id: newId('aud'),
  actorKind: 'person' as const,
  actorId: caller.personId,
  accountId: caller.accountId,
  action,
  subject,
})
