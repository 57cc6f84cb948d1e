import type { z } from 'zod'
import { genericMaterial, genericMaterials } from '../../solvers/materials/generic.ts'
import { type Context, operation, statedBody } from '../operation.ts'
import { Problem } from '../problems.ts'
import { readMaterials } from './import-csv.ts'
import { listMaterials } from './list-materials.ts'
import { deleteMaterial, keepMaterials, readOwn, replaceMaterial } from './queries.ts'
import {
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

const shared = { document: 'openapi', tag: 'Materials', access: 'key' } as const
const path = '/v1/materials'
const path1 = `${path}/{materialId}`
const nothing = () =>
  new Problem('not-found', 'There is no such material among those of the catalogue and the account.')
const notOwn = () => new Problem('not-found', 'The account has no such material.')

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

const list = operation({
  ...shared,
  id: 'listMaterials',
  method: 'get',
  path,
  summary: 'List materials',
  description:
    'The catalogue, then the materials of the account by name, in pages. A solve takes the id of any of them as `material`.',
  query: materialListQuery,
  status: 200,
  answer: materialListSchema,
  handle: async ({ query, caller, deps }) => ({ body: await listMaterials(deps.db, caller.accountId, query) }),
})

const read = operation({
  ...shared,
  id: 'readMaterial',
  method: 'get',
  path: path1,
  summary: 'Read a material',
  description:
    'A material of the catalogue or of the account. The ETag of an own one is what a change names by If-Match.',
  params: materialParams,
  status: 200,
  answer: materialSchema,
  example: { params: { materialId: genericMaterials[0]?.id ?? '' } },
  async handle({ params, caller, deps }) {
    const { materialId } = params
    const material = genericMaterial(materialId) ?? (await readOwnOrNone(deps.db, caller.accountId, materialId))
    if (!material) throw nothing()
    return { body: shownMaterial(material) }
  },
})

/* What no own id looks like is not asked for. */
const readOwnOrNone = (db: Parameters<typeof readOwn>[0], accountId: string, id: string) =>
  ownMaterialParams.safeParse({ materialId: id }).success ? readOwn(db, accountId, id) : undefined

const create = operation({
  ...shared,
  id: 'createMaterial',
  method: 'post',
  path,
  summary: 'Keep a material',
  description: 'A material of the account, seen by its keys alone. Each quantity may be stated with a unit.',
  body: statedBody(newMaterialSchema),
  status: 201,
  answer: materialSchema,
  problems: ['too-many-materials'],
  example: { body: example },
  async handle({ body, caller, deps }) {
    const [material] = await keepMaterials(deps.db, caller, [body])
    if (!material) throw new Error('a material that was kept is not there')
    return { body: shownMaterial(material), headers: { Location: `${path}/${material.id}` } }
  },
})

const replace = operation({
  ...shared,
  id: 'replaceMaterial',
  method: 'put',
  path: path1,
  summary: 'Replace a material',
  description: 'All of a material of the account at once; If-Match holds the ETag of the version that was read.',
  conditional: true,
  params: ownMaterialParams,
  body: statedBody(newMaterialSchema),
  status: 200,
  answer: materialSchema,
  example: { ...ownId, body: example },
  async handle({ params, body, caller, deps, ifMatch = '' }) {
    const change = { id: params.materialId, ifMatch, wish: body }
    const material = await replaceMaterial(deps.db, caller, change)
    if (!material) throw notOwn()
    return { body: shownMaterial(material) }
  },
})

const remove = operation({
  ...shared,
  id: 'deleteMaterial',
  method: 'delete',
  path: path1,
  summary: 'Delete a material',
  description:
    'Answers that used it hold its properties and stay as they are; a solve that names it is refused from now on.',
  params: ownMaterialParams,
  status: 204,
  example: ownId,
  async handle({ params, caller, deps }) {
    if (!(await deleteMaterial(deps.db, caller, params.materialId))) throw notOwn()
    return {}
  },
})

const importAll = operation({
  ...shared,
  id: 'importMaterials',
  method: 'post',
  path: `${path}/import`,
  summary: 'Import materials from CSV',
  description:
    'The first line names the columns, in any order: those of a new material, where group may be left out. Numbers are in SI, with a decimal point. ' +
    'Rows that will do are kept, the others reported with what is wrong; at most 2,000 rows.',
  upload: {
    kind: 'text/csv',
    limit: 256 * 1024,
    description: 'Comma-separated values as of RFC 4180.',
    example: [
      'name,conductivity,density,specificHeat,state,source,confidence',
      '"Lime render, north wall",0.72,1650,950,dry,"Own laboratory, report 12",medium',
      '',
    ].join('\n'),
  },
  query: importQuery,
  status: 200,
  answer: importReportSchema,
  problems: ['too-many-materials'],
  async handle({ body, query, caller, deps }: Context<unknown, z.output<typeof importQuery>, string, 'key'>) {
    const rows = readMaterials(body)
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
  },
})

/* The import comes first of the paths below the list, since "import" is no id. */
export const materialOperations = [list, create, importAll, read, replace, remove]
