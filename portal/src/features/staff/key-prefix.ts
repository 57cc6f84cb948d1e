const wholeKey = /^\s*(soak_[a-z]+_[0-9A-Za-z]{6})[0-9A-Za-z]{4,}\s*$/

/** The prefix of a key that was pasted whole, which nobody but its owner may hold; undefined for any other text. */
export function prefixOf(text: string): string | undefined {
  return wholeKey.exec(text)?.[1]
}

/** The end of a request id: enough to tell the rows of a list apart. */
export const shortId = (id: string): string => `…${id.slice(-8)}`
