import { createHash } from 'node:crypto'
import { crc32 } from 'node:zlib'
import { customAlphabet } from 'nanoid'
import { environments } from '../../drizzle/schema.ts'

const digits = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz'
const LENGTH = 32
/** What a key looks like, for scanners; the last six characters are the checksum of the 32 before them. */
export const KEY_PATTERN = 'soak_(trial|metered)_([0-9A-Za-z]{32})([0-9A-Za-z]{6})'
const form = new RegExp(`^${KEY_PATTERN}$`)
export type Environment = (typeof environments)[number]

/** Base62 of the CRC-32, so that scanners and the gate can tell a misspelt key without looking it up. */
export function checksum(random: string): string {
  let rest = crc32(random)
  let text = ''
  for (let i = 0; i < 6; i++) {
    text = digits[rest % 62] + text
    rest = Math.floor(rest / 62)
  }
  return text
}

const draw = customAlphabet(digits, LENGTH)

export function newKey(environment: Environment): string {
  const random = draw()
  return `soak_${environment}_${random}${checksum(random)}`
}

export function isKey(text: string): boolean {
  const match = form.exec(text)
  return match !== null && checksum(match[2] as string) === match[3]
}

/** The only form in which a key is kept. */
export function hashKey(key: string): Buffer {
  return createHash('sha256').update(key).digest()
}

/** What may be shown of a key: its environment and the first six characters. */
export function prefixOf(key: string): string {
  return key.replace(/^(soak_[a-z]+_.{6}).*$/, '$1…')
}

/* Any length: a part of a key that was cut off somewhere is still a part of a key. */
const anyKey = /soak_(trial|metered)_[0-9A-Za-z]{7,}/g
const escape = /%([0-7][0-9a-f])/gi

/** A text in which no key can be read any more, not even percent-encoded as in an address. */
export function withoutKeys(text: string): string {
  const plain = text.replace(anyKey, prefixOf)
  const decoded = decodedText(plain)
  return decoded === plain || decoded.search(anyKey) < 0 ? plain : decoded.replace(anyKey, prefixOf)
}

/* Encoded more often than that, a key is not seen in a text by accident. */
const ROUNDS = 4

function decodedText(text: string): string {
  let decoded = text
  for (let round = 0; round < ROUNDS && decoded.includes('%'); round++)
    decoded = decoded.replace(escape, (_, code: string) => String.fromCharCode(Number.parseInt(code, 16)))
  return decoded
}
