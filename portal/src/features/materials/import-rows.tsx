import { withMinus } from '../../api/form-words.ts'
import { counted } from '../../components/formats.ts'
import type { ImportReport } from './queries.ts'

/** What became of each row: those that were refused with the reason, first of all. */
export function ImportRows({ report }: { report: ImportReport }) {
  const rows = [...report.rows].sort((a, b) => b.status.localeCompare(a.status) || a.row - b.row)
  return (
    <div className="scroll max-h-[320px]" role="region" aria-label="Report of each row" tabIndex={0}>
      <table className="table">
        <caption>
          {counted(report.accepted, 'row')} {report.dryRun ? 'will do' : 'kept'}, {report.refused} refused. The line of
          names is not counted.
        </caption>
        <thead>
          <tr>
            <th scope="col" className="num">
              Row
            </th>
            <th scope="col">Report</th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ row, status, id, errors = [] }) => (
            <tr key={row}>
              <th scope="row" className="num">
                {row}
              </th>
              <td>
                {status === 'accepted' ? (
                  <span className="fig">{id ?? 'will do'}</span>
                ) : (
                  errors.map(({ column, detail, accepted }, i) => (
                    <p key={i}>
                      {withMinus(detail)}
                      <span className="lab block">
                        {[column && `column ${column}`, accepted && `accepted: ${withMinus(accepted)}`]
                          .filter(Boolean)
                          .join(' · ')}
                      </span>
                    </p>
                  ))
                )}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}
