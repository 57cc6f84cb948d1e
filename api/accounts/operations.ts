import { jsonBody, operation } from '../operation.ts'
import { sessionSchema, signInSchema, signUpSchema } from './schemas.ts'
import { readSession, signIn } from './sign-in.ts'
import { signUp } from './sign-up.ts'

const example = { mail: 'mara.lindqvist@example.org', password: 'seven lime washed walls' }

const signUpOperation = operation({
  id: 'signUp',
  document: 'portal',
  method: 'post',
  path: '/portal/v1/sign-up',
  tag: 'Session',
  summary: 'Open an account and sign in',
  description: 'Makes an account with its owner and starts a session.',
  access: 'public',
  session: true,
  limiter: 'sign-up',
  body: jsonBody(signUpSchema),
  status: 201,
  answer: sessionSchema,
  problems: ['mail-in-use'],
  example: {
    body: { ...example, mail: 'noor.almqvist@example.org', name: 'Noor Almqvist', accountName: 'Lime & Larch' },
  },
  async handle({ body, session, deps }) {
    const { personId, accountId } = await signUp(deps, body)
    await session.start({ personId, accountId })
    return { body: await readSession(deps.db, personId, accountId) }
  },
})

const signInOperation = operation({
  id: 'signIn',
  document: 'portal',
  method: 'post',
  path: '/portal/v1/sign-in',
  tag: 'Session',
  summary: 'Sign in',
  description: 'Starts a session of 12 hours under a new id.',
  access: 'public',
  session: true,
  limiter: 'sign-in',
  body: jsonBody(signInSchema),
  status: 200,
  answer: sessionSchema,
  problems: ['sign-in-refused'],
  example: { body: example },
  async handle({ body, session, deps }) {
    const { personId, accountId } = await signIn(deps, body)
    await session.start({ personId, accountId })
    return { body: await readSession(deps.db, personId, accountId) }
  },
})

const signOutOperation = operation({
  id: 'signOut',
  document: 'portal',
  method: 'post',
  path: '/portal/v1/sign-out',
  tag: 'Session',
  summary: 'Sign out',
  description: 'Ends the session on the server, if there is one.',
  access: 'public',
  session: true,
  status: 204,
  async handle({ session }) {
    await session.end()
    return {}
  },
})

const sessionOperation = operation({
  id: 'readSession',
  document: 'portal',
  method: 'get',
  path: '/portal/v1/session',
  tag: 'Session',
  summary: 'Read the session',
  description: 'Who is signed in, to which account, in which role.',
  access: 'session',
  permission: 'session:read',
  status: 200,
  answer: sessionSchema,
  handle: async ({ caller, deps }) => ({ body: await readSession(deps.db, caller.personId, caller.accountId) }),
})

export const accountOperations = [signUpOperation, signInOperation, signOutOperation, sessionOperation]
