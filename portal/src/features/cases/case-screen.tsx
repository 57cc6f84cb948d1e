import { useQuery } from '@tanstack/react-query'
import { useParams } from 'react-router-dom'
import { ApiError } from '../../api/api-error.ts'
import { ButtonLink } from '../../components/button.tsx'
import { QueryView } from '../../components/query-view.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Empty } from '../../components/states.tsx'
import { CaseSheet } from './case-sheet.tsx'
import { caseQuery } from './queries.ts'

export function CaseScreen() {
  const { caseId = '' } = useParams()
  const query = useQuery(caseQuery(caseId))
  if (query.error instanceof ApiError && query.error.status === 404)
    return (
      <Sheet title="No such case">
        <Band>
          <h1 className="mb-4">No such case</h1>
          <Empty title={`There is no case "${caseId}"`}>
            <ButtonLink kind="main" to="/cases">
              See the cases
            </ButtonLink>
          </Empty>
        </Band>
      </Sheet>
    )
  if (query.data) return <CaseSheet key={query.data.id} description={query.data} />
  return (
    <Sheet title="Case">
      <Band>
        <h1 className="sr-only">Case</h1>
        <QueryView query={query} what="Reading the case.">
          {() => null}
        </QueryView>
      </Band>
    </Sheet>
  )
}
