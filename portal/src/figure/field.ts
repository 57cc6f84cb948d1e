import { multiples, niceStep } from './steps.ts'

export type Back = 'insulated' | 'mirror' | 'endless'

/** A solved field, as a drawing needs it: temperatures by time and depth, and what surrounds the body. */
export interface Field {
  depths: readonly number[]
  times: readonly number[]
  /** °C, one row a time. */
  values: readonly (readonly number[])[]
  initial: number
  /** Temperature that the body is driven to, and by what: a fluid through its film, or its face held there. */
  drive: number
  held: boolean
  back: Back
}

/** Where the two sections cut the plan: a row (time) and a column (place). */
export interface Cut {
  row: number
  column: number
}

export interface Range {
  low: number
  high: number
  step: number
}

export function temperatureRange(values: readonly number[]): Range {
  const low = Math.min(...values)
  const high = Math.max(...values)
  const span = high - low || 1
  const step = niceStep(span, 7)
  return { low: Math.floor(low / step + 1e-9) * step, high: Math.ceil(high / step - 1e-9) * step || step, step }
}

export function rangeOf(field: Field): Range {
  return temperatureRange([field.initial, field.drive, ...field.values.flatMap((row) => [row[0]!, row.at(-1)!])])
}

export interface Isotherms {
  levels: readonly number[]
  /** The level that is drawn thick, with its far side washed: 0 °C, or the one nearest the middle of what occurs. */
  key: number | undefined
}

export function isothermsOf({ initial, drive, values }: Field): Isotherms {
  const [low, high] = [Math.min(initial, drive), Math.max(initial, drive)]
  if (high - low < 1e-9) return { levels: [], key: undefined }
  const all = values.flat()
  const [least, most] = [all.reduce((a, b) => Math.min(a, b)), all.reduce((a, b) => Math.max(a, b))]
  const step = niceStep(high - low, 14)
  const levels = multiples(step, low, high).filter(
    (level) => level > Math.max(low, least) && level < Math.min(high, most),
  )
  const half = (least + most) / 2
  const near = levels.reduce<number | undefined>(
    (best, level) => (best === undefined || Math.abs(level - half) < Math.abs(best - half) ? level : best),
    undefined,
  )
  return { levels, key: levels.includes(0) ? 0 : near }
}
