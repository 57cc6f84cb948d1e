import { queryOptions } from '@tanstack/react-query'
import { ApiError, unwrap } from '../../api/api-error.ts'
import { portalApi } from '../../api/clients.ts'
import { noteSignedIn } from '../../api/signed-in.ts'

export interface SignUp {
  mail: string
  password: string
  name: string
  accountName: string
}

export interface SignIn {
  mail: string
  password: string
}

export const sessionQuery = () =>
  queryOptions({
    queryKey: ['session'],
    queryFn: async ({ signal }) => {
      try {
        const session = await unwrap(portalApi.GET('/portal/v1/session', { signal }))
        noteSignedIn('member', true)
        return session
      } catch (error) {
        if (error instanceof ApiError && error.status === 401) noteSignedIn('member', false)
        throw error
      }
    },
    staleTime: 60_000,
  })

export const signUp = (body: SignUp) => unwrap(portalApi.POST('/portal/v1/sign-up', { body }))
export const signIn = (body: SignIn) => unwrap(portalApi.POST('/portal/v1/sign-in', { body }))
export const signOut = () => unwrap(portalApi.POST('/portal/v1/sign-out'))
