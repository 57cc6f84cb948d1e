import { Drawing } from './drawing.tsx'
import { pathOf } from './points.ts'
import { temperatureRange } from './field.ts'
import { degrees, inMeasure, markText } from './measures.ts'
import { multiples } from './steps.ts'
import { timeAxis } from './time-axis.ts'

export interface Series {
  name: string
  values: readonly number[]
}

interface Props {
  width: number
  times: readonly number[]
  /** °C at each time, of each place. */
  series: readonly Series[]
  /** The one that is read; the first where it is not said. */
  chosen?: number
  /** Temperatures to keep in view beside those of the curve. */
  levels: readonly number[]
  row: number
  title: string
}

/** Histories alone, time to the right; one of them is read. */
export function HistoryFigure({ width, times, series, chosen = 0, levels, row, title }: Props) {
  const height = width < 620 ? 190 : 300
  const [left, right, top] = [width < 620 ? 38 : 54, width - 16, 30]
  const bottom = top + height
  const [start, end] = [times[0]!, times.at(-1)!]
  const { values } = series[chosen]!
  const range = temperatureRange([...levels, ...series.flatMap((one) => one.values)])
  const { measure, ticks } = timeAxis(end, start)
  const x = (time: number) => left + ((right - left) * (time - start)) / (end - start)
  const y = (value: number) => bottom - (height * (value - range.low)) / (range.high - range.low)
  const value = values[row]!
  const at = x(times[row]!)
  const before = at > left + (right - left) * 0.7
  const reading = degrees(value, range.high - range.low)
  const every = ticks.length > 5 && width < 420 ? 2 : 1
  return (
    <Drawing
      width={width}
      height={bottom + 34}
      label={`${title}: ${reading} °C at ${inMeasure(times[row]!, measure)} ${measure.unit}`}
    >
      <rect className="w-sheet" x={left} y={top} width={right - left} height={height} />
      <text x={left - 9} y={top - 12} textAnchor="end">
        °C
      </text>
      {multiples(range.step, range.low, range.high).map((level) => (
        <g key={level}>
          <line className="hair" x1={left} x2={right} y1={y(level)} y2={y(level)} />
          <text x={left - 9} y={y(level) + 4} textAnchor="end">
            {markText(level, range.step)}
          </text>
        </g>
      ))}
      {ticks.map((tick, i) => (
        <g key={tick}>
          <line className="thin" x1={x(tick)} x2={x(tick)} y1={bottom} y2={bottom + 5} />
          {i % every === 0 && (
            <text x={x(tick)} y={bottom + 20} textAnchor={x(tick) > right - 20 ? 'end' : 'middle'}>
              {inMeasure(tick, measure)} {measure.unit}
            </text>
          )}
        </g>
      ))}
      {levels.map((level) => (
        <line key={level} className="dash" x1={left} x2={right} y1={y(level)} y2={y(level)} />
      ))}
      <rect className="out" x={left} y={top} width={right - left} height={height} />
      <line className="chain" x1={at} x2={at} y1={top} y2={bottom} />
      <Others {...{ series, chosen, times, x, y }} />
      <path className="now" d={pathOf(values.map((v, i) => [x(times[i]!), y(v)] as const))} />
      <circle className="ring" cx={at} cy={y(value)} r={5} />
      <text className="t-clay" x={left} y={top - 12}>
        {title}
      </text>
      <text
        className="t-clay halo-sheet"
        x={at + (before ? -10 : 10)}
        y={y(value) + (y(value) > bottom - 30 ? -12 : 22)}
        textAnchor={before ? 'end' : 'start'}
      >
        {reading} °C
      </text>
    </Drawing>
  )
}

interface OthersProps extends Pick<Props, 'series' | 'times'> {
  chosen: number
  x(time: number): number
  y(value: number): number
}

/** The histories that are not read, each with its name at its end where there is room. */
function Others({ series, chosen, times, x, y }: OthersProps) {
  const taken = [y(series[chosen]!.values.at(-1)!)]
  return series.map(({ name, values }, i) => {
    if (i === chosen) return null
    const level = y(values.at(-1)!)
    const free = taken.every((other) => Math.abs(other - level) > 15)
    if (free) taken.push(level)
    return (
      <g key={name}>
        <path className="past" d={pathOf(values.map((v, j) => [x(times[j]!), y(v)] as const))} />
        {free && (
          <text className="halo-sheet" x={x(times.at(-1)!) - 6} y={level - 5} textAnchor="end">
            {name}
          </text>
        )}
      </g>
    )
  })
}
