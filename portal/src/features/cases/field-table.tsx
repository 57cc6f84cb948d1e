import { NumberTable } from '../../components/number-table.tsx'
import { inMeasure, lengthMeasure, sentTime, timeMeasure } from '../../figure/measures.ts'
import type { FieldDrawing } from '../../solving/field-drawing.ts'
import type { HistoryDrawing } from '../../solving/history-drawing.ts'

const ROWS = 24
const COLUMNS = 10

/** The numbers of the curves: every so many of them, those that were asked for among them. */
export function FieldTable({ drawing }: { drawing: FieldDrawing | HistoryDrawing }) {
  const times = drawing.kind === 'field' ? drawing.field.times : drawing.times
  const measure = timeMeasure(Math.max(...times.map(Math.abs)))
  const rows = picked(times, ROWS, drawing.asked.times)
  const columns = drawing.kind === 'field' ? fieldColumns(drawing) : drawing.series
  return (
    <NumberTable
      caption="Temperature, °C. The same numbers as the curves."
      label={`Temperature by time and ${drawing.kind === 'field' ? drawing.field.along : 'place'}`}
      corner={`time, ${measure.unit}`}
      columns={columns.map(({ name }) => name)}
      rows={rows.map((row) => ({
        name: drawing.asked.times.includes(times[row]!)
          ? sentTime(times[row]!, measure)
          : inMeasure(times[row]!, measure, 6),
        values: columns.map(({ values }) => values[row]!),
      }))}
    />
  )
}

function fieldColumns({ field: { places, values }, asked }: FieldDrawing) {
  const length = lengthMeasure(places.at(-1)!)
  return picked(places, COLUMNS, asked.places).map((i) => ({
    name: `${inMeasure(places[i]!, length)} ${length.unit}`,
    values: values.map((row) => row[i]!),
  }))
}

function picked(all: readonly number[], most: number, asked: readonly number[]): number[] {
  const every = Math.max(1, Math.ceil(all.length / most))
  return all.flatMap((value, i) => (i % every === 0 || i === all.length - 1 || asked.includes(value) ? [i] : []))
}
