import { afterAll, beforeAll, expect, test } from 'vitest'
import { sweep } from '../../api/metering/sweep.ts'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import { expectBooks } from './harness/books.ts'
import { createTestDatabase } from './harness/database.ts'
import { gate } from './harness/gate.ts'
import { makeKey, query, signUp } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'

let service: TestService
beforeAll(async () => {
  service = await startTestService()
})
afterAll(() => service.close())

const sql = <R extends object>(text: string, values: unknown[] = []) =>
  query<R & Record<string, unknown>>(service.databaseUrl, text, values)
const sumOf = async (keyId: string) =>
  (await sql<{ sum: number | null }>('SELECT sum(points)::int FROM ledger WHERE key_id = $1', [keyId]))[0]?.sum ?? 0
const usedOf = async (accountId: string) =>
  (await sql<{ sum: number }>('SELECT sum(used)::int FROM periods WHERE account_id = $1', [accountId]))[0]?.sum

/** Too large to be solved before it is charged. */
const large = { ...lumped.example, times: Array.from({ length: 300 }, (_, i) => i + 1) }

/** Sends a call, and hangs up once `reached` resolves. */
async function hangUp(secret: string, body: object, reached: Promise<void>, { url } = service): Promise<void> {
  const ending = new AbortController()
  const lost = fetch(`${url}/v1/cases/${lumped.id}/solve`, {
    method: 'POST',
    headers: { authorization: `Bearer ${secret}`, 'content-type': 'application/json' },
    body: JSON.stringify(body),
    signal: ending.signal,
  })
  await reached
  ending.abort()
  await expect(lost).rejects.toThrow()
}

/** Holds the next calls to one function of the service until `go`. */
function holdUp<K extends string>(owner: Record<K, (...args: never[]) => Promise<unknown>>, name: K) {
  const real = owner[name]
  const [at, on] = [gate(), gate()]
  owner[name] = (async (...args: never[]) => {
    at.open()
    await on.passed
    return real(...args)
  }) as typeof real
  const go = () => {
    owner[name] = real
    on.open()
  }
  return { reached: at.passed, go }
}

const logOf = (accountId: string) =>
  sql('SELECT status, points::int, operation FROM log WHERE account_id = $1', [accountId])

test.each([
  ['during the solve', 'compute', 'solve'],
  ['while the charge is made final', 'meter', 'close'],
] as const)('a client that hangs up %s of a call that was charged pays', async (_, part, step) => {
  const { client, accountId } = await signUp(service.url)
  const key = await makeKey(client)
  const { deps } = service.service
  const held = holdUp(deps[part] as never, step as never)
  await hangUp(key.secret, large, held.reached)
  await new Promise((resolve) => setTimeout(resolve, 100))
  expect(await logOf(accountId)).toEqual([])
  held.go()
  await deps.requestLog.flush()
  expect(await sumOf(key.id)).toBe(300)
  expect(await logOf(accountId)).toEqual([{ status: 499, points: 300, operation: 'solve' }])
  await expectBooks(service.databaseUrl, accountId)
})

test.each([
  ['small', lumped.example, 10],
  ['large', large, 300],
] as const)('log and ledger agree where a client hangs up while a %s call is charged', async (_, body, points) => {
  const { client, accountId } = await signUp(service.url)
  const key = await makeKey(client)
  const { deps } = service.service
  const held = holdUp(deps.meter as never, 'spend' as never)
  await hangUp(key.secret, body, held.reached)
  await new Promise((resolve) => setTimeout(resolve, 100))
  held.go()
  await deps.requestLog.flush()
  expect(await sumOf(key.id)).toBe(points)
  expect(await logOf(accountId)).toEqual([{ status: 499, points, operation: 'solve' }])
  await expectBooks(service.databaseUrl, accountId)
})

test('a client that hangs up before the charge pays nothing', async () => {
  const { client, accountId } = await signUp(service.url)
  const key = await makeKey(client)
  const { deps } = service.service
  const held = holdUp(deps.compute as never, 'solve' as never)
  await hangUp(key.secret, lumped.example, held.reached)
  await new Promise((resolve) => setTimeout(resolve, 100))
  held.go()
  await deps.requestLog.flush()
  expect(await sql('SELECT FROM ledger WHERE key_id = $1', [key.id])).toEqual([])
  expect(await logOf(accountId)).toEqual([{ status: 499, points: 0, operation: 'solve' }])
})

test('a small call that fails in the solve is never charged', async () => {
  const { client, accountId } = await signUp(service.url)
  const key = await makeKey(client)
  const { compute } = service.service.deps
  const { solve } = compute
  compute.solve = () => Promise.reject(new Error('a planted fault'))
  const answer = await client.solve(lumped.id, key.secret, lumped.example).finally(() => (compute.solve = solve))
  expect(answer.status).toBe(500)
  expect(await sql('SELECT FROM ledger WHERE key_id = $1', [key.id])).toEqual([])
  await expectBooks(service.databaseUrl, accountId)
})

const makeOld = () => sql("UPDATE open_charges SET at = at - interval '3 minutes'")

test.each(['answered', 'hung up'])('a refund that failed is made by the sweep: %s', async (how) => {
  const { client, accountId } = await signUp(service.url)
  const key = await makeKey(client)
  const { compute, meter, pool, requestLog } = service.service.deps
  const [{ solve }, { refund }] = [compute, meter]
  const [at, on] = [gate(), gate()]
  compute.solve = async () => {
    at.open()
    await on.passed
    throw new Error('a planted fault')
  }
  meter.refund = () => Promise.reject(new Error('the database is away'))
  try {
    if (how === 'hung up') await hangUp(key.secret, large, at.passed)
    await new Promise((resolve) => setTimeout(resolve, 50))
    on.open()
    if (how === 'answered') expect((await client.solve(lumped.id, key.secret, large)).status).toBe(500)
    await requestLog.flush()
  } finally {
    Object.assign(compute, { solve })
    Object.assign(meter, { refund })
  }
  expect(await sumOf(key.id)).toBe(300)
  expect(await sweep(pool)).toBe(1)
  expect(await sweep(pool)).toBe(0)
  expect([await sumOf(key.id), await usedOf(accountId)]).toEqual([0, 0])
  await expectBooks(service.databaseUrl, accountId)
})

test('an answer that comes after its charge was taken for lost is not given', async () => {
  const { client, accountId } = await signUp(service.url)
  const key = await makeKey(client)
  const { compute, pool } = service.service.deps
  const { solve } = compute
  let young: number | undefined
  compute.solve = async (task) => {
    young = await sweep(pool)
    await makeOld()
    expect(await sweep(pool)).toBe(1)
    return solve(task)
  }
  const answer = await client.solve(lumped.id, key.secret, large).finally(() => (compute.solve = solve))
  expect(young).toBe(0)
  expect(answer.json).toMatchObject({ status: 503, code: 'unavailable' })
  expect(await sumOf(key.id)).toBe(0)
  await expectBooks(service.databaseUrl, accountId)
})

test('a service that ends waits for a call whose client has gone', async () => {
  const database = await createTestDatabase()
  try {
    const own = await startTestService({ databaseUrl: database.url })
    const { client, accountId } = await signUp(own.url)
    const key = await makeKey(client)
    const held = holdUp(own.service.deps.compute as never, 'solve' as never)
    await hangUp(key.secret, large, held.reached, own)
    const closed = own.close()
    await new Promise((resolve) => setTimeout(resolve, 300))
    held.go()
    await closed
    expect(await query(database.url, 'SELECT status, points::int FROM log WHERE account_id = $1', [accountId])).toEqual(
      [{ status: 499, points: 300 }],
    )
    await expectBooks(database.url, accountId)
  } finally {
    await database.drop()
  }
})
