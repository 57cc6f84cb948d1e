import connectPgSimple from 'connect-pg-simple'
import type { Request, RequestHandler } from 'express'
import session from 'express-session'
import type { Deps } from '../deps.ts'
import type { SessionHandle } from '../operation.ts'
import { type SessionKind, cookieName, sessionKinds } from '../session-kinds.ts'

declare module 'express-session' {
  interface SessionData {
    personId: string
    accountId: string
    staffId: string
  }
}

const PgStore = connectPgSimple(session)
const HOURS = 3_600_000
/** Sessions of one kind. They end a fixed time after sign-in, so that reading one writes nothing. */
export function sessionsOf(kind: SessionKind, { pool, config, log }: Deps): { handler: RequestHandler; close(): void } {
  const { tableName, hours } = sessionKinds[kind]
  const store = new PgStore({
    pool,
    tableName,
    createTableIfMissing: false,
    disableTouch: true,
    errorLog: (...words: unknown[]) => log.warn({ words: words.map(String) }, 'the session store met an error'),
  })
  const handler = session({
    name: cookieName(kind, config.https),
    secret: config.sessionSecret,
    store,
    resave: false,
    saveUninitialized: false,
    rolling: false,
    cookie: { httpOnly: true, sameSite: 'lax', secure: config.https, path: '/', maxAge: hours * HOURS },
  })
  return { handler, close: () => void store.close() }
}

const settle = (run: (done: (error?: unknown) => void) => void) =>
  new Promise<void>((resolve, reject) => run((error) => (error ? reject(error) : resolve())))

export function handleOf(req: Request): SessionHandle {
  return {
    async start(content) {
      await settle((done) => req.session.regenerate(done))
      Object.assign(req.session, content)
      await settle((done) => req.session.save(done))
    },
    end: () => settle((done) => req.session.destroy(done)),
  }
}
