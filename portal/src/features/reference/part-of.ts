/** An OpenAPI document, as far as it is read here. */
export interface Contract {
  paths: Record<string, Record<string, { 'x-case'?: string; tags?: string[] }>>
  components: Record<string, Record<string, unknown>>
  tags: { name: string }[]
}

/** The cases whose questions a document holds. */
export function casesIn({ paths }: Contract): string[] {
  const operations = Object.values(paths).flatMap((methods) => Object.values(methods))
  return [...new Set(operations.flatMap((o) => o['x-case'] ?? []))]
}

/** What belongs to no case, and the questions of one: an explorer that is given all of them takes half a minute. */
export function partOf(contract: Contract, caseId: string): Contract {
  const paths = Object.fromEntries(
    Object.entries(contract.paths).filter(([, methods]) =>
      Object.values(methods).every((o) => o['x-case'] === undefined || o['x-case'] === caseId),
    ),
  )
  const used = new Set(Object.values(paths).flatMap((methods) => Object.values(methods).flatMap((o) => o.tags ?? [])))
  return {
    ...contract,
    paths,
    components: reached(contract, paths),
    tags: contract.tags.filter(({ name }) => used.has(name)),
  }
}

/** The components that the paths refer to, directly or through others; security schemes are named, not referred to. */
function reached({ components }: Contract, paths: Contract['paths']): Contract['components'] {
  const kept: Contract['components'] = { securitySchemes: components['securitySchemes'] ?? {} }
  const waiting: unknown[] = [paths]
  while (waiting.length > 0)
    for (const [, kind, name] of JSON.stringify(waiting.pop()).matchAll(/"#\/components\/([^/"]+)\/([^"]+)"/g)) {
      const component = kind && name ? components[kind]?.[name] : undefined
      if (!kind || !name || component === undefined || kept[kind]?.[name] !== undefined) continue
      kept[kind] = { ...kept[kind], [name]: component }
      waiting.push(component)
    }
  return kept
}
