import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useNavigate } from 'react-router-dom'
import { sessionQuery, signIn, signUp } from './queries.ts'
import { noteSignedIn } from '../../api/signed-in.ts'

type Start = typeof signUp | typeof signIn

/** Signs up or in; what another session had read is forgotten first. */
export function useStartSession<B extends Parameters<Start>[0]>(start: (body: B) => ReturnType<Start>, next: string) {
  const client = useQueryClient()
  const navigate = useNavigate()
  return useMutation({
    mutationFn: start,
    onSuccess: async (session) => {
      client.removeQueries({ predicate: ({ queryKey }) => queryKey[0] !== 'cases' })
      client.setQueryData(sessionQuery().queryKey, session)
      noteSignedIn('member', true)
      await navigate(next, { replace: true })
    },
  })
}

/** Only a path of this portal; anything else leads to the keys. */
export function nextOf(search: URLSearchParams): string {
  const next = search.get('next') ?? ''
  return /^\/(?![/\\])/.test(next) ? next : '/keys'
}
