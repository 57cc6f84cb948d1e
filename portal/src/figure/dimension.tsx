interface Props {
  from: number
  to: number
  y: number
  label?: string
  /** How far the extension lines reach up. */
  reach?: number
  className?: string
}

/** A thin line between two oblique strokes, the figure above it. */
export function Dimension({ from, to, y, label, reach = 0, className = 't-ink halo' }: Props) {
  return (
    <g>
      <line className="dim" x1={from} y1={y} x2={to} y2={y} />
      {[from, to].map((x, i) => (
        <g key={i}>
          <line className="dim" x1={x - 4} y1={y + 4} x2={x + 4} y2={y - 4} />
          {reach > 0 && <line className="thin" x1={x} y1={y - reach} x2={x} y2={y + 5} />}
        </g>
      ))}
      {label && (
        <text className={className} x={(from + to) / 2} y={y - 5} textAnchor="middle">
          {label}
        </text>
      )}
    </g>
  )
}
