import { SymbolSpans } from '../../components/symbol.tsx'
import { Dimension } from '../../figure/dimension.tsx'
import { Drawing } from '../../figure/drawing.tsx'
import { hatched } from '../../figure/hatches.tsx'
import { Acting } from '../../figure/sketch/acting.tsx'
import type { Frame } from '../../figure/sketch/frame.ts'
import { shapeOf } from '../../figure/sketch/shapes.ts'
import { useWidth } from '../../figure/use-width.ts'
import type { Body } from '../../solving/body.ts'
import { type Shown, shownOf } from './body-shown.ts'
import type { Case } from './described.ts'

interface Props {
  description: Case
  body: Body
}

const [top, bottom] = [40, 150]

/** The body with the symbols of its fields, as the last solve has it. */
export function BodyDrawing({ description, body }: Props) {
  const [box, width] = useWidth<HTMLDivElement>()
  return (
    <div ref={box} className="min-w-0">
      {width > 0 && (
        <Section
          shown={shownOf(description, body)}
          title={description.title}
          width={Math.min(560, Math.max(264, width))}
        />
      )}
    </div>
  )
}

function frameOf({ body, wide }: Shown, width: number): Frame {
  const tall = ['bar', 'brick', 'corner', 'edge', 'bar-end'].includes(body)
  const [left, right] = wide ? [0.27, 0.92] : [0.27, 0.74]
  if (body === 'endless' || body === 'hole') return { left: width * 0.08, right: width * 0.92, top: 34, bottom }
  if (wide || body === 'slab') return { left: width * left, right: width * right, top: tall ? top + 24 : 34, bottom }
  // Near a square, in the middle.
  const half = Math.min(width * 0.22, body === 'short-cylinder' ? 62 : 72)
  return { left: width / 2 - half, right: width / 2 + half, top: tall ? top + 12 : top, bottom: bottom + 8 }
}

function Section({ shown, title, width }: { shown: Shown; title: string; width: number }) {
  const { body, boundary, first, second, both, place } = shown
  const shape = shapeOf(body)
  const frame = frameOf(shown, width)
  const [x, y] = shape.mark(frame, place.along, place.across)
  const flat = body === 'slab' || body === 'half-space' || body === 'two-bodies'
  const ring = body === 'hollow-cylinder'
  const level = flat || ring || body === 'hole' || body === 'endless'
  const left = !ring && body !== 'hole' && x > frame.left + (frame.right - frame.left) * 0.6
  const measured = shape.measured(frame).filter(({ field }) => shown.symbols[field])
  const base = frame.bottom + 22
  const depth = flat && place.along > 0 && !shown.signed
  const height = base + (depth ? 24 : 4) + 30 * measured.length
  return (
    <Drawing width={width} height={height} label={`${title}: ${shown.text}`}>
      {shape.draw(frame)}
      <Acting frame={frame} body={body} boundary={boundary} first={first} second={both ? second : ''} />
      {body === 'slab' && !both && <Back frame={frame} />}
      {body === 'slab' && shown.mirrored && <MidPlane frame={frame} />}
      {flat && <line className="proj" x1={x} x2={x} y1={frame.top} y2={frame.bottom + 18} />}
      {body !== 'lumped' && (
        <>
          <circle className="ring" cx={x} cy={y} r={5.5} />
          <text
            className="t-it halo-sheet"
            x={x + (left ? -12 : 12)}
            y={y + (level ? 5 : -9)}
            textAnchor={left ? 'end' : 'start'}
          >
            {shown.reading}
          </text>
        </>
      )}
      <text className="t-it" x={8} y={18}>
        <SymbolSpans of={shown.drivers.join(', ')} />
      </text>
      {depth && <Length from={frame.left} to={x} y={base} reach={14} symbol="x" />}
      {measured.map(({ field, from, to }, i) => (
        <Length
          key={field}
          {...{ from, to }}
          y={base + (depth ? 30 : 4) + 30 * i}
          reach={(depth ? 44 : 14) + 30 * i}
          symbol={shown.symbols[field]!}
        />
      ))}
    </Drawing>
  )
}

interface LengthProps {
  from: number
  to: number
  y: number
  reach: number
  symbol: string
}

function Length({ from, to, y, reach, symbol }: LengthProps) {
  return (
    <g>
      <Dimension from={from} to={to} y={y} reach={reach} />
      <text className="t-it halo" x={(from + to) / 2} y={y - 5} textAnchor="middle">
        <SymbolSpans of={symbol} />
      </text>
    </g>
  )
}

/** Wool behind a face that is not exposed. */
function Back({ frame: { right, top: from, bottom: to } }: { frame: Frame }) {
  return (
    <g>
      <rect fill={hatched('wool')} x={right} y={from} width={26} height={to - from} />
      <line className="thin" x1={right + 26} x2={right + 26} y1={from} y2={to} />
      <text x={right + 13} y={from - 8} textAnchor="middle">
        no heat
      </text>
    </g>
  )
}

function MidPlane({ frame }: { frame: Frame }) {
  const middle = (frame.left + frame.right) / 2
  return (
    <g>
      <line className="dash" x1={middle} x2={middle} y1={frame.top - 14} y2={frame.bottom + 14} />
      <text x={middle} y={frame.top - 18} textAnchor="middle">
        mid-plane
      </text>
    </g>
  )
}
