import type { Cut, Field } from './field.ts'
import type { Layout } from './layout.ts'

interface Props {
  field: Field
  layout: Layout
  cut: Cut
  history: boolean
}

/** Chain lines over the plan with thick ends, an arrow the way one looks, and the letter. */
export function CutMarks({ field, layout, cut, history }: Props) {
  const { x, z, left, right, back, small, planTop, planHeight } = layout
  const at = x(field.places[cut.column]!)
  const level = z(field.times[cut.row]!)
  const from = left - (small ? 10 : 12)
  const to = right + back + (small ? 2 : 8)
  const bottom = planTop + planHeight
  return (
    <g>
      <line className="chain" x1={from} x2={to} y1={level} y2={level} />
      <path className="chain-end" d={`M${to - 14} ${level}H${to + 2}M${from - 8} ${level}H${from + 4}`} />
      <path className="chain-end" d={`M${to - 2} ${level - 2}v-9m-4 5l4-6l4 6`} />
      <text className="t-clay halo" x={to + 11} y={level + 4} textAnchor="middle">
        A
      </text>
      <circle className="dot" cx={at} cy={level} r={4} />
      {history && (
        <>
          <line className="chain" x1={at} x2={at} y1={planTop - 10} y2={bottom + 8} />
          <path className="chain-end" d={`M${at} ${bottom}v14M${at} ${bottom + 12}h9m-5-4l6 4l-6 4`} />
          <text className="t-clay halo" x={at - 10} y={bottom + 22} textAnchor="middle">
            B
          </text>
        </>
      )}
    </g>
  )
}
