import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres'
import pg from 'pg'
import type { Logger } from 'pino'
import * as schema from '../drizzle/schema.ts'

export type Database = NodePgDatabase<typeof schema>

/** A pool that survives the loss of its server, and waits for neither a connection nor a statement for ever. */
export function createPool(connectionString: string, max: number, log: Logger): pg.Pool {
  const pool = new pg.Pool({
    connectionString,
    max,
    connectionTimeoutMillis: 5000,
    statement_timeout: 10_000,
    query_timeout: 12_000,
    idle_in_transaction_session_timeout: 15_000,
    keepAlive: true,
    application_name: 'soakstone',
  })
  pool.on('error', (error) => log.warn({ error: error.message }, 'an idle database connection was lost'))
  pool.on('connect', (client) => client.on('error', () => undefined))
  return pool
}

export function createDatabase(pool: pg.Pool): Database {
  return drizzle(pool, { schema, casing: 'snake_case' })
}

/** The SQLSTATE or system code of an error, also where a library has wrapped it. */
export function errorCode(error: unknown): string | undefined {
  for (let at = error, depth = 0; at instanceof Error && depth < 5; at = at.cause, depth++) {
    const { code } = at as { code?: unknown }
    if (typeof code === 'string') return code
  }
  return undefined
}

const unreachable = new Set(['ECONNREFUSED', 'ECONNRESET', 'ENOTFOUND', 'ETIMEDOUT', 'EPIPE', 'EAI_AGAIN', 'ENOENT'])
const lostConnection = /Connection terminated|timeout exceeded when trying to connect|Query read timeout|not queryable/

/** The database is away, full, starting or too slow: a state that passes, and no fault of the call. */
export function databaseIsAway(error: unknown): boolean {
  const code = errorCode(error)
  if (code !== undefined) return unreachable.has(code) || /^(08|53|57|58|25P03)/.test(code)
  for (let at = error, depth = 0; at instanceof Error && depth < 5; at = at.cause, depth++)
    if (lostConnection.test(at.message)) return true
  return false
}
