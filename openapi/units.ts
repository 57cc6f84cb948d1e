import { dimensions } from '../api/catalogue/codes.ts'

type Json = Record<string, unknown>

const isObject = (value: unknown): value is Json => typeof value === 'object' && value !== null && !Array.isArray(value)

/** What limits a number, and goes with it; the rest is told of the field. */
const limits = ['type', 'minimum', 'maximum', 'exclusiveMinimum', 'exclusiveMaximum']

/**
 * A document in which every number of a quantity may also be stated with a unit. The schemas that validate hold numbers
 * alone, since a unit is converted before them; a field says by `x-units` that it is such a number.
 */
export function withUnits(document: Json): Json {
  const used = new Set<string>()
  const walk = (at: unknown): unknown => {
    if (Array.isArray(at)) return at.map(walk)
    if (!isObject(at)) return at
    const changed = Object.fromEntries(Object.entries(at).map(([name, inner]) => [name, walk(inner)]))
    return Array.isArray(at['x-units']) && at['type'] === 'number' ? eitherWay(changed, used) : changed
  }
  const changed = walk(document) as Json
  const components = changed['components'] as Json
  const schemas = { ...(components['schemas'] as Json), ...Object.fromEntries([...used].sort().map(schemaOf)) }
  return { ...changed, components: { ...components, schemas } }
}

function eitherWay(field: Json, used: Set<string>): Json {
  const si = field['x-ucum'] as string
  const { 'x-units': _, ...rest } = field
  if (!dimensions[si]) return rest
  used.add(si)
  const entries = Object.entries(rest)
  const about = entries.filter(([name]) => !limits.includes(name))
  const number = entries.filter(([name]) => limits.includes(name))
  return {
    anyOf: [Object.fromEntries(number), { $ref: `#/components/schemas/${nameOf(si)}` }],
    ...Object.fromEntries(about),
  }
}

const nameOf = (si: string) => `${dimensions[si]?.name}WithUnit`

function schemaOf(si: string): [string, Json] {
  const codes = Object.keys(dimensions[si]?.units ?? {})
  return [
    nameOf(si),
    {
      type: 'object',
      description: `A number with the UCUM code of its unit. It is converted exactly; a plain number is in ${si}.`,
      properties: { value: { type: 'number' }, unit: { type: 'string', enum: codes } },
      required: ['value', 'unit'],
      additionalProperties: false,
      examples: [{ value: 12, unit: codes.at(2) ?? codes[0] }],
    },
  ]
}
