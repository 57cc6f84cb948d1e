import type { Face } from './face-sign.tsx'

/** The box that a body is drawn into; signs and dimensions stand around it. */
export interface Frame {
  left: number
  right: number
  top: number
  bottom: number
}

/** A length that is dimensioned below the body, by the field that gives it. */
export interface Measured {
  field: string
  from: number
  to: number
}

export const middleOf = ({ left, right, top, bottom }: Frame) => ({ x: (left + right) / 2, y: (top + bottom) / 2 })

/** The largest circle in a frame. */
export function circleIn(frame: Frame): { x: number; y: number; r: number } {
  const { left, right, top, bottom } = frame
  return { ...middleOf(frame), r: Math.min(right - left, bottom - top) / 2 }
}

export const leftFace = ({ left, top, bottom }: Frame): Face => ({ x: left, y: top, length: bottom - top, turn: 0 })
export const rightFace = ({ right, top, bottom }: Frame): Face => ({
  x: right,
  y: bottom,
  length: bottom - top,
  turn: 180,
})
export const topFace = ({ left, right, top }: Frame): Face => ({ x: right, y: top, length: right - left, turn: 90 })

/** A free-hand line down the edge where a drawing of a body is broken off. */
export function breakLine(x: number, top: number, bottom: number): string {
  const h = bottom - top
  return `M${x} ${top - 6}c${-h / 15} ${h * 0.19} ${h / 15} ${h * 0.26} 0 ${h / 2}s${h / 15} ${h * 0.28} 0 ${h / 2 + 12}`
}

/** The same along the lower edge. */
export function breakBelow(y: number, left: number, right: number): string {
  const w = right - left
  return `M${left - 6} ${y}c${w * 0.19} ${w / 20} ${w * 0.26} ${-w / 20} ${w / 2} 0s${w * 0.28} ${-w / 20} ${w / 2 + 12} 0`
}
