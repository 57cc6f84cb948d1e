export interface Figure {
  name: string
  value: number
  unit: string
  /** The figure of the same run that the value is a multiple of. */
  ratioTo: string | null
}

export type Report = (figure: Figure) => void

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b)
  const middle = sorted.length >> 1
  const upper = sorted[middle] ?? NaN
  return sorted.length % 2 ? upper : ((sorted[middle - 1] ?? NaN) + upper) / 2
}

/** Four significant digits: more would be noise. */
export const rounded = (value: number) => Number(value.toPrecision(4))
