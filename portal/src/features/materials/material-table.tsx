import { Link } from 'react-router-dom'
import { type Column, DataTable } from '../../components/data-table.tsx'
import { unitText } from '../../components/formats.ts'
import { MINUS } from '../../figure/measures.ts'
import type { Material } from './queries.ts'
import { labels, units } from './words.ts'

interface Props {
  caption: string
  materials: readonly Material[]
}

/** Materials with their properties, what these hold for, where they come from and how sure they are. */
export function MaterialTable({ caption, materials }: Props) {
  return <DataTable caption={caption} rows={materials} columns={columnsOf(materials)} rowKey={({ id }) => id} />
}

function columnsOf(materials: readonly Material[]): readonly Column<Material>[] {
  const figure = (name: keyof typeof units): Column<Material> => {
    const decimals = Math.max(0, ...materials.map((one) => decimalsIn(one[name])))
    return {
      header: `${labels[name]}, ${unitText(units[name])}`,
      numeric: true,
      cell: (one) => one[name].toFixed(decimals).replace('-', MINUS),
    }
  }
  return [
    {
      header: labels.name,
      cell: ({ id, name, source }) => (
        <>
          <Link to={`/materials/${id}`}>{name}</Link>
          <span className="lab block">{source}</span>
        </>
      ),
    },
    { header: labels.group, cell: ({ group }) => group },
    figure('conductivity'),
    figure('density'),
    figure('specificHeat'),
    { header: labels.state, cell: ({ state }) => <span className="fig">{state}</span> },
    { header: labels.confidence, cell: ({ confidence }) => <span className="fig">{confidence}</span> },
  ]
}

/** As many as the number was given with, so that the points of a column line up; four are enough to compare. */
function decimalsIn(value: number): number {
  return Math.min(4, (String(value).split('.')[1] ?? '').length)
}
