import { queryOptions } from '@tanstack/react-query'
import type { components } from '../../../../openapi/portal.d.ts'
import { unwrap } from '../../api/api-error.ts'
import { portalApi } from '../../api/clients.ts'

export type KeyList = components['schemas']['KeyList']
export type Key = components['schemas']['Key']

export const keysQuery = () =>
  queryOptions({
    queryKey: ['keys'],
    queryFn: ({ signal }) => unwrap(portalApi.GET('/portal/v1/keys', { signal })),
    staleTime: 0,
  })

/** What is asked of a new key; what is no number is left for the service to refuse. */
export const createKey = ({ name, quota }: { name: string; quota: string }) => {
  const text = quota.replace(/\s/g, '')
  const points = text === '' ? {} : { quota: (Number.isFinite(Number(text)) ? Number(text) : text) as number }
  return unwrap(portalApi.POST('/portal/v1/keys', { body: { name, ...points } }))
}

export const revokeKey = (keyId: string) =>
  unwrap(portalApi.POST('/portal/v1/keys/{keyId}/revoke', { params: { path: { keyId } } }))
