import { MINUS } from '../figure/measures.ts'

interface Props {
  caption: string
  label: string
  corner: string
  columns: readonly string[]
  rows: readonly { name: string; values: readonly number[] }[]
}

/** Numbers with the same decimals down each column, so that their points line up. */
export function NumberTable({ caption, label, corner, columns, rows }: Props) {
  const decimals = columns.map((_, i) => decimalsOf(rows.map(({ values }) => values[i]!)))
  return (
    <div className="scroll" tabIndex={0} role="region" aria-label={label}>
      <table className="table">
        <caption>{caption}</caption>
        <thead>
          <tr>
            <th scope="col">{corner}</th>
            {columns.map((column, i) => (
              <th key={i} scope="col" className="num">
                {column}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map(({ name, values }, i) => (
            <tr key={i}>
              <th scope="row" className="!font-mono !text-[14px]">
                {name}
              </th>
              {values.map((value, j) => (
                <td key={j} className="num">
                  {value.toFixed(decimals[j]).replace('-', MINUS)}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}

/** Seven significant digits of the largest. */
function decimalsOf(values: readonly number[]): number {
  const largest = Math.max(...values.map(Math.abs))
  return largest > 0 ? Math.min(12, Math.max(0, 6 - Math.floor(Math.log10(largest)))) : 1
}
