import { useMutation, useQueryClient } from '@tanstack/react-query'
import { noteSignedIn } from '../../api/signed-in.ts'
import { staffSignOut } from './queries.ts'

export function StaffSignOut() {
  const client = useQueryClient()
  const end = useMutation({
    mutationFn: staffSignOut,
    onSuccess: () => {
      noteSignedIn('staff', false)
      client.clear()
      location.assign('/staff/sign-in')
    },
  })
  return (
    <button type="button" className="tool" disabled={end.isPending} onClick={() => end.mutate()}>
      {end.isError ? 'Sign out again' : 'Sign out'}
    </button>
  )
}
