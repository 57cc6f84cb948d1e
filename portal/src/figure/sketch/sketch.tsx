import { Dimension } from '../dimension.tsx'
import { Drawing } from '../drawing.tsx'
import { Acting } from './acting.tsx'
import type { Frame } from './frame.ts'
import { actingOn, shapeOf } from './shapes.ts'

export interface SketchOf {
  body: string
  boundary: string
}

const [width, height] = [184, 104]

/** Where a body stands in the small drawing. */
function frameOf(body: string): Frame {
  if (['slab', 'short-cylinder'].includes(body)) return { left: 62, right: 122, top: 16, bottom: 88 }
  if (['half-space', 'two-bodies'].includes(body)) return { left: 62, right: 176, top: 14, bottom: 90 }
  if (body === 'bar-end') return { left: 56, right: 172, top: 42, bottom: 92 }
  if (body === 'edge' || body === 'corner') return { left: 60, right: 168, top: 44, bottom: 94 }
  if (body === 'bar' || body === 'brick') return { left: 64, right: 132, top: 32, bottom: 88 }
  if (body === 'endless' || body === 'hole') return { left: 14, right: 170, top: 12, bottom: 92 }
  if (body === 'lumped') return { left: 78, right: 140, top: 16, bottom: 88 }
  return { left: 66, right: 138, top: 16, bottom: 88 }
}

/** The small drawing of a case: body, hatch, sign of what acts on it. */
export function Sketch({ sketch: { body, boundary }, label }: { sketch: SketchOf; label?: string }) {
  const shape = shapeOf(body)
  const frame = frameOf(body)
  return (
    <Drawing width={width} height={height} {...(label ? { label } : {})}>
      {shape.draw(frame)}
      <Acting frame={frame} body={body} boundary={boundary} {...actingOn(body, boundary)} />
      {body === 'slab' && <Dimension from={frame.left} to={frame.right} y={99} reach={9} />}
    </Drawing>
  )
}
