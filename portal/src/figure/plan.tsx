import { useMemo } from 'react'
import { contour, region } from './contour.ts'
import { type Point, pathOf } from './points.ts'
import { type Cut, type Field, cools, isothermsOf } from './field.ts'
import { hatched } from './hatches.tsx'
import { placeLabels } from './labels.ts'
import type { Layout } from './layout.ts'
import { inMeasure, plain } from './measures.ts'
import { timeAxis } from './time-axis.ts'

interface Props {
  field: Field
  layout: Layout
  cut: Cut
  history: boolean
}

/** Distance across, time downwards, isotherms as contours. */
export function Plan({ field, layout, cut, history }: Props) {
  const { left, right, planTop, planHeight, axis, small, z } = layout
  const bottom = planTop + planHeight
  const { measure, ticks } = timeAxis(field.times.at(-1)!)
  const named = history && layout.x(field.places[cut.column]!) > left + (right - left) * 0.4
  return (
    <g>
      <rect className="w-sheet" x={left} y={planTop} width={right - left} height={planHeight} />
      <Isotherms field={field} layout={layout} cut={cut} />
      <rect className="out" x={left} y={planTop} width={right - left} height={planHeight} />
      <line className={field.near.kind === 'endless' ? 'dash' : 'cut'} x1={left} x2={left} y1={planTop} y2={bottom} />
      {field.places[0]! < 0 && <line className="cut" x1={layout.x(0)} x2={layout.x(0)} y1={planTop} y2={bottom} />}
      <line className={field.far.kind === 'endless' ? 'dash' : 'cut'} x1={right} x2={right} y1={planTop} y2={bottom} />
      {ticks.map((tick) => (
        <g key={tick}>
          <line className="thin" x1={left - 6} x2={left} y1={z(tick)} y2={z(tick)} />
          <text x={left - (small ? 14 : 30)} y={z(tick) + 4} textAnchor="end">
            {inMeasure(tick, measure)} {measure.unit}
          </text>
        </g>
      ))}
      {!small && (
        <text textAnchor="middle" transform={`translate(${axis - 2} ${planTop + planHeight / 2}) rotate(-90)`}>
          {field.initial === undefined ? 'time' : 'time after the change'}
        </text>
      )}
      <text
        x={small && history && !named ? right : small ? left : axis}
        y={bottom + 20}
        textAnchor={small && history && !named ? 'end' : 'start'}
      >
        {small && history ? 'Plan, °C' : 'Plan: isotherms, °C'}
      </text>
      {right - left > 420 && !named && (
        <text x={right} y={bottom + 20} textAnchor="end">
          {acrossText(field)}, to scale
        </text>
      )}
    </g>
  )
}

function Isotherms({ field, layout, cut }: Omit<Props, 'history'>) {
  const lines = useMemo(() => linesOf(field), [field])
  const { x, z } = layout
  const onPaper = (points: readonly Point[]) => points.map(([depth, time]) => [x(depth), z(time)] as const)
  const drawn = lines.levels.map(({ level, parts }) => ({ level, parts: parts.map(onPaper) }))
  const far = lines.far.map((outline) => pathOf(onPaper(outline)) + 'Z').join('')
  const cold = cools(field)
  const keyed = cold ? 'zero' : 'now'
  const labels = placeLabels(drawn, layout, [x(field.places[cut.column]!), z(field.times[cut.row]!)])
  return (
    <g>
      {far && <path className={cold ? 'w-frost' : 'w-clay'} fillRule="evenodd" d={far} />}
      {far && <path fill={hatched(cold ? 'ice' : 'upright')} opacity={0.6} fillRule="evenodd" d={far} />}
      {drawn.map(({ level, parts }) => (
        <path key={level} className={level === lines.key ? keyed : 'iso'} d={parts.map(pathOf).join('')} />
      ))}
      {labels.map(({ level, at }) => (
        <text
          key={level}
          className={`${level === lines.key ? (cold ? 't-frost' : 't-clay') : 't-ink'} halo-sheet`}
          x={at[0]}
          y={at[1] + 4}
          textAnchor="middle"
        >
          {plain(level)}
        </text>
      ))}
    </g>
  )
}

function acrossText({ along, places }: Field): string {
  if (along === 'radius') return 'radius'
  return places[0]! < 0 ? 'distance from the joint' : 'distance from the exposed face'
}

function linesOf(field: Field) {
  const { places, times, values } = field
  const { levels, key } = isothermsOf(field)
  const sign = cools(field) ? -1 : 1
  const turned = values.map((row) => row.map((value) => sign * value))
  return {
    key,
    levels: levels.map((level) => ({ level, parts: contour(places, times, values, level) })),
    far: key === undefined ? [] : region(places, times, turned, sign * key),
  }
}
