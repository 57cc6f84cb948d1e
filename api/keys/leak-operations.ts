import { z } from 'zod'
import { jsonBody, operation } from '../operation.ts'
import { revokeLeaked } from './change-key.ts'
import { KEY_PATTERN, isKey } from './key.ts'

const about = { document: 'openapi', tag: 'Keys', access: 'public' } as const

const format = {
  regularExpression: KEY_PATTERN,
  checksum:
    'The last six characters: the CRC-32 (as in zlib) of the 32 characters before them alone, in base 62 with the digits 0-9, A-Z, a-z, ' +
    'the most significant first, filled up with 0.',
  example: 'soak_trial_0123456789ABCDEFGHIJKLMNOPQRSTUV1ggZdL',
  report: '/v1/leaked-keys',
}

const readFormat = operation({
  ...about,
  id: 'readKeyFormat',
  method: 'get',
  path: '/v1/key-format',
  summary: 'Read what keys look like',
  description: 'For scanners of code and messages: how to tell a key from other text without asking anybody.',
  status: 200,
  answer: z
    .strictObject({ regularExpression: z.string(), checksum: z.string(), example: z.string(), report: z.string() })
    .meta({ id: 'KeyFormat' }),
  handle: () => ({ body: format }),
})

const report = operation({
  ...about,
  id: 'reportLeakedKey',
  method: 'post',
  path: '/v1/leaked-keys',
  summary: 'Report a key that was found in public',
  description:
    'A key that works is revoked at once, and its account sees why. The answer is the same whether there is such a key or not.',
  limiter: 'leak-report',
  body: jsonBody(
    z
      .strictObject({
        key: z
          .string()
          .max(100)
          .refine(isKey, { error: 'This does not look like a key, or its checksum is wrong.' })
          .meta({ title: 'Key', description: 'The whole key.', 'x-accepted': 'a key as of /v1/key-format' }),
      })
      .meta({ id: 'LeakedKey' }),
  ),
  status: 204,
  example: { body: { key: format.example } },
  async handle({ body, call, deps }) {
    await revokeLeaked(deps.db, call.requestId, body.key)
    return {}
  },
})

export const leakOperations = [readFormat, report]
