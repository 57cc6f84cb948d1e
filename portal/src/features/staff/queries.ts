import { queryOptions } from '@tanstack/react-query'
import { unwrap } from '../../api/api-error.ts'
import { supportApi } from '../../api/clients.ts'

export const staffSessionQuery = () =>
  queryOptions({
    queryKey: ['staff-session'],
    queryFn: ({ signal }) => unwrap(supportApi.GET('/support/v1/session', { signal })),
    staleTime: 60_000,
  })

export const staffSignIn = (body: { mail: string; password: string }) =>
  unwrap(supportApi.POST('/support/v1/sign-in', { body }))
export const staffSignOut = () => unwrap(supportApi.POST('/support/v1/sign-out'))

/** Every look is put on record, so an answer is kept and never asked for again by itself. */
const onRecord = { staleTime: Infinity, retry: false } as const

export interface Search {
  query: string
  reason: string
}

export const findQuery = (search: Search) =>
  queryOptions({
    queryKey: ['staff', 'find', search],
    queryFn: () => unwrap(supportApi.POST('/support/v1/find', { body: search })),
    ...onRecord,
  })

export const staffRequestQuery = (requestId: string, reason: string) =>
  queryOptions({
    queryKey: ['staff', 'request', requestId, reason],
    queryFn: () =>
      unwrap(
        supportApi.POST('/support/v1/requests/{requestId}/read', { params: { path: { requestId } }, body: { reason } }),
      ),
    ...onRecord,
  })
