import { plain } from './measures.ts'
import { multiples, niceStep } from './steps.ts'

/** What lies before or behind the shown part of a body. */
export type Edge =
  /** A fluid through its film, or a face that is held, at a temperature. */
  | { kind: 'film' | 'held'; level: number }
  /** Something else that acts on the face, by the sign it is drawn with. */
  | { kind: 'acting'; sign: string }
  | { kind: 'insulated' | 'mirror' | 'centre' | 'endless' }

/** A solved field, as a drawing needs it: temperatures by time and place, and what surrounds the body. */
export interface Field {
  /** Depths from the exposed face, or radii; m. */
  places: readonly number[]
  along: 'depth' | 'radius'
  times: readonly number[]
  /** °C, one row a time. */
  values: readonly (readonly number[])[]
  /** Where the body starts from one temperature. */
  initial: number | undefined
  near: Edge
  far: Edge
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

const levelOf = (edge: Edge): number | undefined => ('level' in edge ? edge.level : undefined)

/** Temperatures that are drawn beside those of the body. */
function levelsOf({ initial, near, far }: Field): number[] {
  return [initial, levelOf(near), levelOf(far)].filter((level) => level !== undefined)
}

export function rangeOf(field: Field): Range {
  const all = field.values.flat()
  return temperatureRange([...levelsOf(field), ...all])
}

const meanOf = (values: readonly number[]): number => values.reduce((a, b) => a + b, 0) / values.length

/** Where a change starts and what it heads for: told by the case, or read from the first and last profile. */
export function changeOf(field: Field): { from: number; to: number } {
  const { initial, near, far, values } = field
  return {
    from: initial ?? meanOf(values[0]!),
    to: levelOf(near) ?? levelOf(far) ?? meanOf(values.at(-1)!),
  }
}

/** Whether the body cools on the whole. */
export function cools(field: Field): boolean {
  const { from, to } = changeOf(field)
  return to < from
}

export interface Isotherms {
  levels: readonly number[]
  /** The level that is drawn thick, with its far side washed: 0 °C, or the one nearest the middle of what occurs. */
  key: number | undefined
}

export function isothermsOf(field: Field): Isotherms {
  const all = field.values.flat()
  const [least, most] = [all.reduce((a, b) => Math.min(a, b)), all.reduce((a, b) => Math.max(a, b))]
  const [low, high] = [Math.min(least, ...levelsOf(field)), Math.max(most, ...levelsOf(field))]
  if (high - low <= FLAT * Math.max(1, Math.abs(low), Math.abs(high))) return { levels: [], key: undefined }
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
  const { values } = field
  const { levels, key } = isothermsOf(field)
  const { low, high } = rangeOf(field)
  const side = cools(field) ? 'below' : 'above'
  const said = key === undefined ? [] : [`Hatched: ${side} ${plain(key)} °C.`]
  if (low < 0 && high > 0 && !levels.includes(0)) {
    const past = (value: number) => (side === 'below' ? value < 0 : value > 0)
    const all = values.every((row) => row.every(past))
    said.unshift(`${all ? 'Everywhere' : 'Nowhere'} ${side} 0 °C.`)
  }
  return said.length > 0 ? said.join(' ') : undefined
}
