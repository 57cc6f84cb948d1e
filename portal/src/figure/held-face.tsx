import type { Layout } from './layout.ts'
import { plain } from './measures.ts'

/** A face held at a temperature: a thick line before it, and its level. */
export function HeldFace({ layout, level: held, cold }: { layout: Layout; level: number; cold: boolean }) {
  const { axis, left, top, bottom, small, y } = layout
  const level = y(held)
  return (
    <g>
      <line className={cold ? 'cold' : 'now'} x1={axis} x2={left} y1={level} y2={level} />
      <line className="now" x1={left - 5} x2={left - 5} y1={top} y2={bottom} />
      <text
        className={`${cold ? 't-frost' : 't-clay'} halo`}
        x={axis + (small ? 2 : 6)}
        y={cold ? level - 8 : level + 18}
      >
        {small ? 'face' : `face ${plain(held)} °C`}
      </text>
    </g>
  )
}
