import type { ReactNode } from 'react'

export interface Column<R> {
  header: string
  cell(row: R): ReactNode
  numeric?: boolean
  mono?: boolean
  /** Heading read out but not shown. */
  quiet?: boolean
}

interface Props<R> {
  caption: string
  rows: readonly R[]
  /** The first names the row. */
  columns: readonly Column<R>[]
  rowKey(row: R): string
  total?: readonly ReactNode[]
  off?(row: R): boolean
}

/** Ruled above and below; under 900 px each row becomes a record. */
export function DataTable<R>({ caption, rows, columns, rowKey, total, off }: Props<R>) {
  return (
    <table className="table stack">
      <caption>{caption}</caption>
      <thead>
        <tr>
          {columns.map(({ header, numeric, quiet }) => (
            <th key={header} scope="col" className={numeric ? 'num' : undefined}>
              {quiet ? <span className="sr-only">{header}</span> : header}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={rowKey(row)} className={off?.(row) ? 'off' : undefined}>
            {columns.map((column, i) =>
              i === 0 ? (
                <th key={column.header} scope="row">
                  {column.cell(row)}
                </th>
              ) : (
                <Cell key={column.header} column={column} content={column.cell(row)} />
              ),
            )}
          </tr>
        ))}
      </tbody>
      {total && (
        <tfoot>
          <tr>
            {columns.map((column, i) =>
              i === 0 ? (
                <th key={column.header} scope="row">
                  {total[i]}
                </th>
              ) : (
                <Cell key={column.header} column={column} content={total[i]} />
              ),
            )}
          </tr>
        </tfoot>
      )}
    </table>
  )
}

function Cell<R>({ column: { header, numeric, mono, quiet }, content }: { column: Column<R>; content: ReactNode }) {
  return (
    <td data-label={quiet ? '' : header} className={numeric ? 'num' : mono ? 'mono' : undefined}>
      {content}
    </td>
  )
}
