import type { FieldDrawing } from './field-drawing.ts'
import type { HistoryDrawing } from './history-drawing.ts'

/** Every number of a drawing, to its last digit: a row for each time, a column for each place. */
export function csvOf(drawing: FieldDrawing | HistoryDrawing): string {
  const { names, times, rows } = drawing.kind === 'field' ? fieldTable(drawing) : historyTable(drawing)
  const lines = [['time, s', ...names], ...rows.map((row, i) => [times[i] ?? '', ...row])]
  return lines.map((line) => `${line.map(cell).join(',')}\r\n`).join('')
}

const fieldTable = ({ field: { places, along, times, values } }: FieldDrawing) => ({
  names: places.map((place) => `temperature at ${along} ${place} m, Cel`),
  times,
  rows: values,
})

const historyTable = ({ series, times }: HistoryDrawing) => ({
  names: series.map(({ name }) => (name === 'temperature' ? 'temperature, Cel' : `temperature at ${name}, Cel`)),
  times,
  rows: times.map((_, i) => series.map(({ values }) => values[i] ?? '')),
})

const cell = (value: string | number): string =>
  typeof value === 'string' ? `"${value.replaceAll('"', '""')}"` : String(value)
