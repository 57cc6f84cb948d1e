import { z } from 'zod'
import { idField } from '../ids.ts'
import { jsonBody, operation } from '../operation.ts'
import { Problem } from '../problems.ts'
import { accountStatus } from '../usage/account-status.ts'
import { statusSchema } from '../usage/schemas.ts'
import { changeKey, revokeKey, rotateKey } from './change-key.ts'
import { createKey, selectKeys } from './queries.ts'
import { keySchema, keySettingsSchema, newKeySchema, rotationSchema, shownSecretSchema } from './schemas.ts'

const about = { document: 'portal', tag: 'Keys', access: 'session' } as const
const params = z.strictObject({ keyId: idField('key') })
const exampleId = { params: { keyId: 'key_019283746570700080000123456789ab' } }
const example = {
  name: 'Nightly run',
  quota: 20_000,
  rate: 600,
  scopes: ['solve', 'usage:read'],
  expiresAt: '2099-12-31T23:00:00Z',
  addresses: ['203.0.113.0/24', '2001:db8::/32'],
  origins: [],
}

const list = operation({
  ...about,
  id: 'listKeys',
  method: 'get',
  path: '/portal/v1/keys',
  summary: 'List keys',
  description: 'All keys of the account for its owner, own keys for an integrator.',
  permission: 'keys:read',
  status: 200,
  answer: z.strictObject({ keys: z.array(keySchema), account: statusSchema }).meta({ id: 'KeyList' }),
  async handle({ caller, deps }) {
    const [keys, account] = await Promise.all([selectKeys(deps.db, caller), accountStatus(deps.pool, caller.accountId)])
    return { body: { keys, account } }
  },
})

const create = operation({
  ...about,
  id: 'createKey',
  method: 'post',
  path: '/portal/v1/keys',
  summary: 'Make a key',
  description: 'The secret is in this answer alone and is kept nowhere.',
  permission: 'keys:create',
  body: jsonBody(newKeySchema),
  status: 201,
  answer: shownSecretSchema,
  problems: ['plan-needed', 'too-many-keys'],
  example: { body: { ...example, environment: 'trial' } },
  handle: async ({ body, caller, deps }) => ({ body: await createKey(deps.db, caller, body) }),
})

const change = operation({
  ...about,
  id: 'changeKey',
  method: 'put',
  path: '/portal/v1/keys/{keyId}',
  summary: 'Change the settings of a key',
  description: 'All settings at once; what is left out is as in a new key. They count from the next call of the key.',
  permission: 'keys:change',
  params,
  body: jsonBody(keySettingsSchema),
  status: 200,
  answer: z.strictObject({ key: keySchema }).meta({ id: 'ChangedKey' }),
  problems: ['key-revoked'],
  example: { ...exampleId, body: example },
  handle: async ({ params, body, caller, deps }) => ({
    body: { key: await changeKey(deps.db, caller, params.keyId, body) },
  }),
})

const rotate = operation({
  ...about,
  id: 'rotateKey',
  method: 'post',
  path: '/portal/v1/keys/{keyId}/rotate',
  summary: 'Give a key another secret',
  description:
    'The new secret is in this answer alone. The old one goes on for the hours stated, or ends at once; one that still overlapped from a ' +
    'rotation before ends in any case. Settings, quota and usage stay those of the key.',
  permission: 'keys:change',
  params,
  body: jsonBody(rotationSchema),
  status: 200,
  answer: shownSecretSchema,
  problems: ['key-revoked'],
  example: { ...exampleId, body: { overlapHours: 48 } },
  handle: async ({ params, body, caller, deps }) => ({
    body: await rotateKey(deps.db, caller, params.keyId, body.overlapHours),
  }),
})

const revoke = operation({
  ...about,
  id: 'revokeKey',
  method: 'post',
  path: '/portal/v1/keys/{keyId}/revoke',
  summary: 'Revoke a key',
  description: 'Takes effect with the next call of the key, in every process. It cannot be undone.',
  permission: 'keys:revoke',
  params,
  status: 200,
  answer: z.strictObject({ key: keySchema }).meta({ id: 'RevokedKey' }),
  example: exampleId,
  async handle({ params, caller, deps }) {
    const key = await revokeKey(deps.db, caller, params.keyId)
    if (!key) throw new Problem('not-found', 'There is no such key among those you may revoke.')
    return { body: { key } }
  },
})

export const keyOperations = [list, create, change, rotate, revoke]
