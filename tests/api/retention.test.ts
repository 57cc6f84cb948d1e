import pg from 'pg'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { KEPT_DAYS, dropOldLog } from '../../api/requests/retention.ts'
import { type TestDatabase, createTestDatabase } from './harness/database.ts'

let database: TestDatabase
let pool: pg.Pool
beforeAll(async () => {
  database = await createTestDatabase()
  pool = new pg.Pool({ connectionString: database.url, max: 4 })
})
afterAll(async () => {
  await pool.end()
  await database.drop()
})

const line = `
  INSERT INTO log (at, id, method, path, status, milliseconds, bytes_in, bytes_out, points, solver)
  SELECT (((now() AT TIME ZONE 'UTC')::date - $1::int)::timestamp + interval '12 hours') AT TIME ZONE 'UTC',
    'req_' || $1, 'GET', '/', 200, 1, 0, 0, 0, '1'`
const addDay = async (ago: number) => {
  await pool.query("SELECT create_partitions(d, d) FROM (SELECT (now() AT TIME ZONE 'UTC')::date - $1::int AS d) x", [
    ago,
  ])
  await pool.query(line, [ago])
}
const kept = async () => (await pool.query<{ id: string }>('SELECT id FROM log ORDER BY at')).rows.map((row) => row.id)

test('days of the log are dropped once they are no longer kept, and no other', async () => {
  for (const ago of [KEPT_DAYS + 40, KEPT_DAYS + 1, KEPT_DAYS, 1, 0]) await addDay(ago)
  await pool.query(line, [KEPT_DAYS + 300])
  await pool.query(line, [KEPT_DAYS - 1])
  const ledgers = async () => (await pool.query("SELECT relname FROM pg_class WHERE relname ~ '^ledger_'")).rowCount
  const before = await ledgers()
  const dropped = await Promise.all([dropOldLog(pool), dropOldLog(pool)])
  expect(dropped[0] + dropped[1]).toBe(2)
  expect(await kept()).toEqual([KEPT_DAYS, KEPT_DAYS - 1, 1, 0].map((ago) => `req_${ago}`))
  expect(await ledgers()).toBe(before)
  expect(await dropOldLog(pool)).toBe(0)
})

test('a day that is being read is left for the next turn, and calls are logged meanwhile', async () => {
  await addDay(KEPT_DAYS + 5)
  const reader = await pool.connect()
  try {
    await reader.query('BEGIN')
    await reader.query('SELECT count(*) FROM log')
    await expect(dropOldLog(pool)).rejects.toThrow(/lock timeout/)
    await pool.query(line, [2])
    await reader.query('COMMIT')
  } finally {
    reader.release()
  }
  expect(await dropOldLog(pool)).toBe(1)
})
