const WIDTH = 72

/** JSON with short lists and objects on one line. */
export function jsonText(value: unknown, indent = ''): string {
  const flat = JSON.stringify(value) ?? 'null'
  if (typeof value !== 'object' || value === null) return flat
  const spaced = spacedOut(value)
  if (spaced.length + indent.length <= WIDTH && !nested(value)) return spaced
  const inner = `${indent}  `
  if (Array.isArray(value)) return `[\n${value.map((v) => inner + jsonText(v, inner)).join(',\n')}\n${indent}]`
  const lines = Object.entries(value).map(([name, v]) => `${inner}${JSON.stringify(name)}: ${jsonText(v, inner)}`)
  return lines.length ? `{\n${lines.join(',\n')}\n${indent}}` : '{}'
}

function nested(value: object): boolean {
  return Object.values(value).some(
    (v) => typeof v === 'object' && v !== null && Object.keys(v).length > 0 && !Array.isArray(value),
  )
}

function spacedOut(value: object): string {
  if (Array.isArray(value)) return `[${value.map((v) => flatOf(v)).join(', ')}]`
  const entries = Object.entries(value).map(([name, v]) => `${JSON.stringify(name)}: ${flatOf(v)}`)
  return entries.length ? `{ ${entries.join(', ')} }` : '{}'
}

const flatOf = (value: unknown): string =>
  typeof value === 'object' && value !== null ? spacedOut(value) : (JSON.stringify(value) ?? 'null')
