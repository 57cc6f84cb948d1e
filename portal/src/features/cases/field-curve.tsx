import { useState } from 'react'
import { Slider } from '../../components/slider.tsx'
import { FieldFigure } from '../../figure/field-figure.tsx'
import { nearest } from '../../figure/grid.ts'
import type { Hatch } from '../../figure/hatches.tsx'
import { placeOf, timeOf } from '../../figure/history-section.tsx'
import type { FieldDrawing } from '../../solving/field-drawing.ts'

/** The three views with a slider for each cut; the sliders step along the solved points. */
export function FieldCurve({ drawing: { field, start }, hatch }: { drawing: FieldDrawing; hatch: Hatch }) {
  const [cut, setCut] = useState({ row: nearest(field.times, start.time), column: nearest(field.places, start.place) })
  return (
    <>
      <FieldFigure field={field} cut={cut} onCut={setCut} hatch={hatch} material="" />
      <div className="cuts">
        <Slider
          label="Cut A–A at time"
          shown={timeOf(field.times, cut.row)}
          min={1}
          max={field.times.length - 1}
          value={cut.row}
          onChange={(row) => setCut({ ...cut, row })}
        />
        <Slider
          label={`Cut B–B at ${field.along}`}
          shown={placeOf(field, cut)}
          min={0}
          max={field.places.length - 1}
          value={cut.column}
          onChange={(column) => setCut({ ...cut, column })}
        />
      </div>
    </>
  )
}
