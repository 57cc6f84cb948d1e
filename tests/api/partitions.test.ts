import { afterAll, beforeAll, expect, test } from 'vitest'
import journal from '../../drizzle/migrations/meta/_journal.json' with { type: 'json' }
import { migrateDatabase } from '../../api/migrate.ts'
import { type TestDatabase, createTestDatabase } from './harness/database.ts'
import { query } from './harness/people.ts'

let database: TestDatabase
beforeAll(async () => {
  database = await createTestDatabase()
})
afterAll(() => database.drop())
const sql = <R extends object>(text: string, values: unknown[] = []) =>
  query<R & Record<string, unknown>>(database.url, text, values)

const entry = `INSERT INTO ledger (day, request_id, kind, account_id, key_id, environment, points) VALUES ($1, $2, 'charge', 'a', 'k', 'trial', 10)`
const line = `INSERT INTO log (at, id, method, path, status, milliseconds, bytes_in, bytes_out, points, solver)
  VALUES ($1, $2, 'GET', '/', 200, 1, 0, 0, 0, '1')`
const placeOf = async (table: string, id: string, column: string) =>
  (await sql<{ place: string }>(`SELECT tableoid::regclass::text AS place FROM ${table} WHERE ${column} = $1`, [id]))[0]
    ?.place

test('the coming week has its partitions from the start', async () => {
  const [row] = await sql<{ n: string }>(
    `SELECT count(*) AS n FROM generate_series(current_date - 1, current_date + 7, interval '1 day') d
     WHERE to_regclass('log_' || to_char(d, 'YYYYMMDD')) IS NOT NULL`,
  )
  expect(row?.n).toBe('9')
})

test('rows without a partition are caught, and move when it is made', async () => {
  await sql(entry, ['2031-05-14', 'req_far'])
  await sql(line, ['2031-05-14T23:59:59.999Z', 'req_far'])
  await sql(line, ['2031-05-15T00:00:00Z', 'req_next'])
  expect([await placeOf('ledger', 'req_far', 'request_id'), await placeOf('log', 'req_far', 'id')]).toEqual([
    'ledger_default',
    'log_default',
  ])
  expect((await sql<{ made: number }>("SELECT create_partitions('2031-05-14', '2031-05-14') AS made"))[0]?.made).toBe(2)
  expect([await placeOf('ledger', 'req_far', 'request_id'), await placeOf('log', 'req_far', 'id')]).toEqual([
    'ledger_203105',
    'log_20310514',
  ])
  expect(await placeOf('log', 'req_next', 'id')).toBe('log_default')
  expect((await sql<{ made: number }>("SELECT create_partitions('2031-05-14', '2031-05-14') AS made"))[0]?.made).toBe(0)
  await expect(sql(entry, ['2031-05-14', 'req_far'])).rejects.toThrow(/duplicate key/)
  await expect(sql('TRUNCATE ledger_203105')).rejects.toThrow(/insert-only/)
  await expect(sql('DELETE FROM ledger')).rejects.toThrow(/insert-only/)
  await sql(entry, ['2035-01-01', 'req_farther'])
  await expect(sql("DELETE FROM ledger WHERE request_id = 'req_farther'")).rejects.toThrow(/insert-only/)
})

test('days are those of UTC, whatever the zone of the connection', async () => {
  const zoned = `SET TIME ZONE 'Pacific/Auckland'; SELECT create_partitions('2032-02-01', '2032-02-02')`
  await sql(zoned)
  await sql(line, ['2032-02-01T00:00:00Z', 'req_zone'])
  expect(await placeOf('log', 'req_zone', 'id')).toBe('log_20320201')
})

test('many processes may make them at once', async () => {
  const made = await Promise.all(
    Array.from({ length: 8 }, () =>
      sql<{ made: number }>("SELECT create_partitions('2033-01-01', '2033-01-20') AS made"),
    ),
  )
  expect(made.map(([row]) => row?.made).sort()).toEqual([0, 0, 0, 0, 0, 0, 0, 21])
})

test('a look for one request reads one day', async () => {
  await sql("SELECT create_partitions('2034-01-01', '2034-01-10')")
  const plan = await sql("EXPLAIN SELECT * FROM log WHERE at = '2034-01-05T12:00:00Z' AND id = 'req_x'")
  expect(JSON.stringify(plan)).toContain('log_20340105')
  expect(JSON.stringify(plan)).not.toContain('log_20340104')
})

test('migrating twice, and twice at once, changes nothing', async () => {
  await Promise.all([migrateDatabase(database.url), migrateDatabase(database.url)])
  const [row] = await sql<{ n: string }>('SELECT count(*) AS n FROM drizzle.__drizzle_migrations')
  expect(row?.n).toBe(String(journal.entries.length))
})
