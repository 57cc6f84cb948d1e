type Json = Record<string, unknown>

/** A schema shorter than this is not worth a reference. */
const WORTH = 160

const pascal = (name: string) => name.charAt(0).toUpperCase() + name.slice(1)

/**
 * The same field stands in the input of most questions of most cases. Each that is met more than once gets a name of its
 * own, from the field's, and is referred to; a field that says something else under the same name gets the next number.
 */
export function sharedFields(document: Json): Json {
  const components = document['components'] as { schemas: Record<string, Json> }
  const inputs = Object.entries(components.schemas).filter(([name]) => name.endsWith('Input'))
  const times = countOf(inputs.map(([, schema]) => schema))
  const names = new Map<string, string>()
  const shared: Record<string, Json> = {}
  const refer = (field: string, schema: Json): Json => {
    const text = JSON.stringify(schema)
    if (text.length < WORTH || (times.get(text) ?? 0) < 2) return withFields(schema)
    const name = names.get(text) ?? free(`${pascal(field)}Field`, { ...components.schemas, ...shared })
    names.set(text, name)
    shared[name] = schema
    return { $ref: `#/components/schemas/${name}` }
  }
  const withFields = (schema: Json): Json => {
    const properties = Object.entries(propertiesOf(schema)).map(([field, one]) => [field, refer(field, one)])
    return properties.length === 0 ? schema : { ...schema, properties: Object.fromEntries(properties) as Json }
  }
  const schemas = Object.fromEntries(inputs.map(([name, schema]) => [name, withFields(schema)]))
  return { ...document, components: { ...components, schemas: { ...components.schemas, ...schemas, ...shared } } }
}

const propertiesOf = (schema: Json) => (schema['properties'] ?? {}) as Record<string, Json>

/** How often each field is met, those within fields too. */
function countOf(schemas: readonly Json[]): Map<string, number> {
  const times = new Map<string, number>()
  const count = (schema: Json): void => {
    for (const field of Object.values(propertiesOf(schema))) {
      const text = JSON.stringify(field)
      times.set(text, (times.get(text) ?? 0) + 1)
      count(field)
    }
  }
  schemas.forEach(count)
  return times
}

function free(name: string, taken: Json): string {
  if (!(name in taken)) return name
  let number = 2
  while (`${name}${number}` in taken) number++
  return `${name}${number}`
}
