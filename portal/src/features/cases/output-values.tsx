import { scientific, unitText } from '../../components/formats.ts'
import { NumberTable } from '../../components/number-table.tsx'
import { plain, sentTime, timeMeasure } from '../../figure/measures.ts'
import { type Answer, type CompactAnswer, isFull } from '../../solving/solve.ts'
import type { Case } from './queries.ts'

type Values = number | number[] | number[][]

interface Bound {
  absolute: number
  relative: number
}

/** Rows of a long answer that are shown; all of them stand in the JSON. */
const SHOWN = 12

/** Each output with its error limit: one number, or a table by time and place. */
export function OutputValues({ description: c, answer }: { description: Case; answer: Answer | CompactAnswer }) {
  const bounds = answer.accuracy.bound as Record<string, Bound>
  const axes = isFull(answer) ? answer.axes : undefined
  return (
    <div className="grid gap-5">
      {Object.entries(answer.result as Record<string, Values>).map(([name, values]) => {
        const output = c.outputs.find((one) => one.name === name)
        const unit = unitText((isFull(answer) && answer.units[name]) || output?.unit || '')
        const limit = `error at most ${limitOf(values, bounds[name]!)}${unit ? ` ${unit === '°C' ? 'K' : unit}` : ''}`
        const head = `${output?.label ?? name}${unit ? `, ${unit}` : ''}`
        if (typeof values === 'number')
          return (
            <dl key={name} className="dl">
              <dt>{head}</dt>
              <dd>
                {plain(values, 9)} <span className="lab">{limit}</span>
              </dd>
            </dl>
          )
        return <Table key={name} head={head} limit={limit} values={values} axes={axes} />
      })}
    </div>
  )
}

interface TableProps {
  head: string
  limit: string
  values: number[] | number[][]
  axes: { times: number[]; depths?: number[] | undefined } | undefined
}

function Table({ head, limit, values, axes }: TableProps) {
  const rows = values.map((row) => (Array.isArray(row) ? row : [row]))
  const measure = timeMeasure(axes?.times.at(-1) ?? 1)
  const across = rows[0]?.length ?? 0
  const columns =
    rows[0] && Array.isArray(values[0])
      ? Array.from({ length: across }, (_, i) => (axes?.depths ? `${plain(axes.depths[i]!)} m` : `place ${i + 1}`))
      : [head.split(', ')[1] ?? head.toLowerCase()]
  const more = rows.length > SHOWN ? ` The first ${SHOWN} of ${rows.length} times; the rest stands in the JSON.` : ''
  return (
    <NumberTable
      caption={`${head}; ${limit}.${more}`}
      label={head}
      corner={axes ? `time, ${measure.unit}` : 'time, in order'}
      columns={columns}
      rows={rows
        .slice(0, SHOWN)
        .map((row, i) => ({ name: axes ? sentTime(axes.times[i]!, measure) : String(i + 1), values: row }))}
    />
  )
}

/** The largest error any of the values may have. */
function limitOf(values: Values, { absolute, relative }: Bound): string {
  const largest = [values].flat(2).reduce((most, value) => Math.max(most, Math.abs(value)), 0)
  return scientific(absolute + relative * largest)
}
