import { z } from 'zod'
import { genericMaterial, genericMaterials } from '../../solvers/materials/generic.ts'
import type { Database } from '../database.ts'
import { type Context, operation, statedBody } from '../operation.ts'
import { Problem } from '../problems.ts'
import { type ImportedRow, readMaterials } from './import-csv.ts'
import { listMaterials } from './list-materials.ts'
import { deleteMaterial, keepMaterials, readOwn, replaceMaterial } from './queries.ts'
import {
  type NewMaterial,
  importQuery,
  importReportSchema,
  materialListQuery,
  materialListSchema,
  materialParams,
  materialSchema,
  newMaterialSchema,
  ownMaterialParams,
  shownMaterial,
} from './schemas.ts'

const about = { tag: 'Materials' } as const
const byKey = { document: 'openapi', access: 'key' } as const
const keyReads = { ...byKey, scope: 'materials:read' } as const
const keyWrites = { ...byKey, scope: 'materials:write' } as const
const byMember = { document: 'portal', access: 'session' } as const
const nothing = () =>
  new Problem('not-found', 'There is no such material among those of the catalogue and the account.')
const notOwn = () =>
  new Problem('not-found', 'There is no such material among those of the account that you may change.')

const example = {
  name: 'Lime render, north wall',
  group: 'plaster',
  conductivity: 0.72,
  density: 1650,
  specificHeat: 950,
  state: 'dry',
  source: 'Own laboratory, report 12',
  confidence: 'medium',
}
const ownId = { params: { materialId: 'mat_0123456789abcdefghijk' } }

type Reading<P, Q> = Context<P, Q, unknown, 'key' | 'session'>

const list = {
  ...about,
  method: 'get',
  summary: 'List materials',
  description:
    'The catalogue, then the materials of the account by name, in pages. A solve takes the id of any of them as `material`.',
  query: materialListQuery,
  status: 200,
  answer: materialListSchema,
} as const
const handleList = async ({ query, caller, deps }: Reading<unknown, z.output<typeof materialListQuery>>) => ({
  body: await listMaterials(deps.db, caller.accountId, query),
})

const read = {
  ...about,
  method: 'get',
  summary: 'Read a material',
  description:
    'A material of the catalogue or of the account. The ETag of an own one is what a change names by If-Match.',
  params: materialParams,
  status: 200,
  answer: materialSchema,
  example: { params: { materialId: genericMaterials[0]?.id ?? '' } },
} as const
async function handleRead({ params, caller, deps }: Reading<z.output<typeof materialParams>, unknown>) {
  const { materialId } = params
  const material = genericMaterial(materialId) ?? (await readOwnOrNone(deps.db, caller.accountId, materialId))
  if (!material) throw nothing()
  return { body: shownMaterial(material) }
}

/* What no own id looks like is not asked for. */
const readOwnOrNone = (db: Database, accountId: string, id: string) =>
  ownMaterialParams.safeParse({ materialId: id }).success ? readOwn(db, accountId, id) : undefined

const create = {
  ...about,
  method: 'post',
  summary: 'Keep a material',
  description:
    'A material of the account, seen by its members and keys alone. Each quantity may be stated with a unit.',
  body: statedBody(newMaterialSchema),
  status: 201,
  answer: materialSchema,
  problems: ['too-many-materials'],
  example: { body: example },
} as const
async function handleCreate({ body, caller, deps }: Context<unknown, unknown, NewMaterial, 'key' | 'session'>) {
  const [material] = await keepMaterials(deps.db, caller, [body])
  if (!material) throw new Error('a material that was kept is not there')
  return { body: shownMaterial(material), headers: { Location: `/v1/materials/${material.id}` } }
}

const replace = {
  ...about,
  method: 'put',
  summary: 'Replace a material',
  description: 'All of a material of the account at once; If-Match holds the ETag of the version that was read.',
  conditional: true,
  params: ownMaterialParams,
  body: statedBody(newMaterialSchema),
  status: 200,
  answer: materialSchema,
  example: { ...ownId, body: example },
} as const
async function handleReplace(context: Context<OwnId, unknown, NewMaterial, 'key' | 'session'>) {
  const { params, body, caller, deps, ifMatch = '' } = context
  const material = await replaceMaterial(deps.db, caller, { id: params.materialId, ifMatch, wish: body })
  if (!material) throw notOwn()
  return { body: shownMaterial(material) }
}
type OwnId = z.output<typeof ownMaterialParams>

const remove = {
  ...about,
  method: 'delete',
  summary: 'Delete a material',
  description:
    'Answers that used it hold its properties and stay as they are; a solve that names it is refused from now on.',
  params: ownMaterialParams,
  status: 204,
  example: ownId,
} as const
async function handleRemove({ params, caller, deps }: Reading<OwnId, unknown>) {
  if (!(await deleteMaterial(deps.db, caller, params.materialId))) throw notOwn()
  return {}
}

const importAll = {
  ...about,
  method: 'post',
  summary: 'Import materials from CSV',
  description:
    'The first line names the columns, in any order: those of a new material, where group may be left out. Numbers are in SI, with a decimal point. ' +
    'Rows that will do are kept, the others reported with what is wrong; at most 1,000 rows.',
  upload: {
    kind: 'text/csv',
    limit: 256 * 1024,
    description: 'Comma-separated values as of RFC 4180.',
    example: [
      'name,conductivity,density,specificHeat,state,source,confidence',
      '"Lime render, north wall",0.72,1650,950,dry,"Own laboratory, report 12",medium',
      '',
    ].join('\n'),
    parse: readMaterials,
  },
  query: importQuery,
  status: 200,
  answer: importReportSchema,
  problems: ['too-many-materials'],
} as const
async function handleImport(context: Context<unknown, z.output<typeof importQuery>, ImportedRow[], 'key' | 'session'>) {
  const { body: rows, query, caller, deps } = context
  const dryRun = query.dryRun === 'true'
  const good = rows.flatMap((row) => ('material' in row ? [row.material] : []))
  const kept = dryRun ? [] : await keepMaterials(deps.db, caller, good)
  const ids = kept.map(({ id }) => id)
  const report = rows.map((row) => {
    if ('material' in row) {
      const id = ids.shift()
      return { row: row.row, status: 'accepted', ...(id === undefined ? {} : { id }) }
    }
    const errors = row.issues.map(({ pointer, ...rest }) => ({ column: pointer.slice(2), ...rest }))
    return { row: row.row, status: 'refused', errors }
  })
  return { body: { dryRun, accepted: good.length, refused: rows.length - good.length, rows: report } }
}

const [keyPath, memberPath] = ['/v1/materials', '/portal/v1/materials']
const oneAt = (path: string) => `${path}/{materialId}`
const reads = { ...byMember, permission: 'materials:read' } as const
const writes = { ...byMember, permission: 'materials:write' } as const

/* The import comes first of the paths below the list, since "import" is no id. */
export const materialOperations = [
  operation({ ...list, ...keyReads, id: 'listMaterials', path: keyPath, handle: handleList }),
  operation({ ...create, ...keyWrites, id: 'createMaterial', path: keyPath, handle: handleCreate }),
  operation({ ...importAll, ...keyWrites, id: 'importMaterials', path: `${keyPath}/import`, handle: handleImport }),
  operation({ ...read, ...keyReads, id: 'readMaterial', path: oneAt(keyPath), handle: handleRead }),
  operation({ ...replace, ...keyWrites, id: 'replaceMaterial', path: oneAt(keyPath), handle: handleReplace }),
  operation({ ...remove, ...keyWrites, id: 'deleteMaterial', path: oneAt(keyPath), handle: handleRemove }),
]

const catalogue = operation({
  ...about,
  id: 'listCatalogueMaterials',
  document: 'portal',
  method: 'get',
  path: `${memberPath}/catalogue`,
  summary: 'List the catalogue of materials',
  description: 'The whole catalogue at once, for pages that need no sign-in.',
  access: 'public',
  status: 200,
  answer: z.strictObject({ materials: z.array(materialSchema) }).meta({ id: 'MaterialCatalogue' }),
  handle: () => ({ body: { materials: genericMaterials.map(shownMaterial) } }),
})

export const memberMaterialOperations = [
  catalogue,
  operation({ ...list, ...reads, id: 'listAccountMaterials', path: memberPath, handle: handleList }),
  operation({ ...create, ...writes, id: 'createAccountMaterial', path: memberPath, handle: handleCreate }),
  operation({
    ...importAll,
    ...writes,
    id: 'importAccountMaterials',
    path: `${memberPath}/import`,
    handle: handleImport,
  }),
  operation({ ...read, ...reads, id: 'readAccountMaterial', path: oneAt(memberPath), handle: handleRead }),
  operation({ ...replace, ...writes, id: 'replaceAccountMaterial', path: oneAt(memberPath), handle: handleReplace }),
  operation({ ...remove, ...writes, id: 'deleteAccountMaterial', path: oneAt(memberPath), handle: handleRemove }),
]
