import { dayText, whole } from '../../components/formats.ts'
import { type Column, DataTable } from '../../components/data-table.tsx'
import { type Series, pointsBy } from './series.ts'
import { type Usage, daysBetween } from './queries.ts'

interface Day {
  day: string
  points: readonly number[]
}

const sum = (values: readonly number[]) => values.reduce((a, b) => a + b, 0)

/** The numbers of the columns. */
export function DayTable({ usage, series }: { usage: Usage; series: readonly Series[] }) {
  const days = daysBetween(usage.from, usage.to)
  const points = pointsBy(usage.rows, days, series)
  const rows = days.map((day, i) => ({ day, points: points[i]! })).reverse()
  const columns: Column<Day>[] = [
    { header: 'Day', cell: ({ day }) => dayText(day) },
    ...series.map(({ name }, i) => ({ header: name, numeric: true, cell: (row: Day) => whole(row.points[i]!) })),
    { header: 'All keys', numeric: true, cell: (row) => whole(sum(row.points)) },
  ]
  const totals = series.map((_, i) => sum(points.map((row) => row[i]!)))
  return (
    <DataTable
      caption="Points by UTC day and key, newest first"
      rows={rows}
      columns={columns}
      rowKey={({ day }) => day}
      total={['All days', ...totals.map(whole), whole(sum(totals))]}
    />
  )
}
