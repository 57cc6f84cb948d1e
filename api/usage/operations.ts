import type { z } from 'zod'
import { type KeyCaller, type MemberCaller, operation } from '../operation.ts'
import type { Deps } from '../deps.ts'
import { KEPT_DAYS } from '../requests/retention.ts'
import { readUsage } from './read-usage.ts'
import { usageQuery, usageSchema } from './schemas.ts'

const shared = {
  method: 'get',
  tag: 'Usage',
  summary: 'Read the usage of the account',
  description:
    'Sums of the ledger by UTC day, key and case, and calls that were refused, which are known for ' +
    `${KEPT_DAYS} days. The total is the sum of the rows.`,
  query: usageQuery,
  status: 200,
  answer: usageSchema,
} as const

async function handle(context: { query: z.output<typeof usageQuery>; caller: KeyCaller | MemberCaller; deps: Deps }) {
  return { body: await readUsage(context.deps.pool, context.caller.accountId, context.query) }
}

export const keyUsage = operation({
  ...shared,
  id: 'readUsage',
  document: 'openapi',
  path: '/v1/usage',
  access: 'key',
  scope: 'usage:read',
  handle,
})

export const memberUsage = operation({
  ...shared,
  id: 'readAccountUsage',
  document: 'portal',
  path: '/portal/v1/usage',
  access: 'session',
  permission: 'usage:read',
  handle,
})
