import { queryOptions } from '@tanstack/react-query'
import type { components } from '../../../../openapi/portal.d.ts'
import { unwrap } from '../../api/api-error.ts'
import { portalApi } from '../../api/clients.ts'

export type Usage = components['schemas']['Usage']
export type UsageRow = Usage['rows'][number]

const DAY = 86_400_000
const dayOf = (instant: number): string => new Date(instant).toISOString().slice(0, 10)

export const usageQuery = (days: number, groupBy: string) =>
  queryOptions({
    queryKey: ['usage', days, groupBy],
    queryFn: ({ signal }) => {
      const now = Date.now()
      const query = { from: dayOf(now - (days - 1) * DAY), to: dayOf(now), groupBy }
      return unwrap(portalApi.GET('/portal/v1/usage', { params: { query }, signal }))
    },
    staleTime: 0,
  })

/** Every UTC day from one to another. */
export function daysBetween(from: string, to: string): string[] {
  const days: string[] = []
  for (let at = Date.parse(from); at <= Date.parse(to); at += DAY) days.push(dayOf(at))
  return days
}
