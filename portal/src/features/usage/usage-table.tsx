import { dayText, whole } from '../../components/formats.ts'
import { type Column, DataTable } from '../../components/data-table.tsx'
import type { Usage, UsageRow } from './queries.ts'

const share = (points: number, total: number): string => (total > 0 ? ((100 * points) / total).toFixed(1) : '0.0')

export function UsageTable({ usage }: { usage: Usage }) {
  const { total } = usage
  const columns: readonly Column<UsageRow>[] = [
    { header: 'Key', cell: ({ keyName }) => keyName ?? 'no key' },
    { header: 'Case', mono: true, cell: (row) => (row.case ? <code>{row.case}</code> : 'other calls') },
    { header: 'Calls', numeric: true, cell: ({ calls }) => whole(calls) },
    { header: 'Refused', numeric: true, cell: ({ refused }) => whole(refused) },
    { header: 'Points', numeric: true, cell: ({ points }) => whole(points) },
    { header: 'Share, %', numeric: true, cell: ({ points }) => share(points, total.points) },
  ]
  return (
    <DataTable
      caption={`By key and case, ${dayText(usage.from)} to ${dayText(usage.to)}, UTC. Points are whole numbers.`}
      rows={[...usage.rows].sort((a, b) => b.points - a.points)}
      columns={columns}
      rowKey={(row) => `${row.keyId} ${row.case}`}
      total={[
        'All',
        '',
        whole(total.calls),
        whole(total.refused),
        whole(total.points),
        share(total.points, total.points),
      ]}
    />
  )
}
