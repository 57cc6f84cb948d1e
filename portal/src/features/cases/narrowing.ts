import type { CaseList, CaseSummary } from './described.ts'

type Facet = CaseList['facets'][number]

/** What the list is narrowed by, as it stands in the address: words, and marks of each facet. */
export interface Narrowing {
  words: string
  marks: Readonly<Record<string, readonly string[]>>
}

export function narrowingIn(search: URLSearchParams, facets: readonly Facet[]): Narrowing {
  const marks = facets.map(({ id, values }) => [
    id,
    search.getAll(id).filter((v) => values.some((one) => one.id === v)),
  ])
  return { words: search.get('q') ?? '', marks: Object.fromEntries(marks) as Narrowing['marks'] }
}

/** The address with one mark set or taken away, or with other words. */
export function marked(search: URLSearchParams, facet: string, value: string, on: boolean): URLSearchParams {
  const next = new URLSearchParams(search)
  next.delete(facet)
  for (const one of search.getAll(facet)) if (one !== value) next.append(facet, one)
  if (on) next.append(facet, value)
  return next
}

export function worded(search: URLSearchParams, words: string): URLSearchParams {
  const next = new URLSearchParams(search)
  if (words) next.set('q', words)
  else next.delete('q')
  return next
}

const hasMarks = (c: CaseSummary, { id, match }: Facet, wanted: readonly string[]): boolean => {
  const own = c.facets[id] ?? []
  if (wanted.length === 0) return true
  return match === 'all' ? wanted.every((value) => own.includes(value)) : wanted.some((value) => own.includes(value))
}

export function narrowed({ cases, facets, families }: CaseList, { words, marks }: Narrowing): CaseSummary[] {
  const wanted = words.toLowerCase().split(/\s+/)
  return cases.filter((c) => {
    const named = facets.flatMap(({ id, values }) =>
      values.filter((value) => c.facets[id]?.includes(value.id)).map(({ title }) => title),
    )
    const family = families.find(({ id }) => id === c.family)
    const text = [c.id, c.title, c.summary, family?.title, ...named].join(' ').toLowerCase()
    return (
      wanted.every((word) => text.includes(word)) && facets.every((facet) => hasMarks(c, facet, marks[facet.id] ?? []))
    )
  })
}

/** How many cases a value would show, with everything else that is marked. */
export function countWith(list: CaseList, narrowing: Narrowing, facet: Facet, value: string): number {
  const kept = facet.match === 'all' ? (narrowing.marks[facet.id] ?? []) : []
  const marks = { ...narrowing.marks, [facet.id]: [...kept.filter((one) => one !== value), value] }
  return narrowed(list, { ...narrowing, marks }).length
}
