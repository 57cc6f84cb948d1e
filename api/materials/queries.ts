import { and, asc, eq, sql } from 'drizzle-orm'
import { materials } from '../../drizzle/schema.ts'
import type { Database } from '../database.ts'
import { etagOf } from '../http/render.ts'
import { newMaterialId } from '../ids.ts'
import type { KeyCaller } from '../operation.ts'
import { Problem } from '../problems.ts'
import { matchesTag } from './if-match.ts'
import { type StoredMaterial, stored, toMaterial } from './own-materials.ts'
import { type NewMaterial, shownMaterial } from './schemas.ts'

const MOST_MATERIALS = 5000

const own = (accountId: string, id: string) => and(eq(materials.accountId, accountId), eq(materials.id, id))

type Reader = Pick<Database, 'select'>

export async function readOwn(db: Reader, accountId: string, id: string): Promise<StoredMaterial | undefined> {
  const [row] = await db.select(stored).from(materials).where(own(accountId, id))
  return row && toMaterial(row)
}

/** Of the materials of an account, those behind a place in the order of names. */
export async function listOwn(
  db: Database,
  accountId: string,
  wish: {
    words: readonly string[]
    group?: string | undefined
    after?: readonly [string, string] | undefined
    limit: number
  },
): Promise<StoredMaterial[]> {
  const { words, group, after, limit } = wish
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
export function keepMaterials(
  db: Database,
  { accountId, keyId }: KeyCaller,
  wishes: readonly NewMaterial[],
): Promise<StoredMaterial[]> {
  return db.transaction(async (tx) => {
    await tx.execute(sql`SELECT 1 FROM accounts WHERE id = ${accountId} FOR NO KEY UPDATE`)
    const kept = await tx.$count(materials, eq(materials.accountId, accountId))
    if (kept + wishes.length > MOST_MATERIALS) throw new Problem('too-many-materials')
    if (wishes.length === 0) return []
    const values = wishes.map((wish) => ({ ...wish, id: newMaterialId(), accountId, createdBy: keyId }))
    const rows = await tx.insert(materials).values(values).returning(stored)
    return rows.map(toMaterial)
  })
}

/** Replaces a material whose present version is the one that was read; undefined where there is none of this id. */
export function replaceMaterial(
  db: Database,
  { accountId }: KeyCaller,
  change: { id: string; ifMatch: string; wish: NewMaterial },
): Promise<StoredMaterial | undefined> {
  const { id, ifMatch, wish } = change
  return db.transaction(async (tx) => {
    const [row] = await tx.select(stored).from(materials).where(own(accountId, id)).for('update')
    if (!row) return undefined
    if (!matchesTag(ifMatch, etagOf(JSON.stringify(shownMaterial(toMaterial(row))))))
      throw new Problem('precondition-failed')
    const [changed] = await tx
      .update(materials)
      .set({ ...wish, updatedAt: sql`now()` })
      .where(own(accountId, id))
      .returning(stored)
    return changed && toMaterial(changed)
  })
}

/** True where there was one. */
export async function deleteMaterial(db: Database, { accountId }: KeyCaller, id: string): Promise<boolean> {
  const gone = await db.delete(materials).where(own(accountId, id)).returning({ id: materials.id })
  return gone.length > 0
}
