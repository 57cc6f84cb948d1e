import { useQuery } from '@tanstack/react-query'
import { Navigate, Outlet } from 'react-router-dom'
import { ApiError } from '../api/api-error.ts'
import { QueryView } from '../components/query-view.tsx'
import { staffSessionQuery } from '../features/staff/queries.ts'
import { StaffSignOut } from '../features/staff/sign-out.tsx'
import { useSignedIn } from '../api/signed-in.ts'
import { Masthead } from './masthead.tsx'
import { Page } from './page.tsx'
import { Rail } from './rail.tsx'

const sheets = [{ to: '/staff', text: 'Find' }]

export function StaffPage() {
  const signedIn = useSignedIn('staff')
  const query = useQuery({ ...staffSessionQuery(), enabled: signedIn })
  if (!signedIn || (query.error instanceof ApiError && query.error.status === 401))
    return <Navigate to="/staff/sign-in" replace />
  return (
    <Page>
      <Masthead>
        <StaffSignOut />
      </Masthead>
      <QueryView query={query} what="Reading your session.">
        {({ person, role }) => (
          <div className="with-rail">
            <Rail label="Staff sheets" owner={`Staff · ${role} · ${person.name}`} sheets={sheets} />
            <Outlet />
          </div>
        )}
      </QueryView>
    </Page>
  )
}
