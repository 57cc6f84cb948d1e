import type { z } from 'zod'
import { genericMaterials } from '../../solvers/materials/generic.ts'
import type { Material } from '../../solvers/materials/material.ts'
import type { Database } from '../database.ts'
import { invalidParameter } from '../problems.ts'
import { listOwn } from './queries.ts'
import { MOST_LISTED, type materialListQuery, shownMaterial } from './schemas.ts'

/** What was last given: how many entries of the catalogue, and the last own material by name and id. */
type Place = readonly [catalogue: number, name: string, id: string]

/** One page: the catalogue in its order, then the materials of the account by name. */
export async function listMaterials(db: Database, accountId: string, query: z.output<typeof materialListQuery>) {
  const { q = '', group, of } = query
  const limit = Math.min(Number(query.limit), MOST_LISTED)
  const words = q.toLowerCase().split(/\s+/).filter(Boolean)
  const [passed, name, id] = query.cursor === undefined ? first : placeOf(query.cursor)
  const generic =
    of === 'account' ? [] : genericMaterials.filter(filterBy(words, group)).slice(passed, passed + limit + 1)
  const after = id === '' ? undefined : ([name, id] as const)
  const room = limit + 1 - generic.length
  const own = of === 'catalogue' || room === 0 ? [] : await listOwn(db, accountId, { words, group, after, limit: room })
  const found: (Material & { updatedAt?: Date })[] = [...generic, ...own]
  const page = found.slice(0, limit)
  const last = own.slice(0, Math.max(0, limit - generic.length)).at(-1)
  const place: Place = [passed + Math.min(generic.length, limit), last?.name ?? name, last?.id ?? id]
  return { materials: page.map(shownMaterial), next: found.length > limit ? cursorOf(place) : null }
}

const first: Place = [0, '', '']

function filterBy(words: readonly string[], group: string | undefined) {
  return ({ id, name, ...about }: Material) => {
    const text = `${id} ${name}`.toLowerCase()
    return (group === undefined || about.group === group) && words.every((word) => text.includes(word))
  }
}

const cursorOf = (place: Place) => Buffer.from(JSON.stringify(place)).toString('base64url')

function placeOf(cursor: string): Place {
  try {
    const place: unknown = JSON.parse(Buffer.from(cursor, 'base64url').toString())
    if (isPlace(place) && cursorOf(place) === cursor) return place
  } catch {
    // Told below, like every other text that is no cursor.
  }
  const detail = 'The cursor was not given out by this list.'
  throw invalidParameter([{ pointer: '#/cursor', code: 'wrong-form', detail, accepted: 'next of the page before' }])
}

function isPlace(value: unknown): value is Place {
  if (!Array.isArray(value) || value.length !== 3) return false
  const [passed, name, id] = value as unknown[]
  const texts = [name, id].every((text) => typeof text === 'string' && !text.includes('\0'))
  return Number.isInteger(passed) && (passed as number) >= 0 && texts
}
