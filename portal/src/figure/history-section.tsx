import { pathOf } from './points.ts'
import type { Cut, Field } from './field.ts'
import type { Layout } from './layout.ts'
import { degrees, inMeasure, lengthMeasure, markText, timeMeasure } from './measures.ts'
import { multiples } from './steps.ts'
import { timeAxis } from './time-axis.ts'

interface Props {
  field: Field
  layout: Layout
  cut: Cut
}

/** Section B–B beside the plan: time downwards as there, temperature brought round the corner by the mitre. */
export function HistorySection({ field, layout, cut }: Props) {
  const { x, y, z, across, historyLeft, size, top, bottom, planTop, planHeight, range } = layout
  const depth = field.places[cut.column]!
  const time = field.times[cut.row]!
  const value = field.values[cut.row]![cut.column]!
  const length = lengthMeasure(field.places.at(-1)!)
  const { measure } = timeAxis(field.times.at(-1)!)
  const place = `${inMeasure(depth, length)} ${length.unit}`
  const right = historyLeft + size
  const level = z(time)
  const curve = field.values.map((row, i) => [across(row[cut.column]!), z(field.times[i]!)] as const)
  return (
    <g>
      <line className="thin" x1={historyLeft} y1={bottom} x2={right} y2={top} />
      <path className="proj" d={`M${x(depth) + 5} ${y(value)}H${across(value)}V${level}`} />
      <text className="halo" x={historyLeft + 6} y={top + 14}>
        mitre: carries °C round
      </text>
      <text className="t-ink halo" x={right} y={bottom - 34} textAnchor="end">
        {`T(${place}, ${inMeasure(time, measure)} ${measure.unit})`}
      </text>
      <text className="t-clay t-large halo" x={right} y={bottom - 8} textAnchor="end">
        {degrees(value, range.high - range.low)} °C
      </text>
      <rect className="w-sheet" x={historyLeft} y={planTop} width={size} height={planHeight} />
      <TemperatureLines layout={layout} />
      {timeAxis(field.times.at(-1)!).ticks.map((tick) => (
        <line key={tick} className="hair" x1={historyLeft} x2={right} y1={z(tick)} y2={z(tick)} />
      ))}
      <rect className="out" x={historyLeft} y={planTop} width={size} height={planHeight} />
      <path className="now" d={pathOf(curve)} />
      <line className="chain" x1={historyLeft - 6} x2={right + 6} y1={level} y2={level} />
      <circle className="ring" cx={across(value)} cy={level} r={5} />
      <text className="t-clay" x={historyLeft} y={planTop + planHeight + 20}>
        Section B–B: history at {place}
      </text>
    </g>
  )
}

function TemperatureLines({ layout: { range, across, planTop, planHeight } }: { layout: Layout }) {
  const levels = multiples(range.step, range.low, range.high)
  const every = levels.length > 6 ? 2 : 1
  return levels.map((level, i) => (
    <g key={level}>
      <line className="hair" x1={across(level)} x2={across(level)} y1={planTop} y2={planTop + planHeight} />
      {i % every === 0 && (
        <text x={across(level)} y={planTop - 8} textAnchor="middle">
          {markText(level, range.step)}
        </text>
      )}
    </g>
  ))
}

/** What a history is called in words. */
export function placeOf(field: Field, cut: Cut): string {
  const length = lengthMeasure(field.places.at(-1)!)
  return `${inMeasure(field.places[cut.column]!, length)} ${length.unit}`
}

export function timeOf(times: readonly number[], row: number): string {
  const measure = timeMeasure(times.at(-1)!)
  return `${inMeasure(times[row]!, measure)} ${measure.unit}`
}
