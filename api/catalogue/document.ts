import { readFile } from 'node:fs/promises'
import { etagOf } from '../http/render.ts'

const file = new URL('../../openapi/openapi.json', import.meta.url)
let kept: Promise<{ text: string; etag: string }> | undefined

/** The public document as it was generated; it changes only with the program. */
export function publicDocument(): Promise<{ text: string; etag: string }> {
  kept ??= readFile(file, 'utf8').then((text) => ({ text, etag: etagOf(text) }))
  return kept
}
