import { queryOptions } from '@tanstack/react-query'
import { unwrap } from './api-error.ts'
import { publicApi } from './clients.ts'

/** The list of cases, which the catalogue and the search of the docs read. */
export const casesQuery = () =>
  queryOptions({
    queryKey: ['cases'],
    queryFn: ({ signal }) => unwrap(publicApi.GET('/v1/cases', { signal })),
    staleTime: Infinity,
  })
