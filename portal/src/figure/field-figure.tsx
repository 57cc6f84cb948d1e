import type { PointerEvent } from 'react'
import { CutMarks } from './cut-marks.tsx'
import { Drawing } from './drawing.tsx'
import { type Cut, type Field, washText } from './field.ts'
import { nearest } from './grid.ts'
import type { Hatch } from './hatches.tsx'
import { HistoryFigure } from './history-figure.tsx'
import { HistorySection, placeOf, timeOf } from './history-section.tsx'
import { type Layout, layoutOf } from './layout.ts'
import { degrees } from './measures.ts'
import { Plan } from './plan.tsx'
import { ProfileReading, ProfileSection } from './profile-section.tsx'
import { useWidth } from './use-width.ts'

interface Props {
  field: Field
  cut: Cut
  onCut(cut: Cut): void
  hatch: Hatch
  material: string
  history?: boolean
}

/** One solve in three views: the plan, and the two sections cut from it. */
export function FieldFigure({ field, cut, onCut, hatch, material, history = true }: Props) {
  const [box, width] = useWidth<HTMLDivElement>()
  const layout = layoutOf(field, Math.max(264, width), history)
  const value = field.values[cut.row]![cut.column]!
  const wash = washText(field)
  const reading = `${degrees(value, layout.range.high - layout.range.low)} °C`
  const label = `Temperature over ${field.along} and time. At ${placeOf(field, cut)} and ${timeOf(field.times, cut.row)}: ${reading}`
  const follow = (event: PointerEvent<SVGSVGElement>) => {
    const at = cutAt(event, field, layout)
    if (at && (at.row !== cut.row || at.column !== cut.column)) onCut(at)
  }
  return (
    <div ref={box} className="min-w-0">
      {width > 0 && (
        <Drawing
          width={layout.width}
          height={layout.height}
          label={label}
          onPointerMove={follow}
          onPointerDown={follow}
          className="drawing cursor-crosshair touch-pan-y"
        >
          <ProfileSection field={field} layout={layout} cut={cut} hatch={hatch} material={material} />
          <Plan field={field} layout={layout} cut={cut} history={history} />
          <CutMarks field={field} layout={layout} cut={cut} history={history} />
          <ProfileReading field={field} layout={layout} cut={cut} history={history} />
          {layout.beside && <HistorySection field={field} layout={layout} cut={cut} />}
        </Drawing>
      )}
      {wash && <p className="lab mt-2">{wash}</p>}
      {width > 0 && history && !layout.beside && (
        <HistoryFigure
          width={layout.width}
          times={field.times}
          series={[{ name: placeOf(field, cut), values: field.values.map((row) => row[cut.column]!) }]}
          levels={field.initial === undefined ? [] : [field.initial]}
          row={cut.row}
          title={`B–B: history at ${placeOf(field, cut)}`}
        />
      )}
    </div>
  )
}

/** The grid point under a pointer on the plan. */
function cutAt(
  event: PointerEvent<SVGSVGElement>,
  field: Field,
  { left, right, planTop, planHeight }: Layout,
): Cut | undefined {
  const box = event.currentTarget.getBoundingClientRect()
  const [px, py] = [event.clientX - box.left, event.clientY - box.top]
  if (px < left - 4 || px > right + 4 || py < planTop - 4 || py > planTop + planHeight + 4) return undefined
  const [first, last] = [field.places[0]!, field.places.at(-1)!]
  const place = first + ((px - left) / (right - left)) * (last - first)
  const time = ((py - planTop) / planHeight) * field.times.at(-1)!
  return { row: Math.max(1, nearest(field.times, time)), column: nearest(field.places, place) }
}
