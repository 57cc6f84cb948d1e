import type { z } from 'zod'
import type { Case } from '../case.ts'
import { figure, metaOf } from '../statement/validate.ts'
import type { Warning } from '../warnings.ts'

interface Typical {
  name: string
  low: number
  high: number
  unit: string
}

const known = new Map<string, Typical[]>()

function typicalOf(c: Case): Typical[] {
  const found = known.get(c.id)
  if (found) return found
  const list = Object.entries(c.fields).flatMap(([name, schema]) => {
    const meta = metaOf(schema as z.ZodType)
    const typical = meta?.['x-typical'] as [number, number] | undefined
    return typical ? [{ name, low: typical[0], high: typical[1], unit: String(meta!['x-ucum']) }] : []
  })
  known.set(c.id, list)
  return list
}

/** Warnings for values outside what their field calls typical. */
export function unusualValues(c: Case, input: Record<string, unknown>): Warning[] {
  return typicalOf(c).flatMap(({ name, low, high, unit }) => {
    const value = input[name]
    if (typeof value !== 'number' || (value >= low && value <= high)) return []
    const kelvin = unit === 'Cel' && value - 273.15 >= low && value - 273.15 <= high
    const hint = kelvin ? ' If this is in kelvin: degrees Celsius are expected.' : ''
    const text = `${name} is ${value} ${unit}; values from ${figure(low)} to ${figure(high)} are usual.${hint}`
    return [{ code: 'outside-typical-range' as const, text, value }]
  })
}
