import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Failed, Loading } from '../../components/states.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { isDrawn } from '../../solving/described.ts'
import { trySolve } from '../../solving/solve.ts'
import { AnswerView } from './answer-view.tsx'
import { CallView } from './call-view.tsx'
import { CaseForm } from './case-form.tsx'
import { CurveBand } from './curve-band.tsx'
import { AboutBody } from './about-body.tsx'
import { OperationsBand } from './operations-band.tsx'
import type { Case } from './described.ts'
import type { Stale } from './stale-frame.tsx'
import { type Solved, useSolve } from './use-solve.ts'

/** One case: what it is, its form, the curve, the answer and the call. It opens with its own example solved. */
export function CaseSheet({ description: c }: { description: Case }) {
  const example = useQuery({
    queryKey: ['try', c.id, c.example],
    queryFn: ({ signal }) => trySolve(c.id, c.example, signal),
    staleTime: Infinity,
  })
  const own = useSolve(c.id, c.example)
  const solved: Solved | undefined =
    own.solved ?? (example.data && { body: c.example, answer: example.data, at: example.dataUpdatedAt })
  const [changed, setChanged] = useState(false)
  const stale: Stale | undefined = changed ? (own.error ? 'refused' : 'changed') : undefined
  return (
    <Sheet title={c.title}>
      <TitleBlock
        title={c.title}
        facts={[
          { name: 'Case', value: c.id, full: true },
          { name: 'Solver', value: c.solver },
          { name: 'Weight', value: weightOf(c) },
          { name: 'Operations', value: c.operations.map(({ id }) => id).join(' · '), full: true },
        ]}
      >
        <p className="prose">{c.summary}</p>
      </TitleBlock>
      <Band>
        <div className="two">
          <AboutBody description={c} body={solved?.body ?? c.example} />
          <CaseForm
            description={c}
            asked={own.asked}
            solved={solved}
            pending={own.pending}
            error={own.error}
            onSolve={own.solve}
            onCancel={own.cancel}
            onChanged={setChanged}
          />
        </div>
      </Band>
      {solved ? (
        <>
          {isDrawn(c) && <CurveBand description={c} solved={solved} stale={stale} />}
          <Band>
            <div className="two flip">
              <AnswerView description={c} answer={solved.answer} stale={stale} />
              <CallView description={c} solved={solved} stale={stale} />
            </div>
          </Band>
          <OperationsBand description={c} solved={solved.body} />
        </>
      ) : (
        <Band>
          {example.isError ? (
            <Failed error={example.error} retry={() => void example.refetch()} />
          ) : (
            <Loading what="Solving the example." />
          )}
        </Band>
      )}
    </Sheet>
  )
}

function weightOf({ weight, setUp }: Case): string {
  return `${weight} a number${setUp ? `, +${setUp} a call` : ''}`
}
