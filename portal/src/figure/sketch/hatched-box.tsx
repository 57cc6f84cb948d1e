import { type Hatch, hatched } from '../hatches.tsx'
import type { Frame } from './frame.ts'

/** Ground and hatch of a rectangular part. */
export function HatchedBox({ frame: { left, right, top, bottom }, hatch }: { frame: Frame; hatch: Hatch }) {
  const box = { x: left, y: top, width: right - left, height: bottom - top }
  return (
    <>
      <rect className="w-sheet" {...box} />
      <rect fill={hatched(hatch)} opacity={0.85} {...box} />
    </>
  )
}

/** Ground and hatch of a round part. */
export function HatchedCircle({ x, y, r, hatch }: { x: number; y: number; r: number; hatch: Hatch }) {
  return (
    <>
      <circle className="w-sheet" cx={x} cy={y} r={r} />
      <circle fill={hatched(hatch)} opacity={0.85} cx={x} cy={y} r={r} />
    </>
  )
}

export const boxPath = ({ left, right, top, bottom }: Frame): string => `M${left} ${top}H${right}V${bottom}H${left}Z`
