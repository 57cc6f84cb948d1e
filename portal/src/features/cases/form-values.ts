import type { Body } from '../../solving/body.ts'
import { type Field, allInside, controlOf, defaultOf, fieldsInside, optionsOf, unitsOf } from './fields.ts'
import { listOf, numberOf, rowsOf, rowsText } from './number-text.ts'
import { isSent, wayName, waysOf } from './solid-ways.ts'

/** What stands in the boxes of the form, or of a group of it. */
export interface FormValues {
  /** Which statement of the solid is sent; empty for none. */
  solid: string
  /** Which kind an object is of; empty for none, and where it has no kinds. */
  kind: string
  /** The unit of a number or list where it is not that of the contract. */
  units: { [name: string]: string }
  fields: { [name: string]: Value }
}

export type Value = string | string[] | FormValues

const isGroup = (value: unknown): value is FormValues =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

export function valuesOf(fields: readonly Field[], body: Body): FormValues {
  const given = waysOf(fields).find((way) => way.some((name) => name in body))
  const boxes = fields.map((field) => [field.name, valueIn(field, body[field.name])] as const)
  const units = fields.map((field) => [field.name, unitIn(field, body[field.name])] as const)
  return {
    solid: given ? wayName(given) : '',
    kind: String(body['kind'] ?? ''),
    units: Object.fromEntries(units),
    fields: Object.fromEntries(boxes),
  }
}

interface WithUnit {
  value: unknown
  unit: string
}

const isWithUnit = (given: unknown): given is WithUnit =>
  typeof given === 'object' && given !== null && 'value' in given && 'unit' in given

const bare = (given: unknown): unknown => (isWithUnit(given) ? given.value : given)

/** A list is in one unit. */
function unitIn(field: Field, given: unknown): string {
  const one: unknown = Array.isArray(given) ? given[0] : given
  return unitsOf(field).length > 0 && isWithUnit(one) ? one.unit : ''
}

function valueIn(field: Field, given: unknown): Value {
  switch (controlOf(field)) {
    case 'group':
    case 'kinds':
      return valuesOf(allInside(field), (given ?? {}) as Body)
    case 'several':
      return ((given ?? defaultOf(field) ?? []) as unknown[]).map(String)
    case 'rows':
      return given === undefined ? '' : rowsText(field.fields ?? [], given as Body[])
    default:
      if (given === undefined) return ''
      return Array.isArray(given) ? given.map(bare).join(', ') : String(bare(given))
  }
}

/** The body of the call: what is empty is not sent, what is no number is sent as typed for the service to refuse. */
export function bodyOf(fields: readonly Field[], values: FormValues): Record<string, unknown> {
  const sent = fields.flatMap((field) => {
    const value = isSent(fields, field.name, values.solid) ? sentOf(field, values.fields[field.name]) : undefined
    return value === undefined ? [] : [[field.name, inUnit(value, field, values.units[field.name])] as const]
  })
  return Object.fromEntries(sent)
}

/** Numbers with a unit, where it is not that of the contract; what is no number is left for the service to refuse. */
function inUnit(value: unknown, field: Field, unit: string | undefined): unknown {
  if (!unit || unit === field.unit) return value
  if (Array.isArray(value)) return value.map((one) => inUnit(one, field, unit))
  return typeof value === 'number' ? { value, unit } : value
}

function sentOf(field: Field, value: Value | undefined): unknown {
  if (isGroup(value)) return groupOf(field, value)
  if (Array.isArray(value)) {
    const chosen = optionsOf(field).filter((option) => value.includes(String(option)))
    return chosen.length === 0 || JSON.stringify(chosen) === JSON.stringify(defaultOf(field)) ? undefined : chosen
  }
  const text = value?.trim() ?? ''
  return text === '' ? undefined : readAs(field, text)
}

/** An object that may be left out is, where nothing of it is given. */
function groupOf(field: Field, values: FormValues): unknown {
  const inside = bodyOf(fieldsInside(field, values.kind), values)
  if (field.kinds) return values.kind === '' ? undefined : { kind: values.kind, ...inside }
  return field.required || Object.keys(inside).length > 0 ? inside : undefined
}

function readAs(field: Field, text: string): unknown {
  switch (controlOf(field)) {
    case 'list':
      return listOf(text)
    case 'rows':
      return rowsOf(field.fields ?? [], text)
    case 'choice':
      return optionsOf(field).find((option) => String(option) === text) ?? text
    case 'text':
      return text
    default:
      return numberOf(text)
  }
}

/** Whether everything that must be given stands in its box; a solid in the way that is chosen. */
export function isComplete(fields: readonly Field[], values: FormValues): boolean {
  const way = waysOf(fields).find((names) => wayName(names) === values.solid) ?? []
  if (!way.every((name) => values.fields[name] !== '')) return false
  return fields.every((field) => {
    if (!isSent(fields, field.name, values.solid)) return true
    const value = values.fields[field.name]
    if (!isGroup(value)) return !field.required || (value !== undefined && value.length > 0)
    if (sentOf(field, value) === undefined) return !field.required
    return isComplete(fieldsInside(field, value.kind), value)
  })
}
