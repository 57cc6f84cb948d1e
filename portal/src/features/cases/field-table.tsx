import { NumberTable } from '../../components/number-table.tsx'
import { inMeasure, lengthMeasure, sentTime, timeMeasure } from '../../figure/measures.ts'
import type { Drawing } from '../../solving/curve-query.ts'

const ROWS = 24
const COLUMNS = 10

/** The numbers of the curves: every so many of them, those that were asked for among them. */
export function FieldTable({ drawing }: { drawing: Drawing }) {
  const times = drawing.kind === 'field' ? drawing.field.times : drawing.times
  const depths = drawing.kind === 'field' ? drawing.field.depths : [0]
  const measure = timeMeasure(times.at(-1)!)
  const length = lengthMeasure(depths.at(-1)!)
  const rows = picked(times, ROWS, drawing.asked.times)
  const columns = picked(depths, COLUMNS, drawing.asked.depths)
  const valueOf = (row: number, column: number) =>
    drawing.kind === 'field' ? drawing.field.values[row]![column]! : drawing.values[row]!
  const heads =
    drawing.kind === 'field' ? columns.map((i) => `${inMeasure(depths[i]!, length)} ${length.unit}`) : ['temperature']
  return (
    <NumberTable
      caption="Temperature, °C. The same numbers as the curves."
      label="Temperature by time and depth"
      corner={`time, ${measure.unit}`}
      columns={heads}
      rows={rows.map((row) => ({
        name: drawing.asked.times.includes(times[row]!)
          ? sentTime(times[row]!, measure)
          : inMeasure(times[row]!, measure, 6),
        values: columns.map((column) => valueOf(row, column)),
      }))}
    />
  )
}

function picked(all: readonly number[], most: number, asked: readonly number[]): number[] {
  const every = Math.max(1, Math.ceil(all.length / most))
  return all.flatMap((value, i) => (i % every === 0 || i === all.length - 1 || asked.includes(value) ? [i] : []))
}
