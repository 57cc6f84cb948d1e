import { nanoid } from 'nanoid'
import { v7 as uuidv7 } from 'uuid'
import { z } from 'zod'
import { OWN_PREFIX } from '../solvers/materials/own-material.ts'

type Kind = 'req' | 'acct' | 'prsn' | 'stff' | 'key' | 'sec' | 'aud'

/** Where ids come from: now and chance, unless a seed says otherwise. */
export interface IdSource {
  msecs?: number
  random?: Uint8Array
}

/** Ids are time-ordered; a request's day is read back from its id. */
export function newId(kind: Kind, source: IdSource = {}): string {
  return `${kind}_${uuidv7(source).replaceAll('-', '')}`
}

/** What an id of a kind looks like; nothing else reaches the database as one. */
export function idField(kind: Kind) {
  return z
    .string()
    .regex(new RegExp(`^${kind}_[0-9a-f]{32}$`))
    .meta({ 'x-accepted': `${kind}_ and 32 digits from 0 to f` })
}

/** Ids of materials stand in the bodies of solves, so they are short, and tell nothing of when they were made. */
export function newMaterialId(): string {
  return OWN_PREFIX + nanoid()
}

/** As in a body, without the quotes around it. */
export const MATERIAL_ID = `${OWN_PREFIX}[0-9A-Za-z_-]{21}`

export const materialIdField = z
  .string()
  .regex(new RegExp(`^${MATERIAL_ID}$`))
  .meta({ 'x-accepted': `${OWN_PREFIX} and 21 characters` })

const requestId = /^req_[0-9a-f]{12}7[0-9a-f]{3}[89ab][0-9a-f]{15}$/

/** The instant at which a request began, or undefined where the text is no request id. */
export function instantOf(id: string): Date | undefined {
  return requestId.test(id) ? new Date(Number.parseInt(id.slice(4, 16), 16)) : undefined
}
