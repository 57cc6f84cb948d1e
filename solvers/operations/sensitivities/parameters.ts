import { z } from 'zod'
import type { Case } from '../../case.ts'
import { findMaterial, type MaterialInput } from '../../materials/find-material.ts'

/** A number that an input states, to be moved by a factor: its place from the outside in, and how it is told. */
export interface Parameter {
  path: readonly string[]
  /** The names of its path with dots between: "left.filmCoefficient". */
  name: string
  value: number
}

type Fields = Record<string, unknown>

interface Described {
  type?: string
  'x-ucum'?: string
  'x-changes-no-number'?: boolean
  properties?: Record<string, Described>
  anyOf?: Described[]
  oneOf?: Described[]
}

/** Moving these along the clock is no matter of a factor. */
const instants = ['timeOfMaximum', 'timeOfMinimum']

const known = new Map<string, ReadonlySet<string>>()

/** Names of the case's fields whose value may be moved by a factor: numbers with a unit that has its zero where nothing is. */
function scalableNames(c: Case): ReadonlySet<string> {
  const found = known.get(c.id)
  if (found) return found
  const names = new Set<string>()
  const collect = (at: Described): void => {
    for (const [name, field] of Object.entries(at.properties ?? {})) {
      const unit = field['x-ucum']
      const scalable = field.type === 'number' && unit !== undefined && unit !== 'Cel'
      if (scalable && !field['x-changes-no-number'] && !instants.includes(name)) names.add(name)
      collect(field)
    }
    for (const option of [...(at.anyOf ?? []), ...(at.oneOf ?? [])]) collect(option)
  }
  collect(z.toJSONSchema(z.object(c.fields), { io: 'input' }) as Described)
  known.set(c.id, names)
  return names
}

const isObject = (value: unknown): value is Fields =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

/** An input with its materials written out, so that each of their properties can be moved. */
export function withoutMaterials(input: Fields): Fields {
  const opened = Object.entries(input).flatMap(([name, value]): [string, unknown][] => {
    if (name === 'material' && value !== undefined) return propertiesOf(value as MaterialInput, input)
    return [[name, isObject(value) ? withoutMaterials(value) : value]]
  })
  return Object.fromEntries(opened)
}

/** A body that is told by its volume takes no conductivity. */
function propertiesOf(material: MaterialInput, { volume }: Fields): [string, number][] {
  const { conductivity, density, specificHeat } = findMaterial(material, () => undefined)!
  return Object.entries({ ...(volume === undefined ? { conductivity } : {}), density, specificHeat })
}

/**
 * The parameters that an input states: what it is made of, its sizes, films, powers and durations. Temperatures, places and
 * times are none. A profile goes from face to face, so the thickness beside it cannot be moved alone.
 */
export function parametersOf(c: Case, input: Fields): Parameter[] {
  const names = scalableNames(c)
  const within = (at: Fields, path: readonly string[]): Parameter[] =>
    Object.entries(at).flatMap(([key, value]) => {
      const here = [...path, key]
      if (isObject(value)) return within(value, here)
      if (typeof value !== 'number' || value === 0 || !names.has(key)) return []
      if (key === 'thickness' && at['initialProfile'] !== undefined) return []
      return [{ path: here, name: here.join('.'), value }]
    })
  return within(input, [])
}

/** The input with one of its parameters changed. */
export function withParameter(input: Fields, [first, ...rest]: readonly string[], value: number): Fields {
  const inner = rest.length === 0 ? value : withParameter(input[first!] as Fields, rest, value)
  return { ...input, [first!]: inner }
}

/** How many parameters an input has, its materials written out. */
export const countParameters = (c: Case, input: Fields): number => parametersOf(c, withoutMaterials(input)).length
