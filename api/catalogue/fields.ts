import { z } from 'zod'
import type { Case } from '../../solvers/case.ts'
import { solve } from '../../solvers/operations/solve.ts'

type Schema = Record<string, unknown>

interface SubFieldEntry {
  name: string
  required: boolean
  schema: Schema
  title?: string
  symbol?: string
  unit?: string
  hint?: string
  accepted?: string
  typical?: number[]
}

interface KindEntry {
  kind: string
  title?: string
  hint?: string
  fields: SubFieldEntry[]
}

export interface FieldEntry extends SubFieldEntry {
  fields?: SubFieldEntry[]
  kinds?: KindEntry[]
}

/** The fields of a solve, told from its schema: of an object what it holds, of alternatives what each kind holds. */
export function fieldsOf(c: Case): FieldEntry[] {
  return entriesOf(z.toJSONSchema(solve.input(c), { io: 'input' }) as Schema).map((entry) => ({
    ...entry,
    ...insideOf(entry.schema),
  }))
}

function entriesOf(object: Schema): SubFieldEntry[] {
  const required = new Set(object['required'] as string[] | undefined)
  return Object.entries((object['properties'] ?? {}) as Record<string, Schema>).map(([name, schema]) => ({
    name,
    required: required.has(name),
    ...known({
      title: schema['title'],
      symbol: schema['x-symbol'],
      unit: schema['x-ucum'],
      hint: schema['x-hint'],
      accepted: schema['x-accepted'],
      typical: schema['x-typical'],
    }),
    schema,
  }))
}

function insideOf(schema: Schema): Pick<FieldEntry, 'fields' | 'kinds'> {
  const object = (schema['items'] ?? schema) as Schema
  if (object['properties']) return { fields: entriesOf(object) }
  const kinds = alternativesOf(schema)
  return kinds.length > 0 ? { kinds } : {}
}

/** Alternatives are told apart by their kind; a schema without them has none. */
function alternativesOf(schema: Schema): KindEntry[] {
  const options = (schema['oneOf'] ?? schema['anyOf'] ?? []) as Schema[]
  return options.flatMap((option) => {
    const properties = option['properties'] as Record<string, Schema> | undefined
    const kind = properties?.['kind']?.['const']
    if (typeof kind !== 'string') return []
    const fields = entriesOf(option).filter(({ name }) => name !== 'kind')
    return [{ kind, ...known({ title: option['title'], hint: option['x-hint'] }), fields }]
  })
}

function known(entries: Schema): Schema {
  return Object.fromEntries(Object.entries(entries).filter(([, value]) => value !== undefined))
}
