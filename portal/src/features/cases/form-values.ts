import type { Body } from '../../solving/solve.ts'
import type { Case, Field } from './queries.ts'

/** What stands in the boxes of the form. */
export interface FormValues {
  /** Which statement of the heat capacity is sent; empty for none. */
  heat: string
  fields: Record<string, string | string[]>
}

interface FieldSchema {
  type?: string
  const?: unknown
  enum?: readonly unknown[]
  anyOf?: readonly FieldSchema[]
  items?: FieldSchema
  default?: unknown
}

export type Kind = 'number' | 'list' | 'choice' | 'several'

/** The values of a closed list, in the type the contract has for them. */
export function choicesOf(schema: FieldSchema): readonly unknown[] {
  if (schema.enum) return schema.enum
  if (schema.anyOf?.every((one) => one.const !== undefined || one.enum))
    return schema.anyOf.flatMap((one) => one.enum ?? [one.const])
  return []
}

export function kindOf(field: Field): Kind {
  const schema = field.schema as FieldSchema
  if (schema.items) return choicesOf(schema.items).length > 0 ? 'several' : 'list'
  return choicesOf(schema).length > 0 ? 'choice' : 'number'
}

export const optionsOf = (field: Field): readonly unknown[] => {
  const schema = field.schema as FieldSchema
  return choicesOf(schema.items ?? schema)
}

/** The ways in which a solid can state its heat capacity; exactly one is sent. */
const heatWays: readonly (readonly string[])[] = [
  ['density', 'specificHeat'],
  ['volumetricHeatCapacity'],
  ['diffusivity'],
]

/** The ways that a case offers, when there is more than one. */
export function waysOf(c: Case): readonly (readonly string[])[] {
  const names = new Set(c.fields.map(({ name }) => name))
  const ways = heatWays.filter((way) => way.every((name) => names.has(name)))
  return ways.length > 1 ? ways : []
}

export const wayName = (way: readonly string[]): string => way.join('+')

export function isSent(c: Case, name: string, heat: string): boolean {
  const way = waysOf(c).find((one) => one.includes(name))
  return !way || wayName(way) === heat
}

export function valuesOf(c: Case, body: Body): FormValues {
  const given = waysOf(c).find((way) => way.some((name) => name in body))
  const fields = Object.fromEntries(c.fields.map((field) => [field.name, textOf(field, body[field.name])]))
  return { heat: given ? wayName(given) : '', fields }
}

function textOf(field: Field, value: unknown): string | string[] {
  if (kindOf(field) === 'several')
    return ((value ?? (field.schema as FieldSchema).default ?? []) as unknown[]).map(String)
  if (value === undefined) return ''
  return Array.isArray(value) ? value.join(', ') : String(value)
}

/** The body of the call: what is empty is not sent, what is no number is sent as typed for the service to refuse. */
export function bodyOf(c: Case, { heat, fields }: FormValues): Record<string, unknown> {
  const body: Record<string, unknown> = {}
  for (const field of c.fields) {
    if (!isSent(c, field.name, heat)) continue
    const value = fields[field.name]
    if (value === undefined || value.length === 0 || (typeof value === 'string' && value.trim() === '')) continue
    const sent = valueOf(field, value)
    if (kindOf(field) === 'several' && JSON.stringify(sent) === JSON.stringify((field.schema as FieldSchema).default))
      continue
    body[field.name] = sent
  }
  return body
}

function valueOf(field: Field, value: string | string[]): unknown {
  if (Array.isArray(value)) return optionsOf(field).filter((option) => value.includes(String(option)))
  const text = value.trim()
  if (kindOf(field) === 'list')
    return text
      .split(/[\s,;]+/)
      .filter(Boolean)
      .map(numberOf)
  if (kindOf(field) === 'choice') return optionsOf(field).find((option) => String(option) === text) ?? text
  return numberOf(text)
}

function numberOf(text: string): number | string {
  const value = Number(text.replaceAll('\u2212', '-'))
  return Number.isFinite(value) ? value : text
}
