import type { Layout } from './layout.ts'
import { plain } from './measures.ts'

interface Props {
  layout: Layout
  /** Of the fluid, °C. */
  level: number
  cold: boolean
  /** Of the face, °C. */
  face: number
}

/** The fluid before the face: its temperature, and the drop from it to the face. */
export function Film({ layout, level: fluid, cold, face }: Props) {
  const { axis, left, top, bottom, small, y } = layout
  const width = small ? 16 : 30
  const edge = left - width
  const level = y(fluid)
  const name = cold ? 't-frost' : 't-clay'
  return (
    <g>
      <path className={cold ? 'cold' : 'now'} d={`M${axis} ${level}H${edge}Q${left - 5} ${level} ${left} ${y(face)}`} />
      <line className="dash" x1={edge} x2={edge} y1={top + 8} y2={bottom} />
      {small ? (
        <text className={name} x={axis + 2} y={cold ? level - 7 : level + 16}>
          fluid
        </text>
      ) : (
        <>
          <text className={`${name} halo`} x={axis + 6} y={cold ? level - 8 : level + 18}>
            {`fluid ${plain(fluid)} °C`}
          </text>
          <text x={edge - 5} y={cold ? top + 20 : bottom - 9} textAnchor="end">
            film
          </text>
        </>
      )}
    </g>
  )
}
