import { and, eq, inArray } from 'drizzle-orm'
import { materials } from '../../drizzle/schema.ts'
import type { Material, State } from '../../solvers/materials/material.ts'
import { OWN_PREFIX } from '../../solvers/materials/own-material.ts'
import type { Database } from '../database.ts'
import { MATERIAL_ID } from '../ids.ts'
import type { Caller, OwnMaterials } from '../operation.ts'

/** A body names at most so many; the rest is not looked up, and refused as unknown. */
const MOST_NAMED = 200

export type StoredMaterial = Material & { updatedAt: Date }

/* What leaves the table; whose it is and who made it stays. */
export const stored = {
  id: materials.id,
  name: materials.name,
  group: materials.group,
  conductivity: materials.conductivity,
  density: materials.density,
  specificHeat: materials.specificHeat,
  state: materials.state,
  source: materials.source,
  confidence: materials.confidence,
  updatedAt: materials.updatedAt,
}

export const toMaterial = (row: Omit<StoredMaterial, 'state'> & { state: string }): StoredMaterial => ({
  ...row,
  state: row.state as State,
})

const none: OwnMaterials = new Map()

/**
 * The own materials that a body names, by id. The bytes are searched and not the value, which a long body has in a thread
 * only; nearly every body names none, and costs one look.
 */
export async function ownMaterialsIn(bytes: Buffer, caller: Caller, db: Database): Promise<OwnMaterials> {
  if (caller.kind !== 'key' && caller.kind !== 'session') return none
  if (!bytes.includes(`"${OWN_PREFIX}`)) return none
  const found = bytes.toString('latin1').matchAll(new RegExp(`"(${MATERIAL_ID})"`, 'g'))
  const ids = [...new Set([...found].map(([, id = '']) => id))].slice(0, MOST_NAMED)
  if (ids.length === 0) return none
  const rows = await db
    .select(stored)
    .from(materials)
    .where(and(eq(materials.accountId, caller.accountId), inArray(materials.id, ids)))
  return new Map(rows.map((row) => [row.id, toMaterial(row)]))
}
