import { queryOptions } from '@tanstack/react-query'
import { unwrap } from './api-error.ts'
import { publicApi } from './clients.ts'
import type { Described, ProblemEntry } from './problem-entry.ts'

interface Contract {
  'x-problems': Record<string, Described & { status: number; retryable: boolean }>
  'x-error-codes': Record<string, Described>
  'x-warnings': Record<string, Described>
}

/** Every code that an answer can carry, from the contract itself. */
export const problemsQuery = () =>
  queryOptions({
    queryKey: ['contract', 'problems'],
    queryFn: async ({ signal }) =>
      entriesOf((await unwrap(publicApi.GET('/v1/openapi.json', { signal }))) as unknown as Contract),
    staleTime: Infinity,
  })

function entriesOf(contract: Contract): ProblemEntry[] {
  const list = <K extends ProblemEntry['kind'], D extends Described>(kind: K, table: Record<string, D>) =>
    Object.entries(table).map(([code, entry]) => ({ code, kind, ...entry }))
  return [
    ...list('problem', contract['x-problems']),
    ...list('entry', contract['x-error-codes']),
    ...list('warning', contract['x-warnings']),
  ]
}
