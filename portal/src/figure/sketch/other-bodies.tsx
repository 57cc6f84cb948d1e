import type { BodyShape } from './body-shape.ts'
import { breakBelow, breakLine, circleIn, middleOf } from './frame.ts'
import { HatchedBox } from './hatched-box.tsx'

export const otherBodies: Record<string, BodyShape> = {
  lumped: {
    hatch: 'masonry',
    text: 'a body with one temperature',
    draw: (frame) => {
      const { left, right, top, bottom } = frame
      const [w, h] = [right - left, bottom - top]
      const at = (x: number, y: number) => `${left + w * x} ${top + h * y}`
      const outline = `M${at(0, 0.3)}C${at(0.18, 0)} ${at(0.72, -0.06)} ${at(0.96, 0.22)}S${at(1.1, 0.88)} ${at(0.8, 0.96)}S${at(-0.14, 0.94)} ${at(-0.1, 0.62)}Q${at(-0.09, 0.44)} ${at(0, 0.3)}Z`
      const { x, y } = middleOf(frame)
      return (
        <>
          <path className="w-sheet" d={outline} />
          <path className="cut" d={outline} />
          <text className="t-ink" x={x} y={y + 5} textAnchor="middle">
            one T
          </text>
        </>
      )
    },
    faces: ({ left, right, top, bottom }) => [
      { x: left - (right - left) * 0.12, y: top + 8, length: bottom - top - 12, turn: 0 },
    ],
    mark: (frame) => {
      const { x, y } = middleOf(frame)
      return [x, y]
    },
    measured: () => [],
  },
  endless: {
    hatch: 'ground',
    text: 'a wide body around a source',
    wide: true,
    draw: (frame) => {
      const { left, right, top, bottom } = frame
      const { x, y, r } = circleIn(frame)
      return (
        <>
          <HatchedBox frame={frame} hatch="ground" />
          <path className="thin" d={breakLine(left, top, bottom) + breakLine(right, top, bottom)} />
          <path className="thin" d={breakBelow(top, left, right) + breakBelow(bottom, left, right)} />
          {[0.34, 0.62, 0.94].map((part) => (
            <circle key={part} className="iso" cx={x} cy={y} r={r * part} />
          ))}
          <circle className="dot" cx={x} cy={y} r={5} />
        </>
      )
    },
    faces: () => [],
    mark: (frame, along) => {
      const { x, y } = middleOf(frame)
      return [x + (frame.right - x) * along, y]
    },
    measured: () => [],
  },
}
