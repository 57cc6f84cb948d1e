import type { Field } from './fields.ts'

/** A way in which a solid can be stated: the fields that it sends, and what these stand in place of. */
interface Way {
  fields: readonly string[]
  without?: string
}

const known: readonly Way[] = [
  { fields: ['material'], without: 'conductivity' },
  { fields: ['density', 'specificHeat'] },
  { fields: ['volumetricHeatCapacity'] },
  { fields: ['diffusivity'] },
]

export const wayName = (way: readonly string[]): string => way.join('+')

/** The ways that the fields of a solid offer, when there is more than one; exactly one is sent. */
export function waysOf(fields: readonly Field[]): readonly (readonly string[])[] {
  const ways = known.filter((way) => way.fields.every((name) => fields.some((field) => field.name === name)))
  return ways.length > 1 ? ways.map((way) => way.fields) : []
}

/** Whether a field is sent, when the solid is stated in one way. */
export function isSent(fields: readonly Field[], name: string, chosen: string): boolean {
  const ways = waysOf(fields)
  if (known.some((way) => way.without === name && wayName(way.fields) === chosen)) return false
  const own = ways.find((way) => way.includes(name))
  return !own || wayName(own) === chosen
}
