const WIDTH = 56

/** JSON with short lists and objects on one line, and long lists of numbers in filled lines. */
export function jsonText(value: unknown, indent = ''): string {
  const flat = JSON.stringify(value) ?? 'null'
  if (!isObject(value)) return flat
  const spaced = onOneLine(value)
  if (spaced.length + indent.length <= WIDTH && !hasObjects(value)) return spaced
  const inner = `${indent}  `
  if (Array.isArray(value)) {
    const plain = value.every((v) => !isObject(v))
    const lines = plain ? filled(value, inner) : value.map((v) => inner + jsonText(v, inner))
    return `[\n${lines.join(',\n')}\n${indent}]`
  }
  const lines = Object.entries(value).map(([name, v]) => `${inner}${JSON.stringify(name)}: ${jsonText(v, inner)}`)
  return lines.length ? `{\n${lines.join(',\n')}\n${indent}}` : '{}'
}

function filled(values: readonly unknown[], indent: string): string[] {
  const lines: string[] = []
  let line = indent
  for (const value of values) {
    const text = JSON.stringify(value) ?? 'null'
    if (line !== indent && line.length + text.length + 2 > WIDTH) {
      lines.push(line)
      line = indent
    }
    line += line === indent ? text : `, ${text}`
  }
  return [...lines, line]
}

const isObject = (value: unknown): value is object => typeof value === 'object' && value !== null

function hasObjects(value: object): boolean {
  return Object.values(value).some((v) => isObject(v) && !Array.isArray(v) && Object.keys(v).length > 0)
}

function onOneLine(value: unknown): string {
  if (!isObject(value)) return JSON.stringify(value) ?? 'null'
  if (Array.isArray(value)) return `[${value.map(onOneLine).join(', ')}]`
  const entries = Object.entries(value).map(([name, v]) => `${JSON.stringify(name)}: ${onOneLine(v)}`)
  return entries.length ? `{ ${entries.join(', ')} }` : '{}'
}
