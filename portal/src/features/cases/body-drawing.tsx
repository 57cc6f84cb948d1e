import { SymbolSpans } from '../../components/symbol.tsx'
import { Dimension } from '../../figure/dimension.tsx'
import { Drawing } from '../../figure/drawing.tsx'
import { FaceSign } from '../../figure/face-sign.tsx'
import { hatched } from '../../figure/hatches.tsx'
import { type SketchOf, Sketch, hatchFor } from '../../figure/sketch.tsx'
import { useWidth } from '../../figure/use-width.ts'
import type { Body } from '../../solving/solve.ts'

interface Props {
  sketch: SketchOf
  title: string
  body: Body
}

const [top, bottom] = [34, 150]

/** The body with the symbols of its fields, as the last solve has it. */
export function BodyDrawing({ sketch, title, body }: Props) {
  const [box, width] = useWidth<HTMLDivElement>()
  const place = sketch.body === 'lumped' ? undefined : placeOf(body)
  return (
    <div ref={box} className="min-w-0">
      {width > 0 &&
        (place === undefined ? (
          <Sketch sketch={sketch} label={title} />
        ) : (
          <Section {...{ sketch, title, body, place }} width={Math.min(560, Math.max(264, width))} />
        ))}
    </div>
  )
}

function Section({ sketch, title, body, place, width }: Props & { place: number; width: number }) {
  const slab = sketch.body === 'slab'
  const both = slab && body['exposedFaces'] === 2
  const [face, far] = [Math.round(width * 0.27), Math.round(width * (slab ? 0.74 : 0.92))]
  const at = face + (far - face) * place
  const middle = (top + bottom) / 2
  return (
    <Drawing
      width={width}
      height={slab ? 216 : 186}
      label={`${title}: ${sketch.boundary === 'temperature' ? 'temperature held at' : 'film before'} ${both ? 'both faces' : 'the face'}, one position marked`}
    >
      <rect className="w-sheet" x={face} y={top} width={far - face} height={bottom - top} />
      <rect
        fill={hatched(hatchFor(sketch.body))}
        opacity={0.8}
        x={face}
        y={top}
        width={far - face}
        height={bottom - top}
      />
      <FaceSign at={face} from={top} to={bottom} kind={sketch.boundary} />
      {both && <FaceSign at={far} from={top} to={bottom} kind={sketch.boundary} turned />}
      {slab && !both && (
        <>
          <rect fill={hatched('wool')} x={far} y={top} width={26} height={bottom - top} />
          <line className="thin" x1={far + 26} x2={far + 26} y1={top} y2={bottom} />
          <text x={far + 13} y={top - 8} textAnchor="middle">
            no heat
          </text>
        </>
      )}
      <path className="thin" d={`M${face} ${top}H${far}M${face} ${bottom}H${far}`} />
      <path
        className="cut"
        d={`M${face} ${top - 10}V${bottom + 10}${slab ? `M${far} ${top - 10}V${bottom + 10}` : ''}`}
      />
      {!slab && <path className="thin" d={`M${far} ${top - 8}c-6 22 6 34 0 62s6 40 0 70`} />}
      {both && (
        <>
          <line className="dash" x1={(face + far) / 2} x2={(face + far) / 2} y1={top - 14} y2={bottom + 14} />
          <text x={(face + far) / 2} y={top - 18} textAnchor="middle">
            mid-plane
          </text>
        </>
      )}
      <line className="proj" x1={at} x2={at} y1={top} y2={bottom + 18} />
      <circle className="ring" cx={at} cy={middle} r={5.5} />
      <text
        className="t-it halo-sheet"
        x={at + (place > 0.6 ? -12 : 12)}
        y={middle + 5}
        textAnchor={place > 0.6 ? 'end' : 'start'}
      >
        T(x, t)
      </text>
      <text className="t-it" x={8} y={18}>
        <SymbolSpans of={sketch.boundary === 'temperature' ? 'Tₛ' : 'h, Tₐ'} />
      </text>
      {place > 0 && <Dimension from={face} to={at} y={bottom + 22} reach={14} />}
      <text className="t-it halo" x={(face + at) / 2} y={bottom + 17} textAnchor="middle">
        x
      </text>
      {slab && (
        <>
          <Dimension from={face} to={far} y={bottom + 52} reach={44} />
          <text className="t-it halo" x={(face + far) / 2} y={bottom + 47} textAnchor="middle">
            d
          </text>
        </>
      )}
    </Drawing>
  )
}

/** The first position inside, as a part of what is drawn. */
function placeOf(body: Body): number {
  const depths = Array.isArray(body['depths']) ? (body['depths'] as number[]) : []
  const inside = depths.find((depth) => depth > 0)
  const extent = typeof body['thickness'] === 'number' ? body['thickness'] : 2 * Math.max(0, ...depths)
  return inside === undefined || !(extent > 0) ? 0.32 : Math.min(1, inside / extent)
}
