/** A line of a stream: its text, or why it has none. */
export type Line = { text: string } | { fault: 'too-long' | 'not-utf-8' }

const NEWLINE = 0x0a

/** Splits a stream of bytes into lines and never holds more of one than the limit. Blank lines are left out. */
export async function* linesOf(chunks: AsyncIterable<Uint8Array>, limit: number): AsyncGenerator<Line> {
  let parts: Uint8Array[] = []
  let length = 0
  const take = (): Line | null => {
    const line = length > limit ? ({ fault: 'too-long' } as const) : decode(Buffer.concat(parts))
    parts = []
    length = 0
    return 'text' in line && line.text.trim() === '' ? null : line
  }
  for await (const chunk of chunks) {
    let from = 0
    for (let at = chunk.indexOf(NEWLINE); at >= 0; at = chunk.indexOf(NEWLINE, from)) {
      keep(chunk.subarray(from, at))
      from = at + 1
      const line = take()
      if (line) yield line
    }
    keep(chunk.subarray(from))
  }
  const last = take()
  if (last) yield last

  function keep(part: Uint8Array): void {
    length += part.length
    if (length <= limit) parts.push(part)
    else parts = []
  }
}

function decode(bytes: Uint8Array): Line {
  try {
    return { text: new TextDecoder('utf-8', { fatal: true }).decode(bytes) }
  } catch {
    return { fault: 'not-utf-8' }
  }
}
