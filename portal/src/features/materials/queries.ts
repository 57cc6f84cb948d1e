import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import type { components } from '../../../../openapi/portal.d.ts'
import { unwrap, unwrapTagged } from '../../api/api-error.ts'
import { portalApi } from '../../api/clients.ts'

export type Material = components['schemas']['Material']
export type ImportReport = components['schemas']['MaterialImport']
type NewMaterial = components['schemas']['NewMaterial']

/** What the lists are narrowed by, and where the page of the own ones begins. */
export interface Wish {
  q?: string
  group?: string
  cursor?: string
}

/** More than the catalogue has. */
const WHOLE = '200'

const everyList = { queryKey: ['materials', 'list'] } as const

export const listQuery = (of: Material['of'], { q, group, cursor }: Wish) => {
  const query = { of, ...(q ? { q } : {}), ...(group ? { group } : {}), ...(cursor ? { cursor } : {}) }
  const limit = of === 'catalogue' ? { limit: WHOLE } : {}
  return queryOptions({
    queryKey: [...everyList.queryKey, query],
    queryFn: ({ signal }) =>
      unwrap(portalApi.GET('/portal/v1/materials', { params: { query: { ...query, ...limit } }, signal })),
    placeholderData: keepPreviousData,
    staleTime: of === 'catalogue' ? Infinity : 0,
  })
}

/** The groups that the catalogue has, in its order. */
export const groupsQuery = () =>
  queryOptions({
    queryKey: ['materials', 'groups'],
    queryFn: async ({ signal }) => {
      const { materials } = await unwrap(portalApi.GET('/portal/v1/materials/catalogue', { signal }))
      return [...new Set(materials.map(({ group }) => group))]
    },
    staleTime: Infinity,
  })

/** A material with the tag of its version. */
export const materialQuery = (materialId: string) =>
  queryOptions({
    queryKey: ['materials', 'one', materialId],
    queryFn: ({ signal }) =>
      unwrapTagged(portalApi.GET('/portal/v1/materials/{materialId}', { params: { path: { materialId } }, signal })),
    staleTime: 0,
  })

/** What stands in the boxes of the form. */
export type Typed = Record<keyof NewMaterial, string>

/** What is asked: an empty box is not sent, and what is no number is sent as typed for the service to refuse. */
function bodyOf(typed: Typed): NewMaterial {
  const number = (text: string) => {
    const value = Number(text.replaceAll('\u2212', '-'))
    return text.trim() !== '' && Number.isFinite(value) ? value : text
  }
  const { conductivity, density, specificHeat, ...words } = typed
  const all = {
    ...words,
    conductivity: number(conductivity),
    density: number(density),
    specificHeat: number(specificHeat),
  }
  return Object.fromEntries(Object.entries(all).filter(([, value]) => value !== '')) as NewMaterial
}

export const createMaterial = (typed: Typed) => unwrap(portalApi.POST('/portal/v1/materials', { body: bodyOf(typed) }))

/** Changes the version that was read, and no other. */
export const replaceMaterial = (materialId: string, etag: string, typed: Typed) =>
  unwrap(
    portalApi.PUT('/portal/v1/materials/{materialId}', {
      params: { path: { materialId }, header: { 'If-Match': etag } },
      body: bodyOf(typed),
    }),
  )

export const deleteMaterial = (materialId: string) =>
  unwrap(portalApi.DELETE('/portal/v1/materials/{materialId}', { params: { path: { materialId } } }))

/** Examines the rows of a text, or keeps those that will do. */
export const importMaterials = (text: string, dryRun: boolean) =>
  unwrap(
    portalApi.POST('/portal/v1/materials/import', {
      params: { query: { dryRun: dryRun ? 'true' : 'false' } },
      headers: { 'Content-Type': 'text/csv' },
      body: text,
      bodySerializer: (body) => body,
    }),
  )

export const allLists = everyList
