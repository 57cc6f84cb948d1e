import { type Field, allInside, controlOf, defaultOf, fieldsInside, unitsOf } from './fields.ts'
import { type FormValues, type Value, valuesOf } from './form-values.ts'
import { isSent, wayName, waysOf } from './solid-ways.ts'

/* What stands in a form, in the address of its page: a parameter for each field that is sent, "left.filmCoefficient" for
   one inside another, with its unit behind where it is not that of the contract. */

/** Longer addresses are not taken everywhere. */
export const LONGEST = 6000

const isGroup = (value: Value | undefined): value is FormValues => typeof value === 'object' && !Array.isArray(value)

export function addressOf(fields: readonly Field[], values: FormValues): URLSearchParams {
  return new URLSearchParams(entriesOf(fields, values, ''))
}

function entriesOf(fields: readonly Field[], values: FormValues, before: string): [string, string][] {
  return fields
    .filter(({ name }) => isSent(fields, name, values.solid))
    .flatMap((field) => {
      const name = before + field.name
      const value = values.fields[field.name]
      if (isGroup(value)) {
        const inside = entriesOf(fieldsInside(field, value.kind), value, `${name}.`)
        return value.kind ? [[`${name}.kind`, value.kind] as [string, string], ...inside] : inside
      }
      const text = textOf(field, value)
      return text === '' ? [] : [[name, text + unitBehind(field, values.units[field.name])] as [string, string]]
    })
}

function textOf(field: Field, value: string | string[] | undefined): string {
  if (!Array.isArray(value)) return value?.trim() ?? ''
  const usual = ((defaultOf(field) ?? []) as unknown[]).map(String)
  return value.join() === usual.join() ? '' : value.join(',')
}

const unitBehind = (field: Field, unit: string | undefined) => (unit && unit !== field.unit ? ` ${unit}` : '')

/** What an address says of a form; nothing where it says nothing of it. */
export function formIn(fields: readonly Field[], search: URLSearchParams): FormValues | undefined {
  const values = filled(fields, search, '')
  return [...addressOf(fields, values).keys()].length > 0 ? values : undefined
}

function filled(fields: readonly Field[], search: URLSearchParams, before: string): FormValues {
  const values = valuesOf(fields, {})
  for (const field of fields) {
    const name = before + field.name
    if (isGroup(values.fields[field.name])) {
      const kind = search.get(`${name}.kind`) ?? ''
      const known = field.kinds?.some((one) => one.kind === kind) ?? false
      values.fields[field.name] = { ...filled(allInside(field), search, `${name}.`), kind: known ? kind : '' }
      continue
    }
    const given = search.get(name)
    if (given === null) continue
    const unit = unitsOf(field).find((code) => given.endsWith(` ${code}`)) ?? ''
    const text = unit ? given.slice(0, -unit.length - 1) : given
    values.units[field.name] = unit
    values.fields[field.name] = controlOf(field) === 'several' ? text.split(',').filter(Boolean) : text
  }
  const way = waysOf(fields).find((names) => names.some((name) => search.has(before + name)))
  return { ...values, solid: way ? wayName(way) : '' }
}
