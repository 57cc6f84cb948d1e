import type { BodyShape } from './body-shape.ts'
import { breakLine, leftFace, middleOf, rightFace } from './frame.ts'
import { HatchedBox } from './hatched-box.tsx'

/** Bodies that heat crosses one way. */
export const flatBodies: Record<string, BodyShape> = {
  'half-space': {
    hatch: 'ground',
    text: 'a half space',
    wide: true,
    draw: (frame) => (
      <>
        <HatchedBox frame={frame} hatch="ground" />
        <path
          className="thin"
          d={`M${frame.left} ${frame.top}H${frame.right}M${frame.left} ${frame.bottom}H${frame.right}`}
        />
        <path className="thin" d={breakLine(frame.right, frame.top, frame.bottom)} />
        <line className="cut" x1={frame.left} x2={frame.left} y1={frame.top - 4} y2={frame.bottom + 4} />
      </>
    ),
    faces: (frame) => [leftFace(frame)],
    mark: (frame, along) => [frame.left + (frame.right - frame.left) * along, middleOf(frame).y],
    measured: () => [],
  },
  slab: {
    hatch: 'concrete',
    text: 'a slab',
    draw: (frame) => (
      <>
        <HatchedBox frame={frame} hatch="concrete" />
        <path
          className="thin"
          d={`M${frame.left} ${frame.top}H${frame.right}M${frame.left} ${frame.bottom}H${frame.right}`}
        />
        {[frame.left, frame.right].map((x) => (
          <line key={x} className="cut" x1={x} x2={x} y1={frame.top - 4} y2={frame.bottom + 4} />
        ))}
      </>
    ),
    faces: (frame) => [leftFace(frame), rightFace(frame)],
    mark: (frame, along) => [frame.left + (frame.right - frame.left) * along, middleOf(frame).y],
    measured: (frame) => [{ field: 'thickness', from: frame.left, to: frame.right }],
  },
  'two-bodies': {
    hatch: 'ground',
    text: 'two bodies that touch',
    wide: true,
    draw: (frame) => {
      const { left, right, top, bottom } = frame
      // The other body takes the place that signs have before a face.
      const other = { left: Math.max(8, left - (right - left) * 0.5), right: left, top, bottom }
      return (
        <>
          <HatchedBox frame={other} hatch="stone" />
          <HatchedBox frame={frame} hatch="ground" />
          <path className="thin" d={`M${other.left} ${top}H${right}M${other.left} ${bottom}H${right}`} />
          <path className="thin" d={breakLine(other.left, top, bottom) + breakLine(right, top, bottom)} />
          <line className="now" x1={left} x2={left} y1={top - 4} y2={bottom + 4} />
        </>
      )
    },
    faces: () => [],
    mark: (frame, along) => [frame.left + (frame.right - frame.left) * along, middleOf(frame).y],
    measured: () => [],
  },
}
