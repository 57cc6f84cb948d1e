import { expect, test } from 'vitest'
import { caseList } from '../../api/catalogue/describe.ts'
import { countWith, marked, narrowed, narrowingIn, worded } from '../../portal/src/features/cases/narrowing.ts'
import type { CaseList } from '../../portal/src/features/cases/described.ts'

const list = caseList() as unknown as CaseList
const idsOf = (search: string) =>
  narrowed(list, narrowingIn(new URLSearchParams(search), list.facets)).map(({ id }) => id)

test('every case has one body, a boundary and a question, each of which the list names', () => {
  for (const { id, facets, family } of list.cases) {
    for (const { id: facet, values } of list.facets) {
      const known = values.map((value) => value.id)
      expect(facets[facet]?.length, `${id} ${facet}`).toBeGreaterThan(0)
      for (const value of facets[facet] ?? []) expect(known, `${id} ${facet}`).toContain(value)
    }
    expect(list.families.map((one) => one.id)).toContain(family)
  }
  expect(idsOf('')).toEqual(list.cases.map(({ id }) => id))
})

test('marks of one facet widen the list or narrow it as the facet says, and facets narrow each other', () => {
  const slabs = idsOf('body=slab')
  expect(slabs.length).toBeGreaterThan(1)
  expect(slabs.every((id) => id.startsWith('slab-'))).toBe(true)
  expect(idsOf('body=slab&body=lumped')).toEqual(expect.arrayContaining([...slabs, 'lumped-convection']))
  expect(idsOf('body=slab&boundary=convection')).toContain('slab-convection')
  expect(idsOf('body=slab&boundary=convection')).not.toContain('slab-surface-temperature')
  const both = idsOf('question=how-hot&question=how-much-heat')
  expect(both.every((id) => idsOf('question=how-much-heat').includes(id))).toBe(true)
  expect(idsOf('body=no-such-body'), 'a mark that nobody knows').toEqual(idsOf(''))
})

test('words are looked for in what is shown of a case, and all must be there', () => {
  expect(idsOf('q=slab+convection')).toContain('slab-convection')
  expect(idsOf('q=SLAB+convection')).toEqual(idsOf('q=slab+convection'))
  expect(idsOf('q=nothing+of+the+kind')).toEqual([])
})

test('the count of a mark is the number of cases it would show', () => {
  for (const search of ['', 'body=slab', 'boundary=convection&question=how-hot', 'q=fluid']) {
    const address = new URLSearchParams(search)
    const narrowing = narrowingIn(address, list.facets)
    for (const facet of list.facets)
      for (const { id } of facet.values) {
        const others = facet.match === 'all' ? marked(address, facet.id, id, true) : new URLSearchParams(address)
        if (facet.match === 'any') others.set(facet.id, id)
        expect(countWith(list, narrowing, facet, id)).toBe(idsOf(others.toString()).length)
      }
  }
})

test('the address keeps what else it says when a mark or the words change', () => {
  const address = new URLSearchParams('q=wall&body=slab')
  expect(marked(address, 'body', 'lumped', true).toString()).toBe('q=wall&body=slab&body=lumped')
  expect(marked(address, 'body', 'slab', false).toString()).toBe('q=wall')
  expect(worded(address, '').toString()).toBe('body=slab')
  expect(worded(address, 'floor').toString()).toBe('q=floor&body=slab')
})
