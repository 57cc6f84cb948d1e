/** Levels of nesting, names in one object, and objects and lists in all. No operation needs more than a few. */
const MAX_DEPTH = 32
const MAX_NAMES = 10_000
const MAX_PARTS = 10_000

const [QUOTE, BACKSLASH, COMMA, COLON] = [0x22, 0x5c, 0x2c, 0x3a]
const [OPEN_LIST, CLOSE_LIST, OPEN_OBJECT, CLOSE_OBJECT] = [0x5b, 0x5d, 0x7b, 0x7d]

export type Scanned = 'too-deep' | 'too-many-parts' | { twice: string } | undefined

/**
 * What a parser does not say of a JSON text: how deep it is and which name stands twice in one object. One pass that
 * builds no values, since it runs before anything is known of the text. Of a text that is not JSON it may say anything.
 */
export function scan(text: string): Scanned {
  /* By level: whether it is an object, and its names so far; the sets are used again by the next object there. */
  const isObject: boolean[] = []
  const names: Set<string>[] = []
  let depth = 0
  let parts = 0
  let nameNext = false
  let twice: string | undefined
  for (let i = 0; i < text.length; i++) {
    const c = text.charCodeAt(i)
    if (c === QUOTE) {
      const end = endOfText(text, i)
      if (nameNext) {
        const name = nameAt(text, i, end)
        const known = names[depth] as Set<string>
        if (known.has(name)) twice ??= name
        if (known.add(name).size > MAX_NAMES) return 'too-many-parts'
        nameNext = false
      }
      i = end
    } else if (c === COMMA) nameNext = depth > 0 && isObject[depth] === true
    else if (c === OPEN_OBJECT || c === OPEN_LIST) {
      if (++depth > MAX_DEPTH) return 'too-deep'
      if (++parts > MAX_PARTS) return 'too-many-parts'
      nameNext = isObject[depth] = c === OPEN_OBJECT
      if (nameNext) {
        const known = (names[depth] ??= new Set())
        if (known.size > 0) known.clear()
      }
    } else if (c === CLOSE_OBJECT || c === CLOSE_LIST) {
      depth = Math.max(0, depth - 1)
      nameNext = false
    } else if (c === COLON) nameNext = false
  }
  return twice === undefined ? undefined : { twice }
}

function endOfText(text: string, start: number): number {
  for (let i = start + 1; i < text.length; i++) {
    const c = text.charCodeAt(i)
    if (c === QUOTE) return i
    if (c === BACKSLASH) i++
  }
  return text.length
}

/* Names are compared as they are read; a wrong escape is the parser's to refuse. */
function nameAt(text: string, start: number, end: number): string {
  const raw = text.slice(start + 1, end)
  if (!raw.includes('\\')) return raw
  try {
    return JSON.parse(`"${raw}"`) as string
  } catch {
    return raw
  }
}
