interface Props {
  at: number
  from: number
  to: number
  kind: string
  /** The body lies to the left of the face. */
  turned?: boolean
}

/** What acts on a face: waves of a fluid, a thick line where it is held, or short ticks where no heat passes. */
export function FaceSign({ at, from, to, kind, turned = false }: Props) {
  const d = turned ? -1 : 1
  const rows = (first: number, every: number, last: number) =>
    Array.from({ length: Math.max(0, Math.ceil((last - first) / every)) }, (_, i) => first + i * every)
  if (kind === 'insulated')
    return (
      <g>
        <line className="cut" x1={at} x2={at} y1={from} y2={to} />
        {rows(from + 6, 9, to).map((y) => (
          <line key={y} className="dim" x1={at} y1={y} x2={at - 8 * d} y2={y - 6} />
        ))}
      </g>
    )
  if (kind === 'temperature') return <line className="now" x1={at - 5 * d} x2={at - 5 * d} y1={from} y2={to} />
  return rows(from + 10, 17, to - 4).map((y) => (
    <path
      key={y}
      className="cold"
      d={`M${at - 40 * d} ${y}c${7 * d}-6 ${10 * d} 6 ${17 * d} 0s${8 * d}-3 ${12 * d} 0m${-5 * d}-4l${5 * d} 4l${-5 * d} 4`}
    />
  ))
}
