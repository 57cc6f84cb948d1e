import { request } from 'node:http'
import type pg from 'pg'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { sweep } from '../../api/metering/sweep.ts'
import { newId } from '../../api/ids.ts'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import { expectBooks } from './harness/books.ts'
import { Client } from './harness/client.ts'
import { makeKey, query, signUp } from './harness/people.ts'
import { type ApiProcess, startProcess } from './harness/processes.ts'
import { type TestService, startTestService } from './harness/service.ts'

let service: TestService
const processes: ApiProcess[] = []
beforeAll(async () => {
  service = await startTestService()
  processes.push(...(await Promise.all([startProcess(service.databaseUrl), startProcess(service.databaseUrl)])))
})
afterAll(async () => {
  await Promise.all(processes.map((p) => p.end()))
  await service.close()
})

const sql = <R extends object>(text: string, values: unknown[] = []) =>
  query<R & Record<string, unknown>>(service.databaseUrl, text, values)
const sumOf = async (keyId: string) =>
  Number((await sql<{ sum: string | null }>('SELECT sum(points) FROM ledger WHERE key_id = $1', [keyId]))[0]?.sum ?? 0)
const usedOf = async (accountId: string) =>
  Number(
    (await sql<{ sum: string | null }>('SELECT sum(used) FROM periods WHERE account_id = $1', [accountId]))[0]?.sum ??
      0,
  )

/** Too large to be solved before it is charged. */
const large = { ...lumped.example, times: Array.from({ length: 300 }, (_, i) => i + 1) }

const CLIENTS = 64
const CALLS_EACH = 4

/** 64 clients on two processes at once; gives the answers. */
async function race(secret: string) {
  const answers = await Promise.all(
    Array.from({ length: CLIENTS }, async (_, i) => {
      const client = new Client(processes[i % processes.length]?.url ?? '')
      const own = []
      for (let n = 0; n < CALLS_EACH; n++) own.push(await client.solve(lumped.id, secret, lumped.example))
      return own
    }),
  )
  return answers.flat()
}

test.each(['the account', 'the key'])('64 clients on two processes get exactly the quota of %s', async (whose) => {
  const { client, accountId } = await signUp(service.url)
  if (whose === 'the account') await sql('UPDATE accounts SET trial_limit = 1000 WHERE id = $1', [accountId])
  const key = await makeKey(client, whose === 'the key' ? { quota: 1000 } : {})
  const answers = await race(key.secret)
  const [ok, refused] = [200, 429].map((status) => answers.filter((a) => a.status === status))
  expect(ok).toHaveLength(100)
  expect(refused).toHaveLength(CLIENTS * CALLS_EACH - 100)
  for (const answer of refused ?? []) expect(answer.json).toMatchObject({ code: 'quota-exceeded', retryable: false })
  expect(refused?.[0]?.json.detail).toContain(whose)
  expect(await usedOf(accountId)).toBe(1000)
  expect(await sumOf(key.id)).toBe(1000)
  const charged = await sql<{ request_id: string }>('SELECT request_id FROM ledger WHERE key_id = $1', [key.id])
  expect(charged.map((row) => row.request_id).sort()).toEqual(ok?.map((a) => a.headers.get('request-id')).sort())
  await expectBooks(service.databaseUrl, accountId)
})

test('large and small calls race for one quota, and the books agree', async () => {
  const { client, accountId } = await signUp(service.url)
  const key = await makeKey(client, { quota: 3200 })
  const answers = await Promise.all(
    Array.from({ length: 60 }, (_, i) =>
      new Client(processes[(i >> 1) % processes.length]?.url ?? '').solve(
        lumped.id,
        key.secret,
        i % 2 ? large : lumped.example,
      ),
    ),
  )
  const sum = answers.map((a) => Number(a.headers.get('points-charged') ?? 0)).reduce((a, b) => a + b)
  expect(new Set(answers.map((a) => a.status))).toEqual(new Set([200, 429]))
  expect(await sumOf(key.id)).toBe(sum)
  expect(await sql('SELECT FROM open_charges')).toEqual([])
  await expectBooks(service.databaseUrl, accountId)
})

test('an account without points does not take others down with it', async () => {
  const [rich, poor] = [await signUp(service.url), await signUp(service.url)]
  const [richKey, poorKey] = [await makeKey(rich.client), await makeKey(poor.client, { quota: 30 })]
  const charge = (accountId: string, keyId: string) =>
    service.service.deps.meter.spend({ requestId: newId('req'), accountId, keyId, caseId: lumped.id, points: 10 }).then(
      () => true,
      () => false,
    )
  const all = Array.from({ length: 200 }, (_, i) =>
    i % 2 ? charge(rich.accountId, richKey.id) : charge(poor.accountId, poorKey.id),
  )
  const granted = await Promise.all(all)
  expect(granted.filter((_, i) => i % 2)).toEqual(Array(100).fill(true))
  expect(granted.filter((_, i) => i % 2 === 0)).toEqual([true, true, true, ...Array(97).fill(false)])
  expect([await usedOf(rich.accountId), await usedOf(poor.accountId)]).toEqual([1000, 30])
  for (const { accountId } of [rich, poor]) await expectBooks(service.databaseUrl, accountId, { logged: false })
})

test('one faulty charge of a gather fails alone', async () => {
  const { client, accountId } = await signUp(service.url)
  const key = await makeKey(client)
  const twice = newId('req')
  const charge = (requestId: string) =>
    service.service.deps.meter.spend({ requestId, accountId, keyId: key.id, caseId: lumped.id, points: 10 })
  const outcomes = await Promise.allSettled([
    charge(newId('req')),
    charge(newId('req')),
    charge(twice),
    charge(twice),
    charge(newId('req')),
  ])
  expect(outcomes.map((o) => o.status).filter((s) => s === 'rejected')).toHaveLength(1)
  expect(await usedOf(accountId)).toBe(40)
  expect(await sumOf(key.id)).toBe(40)
  await expectBooks(service.databaseUrl, accountId, { logged: false })
})

test('a limit lowered below what was used refuses, and takes nothing back', async () => {
  const { client, accountId } = await signUp(service.url)
  const { secret } = await makeKey(client)
  expect((await client.solve(lumped.id, secret, lumped.example)).status).toBe(200)
  await sql('UPDATE periods SET "limit" = 5 WHERE account_id = $1', [accountId])
  const answer = await client.solve(lumped.id, secret, lumped.example)
  expect(answer.status).toBe(429)
  expect(answer.headers.get('points-remaining')).toBe('0')
  expect(await usedOf(accountId)).toBe(10)
  await expectBooks(service.databaseUrl, accountId)
})

test('what fails after the charge costs nothing', async () => {
  const { client, accountId } = await signUp(service.url)
  const key = await makeKey(client)
  const { compute, requestLog } = service.service.deps
  const { solve } = compute
  compute.solve = () => Promise.reject(new Error('a planted fault with a text of its own'))
  const answer = await client.solve(lumped.id, key.secret, large).finally(() => (compute.solve = solve))
  expect(answer.json).toMatchObject({ status: 500, code: 'internal' })
  expect(answer.text).not.toContain('planted')
  const entries = await sql(
    'SELECT kind, points::int, day = (SELECT min(day) FROM ledger WHERE key_id = $1) AS same FROM ledger WHERE key_id = $1 ORDER BY kind',
    [key.id],
  )
  expect(entries).toEqual([
    { kind: 'charge', points: 300, same: true },
    { kind: 'refund', points: -300, same: true },
  ])
  expect(await usedOf(accountId)).toBe(0)
  await requestLog.flush()
  const seen = await client.call(`/portal/v1/requests/${answer.headers.get('request-id')}`)
  expect(seen.json).toMatchObject({ status: 500, points: 0, problem: { code: 'internal' } })
  const usage = await client.call('/portal/v1/usage')
  expect(usage.json.total).toEqual({ calls: 0, points: 0, refused: 1 })
  await expectBooks(service.databaseUrl, accountId)
})

test('a call in absolute form is served, charged and logged', async () => {
  const { client, accountId } = await signUp(service.url)
  const key = await makeKey(client)
  const { hostname, port } = new URL(service.url)
  const path = `/v1/cases/${lumped.id}/solve`
  const status = await new Promise((resolve, reject) =>
    request({ hostname, port, method: 'POST', path: `http://soakstone.example${path}`, agent: false })
      .setHeader('authorization', `Bearer ${key.secret}`)
      .setHeader('content-type', 'application/json')
      .once('response', (response) => response.resume().once('end', () => resolve(response.statusCode)))
      .once('error', reject)
      .end(JSON.stringify(lumped.example)),
  )
  expect(status).toBe(200)
  await service.service.deps.requestLog.flush()
  expect(await sql('SELECT path, points::int FROM log WHERE account_id = $1', [accountId])).toEqual([
    { path, points: 10 },
  ])
  await expectBooks(service.databaseUrl, accountId)
})

test('a commit of unknown outcome answers 503, and the sweep gives back what was charged', async () => {
  const { client, accountId } = await signUp(service.url)
  const key = await makeKey(client)
  const { pool, requestLog } = service.service.deps
  const connect = pool.connect.bind(pool) as (...args: unknown[]) => Promise<pg.PoolClient>
  let faults = 0
  pool.connect = (async (...given: unknown[]) => {
    const real = await connect(...given)
    if (given.length > 0) return real
    const ask = real.query.bind(real) as (...args: unknown[]) => Promise<unknown>
    real.query = (async (...args: unknown[]) => {
      const result = await ask(...args)
      if (args[0] === 'COMMIT' && faults++ === 0)
        throw Object.assign(new Error('read ECONNRESET'), { code: 'ECONNRESET' })
      return result
    }) as typeof real.query
    return real
  }) as unknown as typeof pool.connect
  const answer = await client
    .solve(lumped.id, key.secret, lumped.example)
    .finally(() => (pool.connect = connect as typeof pool.connect))
  expect(answer.json).toMatchObject({ status: 503, code: 'unavailable', retryable: true })
  expect(answer.headers.get('retry-after')).toBe('2')
  expect(await sumOf(key.id)).toBe(10)
  await requestLog.flush()
  expect(await sweep(pool)).toBe(1)
  expect(await sweep(pool)).toBe(0)
  expect([await sumOf(key.id), await usedOf(accountId)]).toEqual([0, 0])
  await expectBooks(service.databaseUrl, accountId)
})

test('the ledger takes no change', async () => {
  for (const text of [
    'UPDATE ledger SET points = 0',
    'DELETE FROM ledger',
    'UPDATE audit SET reason = $$other$$',
    'DELETE FROM audit',
    'TRUNCATE ledger',
    'TRUNCATE ledger_default',
    `TRUNCATE ledger_${new Date().toISOString().slice(0, 7).replace('-', '')}`,
    'TRUNCATE audit',
  ])
    await expect(sql(text)).rejects.toThrow(/insert-only/)
})
