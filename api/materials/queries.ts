import { and, asc, eq, sql } from 'drizzle-orm'
import { audit, keys, materials } from '../../drizzle/schema.ts'
import type { Database } from '../database.ts'
import { etagOf } from '../http/render.ts'
import { newId, newMaterialId } from '../ids.ts'
import type { KeyCaller, MemberCaller } from '../operation.ts'
import { Problem } from '../problems.ts'
import { matchesTag } from './if-match.ts'
import { type StoredMaterial, stored, toMaterial } from './own-materials.ts'
import { type NewMaterial, shownMaterial } from './schemas.ts'

const MOST_MATERIALS = 5000

/** Who keeps materials: a key all of its account, a person those that the role reaches. */
export type Keeper = KeyCaller | MemberCaller

type Tx = Parameters<Parameters<Database['transaction']>[0]>[0]

const ofAccount = (accountId: string, id: string) => and(eq(materials.accountId, accountId), eq(materials.id, id))

/** A material that the caller may change: the one place where that is decided. */
function reached(caller: Keeper, id: string) {
  const own = caller.kind === 'session' && caller.reach === 'own' ? eq(materials.createdBy, caller.personId) : undefined
  return and(ofAccount(caller.accountId, id), own)
}

export async function readOwn(db: Database, accountId: string, id: string): Promise<StoredMaterial | undefined> {
  const [row] = await db.select(stored).from(materials).where(ofAccount(accountId, id))
  return row && toMaterial(row)
}

interface Wish {
  words: readonly string[]
  group?: string | undefined
  after?: readonly [name: string, id: string] | undefined
  limit: number
}

/** Of the materials of an account, those behind a place in the order of names. */
export async function listOwn(
  db: Database,
  accountId: string,
  { words, group, after, limit }: Wish,
): Promise<StoredMaterial[]> {
  const rows = await db
    .select(stored)
    .from(materials)
    .where(
      and(
        eq(materials.accountId, accountId),
        group === undefined ? undefined : eq(materials.group, group),
        after && sql`(${materials.name}, ${materials.id}) > (${after[0]}, ${after[1]})`,
        ...words.map((word) => sql`position(${word} in lower(${materials.id} || ' ' || ${materials.name})) > 0`),
      ),
    )
    .orderBy(asc(materials.name), asc(materials.id))
    .limit(limit)
  return rows.map(toMaterial)
}

/** Keeps new materials, all or none. One transaction of an account at a time counts them. */
export function keepMaterials(db: Database, caller: Keeper, wishes: readonly NewMaterial[]): Promise<StoredMaterial[]> {
  const { accountId } = caller
  return db.transaction(async (tx) => {
    await tx.execute(sql`SELECT 1 FROM accounts WHERE id = ${accountId} FOR NO KEY UPDATE`)
    const kept = await tx.$count(materials, eq(materials.accountId, accountId))
    if (kept + wishes.length > MOST_MATERIALS) throw new Problem('too-many-materials')
    if (wishes.length === 0) return []
    const createdBy = await makerOf(tx, caller)
    const values = wishes.map((wish) => ({ ...wish, id: newMaterialId(), accountId, createdBy }))
    const rows = await tx.insert(materials).values(values).returning(stored)
    await record(tx, caller, wishes.length === 1 ? 'material kept' : 'materials kept', rows[0]?.id)
    return rows.map(toMaterial)
  })
}

/* What a key keeps is of the person who made the key, as the key is. */
async function makerOf(tx: Tx, caller: Keeper): Promise<string> {
  if (caller.kind === 'session') return caller.personId
  const [key] = await tx.select({ createdBy: keys.createdBy }).from(keys).where(eq(keys.id, caller.keyId))
  return key?.createdBy ?? caller.keyId
}

/** Replaces a material whose present version is the one that was read; undefined where the caller reaches none of this id. */
export function replaceMaterial(
  db: Database,
  caller: Keeper,
  { id, ifMatch, wish }: { id: string; ifMatch: string; wish: NewMaterial },
): Promise<StoredMaterial | undefined> {
  return db.transaction(async (tx) => {
    const [row] = await tx.select(stored).from(materials).where(reached(caller, id)).for('update')
    if (!row) return undefined
    const present = etagOf(JSON.stringify(shownMaterial(toMaterial(row))))
    if (!matchesTag(ifMatch, present)) throw new Problem('precondition-failed')
    const [changed] = await tx
      .update(materials)
      .set({ ...wish, updatedAt: sql`now()` })
      .where(reached(caller, id))
      .returning(stored)
    await record(tx, caller, 'material replaced', id)
    return changed && toMaterial(changed)
  })
}

/** True where there was one that the caller reaches. */
export function deleteMaterial(db: Database, caller: Keeper, id: string): Promise<boolean> {
  return db.transaction(async (tx) => {
    const gone = await tx.delete(materials).where(reached(caller, id)).returning({ id: materials.id })
    if (gone.length > 0) await record(tx, caller, 'material deleted', id)
    return gone.length > 0
  })
}

/* What a key does stands in the log of its calls; what a person does stands here. */
async function record(tx: Tx, caller: Keeper, action: string, subject: string | undefined): Promise<void> {
  if (caller.kind !== 'session') return
  const { personId: actorId, accountId } = caller
  await tx.insert(audit).values({ id: newId('aud'), actorKind: 'person', actorId, accountId, action, subject })
}
