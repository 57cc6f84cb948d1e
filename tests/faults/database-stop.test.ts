import { afterAll, beforeAll, expect, test } from 'vitest'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import { startCluster } from '../../scripts/postgres.mjs'
import { migrateDatabase } from '../../api/migrate.ts'
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
  const { client } = await signUp(api.url)
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
  const [sums] = await query(
    cluster.url,
    'SELECT (SELECT sum(points)::int FROM ledger) AS ledger, (SELECT sum(used)::int FROM periods) AS used',
  )
  expect(sums?.['ledger']).toBe(sums?.['used'])
})
