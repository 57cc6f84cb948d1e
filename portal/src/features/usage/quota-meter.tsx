import { whole } from '../../components/formats.ts'
import { Band } from '../../components/sheet.tsx'
import { Dimension } from '../../figure/dimension.tsx'
import { Drawing } from '../../figure/drawing.tsx'
import { hatched } from '../../figure/hatches.tsx'
import { useWidth } from '../../figure/use-width.ts'
import { outlookOf } from './outlook.ts'
import type { Usage } from './queries.ts'

interface Props {
  account: Usage['account']
  asOf: string
}

/** The quota as a wall: hatched is spent, dashed expected, clay past the limit. */
export function QuotaMeter({ account, asOf }: Props) {
  const [box, width] = useWidth<HTMLDivElement>()
  const outlook = outlookOf(account, asOf)
  return (
    <Band tight label="Quota today">
      <h2>Quota today</h2>
      <p className="prose mt-1">{outlook.sentence}</p>
      <div ref={box} className="min-w-0 mt-4">
        {width > 0 && (
          <Wall width={Math.max(264, width)} limit={account.limit} used={account.used} expected={outlook.expected} />
        )}
      </div>
    </Band>
  )
}

function Wall({ width, limit, used, expected }: { width: number; limit: number; used: number; expected: number }) {
  const small = width < 620
  const [left, right, top, height] = [2, width - 4, 36, 44]
  const bottom = top + height
  const most = Math.max(limit * 1.04, expected * 1.03, used * 1.03, 1)
  const x = (points: number) => left + ((right - left) * points) / most
  const spent = Math.min(used, limit)
  return (
    <Drawing
      width={width}
      height={bottom + 82}
      label={`Quota ${whole(limit)} points, spent ${whole(used)}, left ${whole(limit - used)}, expected by the end of the day ${whole(expected)}`}
    >
      <rect className="w-sheet" x={x(0)} y={top} width={x(limit) - x(0)} height={height} />
      <rect fill={hatched('masonry')} x={x(0)} y={top} width={x(spent) - x(0)} height={height} />
      <rect className="out" x={x(0)} y={top} width={x(spent) - x(0)} height={height} />
      {expected > used && (
        <g>
          <rect
            fill={hatched('upright')}
            opacity={0.5}
            x={x(used)}
            y={top + 8}
            width={x(Math.min(expected, limit)) - x(used)}
            height={height - 16}
          />
          <rect
            className="dash"
            x={x(used)}
            y={top + 8}
            width={x(Math.min(expected, limit)) - x(used)}
            height={height - 16}
          />
        </g>
      )}
      {expected > limit && (
        <rect className="w-clay" x={x(limit)} y={top + 8} width={x(expected) - x(limit)} height={height - 16} />
      )}
      <path className="thin" d={`M${x(0)} ${top}H${x(limit)}M${x(0)} ${bottom}H${x(limit)}`} />
      <path className="cut" d={`M${x(0)} ${top - 6}V${bottom + 6}M${x(limit)} ${top - 14}V${bottom + 6}`} />
      <path className="now" d={`M${x(used)} ${top - 6}V${bottom + 6}`} />
      <text className="t-ink" x={x(limit)} y={top - 20} textAnchor="end">
        quota {whole(limit)}
      </text>
      {Math.max(expected, used) > limit && (
        <text className="t-clay halo" x={right} y={top - 4} textAnchor="end">
          {used > limit ? `spent ${whole(used)}` : `expected ${whole(expected)}`}
        </text>
      )}
      <Parts x={x} used={used} limit={limit} y={bottom + 36} small={small} />
    </Drawing>
  )
}

/** Width of a character of the drawing's figures, a little over. */
const CHARACTER = 7.5

/** Figures that would not fit over their part stand at its ends instead. */
function Parts({
  x,
  used,
  limit,
  y,
  small,
}: {
  x(points: number): number
  used: number
  limit: number
  y: number
  small: boolean
}) {
  const fits = (from: number, to: number) => !small && x(to) - x(from) > 150
  const both = fits(0, used) && fits(used, limit)
  const [spent, left] = [`spent ${whole(used)}`, `left ${whole(Math.max(0, limit - used))}`]
  const apart = x(limit) - x(0) > (spent.length + left.length + 3) * CHARACTER
  return (
    <g>
      {used > 0 && (
        <Dimension from={x(0)} to={x(Math.min(used, limit))} y={y} reach={28} {...(both ? { label: spent } : {})} />
      )}
      {used < limit && <Dimension from={x(used)} to={x(limit)} y={y} reach={28} {...(both ? { label: left } : {})} />}
      {!both && (
        <>
          <text className="t-ink" x={x(0)} y={y + 22}>
            {spent}
          </text>
          {apart ? (
            <text className="t-ink" x={x(limit)} y={y + 22} textAnchor="end">
              {left}
            </text>
          ) : (
            <text className="t-ink" x={x(0)} y={y + 40}>
              {left}
            </text>
          )}
        </>
      )}
    </g>
  )
}
