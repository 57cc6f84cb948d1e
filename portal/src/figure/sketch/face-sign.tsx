import { hatched } from '../hatches.tsx'

interface Props {
  at: number
  from: number
  to: number
  kind: string
  /** The body lies to the left of the face. */
  turned?: boolean
}

const rows = (first: number, every: number, last: number) =>
  Array.from({ length: Math.max(0, Math.ceil((last - first) / every)) }, (_, i) => first + i * every)

/**
 * What acts on a face: waves of a fluid, a thick line where it is held, arrows of a flux, a slope, a wave in time,
 * dashes of a liquid, or short ticks where no heat passes.
 */
export function FaceSign({ at, from, to, kind, turned = false }: Props) {
  const d = turned ? -1 : 1
  const middle = (from + to) / 2
  switch (kind) {
    case 'insulated':
      return (
        <g>
          <line className="cut" x1={at} x2={at} y1={from} y2={to} />
          {rows(from + 6, 9, to).map((y) => (
            <line key={y} className="dim" x1={at} y1={y} x2={at - 8 * d} y2={y - 6} />
          ))}
        </g>
      )
    case 'temperature':
    case 'held':
      return <line className="now" x1={at - 5 * d} x2={at - 5 * d} y1={from} y2={to} />
    case 'flux':
      return rows(from + 10, 19, to - 4).map((y) => (
        <path key={y} className="now" d={`M${at - 36 * d} ${y}H${at - 6 * d}m${-6 * d}-5l${6 * d} 5l${-6 * d} 5`} />
      ))
    case 'ramp':
      return <path className="now" d={`M${at - 44 * d} ${to - 10}h${10 * d}L${at - 16 * d} ${from + 12}h${8 * d}`} />
    case 'cycle':
      return (
        <path
          className="now"
          d={`M${at - 46 * d} ${middle}c${6 * d}-34 ${12 * d}-34 ${18 * d} 0s${12 * d} 34 ${18 * d} 0`}
        />
      )
    case 'history':
      return (
        <path
          className="now"
          d={`M${at - 46 * d} ${to - 16}l${9 * d} -16l${7 * d} 6l${10 * d} -28l${7 * d} 11l${6 * d} -5`}
        />
      )
    case 'bath':
      return <Bath left={turned ? at + 2 : at - 44} top={from} bottom={to} />
    case 'convection':
    case 'film':
      return rows(from + 10, 17, to - 4).map((y) => (
        <path
          key={y}
          className="cold"
          d={`M${at - 40 * d} ${y}c${7 * d}-6 ${10 * d} 6 ${17 * d} 0s${8 * d}-3 ${12 * d} 0m${-5 * d}-4l${5 * d} 4l${-5 * d} 4`}
        />
      ))
    default:
      return null
  }
}

/** A liquid that takes part: its surface, and the vessel around it. */
function Bath({ left, top, bottom }: { left: number; top: number; bottom: number }) {
  const box = { x: left, y: top + 10, width: 42, height: bottom - top - 10 }
  return (
    <g>
      <rect className="w-frost" {...box} />
      <rect fill={hatched('ice')} {...box} />
      <path className="thin" d={`M${left} ${top}V${bottom}h42`} />
      <line className="cold" x1={left} x2={left + 42} y1={top + 10} y2={top + 10} />
    </g>
  )
}

export interface Face {
  /** Where the sign begins; it runs from there along the face. */
  x: number
  y: number
  length: number
  /** Degrees: 0 with the body to the right, 90 below, 180 to the left, 270 above. */
  turn: 0 | 90 | 180 | 270
}

/** The sign of a face that looks in any direction. */
export function SignAt({ face: { x, y, length, turn }, kind }: { face: Face; kind: string }) {
  return (
    <g transform={`translate(${x} ${y})${turn ? ` rotate(${turn})` : ''}`}>
      <FaceSign at={0} from={0} to={length} kind={kind} />
    </g>
  )
}
