import { useQuery } from '@tanstack/react-query'
import { Link, useSearchParams } from 'react-router-dom'
import { ButtonLink, LinkButton } from '../../components/button.tsx'
import { type Column, DataTable } from '../../components/data-table.tsx'
import { instantText, whole } from '../../components/formats.ts'
import { QueryView } from '../../components/query-view.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Empty } from '../../components/states.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { type Filter, type RequestEntry, requestsQuery, statuses, usedKeysQuery } from './queries.ts'

const columns: readonly Column<RequestEntry>[] = [
  {
    header: 'At, UTC',
    cell: ({ id, at }) => (
      <Link to={`/requests/${id}`} className="fig">
        {instantText(at)}
      </Link>
    ),
  },
  {
    header: 'Call',
    cell: ({ method, path, case: caseId, operation }) => (
      <span className="fig">{caseId ? `${caseId} · ${operation}` : `${method} ${path}`}</span>
    ),
  },
  { header: 'Key', cell: ({ key }) => key?.name ?? 'no key' },
  {
    header: 'Status',
    cell: ({ status, problem }) => (
      <span className={status < 400 ? 'fig' : 'fig text-clay'}>
        {status}
        {problem ? ` ${problem}` : ''}
      </span>
    ),
  },
  { header: 'Points', numeric: true, cell: ({ points }) => whole(points) },
  { header: 'ms', numeric: true, cell: ({ milliseconds }) => milliseconds.toFixed(1) },
]

export function RequestsScreen() {
  const [search, setSearch] = useSearchParams()
  const filter = filterOf(search)
  const query = useQuery(requestsQuery(filter))
  const keys = useQuery(usedKeysQuery())
  const narrow = (name: string, value: string) => {
    const next = new URLSearchParams(search)
    next.delete('cursor')
    if (value) next.set(name, value)
    else next.delete(name)
    setSearch(next)
  }
  const narrowed = Boolean(filter.keyId ?? filter.status ?? filter.cursor)
  return (
    <Sheet title="Requests">
      <TitleBlock
        title="Requests"
        facts={[
          { name: 'Kept of a call', value: 'status, time, size, problem', full: true },
          { name: 'Never kept', value: 'the body, the key', full: true },
        ]}
      >
        <p className="prose">
          Every call of the account, newest first, refused ones too. Each has one id; support finds it by that id.
        </p>
      </TitleBlock>
      <Band tight label="Filter">
        <div className="filters">
          <div>
            <label htmlFor="status">Outcome</label>
            <select
              id="status"
              className="box"
              value={filter.status ?? ''}
              onChange={(event) => narrow('status', event.target.value)}
            >
              <option value="">All</option>
              {statuses.map((status) => (
                <option key={status} value={status}>
                  {status}
                </option>
              ))}
            </select>
          </div>
          <div>
            <label htmlFor="key">Key</label>
            <select
              id="key"
              className="box"
              value={filter.keyId ?? ''}
              onChange={(event) => narrow('keyId', event.target.value)}
            >
              <option value="">All keys</option>
              {keys.data?.map(({ id, name }) => (
                <option key={id} value={id}>
                  {name}
                </option>
              ))}
            </select>
          </div>
          <div className="btnrow min-h-10">
            <LinkButton onClick={() => void query.refetch()}>Read again</LinkButton>
          </div>
        </div>
      </Band>
      <Band>
        <QueryView
          query={query}
          what="Reading the calls."
          isEmpty={({ requests }) => requests.length === 0}
          empty={<NoRequests narrowed={narrowed} onClear={() => setSearch({})} />}
        >
          {({ requests, next }) => (
            <>
              <DataTable
                caption="Newest first. Times in UTC."
                rows={requests}
                columns={columns}
                rowKey={({ id }) => id}
              />
              <div className="btnrow mt-4">
                {next && <ButtonLink to={`?${pageOf(search, next)}`}>Older calls</ButtonLink>}
                {filter.cursor && <Link to={`?${pageOf(search, undefined)}`}>Newest calls</Link>}
              </div>
            </>
          )}
        </QueryView>
      </Band>
    </Sheet>
  )
}

function NoRequests({ narrowed, onClear }: { narrowed: boolean; onClear(): void }) {
  if (narrowed)
    return (
      <Empty title="No call fits the filter">
        <LinkButton onClick={onClear}>Clear the filter</LinkButton>
      </Empty>
    )
  return (
    <Empty title="No calls yet">
      <p className="prose">The first one appears here within a second of its answer.</p>
      <ButtonLink kind="main" to="/keys">
        Make a key
      </ButtonLink>
    </Empty>
  )
}

function filterOf(search: URLSearchParams): Filter {
  const status = statuses.find((one) => one === search.get('status'))
  const [keyId, cursor] = [search.get('keyId'), search.get('cursor')]
  return { ...(status ? { status } : {}), ...(keyId ? { keyId } : {}), ...(cursor ? { cursor } : {}) }
}

function pageOf(search: URLSearchParams, cursor: string | undefined): string {
  const next = new URLSearchParams(search)
  next.delete('cursor')
  if (cursor) next.set('cursor', cursor)
  return next.toString()
}
