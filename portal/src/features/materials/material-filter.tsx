import { useQuery } from '@tanstack/react-query'
import type { SetURLSearchParams } from 'react-router-dom'
import { groupsQuery } from './queries.ts'

interface Props {
  search: URLSearchParams
  setSearch: SetURLSearchParams
}

/** Words and a group; both stand in the address. */
export function MaterialFilter({ search, setSearch }: Props) {
  const groups = useQuery(groupsQuery())
  const group = search.get('group') ?? ''
  const known = groups.data ?? []
  const narrow = (name: string, value: string) => {
    const next = new URLSearchParams(search)
    next.delete('cursor')
    if (value) next.set(name, value)
    else next.delete(name)
    setSearch(next, { replace: true, preventScrollReset: true, flushSync: true })
  }
  return (
    <search className="band tight">
      <div className="filters">
        <div>
          <label htmlFor="words">Find by word</label>
          <input
            id="words"
            type="search"
            className="box"
            maxLength={100}
            value={search.get('q') ?? ''}
            onChange={(event) => narrow('q', event.target.value)}
          />
        </div>
        <div>
          <label htmlFor="group">Group</label>
          <select id="group" className="box" value={group} onChange={(event) => narrow('group', event.target.value)}>
            <option value="">All</option>
            {[...new Set([...known, 'own', ...(group ? [group] : [])])].map((one) => (
              <option key={one}>{one}</option>
            ))}
          </select>
        </div>
      </div>
    </search>
  )
}
