import { Dimension } from './dimension.tsx'
import { pathOf } from './points.ts'
import { type Cut, type Edge, type Field, cools } from './field.ts'
import { FaceSign } from './sketch/face-sign.tsx'
import { Film } from './film.tsx'
import { HeldFace } from './held-face.tsx'
import { type Hatch, hatched } from './hatches.tsx'
import type { Layout } from './layout.ts'
import { OtherProfiles, profileOf } from './other-profiles.tsx'
import { degrees, inMeasure, lengthMeasure, markText, plain, timeMeasure } from './measures.ts'
import { multiples } from './steps.ts'

interface Props {
  field: Field
  layout: Layout
  cut: Cut
  hatch: Hatch
  material: string
}

/** What lies behind the shown part, in words. */
function behind(edge: Edge): { words: string; short: string } {
  switch (edge.kind) {
    case 'film':
      return { words: `fluid at ${plain(edge.level)} °C`, short: `fluid ${plain(edge.level)} °C` }
    case 'held':
      return { words: `face held at ${plain(edge.level)} °C`, short: `face ${plain(edge.level)} °C` }
    case 'acting':
      return { words: edge.sign.replaceAll('-', ' '), short: edge.sign.replaceAll('-', ' ') }
    case 'insulated':
      return { words: 'insulated: no heat passes', short: 'insulated' }
    case 'mirror':
      return { words: 'mirrored at the mid-plane', short: 'mid-plane' }
    case 'centre':
      return { words: 'the same beyond the centre', short: 'centre' }
    case 'endless':
      return { words: 'the body goes on', short: 'goes on' }
  }
}

/** Only what is the same body again, or none, is hatched behind the shown part. */
const hatchBehind = (edge: Edge, hatch: Hatch): { name: Hatch; opacity: number } | undefined => {
  if (edge.kind === 'insulated') return { name: 'wool', opacity: 0.8 }
  return ['mirror', 'centre', 'endless'].includes(edge.kind) ? { name: hatch, opacity: 0.35 } : undefined
}

/** Section A–A: temperature over depth at one time, in the body it belongs to. */
export function ProfileSection({ field, layout, cut, hatch, material }: Props) {
  const { left, right, top, bottom, back, axis, size, range, small, x, y } = layout
  const measure = timeMeasure(field.times.at(-1)!)
  const time = field.times[cut.row]!
  const at = `${inMeasure(time, measure)} ${measure.unit}`
  const words = behind(field.far)
  const filled = hatchBehind(field.far, hatch)
  return (
    <g>
      <rect className="w-sheet" x={left} y={top} width={right - left} height={size} />
      <rect fill={hatched(hatch)} opacity={0.55} x={left} y={top} width={right - left} height={size} />
      {filled && (
        <rect fill={hatched(filled.name)} opacity={filled.opacity} x={right} y={top} width={back} height={size} />
      )}
      {multiples(range.step, range.low, range.high).map((level) => (
        <g key={level}>
          <line className="thin" x1={axis - 5} x2={axis} y1={y(level)} y2={y(level)} />
          <line className="hair" x1={axis} x2={right} y1={y(level)} y2={y(level)} />
          <text x={axis - 9} y={y(level) + 4} textAnchor="end">
            {markText(level, range.step)}
          </text>
        </g>
      ))}
      <line className="thin" x1={axis} x2={axis} y1={top} y2={bottom} />
      <text x={axis - 9} y={top - 12} textAnchor="end">
        °C
      </text>
      <text className="t-clay" x={small ? left : axis} y={top - 12}>
        {small ? `A–A at ${at}` : `Section A–A: profile at ${at}`}
      </text>
      <line className={field.near.kind === 'endless' ? 'dash' : 'cut'} x1={left} x2={left} y1={top} y2={bottom} />
      {field.places[0]! < 0 && <line className="cut" x1={x(0)} x2={x(0)} y1={top} y2={bottom} />}
      <line className={field.far.kind === 'endless' ? 'dash' : 'cut'} x1={right} x2={right} y1={top} y2={bottom} />
      <path className="thin" d={`M${left} ${top}H${right + back}M${left} ${bottom}H${right + back}`} />
      <text
        className="halo"
        textAnchor="middle"
        transform={`translate(${right + back / 2 + 4} ${top + size / 2}) rotate(-90)`}
      >
        {small ? words.short : words.words}
      </text>
      {range.low < 0 && range.high > 0 && <line className="dash" x1={axis} x2={right} y1={y(0)} y2={y(0)} />}
      {field.initial !== undefined && (
        <line className="dash" x1={left} x2={right} y1={y(field.initial)} y2={y(field.initial)} />
      )}
      <OtherProfiles field={field} layout={layout} cut={cut} />
      <Before field={field} layout={layout} face={field.values[cut.row]![0]!} />
      <path className="now" d={pathOf(profileOf(field, layout, cut.row))} />
      <Dimension from={left} to={right} y={bottom + 30} reach={26} label={`${extentText(field)} ${material}`.trim()} />
    </g>
  )
}

/** What acts on the near face, in the strip before it. */
function Before({ field, layout, face }: { field: Field; layout: Layout; face: number }) {
  const { near } = field
  const cold = cools(field)
  const { left, top, bottom } = layout
  if (near.kind === 'film') return <Film {...{ layout, cold, face }} level={near.level} />
  if (near.kind === 'held') return <HeldFace {...{ layout, cold }} level={near.level} />
  const sign = near.kind === 'acting' ? near.sign : near.kind
  return <FaceSign at={left} from={top} to={bottom} kind={sign} />
}

/** The length of what is shown; of radii that start away from the centre, both ends. */
function extentText({ along, places }: Field): string {
  const [first, last] = [places[0]!, places.at(-1)!]
  const length = lengthMeasure(last)
  const unit = length.unit === 'mm' ? '' : ` ${length.unit}`
  if (along === 'radius' && first > 0) return `${inMeasure(first, length)} to ${inMeasure(last, length)}${unit}`
  return `${inMeasure(last - first, length)}${unit}`
}

/** The chosen point on the profile, with its reading where no larger one stands. */
export function ProfileReading({
  field,
  layout,
  cut,
  history,
}: Pick<Props, 'field' | 'layout' | 'cut'> & { history: boolean }) {
  const { x, y, bottom, left, right, beside, range } = layout
  const value = field.values[cut.row]![cut.column]!
  const at = x(field.places[cut.column]!)
  const before = at > left + (right - left) * 0.62
  const falling = cools(field)
  return (
    <g>
      <line className="proj" x1={at} x2={at} y1={bottom + (history ? 4 : 0)} y2={y(value)} />
      <circle className="ring" cx={at} cy={y(value)} r={5} />
      {!beside && (
        <text
          className="t-clay halo-sheet"
          x={at + (before ? -10 : 10)}
          y={y(value) + (falling ? (y(value) > bottom - 24 ? -12 : 20) : y(value) < layout.top + 20 ? 20 : -12)}
          textAnchor={before ? 'end' : 'start'}
        >
          {degrees(value, range.high - range.low)} °C
        </text>
      )}
    </g>
  )
}
