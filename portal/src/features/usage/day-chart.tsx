import { scaleBand, scaleLinear } from '@visx/scale'
import { useState } from 'react'
import { dayText, whole } from '../../components/formats.ts'
import { Drawing } from '../../figure/drawing.tsx'
import { hatched } from '../../figure/hatches.tsx'
import { niceCeiling } from '../../figure/steps.ts'
import { useWidth } from '../../figure/use-width.ts'
import { SeriesSign } from './series-sign.tsx'
import { type Series, pointsBy } from './series.ts'
import { type Usage, daysBetween } from './queries.ts'

interface Props {
  usage: Usage
  series: readonly Series[]
}

/** Stacked hatched columns, one a day; the slider rings a day and reads it. */
export default function DayChart({ usage, series }: Props) {
  const [box, width] = useWidth<HTMLDivElement>()
  const days = daysBetween(usage.from, usage.to)
  const points = pointsBy(usage.rows, days, series)
  const busy = points.findLastIndex((row) => row.some((p) => p > 0))
  const [chosen, setChosen] = useState(Math.max(0, busy))
  const at = Math.min(chosen, days.length - 1)
  return (
    <>
      <ul className="series" aria-label="Keys">
        {series.map((one) => (
          <li key={one.name + one.keyIds.join()}>
            <SeriesSign {...one} />
            <span className="fig">{one.name}</span>
          </li>
        ))}
      </ul>
      <div ref={box} className="min-w-0 mt-3">
        {width > 0 && (
          <Columns
            width={Math.max(264, width)}
            days={days}
            points={points}
            series={series}
            chosen={at}
            onChoose={setChosen}
          />
        )}
      </div>
      <div className="range mt-1">
        <label htmlFor="day" className="sr-only">
          Day
        </label>
        <input
          id="day"
          type="range"
          min={0}
          max={days.length - 1}
          value={at}
          aria-valuetext={`${dayText(days[at]!)}: ${whole(sum(points[at]!))} points`}
          onChange={(event) => setChosen(event.target.valueAsNumber)}
        />
        <output htmlFor="day" className="col-span-full flex flex-wrap gap-x-5 !text-left !text-[14px]">
          <b className="text-clay">{dayText(days[at]!)}</b>
          {series.map((one, i) => (
            <span key={one.name + one.keyIds.join()} className="font-normal">
              {one.name} {whole(points[at]![i]!)}
            </span>
          ))}
          <b>{whole(sum(points[at]!))} points</b>
        </output>
      </div>
    </>
  )
}

const sum = (values: readonly number[]) => values.reduce((a, b) => a + b, 0)

interface ColumnsProps {
  width: number
  days: readonly string[]
  points: readonly (readonly number[])[]
  series: readonly Series[]
  chosen: number
  onChoose(day: number): void
}

function Columns({ width, days, points, series, chosen, onChoose }: ColumnsProps) {
  const small = width < 620
  const height = small ? 250 : 310
  const [left, right, top, bottom] = [small ? 44 : 64, width - 2, 14, height - 30]
  const most = niceCeiling(Math.max(10, ...points.map(sum)))
  const x = scaleBand({ domain: days.map((_, i) => i), range: [left, right], padding: 0.26 })
  const y = scaleLinear({ domain: [0, most], range: [bottom, top] })
  const every = Math.ceil(days.length / (small ? 5 : 15))
  const column = x.bandwidth()
  return (
    <Drawing
      width={width}
      height={height}
      label={`Points by day and key, ${dayText(days[0]!)} to ${dayText(days.at(-1)!)}. The same numbers stand in the table.`}
      onPointerMove={(event) => {
        const day = Math.floor((event.clientX - event.currentTarget.getBoundingClientRect().left - left) / x.step())
        if (day >= 0 && day < days.length && day !== chosen) onChoose(day)
      }}
    >
      {y.ticks(5).map((tick) => (
        <g key={tick}>
          <line className={tick ? 'hair' : 'out'} x1={left} x2={right} y1={y(tick)} y2={y(tick)} />
          <text x={left - 8} y={y(tick) + 4} textAnchor="end">
            {small && tick >= 1000 ? `${tick / 1000}k` : whole(tick)}
          </text>
        </g>
      ))}
      {points.map((row, day) => (
        <g key={days[day]}>
          {row.map((value, i) => {
            if (value === 0) return null
            const base = sum(row.slice(0, i))
            const place = { x: x(day)!, y: y(base + value), width: column, height: y(base) - y(base + value) }
            return (
              <g key={i}>
                <rect className={series[i]!.wash} {...place} />
                <rect fill={hatched(series[i]!.hatch)} stroke="var(--cut)" {...place} />
              </g>
            )
          })}
          {day === chosen && (
            <>
              <rect
                className="now"
                x={x(day)! - 3}
                y={y(sum(row)) - 3}
                width={column + 6}
                height={bottom - y(sum(row)) + 3}
              />
              <path className="chain-end" d={`M${x(day)! + column / 2} ${bottom}v7`} />
            </>
          )}
          {day % every === 0 && (
            <text
              className={day === chosen ? 't-clay' : undefined}
              x={x(day)! + column / 2}
              y={bottom + 22}
              textAnchor="middle"
            >
              {small ? Number(days[day]!.slice(8)) : dayText(days[day]!)}
            </text>
          )}
        </g>
      ))}
    </Drawing>
  )
}
