import type { ReactNode } from 'react'

const token = /("(?:[^"\\]|\\.)*")(\s*:)?|-?\b\d+(?:\.\d+)?(?:[eE][-+]?\d+)?\b/g

/** JSON with names, texts and numbers told apart. */
export function JsonCode({ text }: { text: string }) {
  const parts: ReactNode[] = []
  let from = 0
  for (const match of text.matchAll(token)) {
    const [whole, quoted, colon] = match
    if (match.index > from) parts.push(text.slice(from, match.index))
    const kind = quoted === undefined ? 'number' : colon === undefined ? 'string' : 'name'
    parts.push(
      <span key={match.index} className={kind}>
        {whole}
      </span>,
    )
    from = match.index + whole.length
  }
  parts.push(text.slice(from))
  return <code>{parts}</code>
}
