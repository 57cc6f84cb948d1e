import { useState } from 'react'
import { Slider } from '../../components/slider.tsx'
import { nearest } from '../../figure/grid.ts'
import { HistoryFigure } from '../../figure/history-figure.tsx'
import { timeOf } from '../../figure/history-section.tsx'
import { useWidth } from '../../figure/use-width.ts'
import type { HistoryDrawing } from '../../solving/curve-query.ts'

/** The history of a body that has one temperature. */
export function HistoryCurve({ drawing: { times, values, levels, start } }: { drawing: HistoryDrawing }) {
  const [box, width] = useWidth<HTMLDivElement>()
  const [row, setRow] = useState(nearest(times, start.time))
  return (
    <>
      <div ref={box} className="min-w-0">
        {width > 0 && (
          <HistoryFigure
            width={Math.max(264, width)}
            times={times}
            values={values}
            levels={levels}
            row={row}
            title="History of the body"
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
      </div>
    </>
  )
}
