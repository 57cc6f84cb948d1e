import type { Case } from './described.ts'

export type TopField = Case['fields'][number]
/** A field of a case, or one inside another. */
export type Field = Omit<TopField, 'fields' | 'kinds'> & Pick<TopField, 'fields' | 'kinds'>

interface FieldSchema {
  'x-units'?: readonly string[]
  'x-material'?: boolean
  type?: string
  const?: unknown
  enum?: readonly unknown[]
  anyOf?: readonly FieldSchema[]
  items?: FieldSchema
  default?: unknown
}

/**
 * How a field is entered: as one number, a list, a choice of one or of several, a word, rows of numbers, or as
 * fields of its own, which may depend on its kind.
 */
export type Control = 'number' | 'list' | 'choice' | 'several' | 'text' | 'rows' | 'group' | 'kinds'

/** The values of a closed list, in the type the contract has for them. */
function choicesOf(schema: FieldSchema): readonly unknown[] {
  if (schema.enum) return schema.enum
  if (schema.const !== undefined) return [schema.const]
  if (schema.anyOf?.every((one) => one.const !== undefined || one.enum))
    return schema.anyOf.flatMap((one) => one.enum ?? [one.const])
  return []
}

export function controlOf(field: Field): Control {
  const schema = field.schema as FieldSchema
  if (field.kinds) return 'kinds'
  if (field.fields) return schema.items ? 'rows' : 'group'
  if (schema.items) return choicesOf(schema.items).length > 0 ? 'several' : 'list'
  if (choicesOf(schema).length > 0) return 'choice'
  return schema.type === 'string' ? 'text' : 'number'
}

export const optionsOf = (field: Field): readonly unknown[] => {
  const schema = field.schema as FieldSchema
  return choicesOf(schema.items ?? schema)
}

/** The codes in which a number, or the numbers of a list, may be given; none where there is only one. */
export function unitsOf(field: Field): readonly string[] {
  const schema = field.schema as FieldSchema
  const units = schema['x-units'] ?? schema.items?.['x-units'] ?? []
  return ['number', 'list'].includes(controlOf(field)) && units.length > 1 ? units : []
}

/** A field that takes the id of a material. */
export const isMaterial = (field: Field): boolean => (field.schema as FieldSchema)['x-material'] === true

export const defaultOf = (field: Field): unknown => (field.schema as FieldSchema).default

/** Every field that may stand inside one, each once. */
export function allInside(field: Field): readonly Field[] {
  const all = field.fields ?? (field.kinds ?? []).flatMap(({ fields }) => fields)
  return all.filter(({ name }, i) => all.findIndex((other) => other.name === name) === i)
}

/** The fields inside one, as its kind has them. */
export function fieldsInside(field: Field, kind: string): readonly Field[] {
  return field.fields ?? field.kinds?.find((one) => one.kind === kind)?.fields ?? []
}

/** What a kind is called. */
export function kindTitle({ kind, title }: { kind: string; title?: string | undefined }): string {
  return title ?? kind.charAt(0).toUpperCase() + kind.slice(1).replaceAll('-', ' ')
}
