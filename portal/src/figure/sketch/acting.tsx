import type { Frame } from './frame.ts'
import { HeldRing, InnerSign } from './round-bodies.tsx'
import { SignAt } from './face-sign.tsx'
import { shapeOf } from './shapes.ts'

interface Props {
  frame: Frame
  body: string
  boundary: string
  /** What acts on each face, in the order of the shape's faces or, of a hollow body, inside and outside. */
  first: string
  second: string
}

const round = ['cylinder', 'sphere', 'hollow-cylinder']
const held = ['temperature', 'held']

/** Signs of what acts on a body, at its faces and inside it. */
export function Acting({ frame, body, boundary, first, second }: Props) {
  const faces = shapeOf(body).faces(frame)
  const hollow = body === 'hollow-cylinder' || body === 'hole'
  const kinds = hollow ? [second, second] : [first, second]
  return (
    <g>
      {faces.map((face, i) => {
        const kind = kinds[i] ?? first
        return round.includes(body) && held.includes(kind) ? (
          <HeldRing key={i} frame={frame} />
        ) : (
          <SignAt key={i} face={face} kind={kind} />
        )
      })}
      {hollow && (
        <InnerSign frame={frame} body={body} kind={body === 'hole' && boundary === 'source' ? 'source' : first} />
      )}
      {boundary === 'source' && !hollow && body !== 'endless' && <Sources frame={frame} />}
    </g>
  )
}

const spots = [
  [0.28, 0.26],
  [0.66, 0.4],
  [0.4, 0.58],
  [0.75, 0.77],
  [0.25, 0.85],
] as const

/** Heat inside: dots of clay. */
function Sources({ frame: { left, right, top, bottom } }: { frame: Frame }) {
  return spots.map(([x, y]) => (
    <circle key={`${x}`} className="dot" cx={left + (right - left) * x} cy={top + (bottom - top) * y} r={3.5} />
  ))
}
