import { visit } from 'jsonc-parser'
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

/* Each open object has its own set of names. Only ever given a text that is JSON and not deep. */
function refuseEqualNames(text: string): void {
  const open: Set<string>[] = []
  visit(text, {
    onObjectBegin: () => void open.push(new Set()),
    onObjectEnd: () => void open.pop(),
    onObjectProperty(name) {
      const names = open.at(-1)
      if (names?.has(name)) throw new Problem('duplicate-name', `"${name.slice(0, 60)}" stands twice in one object.`)
      names?.add(name)
    },
  })
}
