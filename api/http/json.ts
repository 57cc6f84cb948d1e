import { Problem } from '../problems.ts'
import { scan } from './scan.ts'

/** The bytes of a body as a JSON value. Refuses what parsers disagree on: deep nesting first, then syntax, then equal names. */
export function parseJson(bytes: Uint8Array): unknown {
  const text = decode(bytes)
  if (text === undefined) throw new Problem('malformed-json', 'The body is not UTF-8.')
  if (text.startsWith('\uFEFF')) throw new Problem('malformed-json', 'The body starts with a byte order mark.')
  const found = scan(text)
  if (typeof found === 'string') throw new Problem(found)
  let value: unknown
  try {
    value = JSON.parse(text)
  } catch (error) {
    throw new Problem('malformed-json', `The body is not JSON: ${placeOf(error as SyntaxError)}.`)
  }
  if (found) throw new Problem('duplicate-name', `"${found.twice.slice(0, 60)}" stands twice in one object.`)
  return value
}

/** The text of a body, or undefined where it is not UTF-8. */
export function decode(bytes: Uint8Array): string | undefined {
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes)
  } catch {
    return undefined
  }
}

/* The parser's message quotes the body; only the place is ours to repeat. */
function placeOf(error: SyntaxError): string {
  const position = /position (\d+)/.exec(error.message)?.[1]
  return position ? `a fault at character ${position}` : 'it ends too early, or something follows it'
}
