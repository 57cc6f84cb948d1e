import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import type { components } from '../../../../openapi/portal.d.ts'
import { unwrap } from '../../api/api-error.ts'
import { portalApi } from '../../api/clients.ts'

export type RequestEntry = components['schemas']['RequestEntry']

export interface Filter {
  cursor?: string
  keyId?: string
  status?: 'ok' | 'refused' | 'failed'
}

export const statuses = ['ok', 'refused', 'failed'] as const

export const requestsQuery = (filter: Filter) =>
  queryOptions({
    queryKey: ['requests', filter],
    queryFn: ({ signal }) => unwrap(portalApi.GET('/portal/v1/requests', { params: { query: filter }, signal })),
    placeholderData: keepPreviousData,
    staleTime: 0,
  })

export const requestQuery = (requestId: string) =>
  queryOptions({
    queryKey: ['request', requestId],
    queryFn: ({ signal }) =>
      unwrap(portalApi.GET('/portal/v1/requests/{requestId}', { params: { path: { requestId } }, signal })),
  })

/** Keys that have been used lately, to filter by. */
export const usedKeysQuery = () =>
  queryOptions({
    queryKey: ['requests', 'keys'],
    queryFn: async ({ signal }) => {
      const { rows } = await unwrap(
        portalApi.GET('/portal/v1/usage', { params: { query: { groupBy: 'key' } }, signal }),
      )
      return rows.flatMap(({ keyId, keyName }) => (keyId && keyName ? [{ id: keyId, name: keyName }] : []))
    },
  })
