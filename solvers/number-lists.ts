import { z } from 'zod'
import { type Issue, MAX_ISSUES } from './errors.ts'
import { issueAt, issuesOf, shapeFor, unwrap } from './validate.ts'

interface NumberList {
  element: z.ZodType
  min: number
  max: number
  most: number
}

const known = new WeakMap<z.ZodType, NumberList>()

/** Makes a schema of many numbers known, so that its elements are read here and not one by one by the schema. */
export function asNumberList<S extends z.ZodType>(schema: S, list: NumberList): S {
  known.set(schema, list)
  return schema
}

interface Read {
  /** The body with each list cut to one number that the schema accepts. */
  body: unknown
  lists: readonly { path: readonly string[]; values: number[] }[]
  issues: Issue[]
}

/**
 * Reads the long lists of a body apart, nested ones too. A schema makes an issue of every bad element, a hundred
 * thousand of them where fifty are told; here the length is looked at first, and reading stops at the fiftieth.
 */
export function readLists(schema: z.ZodObject, body: unknown): Read {
  const lists: { path: string[]; values: number[] }[] = []
  const issues: Issue[] = []
  const brief = (at: z.ZodType, given: unknown, path: string[]): unknown => {
    const list = known.get(at) ?? known.get(unwrap(at))
    if (list) {
      if (!Array.isArray(given) || given.length === 0) return given
      issues.push(...refusalsOf(schema, path, list, given))
      lists.push({ path, values: given as number[] })
      return [list.min]
    }
    const shape = isPlain(given) && shapeFor(at, given)
    if (!shape) return given
    const entries = Object.entries(given).map(([name, value]) => [
      name,
      Object.hasOwn(shape, name) ? brief(shape[name]!, value, [...path, name]) : value,
    ])
    return Object.fromEntries(entries)
  }
  return { body: brief(schema, body, []), lists, issues }
}

/** Puts the lists back into what the schema made of the brief body. */
export function withLists(parsed: Record<string, unknown>, lists: Read['lists']): Record<string, unknown> {
  for (const { path, values } of lists) {
    let at = parsed
    for (const name of path.slice(0, -1)) at = at[name] as Record<string, unknown>
    at[path.at(-1)!] = values
  }
  return parsed
}

const isPlain = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

function refusalsOf(
  schema: z.ZodObject,
  path: readonly string[],
  list: NumberList,
  given: readonly unknown[],
): Issue[] {
  if (given.length > list.most)
    return [issueAt(schema, path, 'wrong-length', `${path.join('/')} must have at most ${list.most} entries.`)]
  const issues: Issue[] = []
  for (let i = 0; i < given.length && issues.length < MAX_ISSUES; i++) {
    const value = given[i]
    if (typeof value === 'number' && value >= list.min && value <= list.max) continue
    const result = list.element.safeParse(value, { reportInput: true })
    if (!result.success) issues.push(...issuesOf(schema, result.error, [...path, i]))
  }
  return issues
}
