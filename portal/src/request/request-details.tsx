import { Link } from 'react-router-dom'
import type { components } from '../../../openapi/portal.d.ts'
import { CodeBlock } from '../components/code-block.tsx'
import { CopyButton } from '../components/copy-button.tsx'
import { DataTable } from '../components/data-table.tsx'
import { instantText, whole } from '../components/formats.ts'
import { JsonCode } from '../components/json-code.tsx'
import { jsonText } from '../components/json-text.ts'
import { Band } from '../components/sheet.tsx'
import { type Fact, TitleBlock } from '../components/title-block.tsx'
import type { ProblemBody } from '../api/api-error.ts'
import { CallChain } from './call-chain.tsx'

export type RequestWhole = components['schemas']['Request']

interface Props {
  request: RequestWhole
  /** What staff see beside it. */
  extra?: readonly Fact[]
}

/** One call as log and ledger have it. */
export function RequestDetails({ request, extra = [] }: Props) {
  const problem = request.problem as ProblemBody | null
  return (
    <>
      <TitleBlock title={problem?.title ?? titleOf(request)} facts={[...factsOf(request), ...extra]}>
        <p className="prose">{sentenceOf(request)}</p>
      </TitleBlock>
      <Band tight label="What happened">
        <h2>What happened</h2>
        <CallChain request={request} />
      </Band>
      {problem && <Why problem={problem} />}
      <Band label="Ledger">
        <h2 className="mb-4">In the ledger</h2>
        {request.ledger.length === 0 ? (
          <p className="prose">Nothing. The call cost 0 points.</p>
        ) : (
          <DataTable
            caption="Entries of this call. Times in UTC."
            rows={request.ledger}
            columns={[
              { header: 'Entry', cell: ({ kind }) => kind },
              { header: 'At, UTC', mono: true, cell: ({ at }) => <span className="fig">{instantText(at)}</span> },
              { header: 'Points', numeric: true, cell: ({ points }) => whole(points) },
            ]}
            rowKey={({ kind, at }) => kind + at}
            total={['All', '', whole(request.ledger.reduce((sum, { points }) => sum + points, 0))]}
          />
        )}
      </Band>
    </>
  )
}

function Why({ problem }: { problem: ProblemBody }) {
  const json = jsonText(problem)
  return (
    <Band label="Why it was refused">
      <div className="pair">
        <div>
          <h2 className="mb-3">{problem.status < 500 ? 'Why it was refused' : 'Why it failed'}</h2>
          <p className="prose">{problem.detail}</p>
          <ul className="grid gap-3 mt-3">
            {problem.errors?.map(({ pointer, parameter, code, detail, accepted }, i) => (
              <li key={i} className="note warning">
                <code>{pointer ?? parameter}</code> <Link to={`/problems/${code}`}>{code}</Link>
                <br />
                {detail}
                {accepted && (
                  <>
                    <br />
                    Accepted: {accepted}.
                  </>
                )}
              </li>
            ))}
          </ul>
          <p className="prose mt-4">
            <Link to={`/problems/${problem.code}`}>Problem page: {problem.code}</Link>
          </p>
        </div>
        <CodeBlock
          caption={`Problem · ${problem.status} · application/problem+json`}
          text={json}
          label="Problem as answered"
        >
          <JsonCode text={json} />
        </CodeBlock>
      </div>
    </Band>
  )
}

const titleOf = ({ case: caseId, operation, method, path }: RequestWhole): string =>
  caseId ? `${caseId}, ${operation}` : `${method} ${path}`

function sentenceOf({ status, milliseconds, points }: RequestWhole): string {
  const time = `${milliseconds.toFixed(1)} ms`
  if (status < 400) return `The call was answered with ${status} after ${time} and cost ${whole(points)} points.`
  if (status === 499) return `The client hung up after ${time}. The call cost ${whole(points)} points.`
  return `The call ${status < 500 ? 'was refused' : 'failed'} with ${status} after ${time} and cost ${points === 0 ? 'nothing' : `${whole(points)} points`}.`
}

function factsOf({ id, key, method, path, at, solver }: RequestWhole): Fact[] {
  return [
    {
      name: 'Request',
      value: (
        <>
          {id} <CopyButton text={id} />
        </>
      ),
      full: true,
    },
    { name: 'Call', value: `${method} ${path}`, full: true },
    { name: 'Key', value: key ? `${key.name} · ${key.prefix}` : 'none', full: true },
    { name: 'Received, UTC', value: instantText(at) },
    { name: 'Solver', value: solver },
  ]
}
