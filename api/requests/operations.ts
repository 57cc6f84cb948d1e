import { type Context, operation } from '../operation.ts'
import { Problem } from '../problems.ts'
import { listRequests, readRequest } from './queries.ts'
import { requestListQuery, requestListSchema, requestParams, requestSchema } from './schemas.ts'

const shared = {
  method: 'get',
  tag: 'Requests',
  summary: 'Read one request',
  description: 'A call as it was logged, joined with its entries in the ledger. The body of a call is not kept.',
  params: requestParams,
  status: 200,
  answer: requestSchema,
  example: { params: { requestId: 'req_019283746570700080000123456789ab' } },
} as const

async function handle({ params, caller, deps }: Context<{ requestId: string }, unknown, unknown, 'key' | 'session'>) {
  const body = await readRequest(deps.pool, params.requestId, caller.accountId)
  if (!body) throw new Problem('not-found', 'The account has no request with this id.')
  const { account: _, ...request } = body
  return { body: request }
}

export const keyRequest = operation({
  ...shared,
  id: 'readRequest',
  document: 'openapi',
  path: '/v1/requests/{requestId}',
  access: 'key',
  scope: 'requests:read',
  handle,
})

const memberRequest = operation({
  ...shared,
  id: 'readAccountRequest',
  document: 'portal',
  path: '/portal/v1/requests/{requestId}',
  access: 'session',
  permission: 'requests:read',
  handle,
})

const memberRequests = operation({
  id: 'listAccountRequests',
  document: 'portal',
  method: 'get',
  path: '/portal/v1/requests',
  tag: 'Requests',
  summary: 'List the requests of the account',
  description: 'Newest first, in pages.',
  access: 'session',
  permission: 'requests:read',
  query: requestListQuery,
  status: 200,
  answer: requestListSchema,
  handle: async ({ query, caller, deps }) => ({ body: await listRequests(deps.pool, caller.accountId, query) }),
})

export const memberRequestOperations = [memberRequests, memberRequest]
