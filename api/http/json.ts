import { SyntaxKind, createScanner } from 'jsonc-parser'
import { Problem } from '../problems.ts'

/** Bytes of a body, after decompression. */
export const BODY_LIMIT = 4 * 1024 * 1024
const MAX_DEPTH = 32

/** JSON text as a value. Refuses what parsers disagree on: deep nesting first, then syntax, then equal names. */
export function parseJson(text: string): unknown {
  if (depthOf(text) > MAX_DEPTH) throw new Problem('too-deep')
  let value: unknown
  try {
    value = JSON.parse(text)
  } catch (error) {
    throw new Problem('malformed-json', `The body is not JSON: ${placeOf(error as SyntaxError)}.`)
  }
  refuseEqualNames(text)
  return value
}

/* The parser's message quotes the body; only the place is ours to repeat. */
function placeOf(error: SyntaxError): string {
  const position = /position (\d+)/.exec(error.message)?.[1]
  return position ? `a fault at character ${position}` : 'it ends too early, or something follows it'
}

function depthOf(text: string): number {
  let depth = 0
  let deepest = 0
  let inText = false
  for (let i = 0; i < text.length; i++) {
    const c = text.charCodeAt(i)
    if (inText) {
      if (c === 0x5c) i++
      else if (c === 0x22) inText = false
    } else if (c === 0x22) inText = true
    else if (c === 0x7b || c === 0x5b) deepest = Math.max(deepest, ++depth)
    else if (c === 0x7d || c === 0x5d) depth--
  }
  return deepest
}

/* A text that is a name is followed by a colon; each object has its own set of names. */
function refuseEqualNames(text: string): void {
  const scanner = createScanner(text, true)
  const open: (Set<string> | null)[] = []
  let last = ''
  for (let token = scanner.scan(); token !== SyntaxKind.EOF; token = scanner.scan()) {
    if (token === SyntaxKind.OpenBraceToken) open.push(new Set())
    else if (token === SyntaxKind.OpenBracketToken) open.push(null)
    else if (token === SyntaxKind.CloseBraceToken || token === SyntaxKind.CloseBracketToken) open.pop()
    else if (token === SyntaxKind.StringLiteral) last = scanner.getTokenValue()
    else if (token === SyntaxKind.ColonToken) {
      const names = open.at(-1)
      if (names?.has(last)) throw new Problem('duplicate-name', `"${last.slice(0, 60)}" stands twice in one object.`)
      names?.add(last)
    }
  }
}
