import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { Button, LinkButton } from '../../components/button.tsx'
import { type Column, DataTable } from '../../components/data-table.tsx'
import { counted, dayText, instantText, whole } from '../../components/formats.ts'
import { QueryView } from '../../components/query-view.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Empty } from '../../components/states.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { CreateKey } from './create-key.tsx'
import { KeyMeter } from './key-meter.tsx'
import { type Key, keysQuery } from './queries.ts'
import { RevokeKey } from './revoke-key.tsx'

const columns = (revoke: (key: Key) => void): readonly Column<Key>[] => [
  {
    header: 'Name',
    cell: ({ name, createdAt, createdBy, revokedAt }) => (
      <>
        {name}
        <span className="lab block">
          {revokedAt ? <b>Revoked {instantText(revokedAt)}</b> : `${dayText(createdAt)} by ${createdBy}`}
        </span>
      </>
    ),
  },
  { header: 'Key', mono: true, cell: ({ prefix }) => <code>{prefix}</code> },
  { header: 'Points today', numeric: true, cell: ({ used }) => whole(used) },
  { header: 'of its quota', cell: (key) => <KeyMeter used={key.used} quota={key.quota} /> },
  {
    header: 'Last used, UTC',
    mono: true,
    cell: ({ lastUsedAt }) => <span className="fig">{lastUsedAt ? instantText(lastUsedAt) : 'never used'}</span>,
  },
  {
    header: 'Actions',
    quiet: true,
    cell: (key) =>
      key.revokedAt ? null : (
        <LinkButton risk aria-label={`Revoke ${key.name}`} onClick={() => revoke(key)}>
          Revoke
        </LinkButton>
      ),
  },
]

export function KeysScreen() {
  const query = useQuery(keysQuery())
  const [creating, setCreating] = useState(false)
  const [revoking, setRevoking] = useState<Key>()
  const keys = query.data?.keys ?? []
  const account = query.data?.account
  const inUse = keys.filter(({ revokedAt }) => !revokedAt)
  const facts = account
    ? [
        {
          name: 'Keys',
          value: `${counted(inUse.length, 'key')} in use, ${whole(keys.length - inUse.length)} revoked`,
          full: true,
        },
        { name: 'Left today', value: whole(account.limit - account.used) },
        { name: 'Resets, UTC', value: instantText(account.resetsAt) },
        { name: 'A revocation works', value: 'within a second', full: true },
      ]
    : []
  return (
    <Sheet title="Keys">
      <TitleBlock title="Keys" facts={facts}>
        <p className="prose">
          A key is shown once. We keep its SHA-256 and the first six characters, so a lost key cannot be read back.
        </p>
      </TitleBlock>
      <Band>
        <div className="btnrow justify-between mb-4">
          <h2>Trial keys</h2>
          {!query.isError && (
            <Button kind="main" onClick={() => setCreating(true)}>
              Create a key
            </Button>
          )}
        </div>
        <QueryView
          query={query}
          what="Reading the keys."
          isEmpty={(data) => data.keys.length === 0}
          empty={
            <Empty title="No keys yet">
              <p className="prose">A key lets a program call the API. The first one takes a name, and is shown once.</p>
            </Empty>
          }
        >
          {(data) => (
            <DataTable
              caption="Points of the current UTC day. The quota of a key lies within that of the account."
              rows={[...data.keys].sort((a, b) => Number(Boolean(a.revokedAt)) - Number(Boolean(b.revokedAt)))}
              columns={columns(setRevoking)}
              rowKey={({ id }) => id}
              off={({ revokedAt }) => Boolean(revokedAt)}
            />
          )}
        </QueryView>
        <div className="note information mt-6">
          <b>Do not put a key in a web page.</b> Whoever opens the page can read it. Call the API from your server.
        </div>
      </Band>
      {creating && <CreateKey onClose={() => setCreating(false)} />}
      {revoking && <RevokeKey of={revoking} onClose={() => setRevoking(undefined)} />}
    </Sheet>
  )
}
