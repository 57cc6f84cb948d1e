import { Drawing } from '../../figure/drawing.tsx'
import { hatched } from '../../figure/hatches.tsx'
import type { Series } from './series.ts'

export function SeriesSign({ hatch, wash }: Pick<Series, 'hatch' | 'wash'>) {
  return (
    <Drawing width={26} height={18}>
      <rect className={wash} x={0.75} y={0.75} width={24.5} height={16.5} />
      <rect fill={hatched(hatch)} stroke="var(--cut)" strokeWidth={1.5} x={0.75} y={0.75} width={24.5} height={16.5} />
    </Drawing>
  )
}
