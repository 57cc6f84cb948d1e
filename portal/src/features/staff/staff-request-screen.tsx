import { useQuery } from '@tanstack/react-query'
import { useForm } from 'react-hook-form'
import { Link, useLocation, useNavigate, useParams } from 'react-router-dom'
import { Button } from '../../components/button.tsx'
import { instantText } from '../../components/formats.ts'
import { QueryView } from '../../components/query-view.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { TextField } from '../../components/text-field.tsx'
import { RequestDetails } from '../../request/request-details.tsx'
import { staffRequestQuery, staffSessionQuery } from './queries.ts'

/** One call of any account, under the reason given for the look. */
export function StaffRequestScreen() {
  const { requestId = '' } = useParams()
  const reason = (useLocation().state as { reason?: string } | null)?.reason
  return (
    <Sheet title="Request">
      {reason ? <Looked requestId={requestId} reason={reason} /> : <AskReason />}
      <Band tight>
        <Link to="/staff">Find another</Link>
      </Band>
    </Sheet>
  )
}

function Looked({ requestId, reason }: { requestId: string; reason: string }) {
  const query = useQuery(staffRequestQuery(requestId, reason))
  const session = useQuery(staffSessionQuery())
  if (!query.data)
    return (
      <Band>
        <h1 className="mb-4">Request</h1>
        <QueryView query={query} what="Reading the call.">
          {() => null}
        </QueryView>
      </Band>
    )
  return (
    <>
      <aside className="banner" aria-label="This look is on record">
        <b>On record.</b>
        <span>Reason given: “{reason}”</span>
        <span className="fig">
          {instantText(new Date(query.dataUpdatedAt).toISOString())} · {session.data?.person.name}
        </span>
      </aside>
      <RequestDetails
        request={query.data}
        extra={[{ name: 'Account', value: query.data.account?.name ?? 'none', full: true }]}
      />
    </>
  )
}

function AskReason() {
  const navigate = useNavigate()
  const { register, handleSubmit } = useForm({ defaultValues: { reason: '' } })
  return (
    <Band>
      <h1 className="mb-4">Why do you look?</h1>
      <form
        className="max-w-[760px]"
        onSubmit={handleSubmit(({ reason }) => navigate('.', { replace: true, state: { reason } }))}
      >
        <TextField label="Reason" hint="goes on record" autoComplete="off" {...register('reason')} />
        <div className="btnrow mt-5">
          <Button kind="main" type="submit">
            Open the request
          </Button>
        </div>
      </form>
    </Band>
  )
}
