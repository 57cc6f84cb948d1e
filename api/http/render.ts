import { createHash } from 'node:crypto'

/** Names a body by its bytes: equal answers have equal tags, in every process. */
export function etagOf(text: string): string {
  return `"${createHash('sha256').update(text).digest('base64url').slice(0, 27)}"`
}

export interface Rendered {
  text: string
  etag: string
}

export function render(body: unknown): Rendered {
  const text = JSON.stringify(body)
  return { text, etag: etagOf(text) }
}
