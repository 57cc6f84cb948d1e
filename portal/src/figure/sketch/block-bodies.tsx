import type { BodyShape } from './body-shape.ts'
import { type Frame, breakBelow, breakLine, leftFace, middleOf, topFace } from './frame.ts'
import { HatchedBox, boxPath } from './hatched-box.tsx'

/** The depth of what is drawn obliquely behind a section, as a part of its height. */
const OBLIQUE = 0.26

const obliqueOf = ({ top, bottom }: Frame): [number, number] => {
  const d = (bottom - top) * OBLIQUE
  return [d, -d * 0.85]
}

/** Edges behind the section, whole or broken off. */
function Behind({ frame, className }: { frame: Frame; className: string }) {
  const { left, right, top, bottom } = frame
  const [dx, dy] = obliqueOf(frame)
  const d = `M${left} ${top}l${dx} ${dy}H${right + dx}L${right} ${top}M${right + dx} ${top + dy}V${bottom + dy}L${right} ${bottom}`
  return <path className={className} d={d} />
}

function MidLines({ frame }: { frame: Frame }) {
  const { left, right, top, bottom } = frame
  const { x, y } = middleOf(frame)
  return <path className="dash" d={`M${left - 6} ${y}H${right + 6}M${x} ${top - 6}V${bottom + 6}`} />
}

/** From the middle outwards. */
const fromMiddle: BodyShape['mark'] = (frame, along, across) => {
  const { x, y } = middleOf(frame)
  return [x + (frame.right - x) * along, y - (y - frame.top) * across]
}
/** From the corner between the two faces inwards. */
const fromCorner: BodyShape['mark'] = ({ left, right, top, bottom }, along, across) => [
  left + (right - left) * along,
  top + (bottom - top) * across,
]
const widthOf: BodyShape['measured'] = ({ left, right }) => [{ field: 'width', from: left, to: right }]

function Quarter({ frame }: { frame: Frame }) {
  const { left, right, top, bottom } = frame
  return (
    <>
      <HatchedBox frame={frame} hatch="concrete" />
      <path className="thin" d={breakLine(right, top, bottom) + breakBelow(bottom, left, right)} />
      <path className="cut" d={`M${left} ${bottom + 4}V${top}H${right + 4}`} />
    </>
  )
}

/** Bodies that heat enters from two or three sides. */
export const blockBodies: Record<string, BodyShape> = {
  bar: {
    hatch: 'stone',
    text: 'a long bar of rectangular section',
    draw: (frame) => (
      <>
        <Behind frame={frame} className="dash" />
        <HatchedBox frame={frame} hatch="stone" />
        <path className="cut" d={boxPath(frame)} />
        <MidLines frame={frame} />
      </>
    ),
    faces: (frame) => [leftFace(frame)],
    mark: fromMiddle,
    measured: widthOf,
  },
  brick: {
    hatch: 'masonry',
    text: 'a brick',
    draw: (frame) => (
      <>
        <Behind frame={frame} className="out" />
        <HatchedBox frame={frame} hatch="masonry" />
        <path className="cut" d={boxPath(frame)} />
        <MidLines frame={frame} />
      </>
    ),
    faces: (frame) => [leftFace(frame)],
    mark: fromMiddle,
    measured: widthOf,
  },
  'short-cylinder': {
    hatch: 'concrete',
    text: 'a short cylinder',
    draw: (frame) => {
      const { left, right, top, bottom } = frame
      const { x } = middleOf(frame)
      const [rx, ry] = [(right - left) / 2, (right - left) * 0.12]
      const mantle = `M${left} ${top}V${bottom}A${rx} ${ry} 0 0 0 ${right} ${bottom}V${top}`
      return (
        <>
          <HatchedBox frame={frame} hatch="concrete" />
          <path className="cut" d={mantle} />
          <ellipse className="w-sheet cut-ring" cx={x} cy={top} rx={rx} ry={ry} />
          <path className="dash" d={`M${x} ${top - ry - 4}V${bottom + ry + 6}`} />
        </>
      )
    },
    faces: (frame) => [leftFace(frame)],
    mark: fromMiddle,
    measured: (frame) => [{ field: 'radius', from: middleOf(frame).x, to: frame.right }],
  },
  'bar-end': {
    hatch: 'concrete',
    text: 'the end of a long bar',
    wide: true,
    draw: (frame) => {
      const { left, right, top, bottom } = frame
      return (
        <>
          <HatchedBox frame={frame} hatch="concrete" />
          <path className="cut" d={`M${right} ${top}H${left}V${bottom}H${right}`} />
          <path className="thin" d={breakLine(right, top, bottom)} />
          <path className="dash" d={`M${left - 6} ${middleOf(frame).y}H${right + 6}`} />
        </>
      )
    },
    faces: (frame) => [leftFace(frame), topFace(frame)],
    mark: (frame, along, across) => {
      const { y } = middleOf(frame)
      return [frame.left + (frame.right - frame.left) * along, y - (y - frame.top) * across]
    },
    measured: () => [],
  },
  edge: {
    hatch: 'concrete',
    text: 'the edge between two faces',
    wide: true,
    draw: (frame) => <Quarter frame={frame} />,
    faces: (frame) => [leftFace(frame), topFace(frame)],
    mark: fromCorner,
    measured: () => [],
  },
  corner: {
    hatch: 'concrete',
    text: 'the corner between three faces',
    wide: true,
    draw: (frame) => {
      const [dx, dy] = obliqueOf(frame)
      const { left, right, top } = frame
      return (
        <>
          <Quarter frame={frame} />
          <path className="out" d={`M${left} ${top}l${dx} ${dy}H${right + 4}`} />
        </>
      )
    },
    faces: (frame) => [leftFace(frame), topFace(frame)],
    mark: fromCorner,
    measured: () => [],
  },
}
