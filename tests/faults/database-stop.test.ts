import { afterAll, beforeAll, expect, test } from 'vitest'
import { createPool } from '../../api/database.ts'
import { createLog } from '../../api/log.ts'
import { sweep } from '../../api/metering/sweep.ts'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import { startCluster } from '../../scripts/postgres.mjs'
import { migrateDatabase } from '../../api/migrate.ts'
import { expectBooks } from '../api/harness/books.ts'
import { Client } from '../api/harness/client.ts'
import { makeKey, query, signUp } from '../api/harness/people.ts'
import { type ApiProcess, startProcess } from '../api/harness/processes.ts'

let cluster: Awaited<ReturnType<typeof startCluster>>
let api: ApiProcess
beforeAll(async () => {
  cluster = await startCluster({ ephemeral: true, durable: true })
  await migrateDatabase(cluster.url)
  api = await startProcess(cluster.url)
})
afterAll(async () => {
  await api?.end()
  await cluster?.stop()
})

test('a database that dies answers 503, the process lives, and each acknowledged call is in the ledger', async () => {
  const { client, accountId } = await signUp(api.url)
  const key = await makeKey(client)
  const answered: string[] = []
  const statuses = new Set<number>()
  let stopped = false
  const load = Array.from({ length: 8 }, async () => {
    const own = new Client(api.url)
    while (!stopped) {
      const answer = await own.solve(lumped.id, key.secret, lumped.example)
      statuses.add(answer.status)
      if (answer.status === 200) answered.push(answer.headers.get('request-id') as string)
      else await new Promise((resolve) => setTimeout(resolve, 50))
    }
  })
  while (answered.length < 50) await new Promise((resolve) => setTimeout(resolve, 20))
  await cluster.crash()
  const away = await client.solve(lumped.id, key.secret, lumped.example)
  expect(away.json).toMatchObject({ status: 503, code: 'unavailable', retryable: true })
  expect(away.headers.get('retry-after')).toBe('2')
  expect((await client.call('/readyz')).status).toBe(503)
  expect((await client.call('/portal/v1/session')).status).toBe(503)
  expect((await client.call('/healthz')).status).toBe(200)
  expect((await client.call('/v1/cases')).status).toBe(200)
  await cluster.restart()
  const before = answered.length
  for (let n = 0; n < 300 && answered.length < before + 20; n++)
    await new Promise((resolve) => setTimeout(resolve, 100))
  stopped = true
  await Promise.all(load)
  expect(answered.length).toBeGreaterThanOrEqual(before + 20)
  expect([...statuses].sort()).toEqual([200, 503])
  expect(api.child.exitCode).toBeNull()

  const rows = await query<{ request_id: string }>(
    cluster.url,
    "SELECT request_id FROM ledger WHERE key_id = $1 AND kind = 'charge'",
    [key.id],
  )
  const charged = new Set(rows.map((row) => row.request_id))
  expect(answered.filter((id) => !charged.has(id))).toEqual([])
  const pool = createPool(cluster.url, 2, createLog('silent'))
  await expectLogged(answered, key.id)
  await sweep(pool).finally(() => pool.end())
  await expectBooks(cluster.url, accountId)
})

/* Rows of calls that ended while the database was away wait for it. */
async function expectLogged(answered: string[], keyId: string): Promise<void> {
  for (let tries = 0; ; tries++) {
    const rows = await query<{ id: string }>(cluster.url, 'SELECT id FROM log WHERE key_id = $1', [keyId])
    const logged = new Set(rows.map((row) => row.id))
    const missing = answered.filter((id) => !logged.has(id))
    if (missing.length === 0) return
    if (tries === 50) expect(missing).toEqual([])
    await new Promise((resolve) => setTimeout(resolve, 100))
  }
}
