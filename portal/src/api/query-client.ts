import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query'
import { noteSignedIn } from './signed-in.ts'
import { ApiError } from './api-error.ts'

/**
 * Without a connection a call fails at once and is never sent later by itself. When a session has ended, whoever was
 * signed in is asked to sign in again.
 */
export const queryClient: QueryClient = new QueryClient({
  queryCache: new QueryCache({ onError: leaveEndedSession }),
  mutationCache: new MutationCache({ onError: leaveEndedSession }),
  defaultOptions: {
    queries: {
      staleTime: 30_000,
      retry: (count, error) =>
        count < 2 && error instanceof ApiError && (error.problem?.retryable ?? false) && error.status !== 429,
      refetchOnWindowFocus: false,
      networkMode: 'always',
    },
    mutations: { networkMode: 'always' },
  },
})

function leaveEndedSession(error: Error) {
  if (!(error instanceof ApiError) || error.problem?.code !== 'sign-in-needed') return
  queryClient.removeQueries({ queryKey: [error.who === 'staff' ? 'staff-session' : 'session'] })
  noteSignedIn(error.who, false)
}
