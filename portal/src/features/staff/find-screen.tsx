import { useQuery } from '@tanstack/react-query'
import { type ChangeEvent, useState } from 'react'
import { useForm } from 'react-hook-form'
import { Link, useLocation, useNavigate } from 'react-router-dom'
import { issuesByField } from '../../api/api-error.ts'
import type { components } from '../../../../openapi/support.d.ts'
import { type Column, DataTable } from '../../components/data-table.tsx'
import { instantText, whole } from '../../components/formats.ts'
import { FormFailure } from '../../components/form-failure.tsx'
import { SendButton } from '../../components/send-button.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Empty, Loading } from '../../components/states.tsx'
import { TextField } from '../../components/text-field.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { prefixOf, shortId } from './key-prefix.ts'
import { type Search, findQuery } from './queries.ts'

type Found = components['schemas']['FoundRequest']

const columns = (reason: string): readonly Column<Found>[] => [
  {
    header: 'At, UTC',
    cell: ({ id, at }) => (
      <Link className="fig" to={`/staff/requests/${id}`} state={{ reason }}>
        {instantText(at)}
      </Link>
    ),
  },
  { header: 'Request', mono: true, cell: ({ id }) => <code title={id}>{shortId(id)}</code> },
  { header: 'Account', cell: ({ account }) => account?.name ?? 'none' },
  { header: 'Key', mono: true, cell: ({ key }) => <code>{key?.prefix ?? 'none'}</code> },
  { header: 'Call', cell: ({ method, path }) => <span className="fig">{`${method} ${path}`}</span> },
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
]

const words = { labels: { query: 'Request id or key prefix', reason: 'Reason' } }

/** Finds calls of any account; what was found stands in this entry of the history, so Back asks nothing again. */
export function FindScreen() {
  const search = useLocation().state as Search | null
  const navigate = useNavigate()
  const [cut, setCut] = useState(false)
  const { register, handleSubmit, setValue } = useForm<Search>({ defaultValues: search ?? { query: '', reason: '' } })
  const result = useQuery({ ...findQuery(search ?? { query: '', reason: '' }), enabled: search !== null })
  const errors = issuesByField(result.error, words)
  return (
    <Sheet title="Find">
      <TitleBlock
        title="Find a request"
        facts={[
          { name: 'Every look', value: 'is on record with its reason', full: true },
          { name: 'Never shown', value: 'a key, a mail address', full: true },
        ]}
      >
        <p className="prose">
          By the request id that a customer names, or by a key as it is listed: its environment and first six
          characters.
        </p>
      </TitleBlock>
      <Band>
        <form
          className="max-w-[760px]"
          noValidate
          onSubmit={handleSubmit((values) =>
            navigate('.', { replace: true, state: { query: values.query.trim(), reason: values.reason } }),
          )}
        >
          <TextField
            label="Request id or key prefix"
            hint="req_… or soak_trial_AbC123"
            autoComplete="off"
            spellCheck={false}
            error={errors['query']}
            {...register('query', {
              onChange: (event: ChangeEvent<HTMLInputElement>) => {
                const prefix = prefixOf(event.target.value)
                setCut(prefix !== undefined)
                if (prefix !== undefined) setValue('query', prefix)
              },
            })}
          />
          <div role="status">
            {cut && (
              <p className="note warning mt-3 mb-3">The key was cut to its prefix. Tell the customer to revoke it.</p>
            )}
          </div>
          <TextField
            label="Reason"
            hint="goes on record"
            autoComplete="off"
            error={errors['reason']}
            {...register('reason')}
          />
          <FormFailure error={result.error} words={words} />
          <div className="btnrow mt-5">
            <SendButton kind="main" type="submit" error={result.error}>
              {result.isFetching ? 'Finding' : 'Find'}
            </SendButton>
          </div>
        </form>
      </Band>
      {search && (
        <Band label="Found">
          {result.isFetching && <Loading what="Looking in the log." />}
          {result.data &&
            (result.data.requests.length === 0 ? (
              <Empty title="Nothing found">
                <p className="prose">No call has this id or key. Ask for the Request-Id header of the answer.</p>
              </Empty>
            ) : (
              <DataTable
                caption="Newest first. Times in UTC."
                rows={result.data.requests}
                columns={columns(search.reason)}
                rowKey={({ id }) => id}
              />
            ))}
        </Band>
      )}
    </Sheet>
  )
}
