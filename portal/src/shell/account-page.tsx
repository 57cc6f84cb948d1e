import { useQuery } from '@tanstack/react-query'
import { Navigate, Outlet, useLocation } from 'react-router-dom'
import { ApiError } from '../api/api-error.ts'
import { QueryView } from '../components/query-view.tsx'
import { sessionQuery } from '../features/access/queries.ts'
import { SignOut } from '../features/access/sign-out.tsx'
import type { Permissions } from '../api/may.ts'
import { useSignedIn } from '../api/signed-in.ts'
import { Masthead } from './masthead.tsx'
import { Page } from './page.tsx'
import { Rail } from './rail.tsx'

const sheets = [
  { to: '/keys', text: 'Keys' },
  { to: '/usage', text: 'Usage' },
  { to: '/requests', text: 'Requests' },
  { to: '/materials', text: 'Materials' },
]

/** The sheets of an account; whoever is not signed in is asked to, and comes back. */
export function AccountPage() {
  const signedIn = useSignedIn('member')
  const query = useQuery({ ...sessionQuery(), enabled: signedIn })
  const { pathname, search } = useLocation()
  if (!signedIn || (query.error instanceof ApiError && query.error.status === 401))
    return <Navigate to={`/sign-in?next=${encodeURIComponent(pathname + search)}`} replace />
  return (
    <Page>
      <Masthead>
        <SignOut />
      </Masthead>
      <QueryView query={query} what="Reading your session.">
        {({ account, role, permissions }) => (
          <div className="with-rail">
            <Rail label="Account sheets" owner={`${account.name} · ${role}`} sheets={sheets} />
            <Outlet context={permissions satisfies Permissions} />
          </div>
        )}
      </QueryView>
    </Page>
  )
}
