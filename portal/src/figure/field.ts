import { plain } from './measures.ts'
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

/** Differences below this part of the temperatures themselves are rounding, and are not drawn as a range. */
const FLAT = 1e-9

/** From a nice step below the least to one above the largest; where nothing changes, 1 K to either side. */
export function temperatureRange(values: readonly number[]): Range {
  const [least, largest] = [Math.min(...values), Math.max(...values)]
  const flat = largest - least <= FLAT * Math.max(1, Math.abs(least), Math.abs(largest))
  const [low, high] = flat ? [least - 1, largest + 1] : [least, largest]
  const step = niceStep(high - low, 7)
  return { low: Math.floor(low / step + 1e-9) * step, high: Math.ceil(high / step - 1e-9) * step, step }
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
  if (high - low <= FLAT * Math.max(1, Math.abs(low), Math.abs(high))) return { levels: [], key: undefined }
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

/** What the hatching of the plan means, in words; undefined where nothing is hatched and 0 °C is not in question. */
export function washText(field: Field): string | undefined {
  const { initial, drive, values } = field
  const { levels, key } = isothermsOf(field)
  const side = drive < initial ? 'below' : 'above'
  const said = key === undefined ? [] : [`Hatched: ${side} ${plain(key)} °C.`]
  if (Math.min(initial, drive) < 0 && Math.max(initial, drive) > 0 && !levels.includes(0)) {
    const past = (value: number) => (side === 'below' ? value < 0 : value > 0)
    const all = values.every((row) => row.every(past))
    said.unshift(`${all ? 'Everywhere' : 'Nowhere'} ${side} 0 °C.`)
  }
  return said.length > 0 ? said.join(' ') : undefined
}
