import type pg from 'pg'
import type { z } from 'zod'
import { instantOf } from '../ids.ts'
import { invalidParameter } from '../problems.ts'
import type { requestListQuery } from './schemas.ts'

const PAGE = 50

const entry = `
  g.id, g.at, g.method, g.path, g.case_id, g.operation, g.status, g.milliseconds, g.points, g.problem, g.reference, g.trace_id,
  k.id AS key_id, k.name AS key_name, k.prefix AS key_prefix, a.id AS account_id, a.name AS account_name`
const joined = 'log g LEFT JOIN keys k ON k.id = g.key_id LEFT JOIN accounts a ON a.id = g.account_id'

export interface LogRow {
  id: string
  at: Date
  method: string
  path: string
  case_id: string | null
  operation: string | null
  status: number
  milliseconds: number
  points: string
  problem: { code: string } | null
  reference: string | null
  trace_id: string | null
  key_id: string | null
  key_name: string
  key_prefix: string
  account_id: string | null
  account_name: string
}

function toEntry(row: LogRow) {
  return {
    id: row.id,
    at: row.at.toISOString(),
    key: row.key_id ? { id: row.key_id, name: row.key_name, prefix: row.key_prefix } : null,
    method: row.method,
    path: row.path,
    case: row.case_id,
    operation: row.operation,
    status: row.status,
    milliseconds: row.milliseconds,
    points: Number(row.points),
    problem: row.problem?.code ?? null,
    reference: row.reference,
    traceId: row.trace_id,
  }
}

const accountOf = (row: LogRow) => (row.account_id ? { id: row.account_id, name: row.account_name } : null)

const ranges = { ok: [100, 399], refused: [400, 499], failed: [500, 599] } as const

/** One page of an account's calls, newest first. */
export async function listRequests(pool: pg.Pool, accountId: string, query: z.output<typeof requestListQuery>) {
  const values: unknown[] = [accountId]
  const conditions = ['g.account_id = $1']
  const add = (condition: (...places: string[]) => string, ...added: unknown[]) => {
    conditions.push(condition(...added.map((value) => `$${values.push(value)}`)))
  }
  if (query.cursor) {
    const last = idOf(query.cursor)
    add((at, id) => `(g.at, g.id) < (${at}, ${id})`, instantOf(last), last)
  }
  if (query.keyId) add((keyId) => `g.key_id = ${keyId}`, query.keyId)
  if (query.reference) add((reference) => `g.reference = ${reference}`, query.reference)
  if (query.status) add((low, high) => `g.status BETWEEN ${low} AND ${high}`, ...ranges[query.status])
  const { rows } = await pool.query<LogRow>(
    `SELECT ${entry} FROM ${joined} WHERE ${conditions.join(' AND ')} ORDER BY g.at DESC, g.id DESC LIMIT ${PAGE + 1}`,
    values,
  )
  const requests = rows.slice(0, PAGE).map(toEntry)
  const last = requests.at(-1)
  return { requests, next: rows.length > PAGE && last ? Buffer.from(last.id).toString('base64url') : null }
}

function idOf(cursor: string): string {
  const id = Buffer.from(cursor, 'base64url').toString()
  if (instantOf(id)) return id
  const detail = 'The cursor was not given out by this list.'
  throw invalidParameter([{ pointer: '#/cursor', code: 'wrong-form', detail, accepted: 'next of the page before' }])
}

/** One call whole, of one account or, for staff, of any. */
export async function readRequest(pool: pg.Pool, id: string, accountId?: string) {
  const at = instantOf(id)
  if (!at) return undefined
  const { rows } = await pool.query<LogRow & { bytes_in: number; bytes_out: number; solver: string }>(
    `SELECT ${entry}, g.bytes_in, g.bytes_out, g.solver FROM ${joined}
     WHERE g.at = $1 AND g.id = $2 AND ($3::text IS NULL OR g.account_id = $3)`,
    [at, id, accountId ?? null],
  )
  const row = rows[0]
  if (!row) return undefined
  const { bytes_in: bytesIn, bytes_out: bytesOut, solver, problem } = row
  return {
    ...toEntry(row),
    bytesIn,
    bytesOut,
    problem,
    ledger: await entriesOf(pool, id, at),
    solver,
    account: accountOf(row),
  }
}

/* A charge's day is the database's, which a process's own clock may miss by a little. */
async function entriesOf(pool: pg.Pool, id: string, at: Date) {
  const { rows } = await pool.query<{ kind: 'charge' | 'refund'; points: string; at: Date }>(
    `SELECT kind, points, at FROM ledger
     WHERE request_id = $1 AND day BETWEEN ($2 AT TIME ZONE 'UTC')::date - 1 AND ($2 AT TIME ZONE 'UTC')::date + 1
     ORDER BY kind`,
    [id, at],
  )
  return rows.map((row) => ({ kind: row.kind, points: Number(row.points), at: row.at.toISOString() }))
}

/** The newest calls of keys with this prefix, for staff. */
export async function requestsOfPrefix(pool: pg.Pool, prefix: string) {
  const { rows } = await pool.query<LogRow>(
    `SELECT ${entry} FROM ${joined} WHERE g.key_id IN (SELECT key_id FROM secrets WHERE prefix = $1)
     ORDER BY g.at DESC, g.id DESC LIMIT ${PAGE}`,
    [prefix],
  )
  return rows.map((row) => ({ ...toEntry(row), account: accountOf(row) }))
}
