import { z } from 'zod'
import { signInSchema, staffSessionSchema } from '../accounts/schemas.ts'
import { staffSession, staffSignIn } from '../accounts/sign-in.ts'
import { jsonBody, operation } from '../operation.ts'
import { Problem } from '../problems.ts'
import { foundSchema, requestParams, staffRequestSchema } from '../requests/schemas.ts'
import { storedText } from '../texts.ts'
import { findRequests, readAnyRequest } from './find.ts'

const reason = storedText('Reason', 300, 3)

const signIn = operation({
  id: 'staffSignIn',
  document: 'support',
  method: 'post',
  path: '/support/v1/sign-in',
  tag: 'Session',
  summary: 'Sign in as staff',
  description: 'Starts a staff session; only where the service is reached from its own machine alone.',
  access: 'public',
  session: true,
  limiter: 'staff-sign-in',
  body: jsonBody(signInSchema),
  status: 200,
  answer: staffSessionSchema,
  problems: ['sign-in-refused', 'forbidden'],
  example: { body: { mail: 'support@example.org', password: 'seven lime washed walls' } },
  async handle({ body, session, deps }) {
    const staffId = await staffSignIn(deps, body)
    await session.start({ staffId })
    return { body: await staffSession(deps.db, staffId) }
  },
})

const signOut = operation({
  id: 'staffSignOut',
  document: 'support',
  method: 'post',
  path: '/support/v1/sign-out',
  tag: 'Session',
  summary: 'Sign out',
  description: 'Ends the staff session on the server, if there is one.',
  access: 'public',
  session: true,
  status: 204,
  async handle({ session }) {
    await session.end()
    return {}
  },
})

const readSession = operation({
  id: 'readStaffSession',
  document: 'support',
  method: 'get',
  path: '/support/v1/session',
  tag: 'Session',
  summary: 'Read the staff session',
  access: 'staff',
  permission: 'staff-session:read',
  status: 200,
  answer: staffSessionSchema,
  handle: async ({ caller, deps }) => ({ body: await staffSession(deps.db, caller.staffId) }),
})

const find = operation({
  id: 'findRequests',
  document: 'support',
  method: 'post',
  path: '/support/v1/find',
  tag: 'Requests',
  summary: 'Find requests',
  description: 'By request id, or by what may be shown of a key. The look is put on record with its reason.',
  access: 'staff',
  permission: 'any-request:find',
  body: jsonBody(
    z
      .strictObject({
        query: storedText('Query', 100, 6).meta({
          title: 'Query',
          description: 'A request id, or a key as it is listed: its environment and first six characters.',
          'x-accepted': 'a request id, or a key prefix such as soak_trial_AbC123',
        }),
        reason,
      })
      .meta({ id: 'Find' }),
  ),
  status: 200,
  answer: foundSchema,
  example: { body: { query: 'req_019283746570700080000123456789ab', reason: 'The customer asks why a call failed.' } },
  handle: async ({ body, caller, deps }) => ({ body: { requests: await findRequests(deps, caller, body) } }),
})

const read = operation({
  id: 'readAnyRequest',
  document: 'support',
  method: 'post',
  path: '/support/v1/requests/{requestId}/read',
  tag: 'Requests',
  summary: 'Read one request of any account',
  description:
    'A call as it was logged, with its account, key and entries in the ledger. The look is put on record with its reason.',
  access: 'staff',
  permission: 'any-request:read',
  params: requestParams,
  body: jsonBody(z.strictObject({ reason }).meta({ id: 'Look' })),
  status: 200,
  answer: staffRequestSchema,
  example: {
    params: { requestId: 'req_019283746570700080000123456789ab' },
    body: { reason: 'The customer asks why a call failed.' },
  },
  async handle({ params, body, caller, deps }) {
    const request = await readAnyRequest(deps, caller, params.requestId, body.reason)
    if (!request) throw new Problem('not-found', 'There is no request with this id.')
    return { body: request }
  },
})

export const supportOperations = [signIn, signOut, readSession, find, read]
