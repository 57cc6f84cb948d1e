import { useQuery } from '@tanstack/react-query'
import { Link, useParams } from 'react-router-dom'
import { Band, Sheet } from '../../components/sheet.tsx'
import { QueryView } from '../../components/query-view.tsx'
import { RequestDetails } from '../../request/request-details.tsx'
import { requestQuery } from './queries.ts'

export function RequestScreen() {
  const { requestId = '' } = useParams()
  const query = useQuery(requestQuery(requestId))
  return (
    <Sheet title="Request">
      {query.data ? (
        <RequestDetails request={query.data} />
      ) : (
        <Band>
          <h1 className="mb-4">Request</h1>
          <QueryView query={query} what="Reading the call.">
            {() => null}
          </QueryView>
        </Band>
      )}
      <Band tight>
        <Link to="/requests">All requests</Link>
      </Band>
    </Sheet>
  )
}
