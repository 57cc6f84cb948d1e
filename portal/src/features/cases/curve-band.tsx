import { useQuery } from '@tanstack/react-query'
import { useRef, useState } from 'react'
import { Segmented } from '../../components/segmented.tsx'
import { Band } from '../../components/sheet.tsx'
import { QueryView } from '../../components/query-view.tsx'
import { hatchFor } from '../../figure/sketch/shapes.ts'
import { type Drawing, curveQuery } from '../../solving/curve-query.ts'
import { CurveDownloads } from './curve-downloads.tsx'
import { FieldCurve } from './field-curve.tsx'
import { FieldTable } from './field-table.tsx'
import { HistoryCurve } from './history-curve.tsx'
import type { Case } from './described.ts'
import { type Stale, StaleFrame } from './stale-frame.tsx'
import type { Solved } from './use-solve.ts'

const views = [
  { value: 'curve', text: 'Curve' },
  { value: 'table', text: 'Table' },
] as const

interface Props {
  description: Case
  solved: Solved
  stale: Stale | undefined
}

/** The solve drawn, and the same numbers as a table. */
export function CurveBand({ description: c, solved: { body, answer }, stale }: Props) {
  const query = useQuery(curveQuery(c, body, answer))
  const drawn = useRef<HTMLDivElement>(null)
  const [view, setView] = useState<'curve' | 'table'>('curve')
  return (
    <Band label="Curve">
      <div className="btnrow justify-between mb-5">
        <h2>{headOf(query.data)}</h2>
        <Segmented label="Show as" options={views} value={view} onChange={(chosen) => setView(chosen)} />
      </div>
      <StaleFrame stale={stale}>
        <QueryView query={query} what="Solving for the curve.">
          {(drawing) => (
            <>
              <div data-drawn={drawing.kind} ref={drawn}>
                <Shown drawing={drawing} view={view} body={c.sketch.body} />
              </div>
              {drawing.kind !== 'none' && (
                <CurveDownloads drawing={drawing} name={c.id} drawn={view === 'curve' ? drawn : undefined} />
              )}
            </>
          )}
        </QueryView>
      </StaleFrame>
    </Band>
  )
}

function headOf(drawing: Drawing | undefined): string {
  if (drawing?.kind === 'field') return 'One solve, two cuts'
  return drawing?.kind === 'history' && drawing.series.length > 1
    ? 'One solve, its histories'
    : 'One solve, its history'
}

function Shown({ drawing, view, body }: { drawing: Drawing; view: 'curve' | 'table'; body: string }) {
  if (drawing.kind === 'none') return <p className="prose">{drawing.why}</p>
  if (view === 'table') return <FieldTable drawing={drawing} />
  if (drawing.kind === 'field') return <FieldCurve drawing={drawing} hatch={hatchFor(body)} />
  return <HistoryCurve drawing={drawing} />
}
