import { afterAll, beforeAll, expect, test } from 'vitest'
import { createPool } from '../../api/database.ts'
import { createLog } from '../../api/log.ts'
import { sweep } from '../../api/metering/sweep.ts'
import semiInfinite from '../../solvers/cases/semi-infinite-convection/case.ts'
import { Client } from '../api/harness/client.ts'
import { type TestDatabase, createTestDatabase } from '../api/harness/database.ts'
import { makeKey, query, signUp } from '../api/harness/people.ts'
import { startProcess } from '../api/harness/processes.ts'

let database: TestDatabase
beforeAll(async () => {
  database = await createTestDatabase()
})
afterAll(() => database.drop())

const sql = <R extends object>(text: string, values: unknown[] = []) =>
  query<R & Record<string, unknown>>(database.url, text, values)
const sumsOf = (accountId: string) =>
  sql(
    `SELECT (SELECT sum(points)::int FROM ledger WHERE account_id = $1) AS ledger,
       (SELECT sum(used)::int FROM periods WHERE account_id = $1) AS account,
       (SELECT sum(used)::int FROM key_periods JOIN keys ON id = key_id WHERE account_id = $1) AS keys`,
    [accountId],
  )

async function sweepLater(): Promise<number> {
  await sql("UPDATE open_charges SET at = at - interval '3 minutes'")
  const pool = createPool(database.url, 2, createLog('silent'))
  try {
    return await sweep(pool)
  } finally {
    await pool.end()
  }
}

const long = {
  ...semiInfinite.example,
  depths: Array.from({ length: 100 }, (_, i) => (i + 1) / 1000),
  times: Array.from({ length: 900 }, (_, i) => (i + 1) * 60.5),
}
const middling = { ...semiInfinite.example, depths: [0.01, 0.02], times: long.times.slice(0, 150) }

test('a process killed during a long solve keeps no points', async () => {
  const api = await startProcess(database.url)
  const { client, accountId } = await signUp(api.url)
  const key = await makeKey(client)
  const lost = client.solve(semiInfinite.id, key.secret, long).then(
    (answer) => answer.status,
    () => 'lost',
  )
  while ((await sql('SELECT FROM ledger WHERE key_id = $1', [key.id])).length === 0);
  api.child.kill('SIGKILL')
  expect(await lost).toBe('lost')
  expect(await sumsOf(accountId)).toEqual([{ ledger: 90_000, account: 90_000, keys: 90_000 }])
  expect(await sweepLater()).toBe(1)
  expect(await sumsOf(accountId)).toEqual([{ ledger: 0, account: 0, keys: 0 }])
  expect(await sweepLater()).toBe(0)
})

test('a process killed under load keeps each answered call, and no charge of a long one that was not', async () => {
  const api = await startProcess(database.url)
  const { client, accountId } = await signUp(api.url)
  await sql('UPDATE accounts SET trial_limit = 1000000000 WHERE id = $1', [accountId])
  const key = await makeKey(client)
  const answered: string[] = []
  const clients = Array.from({ length: 16 }, async (_, i) => {
    const own = new Client(api.url)
    const body = i % 2 ? middling : semiInfinite.example
    for (;;) {
      const answer = await own.solve(semiInfinite.id, key.secret, body).catch(() => undefined)
      if (!answer) return
      expect(answer.status, answer.text).toBe(200)
      answered.push(answer.headers.get('request-id') as string)
    }
  })
  while (answered.length < 200) await new Promise((resolve) => setTimeout(resolve, 10))
  api.child.kill('SIGKILL')
  await Promise.all(clients)
  await sweepLater()
  const standing = await sql<{ id: string; points: number }>(
    `SELECT request_id AS id, sum(points)::int AS points FROM ledger WHERE key_id = $1
     GROUP BY request_id HAVING sum(points) <> 0`,
    [key.id],
  )
  const stands = new Set(standing.map((row) => row.id))
  expect(answered.filter((id) => !stands.has(id))).toEqual([])
  expect(standing.length - answered.length).toBeLessThanOrEqual(16)
  const [sums] = await sumsOf(accountId)
  expect([sums?.['account'], sums?.['keys']]).toEqual([sums?.['ledger'], sums?.['ledger']])
  expect(await sql('SELECT FROM open_charges')).toEqual([])
})
