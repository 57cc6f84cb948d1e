import { withoutKeys } from '../keys/key.ts'

const unreadable = /[\p{Cc}\p{Cs}]/gu

/** Texts without keys, half surrogate pairs and control characters: what may be answered, logged and kept. */
export function readableText(text: string): string {
  return withoutKeys(text).replace(unreadable, '\uFFFD')
}

export function readable<T>(value: T): T {
  if (typeof value === 'string') return readableText(value) as T
  if (Array.isArray(value)) return value.map(readable) as T
  if (typeof value !== 'object' || value === null) return value
  return Object.fromEntries(Object.entries(value).map(([name, part]) => [name, readable(part)])) as T
}
