import { Link, Outlet } from 'react-router-dom'
import { ButtonLink } from '../components/button.tsx'
import { useSignedIn } from '../api/signed-in.ts'
import { Masthead } from './masthead.tsx'
import { Page } from './page.tsx'

export function PublicPage() {
  const signedIn = useSignedIn('member')
  return (
    <Page>
      <Masthead>
        {signedIn ? (
          <ButtonLink small to="/keys">
            Your keys
          </ButtonLink>
        ) : (
          <>
            <Link className="tool" to="/sign-in">
              Sign in
            </Link>
            <ButtonLink small to="/sign-up">
              Get a key
            </ButtonLink>
          </>
        )}
      </Masthead>
      <Outlet />
    </Page>
  )
}
