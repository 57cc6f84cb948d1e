import { useQuery } from '@tanstack/react-query'
import { useCallback, useState } from 'react'
import { useSearchParams } from 'react-router-dom'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Failed, Loading } from '../../components/states.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { isDrawn } from '../../solving/described.ts'
import { asUsed } from '../../solving/as-used.ts'
import { trySolve } from '../../solving/solve.ts'
import { AnswerView } from './answer-view.tsx'
import { CallView } from './call-view.tsx'
import { CaseForm } from './case-form.tsx'
import { formIn } from './form-address.ts'
import { bodyOf, valuesOf } from './form-values.ts'
import { CurveBand } from './curve-band.tsx'
import { AboutBody } from './about-body.tsx'
import { OperationsBand } from './operations-band.tsx'
import type { Case } from './described.ts'
import type { Stale } from './stale-frame.tsx'
import { type Solved, useSolve } from './use-solve.ts'

/** One case: what it is, its form, the curve, the answer and the call. It opens with
 * what its address says, or with its own example, solved. */
export function CaseSheet({ description: c }: { description: Case }) {
  const [search, setSearch] = useSearchParams()
  const [first] = useState(() => formIn(c.fields, search) ?? valuesOf(c.fields, c.example))
  const [body] = useState(() => bodyOf(c.fields, first))
  const opening = useQuery({
    queryKey: ['try', c.id, body],
    queryFn: ({ signal }) => trySolve(c.id, body, signal),
    staleTime: Infinity,
  })
  const own = useSolve(c.id, body)
  const solved: Solved | undefined =
    own.solved ?? (opening.data && { body, answer: opening.data, at: opening.dataUpdatedAt })
  const onAddress = useCallback(
    (address: string) => {
      if (address !== search.toString()) setSearch(address, { replace: true, preventScrollReset: true })
    },
    [search, setSearch],
  )
  const error = own.error ?? (own.solved || own.pending ? null : opening.error)
  const [changed, setChanged] = useState(false)
  const stale: Stale | undefined = changed ? (error ? 'refused' : 'changed') : undefined
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
          <AboutBody description={c} body={solved ? asUsed(solved) : c.example} />
          <CaseForm
            description={c}
            first={first}
            asked={own.asked}
            solved={solved}
            pending={own.pending}
            error={error}
            onSolve={own.solve}
            onCancel={own.cancel}
            onChanged={setChanged}
            onAddress={onAddress}
          />
        </div>
      </Band>
      {solved ? (
        <>
          {isDrawn(c) && <CurveBand description={c} solved={solved} stale={stale} />}
          <Band>
            <div className="two flip">
              <AnswerView description={c} solved={solved} stale={stale} />
              <CallView description={c} solved={solved} stale={stale} />
            </div>
          </Band>
          <OperationsBand description={c} solved={solved.body} />
        </>
      ) : (
        <Band>
          {opening.isError ? (
            <Failed error={opening.error} retry={() => void opening.refetch()} />
          ) : (
            <Loading what="Solving it." />
          )}
        </Band>
      )}
    </Sheet>
  )
}

function weightOf({ weight, setUp }: Case): string {
  return `${weight} a number${setUp ? `, +${setUp} a call` : ''}`
}
