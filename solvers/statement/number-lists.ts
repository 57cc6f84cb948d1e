import { z } from 'zod'
import { type Issue, MAX_ISSUES } from '../errors.ts'
import { OwnMaterial } from '../materials/own-material.ts'
import { readStated } from '../units/read.ts'
import { issueAt, issuesOf, metaOf, shapeFor, unwrap } from './validate.ts'

interface NumberList {
  element: z.ZodType
  unit: string
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

type Path = readonly (string | number)[]

interface Read {
  /** The body in SI, with each list cut to one number that the schema accepts. */
  body: unknown
  /** What is put back in its place once the schema has accepted the body. */
  lists: readonly { path: Path; values: unknown }[]
  issues: Issue[]
}

/** Longer lists of objects are left to the schema, which refuses their length. */
const MOST_OBJECTS = 10_000

/**
 * Reads a body along its schema, nested fields too, before the schema itself does: numbers with a unit become SI, and
 * the long lists are read apart. A schema makes an issue of every bad element, a hundred thousand of them where fifty are
 * told; here the length is looked at first, and reading stops at the fiftieth.
 */
export function readLists(schema: z.ZodObject, body: unknown): Read {
  const lists: { path: Path; values: unknown }[] = []
  const issues: Issue[] = []

  const keepList = (list: NumberList, given: unknown, path: Path): unknown => {
    if (!Array.isArray(given) || given.length === 0) return given
    const read = readList(schema, path, list, given)
    issues.push(...read.issues)
    lists.push({ path, values: read.values })
    return [list.min]
  }

  const inObject = (at: z.ZodType, given: Record<string, unknown>, path: Path): unknown => {
    const shape = shapeFor(at, given)
    if (!shape) return given
    const entries = Object.entries(given).map(([name, value]) => [
      name,
      Object.hasOwn(shape, name) ? brief(shape[name]!, value, [...path, name]) : value,
    ])
    return Object.fromEntries(entries)
  }

  const brief = (at: z.ZodType, given: unknown, path: Path): unknown => {
    const list = known.get(at) ?? known.get(unwrap(at))
    if (list) return keepList(list, given, path)
    if (given instanceof OwnMaterial) {
      lists.push({ path, values: given })
      return given.id
    }
    if (isPlain(given)) {
      const unit = isStated(given) ? unitOfNumber(at) : undefined
      if (unit === undefined) return inObject(at, given, path)
      const value = readStated(unit, given, path)
      if (typeof value === 'number') return value
      issues.push(...value)
      return (unwrap(at) as z.ZodNumber).minValue ?? 0
    }
    const element = Array.isArray(given) && given.length <= MOST_OBJECTS && elementOf(at)
    return element ? (given as unknown[]).map((one, i) => brief(element, one, [...path, i])) : given
  }

  return { body: brief(schema, body, []), lists, issues: issues.slice(0, MAX_ISSUES) }
}

/** Puts the lists back into what the schema made of the brief body. */
export function withLists(parsed: Record<string, unknown>, lists: Read['lists']): Record<string, unknown> {
  for (const { path, values } of lists) {
    let at = parsed as Record<string | number, unknown>
    for (const name of path.slice(0, -1)) at = at[name] as Record<string | number, unknown>
    at[path.at(-1)!] = values
  }
  return parsed
}

const isPlain = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

/** Meant as a number with a unit; what has neither part is an object where none belongs, and told so. */
const isStated = (given: object) => Object.hasOwn(given, 'value') || Object.hasOwn(given, 'unit')

/** The SI unit of a quantity; undefined where the schema is of something else. */
function unitOfNumber(schema: z.ZodType): string | undefined {
  if (unwrap(schema).def.type !== 'number') return undefined
  const unit = metaOf(schema)?.['x-ucum']
  return typeof unit === 'string' ? unit : undefined
}

function elementOf(schema: z.ZodType): z.ZodType | undefined {
  return (unwrap(schema).def as { element?: z.ZodType }).element
}

function readList(schema: z.ZodObject, path: Path, list: NumberList, given: readonly unknown[]) {
  if (given.length > list.most) {
    const detail = `${path.join('/')} must have at most ${list.most} entries.`
    return { values: given, issues: [issueAt(schema, path, 'wrong-length', detail)] }
  }
  const issues: Issue[] = []
  let values = given
  for (let i = 0; i < given.length && issues.length < MAX_ISSUES; i++) {
    let value = given[i]
    if (typeof value === 'number' && value >= list.min && value <= list.max) continue
    if (isPlain(value) && isStated(value)) {
      const read = readStated(list.unit, value, [...path, i])
      if (typeof read !== 'number') {
        issues.push(...read)
        continue
      }
      if (values === given) values = [...given]
      ;(values as unknown[])[i] = value = read
    }
    const result = list.element.safeParse(value, { reportInput: true })
    if (!result.success) issues.push(...issuesOf(schema, result.error, [...path, i]))
  }
  return { values, issues }
}
