import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import { type Column, DataTable } from '../../components/data-table.tsx'
import { QueryView } from '../../components/query-view.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { problemsQuery } from '../../api/codes.ts'
import type { ProblemEntry } from '../../api/problem-entry.ts'

const code: Column<ProblemEntry> = {
  header: 'Code',
  cell: (entry) => (
    <Link to={`/problems/${entry.code}`}>
      <code>{entry.code}</code>
    </Link>
  ),
}
const title: Column<ProblemEntry> = { header: 'Meaning', cell: (entry) => entry.title }
const withStatus: readonly Column<ProblemEntry>[] = [
  code,
  title,
  { header: 'Status', numeric: true, cell: ({ status }) => status },
  { header: 'Send the same again', cell: ({ retryable }) => (retryable ? 'yes, later' : 'no') },
]

const groups = [
  { kind: 'problem', title: 'Problems', caption: 'What a refused or failed call answers as code', columns: withStatus },
  {
    kind: 'entry',
    title: 'Codes of single fields',
    caption: 'Codes in errors of an invalid-input, with pointer and what would be accepted',
    columns: [code, title],
  },
  { kind: 'warning', title: 'Warnings', caption: 'Codes in warnings of an answer', columns: [code, title] },
] as const

export function ProblemsScreen() {
  const query = useQuery(problemsQuery())
  return (
    <Sheet title="Problems">
      <TitleBlock
        title="Problems"
        facts={[
          { name: 'Form', value: 'RFC 9457, application/problem+json', full: true },
          { name: 'Match on', value: 'code' },
          { name: 'A refused call costs', value: '0 points' },
        ]}
      >
        <p className="prose">
          Every refusal has a code, a page and a request id. Refused calls are refused before any work.
        </p>
      </TitleBlock>
      <QueryView query={query} what="Reading the contract.">
        {(entries) =>
          groups.map(({ kind, title: heading, caption, columns }) => (
            <Band key={kind} label={heading}>
              <h2 className="mb-4">{heading}</h2>
              <DataTable
                caption={caption}
                rows={entries.filter((entry) => entry.kind === kind)}
                columns={columns}
                rowKey={(entry) => entry.code}
              />
            </Band>
          ))
        }
      </QueryView>
    </Sheet>
  )
}
