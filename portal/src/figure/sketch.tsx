import { Drawing } from './drawing.tsx'
import { Dimension } from './dimension.tsx'
import { type Hatch, hatched } from './hatches.tsx'
import { FaceSign } from './face-sign.tsx'

export interface SketchOf {
  body: string
  boundary: string
}

/** The hatch of a body whose material is not named. */
const hatchOf: Record<string, Hatch> = { 'half-space': 'ground', slab: 'concrete' }

export const hatchFor = (body: string): Hatch => hatchOf[body] ?? 'masonry'

const [face, top, bottom, end] = [58, 14, 90, 122]

/** The small drawing of a case: body, hatch, sign of what acts on it. */
export function Sketch({ sketch, label }: { sketch: SketchOf; label?: string }) {
  return (
    <Drawing width={184} height={104} {...(label ? { label } : {})}>
      <Body {...sketch} />
    </Drawing>
  )
}

function Body({ body, boundary }: SketchOf) {
  if (body === 'lumped')
    return (
      <>
        <path className="cut" d="M72 36c12-22 48-26 66-6s10 48-14 54-66-2-62-22q1-14 10-26z" />
        <FaceSign at={64} from={24} to={86} kind={boundary} />
        <text className="t-ink" x={106} y={60} textAnchor="middle">
          one T
        </text>
      </>
    )
  const right = body === 'slab' ? end : 178
  return (
    <>
      <rect className="w-sheet" x={face} y={top} width={right - face} height={bottom - top} />
      <rect fill={hatched(hatchFor(body))} x={face} y={top} width={right - face} height={bottom - top} />
      <path className="thin" d={`M${face} ${top}H${right}M${face} ${bottom}H${right}`} />
      {body === 'slab' ? (
        <>
          <line className="cut" x1={end} x2={end} y1={top} y2={bottom} />
          <FaceSign at={end} from={top} to={bottom} kind={boundary} turned />
          <Dimension from={face} to={end} y={100} reach={8} />
        </>
      ) : (
        <path className="thin" d="M178 8c-5 14 5 20 0 36s5 22 0 52" />
      )}
      <line className="cut" x1={face} x2={face} y1={top - 4} y2={bottom + 4} />
      <FaceSign at={face} from={top} to={bottom} kind={boundary} />
    </>
  )
}
