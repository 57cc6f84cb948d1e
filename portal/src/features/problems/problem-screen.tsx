import { useQuery } from '@tanstack/react-query'
import { useParams } from 'react-router-dom'
import { ButtonLink } from '../../components/button.tsx'
import { QueryView } from '../../components/query-view.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Empty } from '../../components/states.tsx'
import { type Fact, TitleBlock } from '../../components/title-block.tsx'
import { problemsQuery } from '../../api/codes.ts'
import type { ProblemEntry } from '../../api/problem-entry.ts'

const places = {
  problem: 'code of a problem',
  entry: 'code in errors of an invalid-input',
  warning: 'code in warnings of an answer',
}

export function ProblemScreen() {
  const { code = '' } = useParams()
  const query = useQuery(problemsQuery())
  const entry = query.data?.find((one) => one.code === code)
  return (
    <Sheet title={entry?.title ?? `Problem ${code}`}>
      <TitleBlock title={entry?.title ?? code} facts={entry ? factsOf(entry) : []}>
        {entry && <p className="lead">{entry.text}</p>}
      </TitleBlock>
      <Band>
        <QueryView query={query} what="Reading the contract.">
          {() =>
            entry ? <Advice entry={entry} /> : <Empty title={`The contract has no code "${code}"`}>{null}</Empty>
          }
        </QueryView>
        <div className="btnrow mt-5">
          <ButtonLink to="/problems">All problems</ButtonLink>
        </div>
      </Band>
    </Sheet>
  )
}

function factsOf({ code, kind, status, retryable }: ProblemEntry): Fact[] {
  return [
    { name: 'Code', value: code, full: true },
    { name: 'Stands as', value: places[kind], full: true },
    ...(status ? [{ name: 'Status', value: status }] : []),
    ...(retryable === undefined ? [] : [{ name: 'Send the same again', value: retryable ? 'yes, later' : 'no' }]),
  ]
}

function Advice({ entry }: { entry: ProblemEntry }) {
  if (entry.kind === 'warning')
    return (
      <p className="prose">
        The answer was given and charged. Read it with this in mind, or change the input and send it again.
      </p>
    )
  if (entry.kind === 'entry')
    return (
      <p className="prose">
        The pointer of the entry names the field, and <code>accepted</code> says what would do. Nothing was guessed and
        nothing was charged.
      </p>
    )
  return (
    <p className="prose">
      {entry.retryable
        ? 'The same call may succeed later. Where a Retry-After header came with it, wait that long.'
        : 'The same call would be refused again. Change what the detail names, then send it.'}{' '}
      Nothing was charged. The <code>requestId</code> of the answer finds the call under Requests.
    </p>
  )
}
