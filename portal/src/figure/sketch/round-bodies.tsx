import type { BodyShape } from './body-shape.ts'
import { type Frame, breakBelow, breakLine, circleIn } from './frame.ts'
import { HatchedBox, HatchedCircle } from './hatched-box.tsx'

const faceOf = (frame: Frame) => {
  const { x, y, r } = circleIn(frame)
  return { x: x - r - 2, y: y - r + 6, length: 2 * r - 12, turn: 0 as const }
}

/** From the surface on the left to the centre. */
const markIn = (frame: Frame, along: number) => {
  const { x, y, r } = circleIn(frame)
  return [x - r + along * r, y] as const
}

const radiusOf = (frame: Frame) => {
  const { x, r } = circleIn(frame)
  return [{ field: 'radius', from: x, to: x + r }]
}

function CentreLines({ frame }: { frame: Frame }) {
  const { x, y, r } = circleIn(frame)
  return <path className="dash" d={`M${x - r - 8} ${y}H${x + r + 8}M${x} ${y - r - 6}V${y + r + 6}`} />
}

/** The part of the mantle that is seen behind the section. */
function Mantle({ frame }: { frame: Frame }) {
  const { x, y, r } = circleIn(frame)
  const [dx, dy] = [r * 0.6, -r * 0.36]
  const [nx, ny] = [(-dy * r) / Math.hypot(dx, dy), (dx * r) / Math.hypot(dx, dy)]
  return (
    <path
      className="thin"
      d={`M${x - nx} ${y - ny}l${dx} ${dy}A${r} ${r} 0 0 1 ${x + nx + dx} ${y + ny + dy}L${x + nx} ${y + ny}`}
    />
  )
}

/** Bodies that heat crosses along the radius. */
export const roundBodies: Record<string, BodyShape> = {
  cylinder: {
    hatch: 'concrete',
    text: 'a long cylinder',
    draw: (frame) => (
      <>
        <Mantle frame={frame} />
        <HatchedCircle {...circleIn(frame)} hatch="concrete" />
        <circle className="cut" cx={circleIn(frame).x} cy={circleIn(frame).y} r={circleIn(frame).r} />
        <CentreLines frame={frame} />
      </>
    ),
    faces: (frame) => [faceOf(frame)],
    mark: markIn,
    measured: radiusOf,
  },
  sphere: {
    hatch: 'plaster',
    text: 'a sphere',
    draw: (frame) => {
      const { x, y, r } = circleIn(frame)
      return (
        <>
          <HatchedCircle x={x} y={y} r={r} hatch="plaster" />
          <circle className="cut" cx={x} cy={y} r={r} />
          <path className="thin" d={`M${x - r} ${y}A${r} ${r * 0.3} 0 0 0 ${x + r} ${y}`} />
          <path className="dash" d={`M${x - r} ${y}A${r} ${r * 0.3} 0 0 1 ${x + r} ${y}`} />
          <path className="dash" d={`M${x} ${y - r - 6}V${y + r + 6}`} />
        </>
      )
    },
    faces: (frame) => [faceOf(frame)],
    mark: markIn,
    measured: radiusOf,
  },
  'hollow-cylinder': {
    hatch: 'metal',
    text: 'a hollow cylinder',
    draw: (frame) => {
      const { x, y, r } = circleIn(frame)
      return (
        <>
          <Mantle frame={frame} />
          <HatchedCircle x={x} y={y} r={r} hatch="metal" />
          <circle className="cut" cx={x} cy={y} r={r} />
          <circle className="w-paper cut-ring" cx={x} cy={y} r={r * 0.5} />
          <CentreLines frame={frame} />
        </>
      )
    },
    faces: (frame) => [faceOf(frame)],
    mark: (frame, along) => {
      const { x, y, r } = circleIn(frame)
      return [x + r * (0.5 + 0.5 * along), y]
    },
    measured: (frame) => {
      const { x, r } = circleIn(frame)
      return [
        { field: 'innerRadius', from: x, to: x + r * 0.5 },
        { field: 'outerRadius', from: x, to: x + r },
      ]
    },
  },
  hole: {
    hatch: 'ground',
    text: 'a round hole in a wide body',
    draw: (frame) => {
      const { x, y, r } = circleIn(frame)
      const { left, right, top, bottom } = frame
      return (
        <>
          <HatchedBox frame={frame} hatch="ground" />
          <path className="thin" d={breakLine(left, top, bottom) + breakLine(right, top, bottom)} />
          <path className="thin" d={breakBelow(top, left, right) + breakBelow(bottom, left, right)} />
          <circle className="w-paper cut-ring" cx={x} cy={y} r={r * 0.42} />
          <path className="dash" d={`M${x - r * 0.55} ${y}H${x + r * 0.55}M${x} ${y - r * 0.55}V${y + r * 0.55}`} />
        </>
      )
    },
    faces: () => [],
    mark: (frame, along) => {
      const { x, y, r } = circleIn(frame)
      return [x + r * 0.42 + (frame.right - x - r * 0.42) * along, y]
    },
    measured: (frame) => {
      const { x, r } = circleIn(frame)
      return [{ field: 'radius', from: x, to: x + r * 0.42 }]
    },
    wide: true,
  },
}

/** A round surface that is held is held all around. */
export function HeldRing({ frame }: { frame: Frame }) {
  const { x, y, r } = circleIn(frame)
  return <circle className="now" cx={x} cy={y} r={r + 5} />
}

/** What acts inside a hollow or a hole: a clay ring where it is held, arrows of a flux, a wave of a fluid. */
export function InnerSign({ frame, body, kind }: { frame: Frame; body: string; kind: string }) {
  const { x, y, r: whole } = circleIn(frame)
  const r = whole * (body === 'hole' ? 0.42 : 0.5)
  if (kind === 'temperature' || kind === 'held') return <circle className="now" cx={x} cy={y} r={r - 4} />
  if (kind === 'convection')
    return <path className="cold" d={`M${x - r * 0.6} ${y - 3}c5-6 8 6 ${r * 0.5} 0s8-3 ${r * 0.6} 0m-4-4l4 4l-4 4`} />
  if (kind === 'insulated') return <circle className="dash" cx={x} cy={y} r={r - 4} />
  const arrows = [45, 135, 225, 315].map((turn) => (
    <path
      key={turn}
      className="now"
      transform={`translate(${x} ${y}) rotate(${turn})`}
      d={`M${r * 0.3} 0H${r - 3}m-5-4l5 4l-5 4`}
    />
  ))
  return (
    <g>
      {(kind === 'source' || kind === 'line-power') && <circle className="dot" cx={x} cy={y} r={4} />}
      {arrows}
    </g>
  )
}
