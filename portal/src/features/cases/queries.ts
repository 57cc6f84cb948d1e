import { queryOptions } from '@tanstack/react-query'
import { unwrap } from '../../api/api-error.ts'
import { portalApi, publicApi } from '../../api/clients.ts'

export const caseQuery = (caseId: string) =>
  queryOptions({
    queryKey: ['cases', caseId],
    queryFn: ({ signal }) => unwrap(publicApi.GET('/v1/cases/{caseId}', { params: { path: { caseId } }, signal })),
    staleTime: Infinity,
  })

/** The materials that every solve may name. */
export const catalogueQuery = () =>
  queryOptions({
    queryKey: ['materials', 'catalogue'],
    queryFn: ({ signal }) => unwrap(portalApi.GET('/portal/v1/materials/catalogue', { signal })),
    staleTime: Infinity,
  })
