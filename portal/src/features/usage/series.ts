import type { Hatch } from '../../figure/hatches.tsx'
import type { UsageRow } from './queries.ts'

/** What is drawn as one: a key, or all keys beyond the first five. */
export interface Series {
  name: string
  keyIds: readonly (string | null)[]
  hatch: Hatch
  wash: string
}

const looks: readonly { hatch: Hatch; wash: string }[] = [
  { hatch: 'masonry', wash: 'w-sheet' },
  { hatch: 'level', wash: 'w-clay' },
  { hatch: 'cross', wash: 'w-frost' },
  { hatch: 'plaster', wash: 'w-trough' },
  { hatch: 'back', wash: 'w-paper' },
  { hatch: 'upright', wash: 'w-sheet' },
]

/** The keys by points, the largest first. */
export function seriesOf(rows: readonly UsageRow[]): Series[] {
  const totals = new Map<string | null, { name: string; points: number }>()
  for (const { keyId = null, keyName, points } of rows) {
    const entry = totals.get(keyId) ?? { name: keyName ?? 'no key', points: 0 }
    totals.set(keyId, { ...entry, points: entry.points + points })
  }
  const sorted = [...totals].filter(([, { points }]) => points > 0).sort(([, a], [, b]) => b.points - a.points)
  const shown = sorted.length > looks.length ? sorted.slice(0, looks.length - 1) : sorted
  const rest = sorted.slice(shown.length)
  const groups = shown.map(([id, { name }]) => ({ name, keyIds: [id] as (string | null)[] }))
  if (rest.length > 0) groups.push({ name: 'others', keyIds: rest.map(([id]) => id) })
  return groups.map((group, i) => ({ ...group, ...looks[i]! }))
}

/** Points of each series on each day. */
export function pointsBy(rows: readonly UsageRow[], days: readonly string[], series: readonly Series[]): number[][] {
  return days.map((day) =>
    series.map(({ keyIds }) =>
      rows.reduce((sum, row) => sum + (row.day === day && keyIds.includes(row.keyId ?? null) ? row.points : 0), 0),
    ),
  )
}
