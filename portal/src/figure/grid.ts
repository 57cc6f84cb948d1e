/** At most so many numbers are asked for one drawing, unless each of them takes long. */
const MOST = 10_000
const COLUMNS = 50
const ROWS = 100

interface Wanted {
  /** Where the places begin. */
  from?: number
  extent: number
  end: number
  /** Places and times that the reader named; they stand in the grid exactly. */
  depths: readonly number[]
  times: readonly number[]
  /** Even steps of time, unless the limit allows fewer. */
  rows?: number
  /** Even steps of depth. */
  columns?: number
  most?: number
  /** Places stand closer together near the first of them, where most happens. */
  close?: boolean
}

/** The depths and times to solve for, close together just after the change. */
export function gridOf({ from = 0, extent, end, depths, times, ...counts }: Wanted): {
  depths: number[]
  times: number[]
} {
  const { rows: wanted = ROWS, columns = COLUMNS, most = MOST, close = false } = counts
  const inside = depths.filter((d) => d >= from && d <= extent).slice(0, 15)
  const across = sorted([...even(extent, columns, from, close ? 2 : 1), ...inside], extent)
  const named = times.filter((t) => t > 0 && t <= end).slice(0, 15)
  const rows = Math.min(wanted, Math.floor(most / across.length) - named.length - 5)
  const first = end / rows
  const early = [1 / 64, 1 / 16, 1 / 4, 1 / 2].map((part) => first * part)
  return { depths: across, times: sorted([...even(end, rows), ...early, ...named], end) }
}

/** Even steps, or with a power above 1 steps that grow. */
export function even(end: number, parts: number, from = 0, power = 1): number[] {
  return Array.from({ length: parts + 1 }, (_, i) =>
    Number((from + (end - from) * (i / parts) ** power).toPrecision(12)),
  )
}

/** In order and rounded, but never past the end: the body has no temperature there. */
function sorted(values: readonly number[], end: number): number[] {
  return [...new Set(values.map((v) => Math.min(end, Number(v.toPrecision(12)))))].sort((a, b) => a - b)
}

/** The index whose value lies nearest. */
export function nearest(values: readonly number[], value: number): number {
  let best = 0
  for (let i = 1; i < values.length; i++) if (Math.abs(values[i]! - value) < Math.abs(values[best]! - value)) best = i
  return best
}
