import { whole } from '../../components/formats.ts'
import { Drawing } from '../../figure/drawing.tsx'
import { hatched } from '../../figure/hatches.tsx'

/** A small wall filled with what is spent. */
export function KeyMeter({ used, quota }: { used: number; quota: number | null }) {
  if (quota === null) return <span className="lab">that of the account</span>
  const part = quota > 0 ? Math.min(1, used / quota) : 1
  return (
    <span>
      <Drawing width={112} height={12} className="drawing inline-block align-[-1px]">
        <rect className="w-sheet" stroke="var(--line)" x={0.75} y={0.75} width={110.5} height={10.5} />
        <rect fill={hatched('masonry')} stroke="var(--line)" x={0.75} y={0.75} width={110.5 * part} height={10.5} />
        {used > 0 && <path className={part < 1 ? 'cut' : 'now'} d={`M${0.75 + 110.5 * part} -1V13`} />}
      </Drawing>
      <span className="lab block">{whole(quota)}</span>
    </span>
  )
}
