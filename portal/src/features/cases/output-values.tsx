import { scientific, unitText } from '../../components/formats.ts'
import { NumberTable } from '../../components/number-table.tsx'
import { plain, sentTime, timeMeasure } from '../../figure/measures.ts'
import { type Answer, type CompactAnswer, isFull } from '../../solving/solve.ts'
import type { Case } from './described.ts'

type Values = number | number[] | number[][]
/** The same for each parameter, by its name. */
type ByParameter = Record<string, number[] | number[][]>
type Shape = Case['outputs'][number]['shape']

interface Bound {
  absolute: number
  relative: number
}

interface Axes {
  times?: number[]
  depths?: number[] | undefined
  radii?: number[] | undefined
  points?: Record<string, number>[] | undefined
}

/** Rows of a long answer that are shown; all of them stand in the JSON. */
const SHOWN = 12

/** Each output with its error limit: one number, or a table by time, by place, or by both. */
export function OutputValues({ description: c, answer }: { description: Case; answer: Answer | CompactAnswer }) {
  const bounds = answer.accuracy.bound as Record<string, Bound>
  const axes: Axes = isFull(answer) ? answer.axes : {}
  return (
    <div className="grid gap-5">
      {tablesOf(answer.result as Record<string, Values | ByParameter>).map(({ name, parameter, values }) => {
        const output = c.outputs.find((one) => one.name === name)
        const unit = unitText((isFull(answer) && answer.units[name]) || output?.unit || '')
        const limit = `error at most ${limitOf(values, bounds[name]!)}${unit ? ` ${unit === '°C' ? 'K' : unit}` : ''}`
        const label = parameter ? `Sensitivity to ${parameter}` : (output?.label ?? name)
        const head = `${label}${unit ? `, ${unit}` : ''}`
        if (typeof values === 'number')
          return (
            <dl key={name} className="dl">
              <dt>{head}</dt>
              <dd>
                {plain(values, 9)} <span className="lab">{limit}</span>
              </dd>
            </dl>
          )
        return (
          <Table key={`${name} ${parameter}`} {...{ head, limit, values, axes }} shape={output?.shape ?? 'times'} />
        )
      })}
    </div>
  )
}

interface TableOf {
  name: string
  parameter?: string
  values: Values
}

/** One table an output, or one for each of its parameters. */
function tablesOf(result: Record<string, Values | ByParameter>): TableOf[] {
  return Object.entries(result).flatMap(([name, values]): TableOf[] => {
    if (typeof values === 'number' || Array.isArray(values)) return [{ name, values }]
    return Object.entries(values).map(([parameter, inner]) => ({ name, parameter, values: inner }))
  })
}

interface TableProps {
  head: string
  limit: string
  values: number[] | number[][]
  shape: Shape
  axes: Axes
}

function Table({ head, limit, values, shape, axes }: TableProps) {
  const places = placeNames(axes)
  const byPlace = shape === 'places'
  const rows = values.map((row) => (Array.isArray(row) ? row : [row]))
  const measure = timeMeasure(Math.max(...(axes.times ?? [1]).map(Math.abs)))
  const columns = Array.isArray(values[0])
    ? rows[0]!.map((_, j) => places?.[j] ?? `place ${j + 1}`)
    : [head.split(', ')[1] ?? head.toLowerCase()]
  const names = byPlace ? places : axes.times?.map((time) => sentTime(time, measure))
  const what = byPlace ? 'places' : 'times'
  const more = rows.length > SHOWN ? ` The first ${SHOWN} of ${rows.length} ${what}; the rest stands in the JSON.` : ''
  return (
    <NumberTable
      caption={`${head}; ${limit}.${more}`}
      label={head}
      corner={byPlace ? 'place' : axes.times ? `time, ${measure.unit}` : 'time, in order'}
      columns={columns}
      rows={rows.slice(0, SHOWN).map((row, i) => ({ name: names?.[i] ?? String(i + 1), values: row }))}
    />
  )
}

/** The places as they were asked for. */
function placeNames({ depths, radii, points }: Axes): string[] | undefined {
  const list = depths ?? radii
  if (list) return list.map((place) => `${plain(place)} m`)
  return points?.map(
    (point) =>
      `${Object.entries(point)
        .map(([axis, value]) => `${axis} ${plain(value)}`)
        .join(', ')} m`,
  )
}

/** The largest error any of the values may have. */
function limitOf(values: Values, { absolute, relative }: Bound): string {
  const largest = [values].flat(2).reduce((most, value) => Math.max(most, Math.abs(value)), 0)
  return scientific(absolute + relative * largest)
}
