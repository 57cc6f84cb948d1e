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

/** A whole number with or without groups of three: 1000, 1,000, 1 000. */
const grouped = /^\d{1,3}(?:([,\s'])\d{3})(?:\1\d{3})*$/

/** What is asked of a new key; what is no number is left for the service to refuse. */
export const createKey = ({ name, quota }: { name: string; quota: string }) => {
  const typed = quota.trim()
  const text = grouped.test(typed) ? typed.replace(/\D/g, '') : typed
  const points = text === '' ? {} : { quota: (Number.isFinite(Number(text)) ? Number(text) : text) as number }
  return unwrap(portalApi.POST('/portal/v1/keys', { body: { name, environment: 'trial', ...points } }))
}

export const revokeKey = (keyId: string) =>
  unwrap(portalApi.POST('/portal/v1/keys/{keyId}/revoke', { params: { path: { keyId } } }))
