import connectPgSimple from 'connect-pg-simple'
import type { Request, RequestHandler } from 'express'
import session from 'express-session'
import type { Deps } from '../deps.ts'
import type { SessionHandle } from '../operation.ts'

declare module 'express-session' {
  interface SessionData {
    personId: string
    accountId: string
    staffId: string
  }
}

const PgStore = connectPgSimple(session)
const HOURS = 3_600_000
const kinds = {
  member: { cookie: 'soakstone', tableName: 'sessions', hours: 12 },
  staff: { cookie: 'soakstone-staff', tableName: 'staff_sessions', hours: 8 },
} as const

/** Sessions of one kind. They end a fixed time after sign-in, so that reading one writes nothing. */
export function sessionsOf(
  kind: keyof typeof kinds,
  { pool, config, log }: Deps,
): { handler: RequestHandler; close(): void } {
  const { cookie, tableName, hours } = kinds[kind]
  const store = new PgStore({
    pool,
    tableName,
    createTableIfMissing: false,
    disableTouch: true,
    errorLog: (...words: unknown[]) => log.warn({ words: words.map(String) }, 'the session store met an error'),
  })
  const handler = session({
    name: config.https ? `__Host-${cookie}` : cookie,
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
