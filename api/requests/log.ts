import { setTimeout as sleep } from 'node:timers/promises'
import type pg from 'pg'
import type { Logger } from 'pino'
import { SOLVER_VERSION } from '../../solvers/version.ts'
import { databaseIsAway } from '../database.ts'
import { gather } from '../gather.ts'

export interface LogEntry {
  at: Date
  id: string
  accountId?: string
  keyId?: string
  secretId?: string
  method: string
  path: string
  caseId?: string
  operation?: string
  status: number
  milliseconds: number
  bytesIn: number
  bytesOut: number
  points: number
  problem?: object
  reference?: string
  traceId?: string
}

const names = [
  'at',
  'id',
  'accountId',
  'keyId',
  'method',
  'path',
  'caseId',
  'operation',
  'status',
  'milliseconds',
] as const
const more = ['bytesIn', 'bytesOut', 'points', 'problem', 'reference', 'traceId'] as const

const insert = {
  name: 'log-calls',
  text: `
    INSERT INTO log (at, id, account_id, key_id, method, path, case_id, operation, status, milliseconds,
      bytes_in, bytes_out, points, problem, reference, trace_id, solver)
    SELECT e.*, $17 FROM unnest($1::timestamptz[], $2::text[], $3::text[], $4::text[], $5::text[], $6::text[], $7::text[],
      $8::text[], $9::smallint[], $10::real[], $11::int[], $12::int[], $13::bigint[], $14::json[], $15::text[], $16::text[]) e
    ON CONFLICT DO NOTHING`,
}

const touchKeys = {
  name: 'touch-keys',
  text: `
    WITH used AS MATERIALIZED (SELECT * FROM unnest($1::text[], $2::text[], $3::timestamptz[]) u(key_id, secret_id, at)),
    of_secrets AS (
      UPDATE secrets s SET last_used_at = e.at FROM (SELECT secret_id, max(at) AS at FROM used GROUP BY secret_id) e
      WHERE s.id = e.secret_id AND (s.last_used_at IS NULL OR s.last_used_at < e.at - interval '5 seconds'))
    UPDATE keys k SET last_used_at = e.at FROM (SELECT key_id, max(at) AS at FROM used GROUP BY key_id) e
    WHERE k.id = e.key_id AND (k.last_used_at IS NULL OR k.last_used_at < e.at - interval '5 seconds')`,
}

/** Writes log rows, and when each key and secret was last used. */
export async function insertLog(db: pg.Pool | pg.ClientBase, entries: readonly LogEntry[]): Promise<void> {
  const columns = [...names, ...more].map((name) =>
    entries.map((e) => (name === 'problem' ? (e.problem ? JSON.stringify(e.problem) : null) : (e[name] ?? null))),
  )
  await db.query({ ...insert, values: [...columns, SOLVER_VERSION] })
  const used = entries.filter((e) => e.keyId)
  if (used.length > 0)
    await db.query({
      ...touchKeys,
      values: [used.map((e) => e.keyId), used.map((e) => e.secretId ?? null), used.map((e) => e.at)],
    })
}

/** Rows that wait for the database; more than these are counted and dropped rather than kept in memory. */
const MOST_WAITING = 20_000
/** Milliseconds between two tries while the database is away, and tries that are left once the service ends. */
const PAUSE = 500
const LAST_TRIES = 6

export interface RequestLog {
  add(entry: LogEntry): void
  /** Makes `flush` wait for a call that will be added when its handler ends. */
  hold(call: Promise<void>): void
  /** Resolves once nothing waits. */
  flush(): Promise<void>
}

export function createRequestLog(pool: pg.Pool, log: Logger): RequestLog {
  const waiting = new Set<Promise<unknown>>()
  let flushes = 0
  const write = gather((entries: LogEntry[]) => writeGathered(entries), { atOnce: 1, most: 1000 })

  /* A charge of unknown outcome is settled by its row, so rows outlast the database's absence. */
  async function writeGathered(entries: LogEntry[]): Promise<(Error | undefined)[]> {
    for (let late = 0; ; late += flushes > 0 ? 1 : 0) {
      try {
        await insertLog(pool, entries)
        return entries.map(() => undefined)
      } catch (error) {
        if (!databaseIsAway(error)) return entries.length > 1 ? oneByOne(entries) : [error as Error]
        if (late >= LAST_TRIES) return entries.map(() => error as Error)
      }
      await sleep(PAUSE)
    }
  }

  async function oneByOne(entries: LogEntry[]): Promise<(Error | undefined)[]> {
    const errors = []
    for (const one of entries) errors.push(...(await writeGathered([one])))
    return errors
  }

  function add(entry: LogEntry): void {
    if (waiting.size >= MOST_WAITING) {
      log.error({ requestId: entry.id }, 'a call could not be logged: too many wait')
      return
    }
    hold(
      write(entry).then((error) => {
        if (error) log.error({ requestId: entry.id, error: error.message }, 'a call could not be logged')
      }),
    )
  }

  function hold(work: Promise<void>): void {
    const held = work.finally(() => waiting.delete(held))
    waiting.add(held)
  }

  return {
    add,
    hold,
    async flush() {
      flushes++
      while (waiting.size > 0) await Promise.all(waiting)
      flushes--
    },
  }
}
