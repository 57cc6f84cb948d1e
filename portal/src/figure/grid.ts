/** At most so many numbers are asked for one drawing. */
const MOST = 10_000
const COLUMNS = 50
const ROWS = 100

interface Wanted {
  extent: number
  end: number
  /** Places and times that the reader named; they stand in the grid exactly. */
  depths: readonly number[]
  times: readonly number[]
  /** Even steps of time, unless the limit allows fewer. */
  rows?: number
  /** Even steps of depth. */
  columns?: number
}

/** The depths and times to solve for, close together just after the change. */
export function gridOf({ extent, end, depths, times, rows: wanted = ROWS, columns = COLUMNS }: Wanted): {
  depths: number[]
  times: number[]
} {
  const across = sorted([...even(extent, columns), ...depths.filter((d) => d >= 0 && d <= extent).slice(0, 15)], extent)
  const named = times.filter((t) => t > 0 && t <= end).slice(0, 15)
  const rows = Math.min(wanted, Math.floor(MOST / across.length) - named.length - 5)
  const first = end / rows
  const early = [1 / 64, 1 / 16, 1 / 4, 1 / 2].map((part) => first * part)
  return { depths: across, times: sorted([...even(end, rows), ...early, ...named], end) }
}

function even(end: number, parts: number): number[] {
  return Array.from({ length: parts + 1 }, (_, i) => Number(((end * i) / parts).toPrecision(12)))
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
