import type { z } from 'zod'
import { type DomainCode, type Issue, DomainError, MAX_ISSUES, pointerOf } from '../errors.ts'

/** Parses by a schema, or throws a DomainError whose issues name each field and what it would accept. */
export function parse<S extends z.ZodType>(schema: S, value: unknown): z.output<S> {
  const result = schema.safeParse(value, { reportInput: true })
  if (result.success) return result.data
  throw new DomainError(issuesOf(schema, result.error))
}

/** The issues of a failed parse, with pointers, codes of ours and what would be accepted. */
export function issuesOf(schema: z.ZodType, error: z.ZodError, within: readonly PropertyKey[] = []): Issue[] {
  return error.issues
    .slice(0, MAX_ISSUES)
    .flatMap((issue) => toIssues(schema, { ...issue, path: [...within, ...issue.path] } as RawIssue))
    .slice(0, MAX_ISSUES)
}

/** One issue at a place of a schema, with what would be accepted there. */
export function issueAt(schema: z.ZodType, path: readonly PropertyKey[], code: DomainCode, detail: string): Issue {
  const accepted = acceptedAt(schema, path)
  return { pointer: pointerOf(path), code, detail, ...(accepted ? { accepted } : {}) }
}

/** Names and values are quoted to this length. */
const QUOTED = 60

type RawIssue = z.core.$ZodIssue & { input?: unknown }

function toIssues(schema: z.ZodType, issue: RawIssue): Issue[] {
  if (issue.code === 'unrecognized_keys') {
    const at = schemaAt(schema, issue.path)
    const known = Object.keys((at && shapeFor(at, (issue.input ?? {}) as Record<string, unknown>)) ?? {})
    return issue.keys.slice(0, MAX_ISSUES).map((key) => ({
      pointer: pointerOf([...issue.path, key.slice(0, 4 * QUOTED)]),
      code: 'unknown-field' as const,
      detail: `There is no field "${key.slice(0, QUOTED)}" here.`,
      accepted: known.length ? known.join(', ') : 'no fields',
    }))
  }
  const [code, detail] = describe(issue)
  return [issueAt(schema, issue.path, code, detail)]
}

/** A union of objects that cannot tell which one is meant reports the object; what is at fault is its kind. */
function kindIssue(issue: RawIssue): [DomainCode, string] {
  const name = issue.path.join('/')
  const kind = (issue.input as Record<string, unknown> | undefined)?.['kind']
  if (kind === undefined) return ['missing-field', `${name} is missing.`]
  return ['not-in-list', `${name} is ${kindOf(kind)}, which is not one of the kinds offered.`]
}

function describe(issue: RawIssue): [DomainCode, string] {
  const name = issue.path.join('/') || 'The body'
  if (issue.code === 'invalid_union' && issue.path.at(-1) === 'kind') return kindIssue(issue)
  switch (issue.code) {
    case 'invalid_type':
    case 'invalid_union':
      if (issue.input === undefined) return ['missing-field', `${name} is missing.`]
      if (typeof issue.input === 'number' && !Number.isFinite(issue.input))
        return ['out-of-range', `${name} is not a finite number.`]
      if (issue.code === 'invalid_union')
        return typeof issue.input === 'number'
          ? ['not-in-list', `${name} is ${issue.input}, which is not one of the values offered.`]
          : ['wrong-type', `${name} is ${kindOf(issue.input)}, which is not one of the values offered.`]
      return ['wrong-type', `${name} is ${kindOf(issue.input)}; ${article(issue.expected)} is expected.`]
    case 'too_small':
    case 'too_big': {
      const limit = issue.code === 'too_small' ? issue.minimum : issue.maximum
      const side = issue.code === 'too_small' ? 'least' : 'most'
      if (issue.origin === 'number' || issue.origin === 'int')
        return ['out-of-range', `${name} is ${String(issue.input)}; at ${side} ${figure(Number(limit))} is accepted.`]
      return [
        'wrong-length',
        `${name} must have at ${side} ${limit} ${issue.origin === 'string' ? 'character' : 'entr'}${endOf(issue.origin, limit)}.`,
      ]
    }
    case 'invalid_value':
      if (issue.input === undefined) return ['missing-field', `${name} is missing.`]
      return describeChoice(name, issue)
    case 'invalid_format':
      return ['wrong-form', `${name} is not of the required form.`]
    case 'custom':
      if (issue.params?.['code'] === 'out-of-range')
        return ['out-of-range', `${name} is ${String(issue.input)}, below its range.`]
      return ['wrong-form', issue.message]
    default:
      return ['wrong-form', issue.message]
  }
}

/** A choice that is missed, by its type where that alone is wrong: "2" for 2. */
function describeChoice(name: string, issue: RawIssue & { code: 'invalid_value' }): [DomainCode, string] {
  const offered = issue.values.map((v) => (typeof v === 'number' ? `the number ${v}` : JSON.stringify(v))).join(' or ')
  const wrongType = issue.values.every((v) => typeof v !== typeof issue.input)
  return [wrongType ? 'wrong-type' : 'not-in-list', `${name} is ${kindOf(issue.input)}; ${offered} is expected.`]
}

function endOf(origin: string, limit: number | bigint): string {
  const one = Number(limit) === 1
  return origin === 'string' ? (one ? '' : 's') : one ? 'y' : 'ies'
}

/** A number as people write it: 1e17, not its seventeen zeros. */
export function figure(value: number): string {
  const size = Math.abs(value)
  return size >= 1e6 || (size > 0 && size < 1e-3) ? value.toExponential().replace('e+', 'e') : String(value)
}

/** A value in words, for texts that say what was given. */
export function kindOf(value: unknown): string {
  if (typeof value === 'string') return `the text "${value.slice(0, QUOTED)}"`
  if (value === null) return 'null'
  if (Array.isArray(value)) return 'a list'
  return article(typeof value)
}

function article(kind: string): string {
  const word = { string: 'text', object: 'object', array: 'list', boolean: 'boolean', number: 'number' }[kind] ?? kind
  return `${/^[aeiou]/.test(word) ? 'an' : 'a'} ${word}`
}

interface Walkable {
  shape?: Record<string, z.ZodType>
  element?: z.ZodType
  options?: readonly z.ZodType[]
}
const defOf = (schema: z.ZodType): Walkable => unwrap(schema).def as Walkable

/* Walks a schema along a path, through optional and default wrappers, to what a field says of itself. */
function schemaAt(schema: z.ZodType, path: readonly PropertyKey[]): z.ZodType | undefined {
  return path.reduce<z.ZodType | undefined>((at, part) => at && stepInto(at, String(part)), schema)
}

/** Of alternatives, the first that has the name: those of one union mean the same by the same name. */
function stepInto(schema: z.ZodType, name: string): z.ZodType | undefined {
  const { shape, element, options } = defOf(schema)
  if (shape) return Object.hasOwn(shape, name) ? shape[name] : undefined
  if (element) return element
  for (const option of options ?? []) {
    const found = stepInto(option, name)
    if (found) return found
  }
  return undefined
}

/** The fields that an object has by a schema; of alternatives, those of the kind that the object says it is. */
export function shapeFor(schema: z.ZodType, given: Record<string, unknown>): Record<string, z.ZodType> | undefined {
  const { shape, options = [] } = defOf(schema)
  if (shape) return shape
  const shapes = options.map((option) => shapeFor(option, given)).filter((one) => one !== undefined)
  return shapes.find(({ kind }) => kind?.safeParse(given['kind']).success)
}

/** The kinds that a union of objects offers. */
function kindsOf(schema: z.ZodType): string[] {
  const values = (defOf(schema).options ?? []).flatMap(
    (option) => (defOf(option).shape?.['kind']?.def as { values?: string[] } | undefined)?.values ?? [],
  )
  return values.map((value) => JSON.stringify(value))
}

export function unwrap(schema: z.ZodType): z.ZodType {
  let at = schema
  for (let depth = 0; depth < 8; depth++) {
    const inner = (at.def as { innerType?: z.ZodType }).innerType
    if (!inner) return at
    at = inner
  }
  return at
}

function acceptedAt(schema: z.ZodType, path: readonly PropertyKey[]): string | undefined {
  const at = schemaAt(schema, path)
  const accepted = at && metaOf(at)?.['x-accepted']
  if (typeof accepted === 'string') return accepted
  const union = path.at(-1) === 'kind' ? schemaAt(schema, path.slice(0, -1)) : at
  const kinds = union ? kindsOf(union) : []
  if (kinds.length === 0) return undefined
  return path.at(-1) === 'kind' ? kinds.join(', ') : `an object whose kind is one of ${kinds.join(', ')}`
}

/** What a field says of itself, be it optional or not. */
export function metaOf(schema: z.ZodType): Record<string, unknown> | undefined {
  return schema.meta() ?? unwrap(schema).meta()
}
