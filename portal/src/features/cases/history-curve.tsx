import { useState } from 'react'
import { Slider } from '../../components/slider.tsx'
import { nearest } from '../../figure/grid.ts'
import { HistoryFigure } from '../../figure/history-figure.tsx'
import { timeOf } from '../../figure/history-section.tsx'
import { useWidth } from '../../figure/use-width.ts'
import type { HistoryDrawing } from '../../solving/history-drawing.ts'

/** The history of a body that has one temperature, or of the first places of another. */
export function HistoryCurve({ drawing: { times, series, levels, start } }: { drawing: HistoryDrawing }) {
  const [box, width] = useWidth<HTMLDivElement>()
  const [row, setRow] = useState(nearest(times, start.time))
  const [chosen, setChosen] = useState(0)
  const many = series.length > 1
  const place = series[chosen]?.name ?? ''
  return (
    <>
      <div ref={box} className="min-w-0">
        {width > 0 && (
          <HistoryFigure
            width={Math.max(264, width)}
            times={times}
            series={series}
            chosen={chosen}
            levels={levels}
            row={row}
            title={place === 'temperature' ? 'History of the body' : `History at ${place}`}
          />
        )}
      </div>
      <div className="cuts">
        <Slider
          label="Reading at time"
          shown={timeOf(times, row)}
          min={0}
          max={times.length - 1}
          value={row}
          onChange={setRow}
        />
        {many && (
          <Slider
            label="Reading at place"
            shown={place}
            min={0}
            max={series.length - 1}
            value={chosen}
            onChange={setChosen}
          />
        )}
      </div>
    </>
  )
}
