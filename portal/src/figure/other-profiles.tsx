import { type Point, pathOf } from './points.ts'
import { type Cut, type Field, changeOf } from './field.ts'
import { nearest } from './grid.ts'
import type { Layout } from './layout.ts'
import { inMeasure } from './measures.ts'
import { timeAxis } from './time-axis.ts'

/** Parts of the shown time near which past and future profiles are drawn. */
const parts = [1 / 24, 1 / 6, 1 / 3, 2 / 3, 1]

interface Props {
  field: Field
  layout: Layout
  cut: Cut
}

/** A profile as it is drawn. */
export function profileOf(field: Field, { x, y }: Layout, row: number): Point[] {
  return field.values[row]!.map((value, i) => [x(field.places[i]!), y(value)] as const)
}

/** Profiles before and after the chosen one, each with its time where there is room. */
export function OtherProfiles({ field, layout, cut }: Props) {
  const { measure } = timeAxis(field.times.at(-1)!)
  const taken: Point[] = [labelPlace(field, layout, profileOf(field, layout, cut.row))]
  return rowsOf(field, cut).map((row) => {
    const curve = profileOf(field, layout, row)
    const at = labelPlace(field, layout, curve)
    const free = taken.every((other) => Math.abs(other[1] - at[1]) > 15 || Math.abs(other[0] - at[0]) > 44)
    if (free) taken.push(at)
    return (
      <g key={row}>
        <path className="past" d={pathOf(curve)} />
        {free && (
          <text className="halo-sheet" x={at[0]} y={at[1]} textAnchor={field.far.kind === 'endless' ? 'start' : 'end'}>
            {inMeasure(field.times[row]!, measure)} {measure.unit}
          </text>
        )}
      </g>
    )
  })
}

/** Round times near those parts. */
export function profileTimes(end: number): number[] {
  const step = (timeAxis(end).ticks[1] ?? end) / 4
  return parts.map((part) => Math.max(step, Math.round((end * part) / step) * step))
}

function rowsOf({ times }: Field, cut: Cut): number[] {
  const end = times.at(-1)!
  const rows = profileTimes(end).map((time) => nearest(times, time))
  return [...new Set(rows)].filter((row) => Math.abs(times[row]! - times[cut.row]!) > 0.02 * end)
}

/** At the end of the profile; in a body without end, where all profiles meet, half-way down the change. */
function labelPlace(field: Field, { right, top, y }: Layout, curve: readonly Point[]): Point {
  if (field.far.kind === 'endless') {
    const { from, to } = changeOf(field)
    const half = y((from + to) / 2)
    const side = Math.sign(y(from) - half)
    const at = curve.find(([, level]) => (level - half) * side >= 0)
    return at ? [at[0] + 4, half + 14] : [right - 6, half]
  }
  const level = curve.at(-1)![1]
  return [right - 6, level < top + 14 ? level + 14 : level - 4]
}
