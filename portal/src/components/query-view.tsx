import type { UseQueryResult } from '@tanstack/react-query'
import type { ReactNode } from 'react'
import { Failed, Loading } from './states.tsx'

interface Props<T> {
  query: UseQueryResult<T>
  /** What is awaited, in a sentence. */
  what: string
  isEmpty?(data: T): boolean
  empty?: ReactNode
  children(data: T): ReactNode
}

/** Every screen shows its data through this: waiting, failed, empty or there. A failed refresh keeps the data. */
export function QueryView<T>({ query, what, isEmpty, empty, children }: Props<T>) {
  if (query.data === undefined) {
    if (query.isError) return <Failed error={query.error} retry={() => void query.refetch()} />
    return <Loading what={what} />
  }
  if (isEmpty?.(query.data)) return empty
  return children(query.data)
}
