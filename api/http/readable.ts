import { withoutKeys } from '../keys/key.ts'

const unreadable = /[\p{Cc}\p{Cs}]/gu

/** Texts without keys, half surrogate pairs and control characters: what may be answered, logged and kept. */
export function readableText(text: string): string {
  return withoutKeys(text).replace(unreadable, '\uFFFD')
}

/** Characters of one text of a problem; names that callers invent are longer. */
const LONGEST = 600

/** A problem as it is answered, logged and kept, all its texts readable and none of them long. */
export function readable<T>(value: T): T {
  if (typeof value === 'string') return readableText(value.slice(0, LONGEST)) as T
  if (Array.isArray(value)) return value.map(readable) as T
  if (typeof value !== 'object' || value === null) return value
  return Object.fromEntries(Object.entries(value).map(([name, part]) => [name, readable(part)])) as T
}
