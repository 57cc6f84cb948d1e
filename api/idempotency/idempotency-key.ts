import { invalidHeader } from '../problems.ts'

const quoted = /^"((?:[\x20\x21\x23-\x5b\x5d-\x7e]|\\["\\]){1,255})"$/
const bare = /^[\x21\x23-\x2b\x2d-\x3a\x3c-\x5b\x5d-\x7e]{1,255}$/

/** The key of the header, written as a string of structured fields or without quotes. */
export function idempotencyKeyOf(header: string): string {
  const inside = quoted.exec(header)?.[1]
  if (inside !== undefined) return inside.replace(/\\(["\\])/g, '$1')
  if (bare.test(header)) return header
  const accepted = '1 to 255 visible characters, such as a UUID, with or without quotes'
  throw invalidHeader('Idempotency-Key', 'The header is no key.', accepted)
}
