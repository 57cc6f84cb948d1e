import { z } from 'zod'
import { type Issue, MAX_ISSUES } from './errors.ts'
import { issueAt, issuesOf, unwrap } from './validate.ts'

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
  lists: Record<string, number[]>
  issues: Issue[]
}

/**
 * Reads the long lists of a body apart. A schema makes an issue of every bad element, a hundred thousand of them where
 * fifty are told; here the length is looked at first, and reading stops at the fiftieth.
 */
export function readLists(schema: z.ZodObject, body: unknown): Read {
  if (typeof body !== 'object' || body === null || Array.isArray(body)) return { body, lists: {}, issues: [] }
  const brief: Record<string, unknown> = { ...body }
  const lists: Record<string, number[]> = {}
  const issues: Issue[] = []
  for (const [name, field] of Object.entries(schema.shape)) {
    const list = known.get(unwrap(field as z.ZodType)) ?? known.get(field as z.ZodType)
    const given = Object.hasOwn(brief, name) ? brief[name] : undefined
    if (!list || !Array.isArray(given) || given.length === 0) continue
    issues.push(...refusalsOf(schema, name, list, given))
    lists[name] = given as number[]
    brief[name] = [list.min]
  }
  return { body: brief, lists, issues }
}

function refusalsOf(schema: z.ZodObject, name: string, list: NumberList, given: readonly unknown[]): Issue[] {
  if (given.length > list.most)
    return [issueAt(schema, [name], 'wrong-length', `${name} must have at most ${list.most} entries.`)]
  const issues: Issue[] = []
  for (let i = 0; i < given.length && issues.length < MAX_ISSUES; i++) {
    const value = given[i]
    if (typeof value === 'number' && value >= list.min && value <= list.max) continue
    const result = list.element.safeParse(value, { reportInput: true })
    if (!result.success) issues.push(...issuesOf(schema, result.error, [name, i]))
  }
  return issues
}
