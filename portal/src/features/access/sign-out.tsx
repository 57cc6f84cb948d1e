import { useMutation, useQueryClient } from '@tanstack/react-query'
import { signOut } from './queries.ts'
import { noteSignedIn } from '../../api/signed-in.ts'
import { dropDrafts } from '../../components/drafts.ts'

/** Ends the session on the server and forgets what was read; the page starts anew. */
export function SignOut() {
  const client = useQueryClient()
  const end = useMutation({
    mutationFn: signOut,
    onSuccess: () => {
      noteSignedIn('member', false)
      dropDrafts()
      client.clear()
      location.assign('/')
    },
  })
  return (
    <button type="button" className="tool" disabled={end.isPending} onClick={() => end.mutate()}>
      {end.isError ? 'Sign out again' : 'Sign out'}
    </button>
  )
}
