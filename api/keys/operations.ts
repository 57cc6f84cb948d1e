import { z } from 'zod'
import { idField } from '../ids.ts'
import { jsonBody, operation } from '../operation.ts'
import { Problem } from '../problems.ts'
import { instantSchema, storedText } from '../texts.ts'
import { accountStatus } from '../usage/account-status.ts'
import { statusSchema } from '../usage/schemas.ts'
import { createKey, listKeys, revokeKey } from './queries.ts'

const count = z.number().int()
const keySchema = z
  .strictObject({
    id: z.string(),
    name: z.string(),
    prefix: z
      .string()
      .meta({ description: 'Environment and the first six characters; more of a key is never shown again.' }),
    environment: z.literal('trial'),
    quota: count.nullable().meta({ description: 'Points a period of this key alone, or null.' }),
    used: count.meta({ description: 'Points used in this period.' }),
    createdAt: instantSchema,
    createdBy: z.string(),
    lastUsedAt: instantSchema.nullable(),
    revokedAt: instantSchema.nullable(),
  })
  .meta({ id: 'Key' })

const list = operation({
  id: 'listKeys',
  document: 'portal',
  method: 'get',
  path: '/portal/v1/keys',
  tag: 'Keys',
  summary: 'List keys',
  description: 'All keys of the account for its owner, own keys for an integrator.',
  access: 'session',
  permission: 'keys:read',
  status: 200,
  answer: z.strictObject({ keys: z.array(keySchema), account: statusSchema }).meta({ id: 'KeyList' }),
  async handle({ caller, deps }) {
    const [keys, account] = await Promise.all([listKeys(deps.db, caller), accountStatus(deps.pool, caller.accountId)])
    return { body: { keys, account } }
  },
})

const create = operation({
  id: 'createKey',
  document: 'portal',
  method: 'post',
  path: '/portal/v1/keys',
  tag: 'Keys',
  summary: 'Make a trial key',
  description: 'The secret is in this answer alone and is kept nowhere.',
  access: 'session',
  permission: 'keys:create',
  body: jsonBody(
    z
      .strictObject({
        name: storedText('Name', 80),
        quota: count.min(0).max(1_000_000_000).optional().meta({
          title: 'Own quota',
          description: 'Points a period for this key alone.',
          'x-accepted': 'a whole number from 0 to 1000000000',
        }),
      })
      .meta({ id: 'NewKey' }),
  ),
  status: 201,
  answer: z.strictObject({ key: keySchema, secret: z.string() }).meta({ id: 'CreatedKey' }),
  problems: ['too-many-keys'],
  example: { body: { name: 'Nightly run', quota: 20_000 } },
  handle: async ({ body, caller, deps }) => ({ body: await createKey(deps.db, caller, body) }),
})

const revoke = operation({
  id: 'revokeKey',
  document: 'portal',
  method: 'post',
  path: '/portal/v1/keys/{keyId}/revoke',
  tag: 'Keys',
  summary: 'Revoke a key',
  description: 'Takes effect with the next call of the key, in every process. It cannot be undone.',
  access: 'session',
  permission: 'keys:revoke',
  params: z.strictObject({ keyId: idField('key') }),
  status: 200,
  answer: z.strictObject({ key: keySchema }).meta({ id: 'RevokedKey' }),
  example: { params: { keyId: 'key_019283746570700080000123456789ab' } },
  async handle({ params, caller, deps }) {
    const key = await revokeKey(deps.db, caller, params.keyId)
    if (!key) throw new Problem('not-found', 'There is no such key among those you may revoke.')
    return { body: { key } }
  },
})

export const keyOperations = [list, create, revoke]
