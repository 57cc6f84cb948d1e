import { and, eq, isNull, sql } from 'drizzle-orm'
import { audit, keyPeriods, keys, secrets } from '../../drizzle/schema.ts'
import type { Database } from '../database.ts'
import { newId } from '../ids.ts'
import type { MemberCaller } from '../operation.ts'
import { Problem } from '../problems.ts'
import { hashKey, newKey, prefixOf } from './key.ts'
import { columnsOf, entry, reached, secretRow, selectKeys, thisPeriod } from './queries.ts'
import type { KeySettings } from './schemas.ts'

type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0]

const notReached = () => new Problem('not-found', 'There is no such key among those you may change.')

/* Locked, so that of two changes one comes after the other. */
async function lockLiving(tx: Transaction, caller: MemberCaller, id: string) {
  const where = and(reached(caller), eq(keys.id, id))
  const [key] = await tx.select().from(keys).where(where).for('no key update')
  if (!key) throw notReached()
  if (key.revokedAt) throw new Problem('key-revoked')
  return key
}

/** Sets everything that may be set of a key; it counts from its next call. */
export async function changeKey(db: Database, caller: MemberCaller, id: string, wish: KeySettings) {
  const columns = columnsOf(wish)
  return db.transaction(async (tx) => {
    await lockLiving(tx, caller, id)
    await tx.update(keys).set(columns).where(eq(keys.id, id))
    await tx
      .update(keyPeriods)
      .set({ limit: columns.quota })
      .from(keys)
      .where(and(eq(keyPeriods.keyId, id), eq(keys.id, id), eq(keyPeriods.period, thisPeriod)))
    await tx.insert(audit).values(entry(caller, 'key changed', id))
    const [key] = await selectKeys(tx, caller, id)
    return key
  })
}

/** Gives a key another secret. The one before it goes on for so many hours; any older one ends now. */
export async function rotateKey(db: Database, caller: MemberCaller, id: string, overlapHours: number) {
  return db.transaction(async (tx) => {
    const { environment } = await lockLiving(tx, caller, id)
    const secret = newKey(environment)
    await tx
      .update(secrets)
      .set({ endsAt: sql`now()` })
      .where(and(eq(secrets.keyId, id), sql`${secrets.endsAt} > now()`))
    await tx
      .update(secrets)
      .set({ endsAt: sql`now() + ${overlapHours} * interval '1 hour'` })
      .where(and(eq(secrets.keyId, id), isNull(secrets.endsAt)))
    await tx.insert(secrets).values(secretRow(id, secret))
    await tx
      .update(keys)
      .set({ prefix: prefixOf(secret) })
      .where(eq(keys.id, id))
    await tx.insert(audit).values(entry(caller, 'key rotated', id))
    const [key] = await selectKeys(tx, caller, id)
    return { key, secret }
  })
}

/** Revokes a key for good; undefined where the caller reaches none of this id. */
export async function revokeKey(db: Database, caller: MemberCaller, id: string) {
  return db.transaction(async (tx) => {
    const where = and(reached(caller), eq(keys.id, id))
    const revoked = await tx
      .update(keys)
      .set({ revokedAt: sql`now()`, revokedFor: 'asked' })
      .where(and(where, isNull(keys.revokedAt)))
      .returning({ id: keys.id })
    if (revoked.length > 0) await tx.insert(audit).values(entry(caller, 'key revoked', id))
    const [key] = await selectKeys(tx, caller, id)
    return key
  })
}

/** Revokes the key that somebody found in public. Says nothing, so that nobody learns which keys there are. */
export async function revokeLeaked(db: Database, requestId: string, secret: string): Promise<void> {
  await db.transaction(async (tx) => {
    const ofSecret = sql`${keys.id} = (SELECT key_id FROM secrets WHERE hash = ${hashKey(secret)})`
    const [key] = await tx
      .update(keys)
      .set({ revokedAt: sql`now()`, revokedFor: 'leaked' })
      .where(and(ofSecret, isNull(keys.revokedAt)))
      .returning({ id: keys.id, accountId: keys.accountId })
    if (!key) return
    const action = { action: 'key reported as leaked and revoked', subject: key.id, accountId: key.accountId }
    await tx.insert(audit).values({ ...action, id: newId('aud'), actorKind: 'call', actorId: requestId })
  })
}
