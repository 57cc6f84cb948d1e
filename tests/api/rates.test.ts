import { setTimeout as sleep } from 'node:timers/promises'
import { parseList } from 'structured-headers'
import { afterAll, beforeAll, expect, test } from 'vitest'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import type { Operation } from '../../api/operation.ts'
import { operations } from '../../api/operations.ts'
import { limitHeaders } from '../../api/metering/limit-headers.ts'
import { type Answer, Client } from './harness/client.ts'
import { gate } from './harness/gate.ts'
import { makeKey, query, signUp } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'

const cost = operations.find(({ id }) => id === `cost-${lumped.id}`) as Operation

let one: TestService
let two: TestService
beforeAll(async () => {
  one = await startTestService()
  two = await startTestService({ databaseUrl: one.databaseUrl })
})
afterAll(async () => {
  await two.close()
  await one.close()
})

const sql = <R extends object>(text: string, values: unknown[] = []) =>
  query<R & Record<string, unknown>>(one.databaseUrl, text, values)

/* A few calls of one test belong to one minute. */
async function earlyInMinute(): Promise<void> {
  while (Number((await sql<{ s: string }>('SELECT extract(second FROM now()) AS s'))[0]?.s) > 40) await sleep(500)
}

const items = (answer: Answer, name: string) =>
  Object.fromEntries(
    parseList(answer.headers.get(name) ?? '').map(([level, parameters]) => [level, Object.fromEntries(parameters)]),
  ) as Record<string, Record<string, number>>

test('limits are written as the draft says, each a member of its list', () => {
  const now = new Date('2026-03-01T10:00:30.200Z')
  const standing = { points: 90, calls: { account: { limit: 6000, left: 5999 }, key: { limit: 60, left: 0 } } }
  const charged = { decision: { granted: true as const, standing }, resetsAt: now, now }
  expect(limitHeaders({ ...charged, minuteEnds: new Date('2026-03-01T10:01:00Z') })).toEqual({
    'RateLimit-Policy': '"account";q=6000;w=60, "key";q=60;w=60',
    RateLimit: '"account";r=5999;t=30, "key";r=0;t=30',
    'Points-Remaining': '90',
  })
})

test('every call of a key counts once, whatever comes of it, and one too many is told when to come back', async () => {
  const { client, accountId } = await signUp(one.url)
  const { secret, id } = await makeKey(client, { rate: 6 })
  const headers = { authorization: `Bearer ${secret}` }
  await earlyInMinute()
  const answers = [
    await client.solve(lumped.id, secret, lumped.example),
    await client.solve(lumped.id, secret, {}),
    await client.solve(lumped.id, secret, '{'),
    await client.call('/v1/usage', { headers }),
    await client.call('/v1/requests/req_019283746570700080000123456789ab', { headers }),
    await client.post(cost.path, cost.example?.body, headers),
  ]
  expect(answers.map((a) => a.status)).toEqual([200, 422, 400, 200, 404, 200])
  answers.forEach((answer, n) => {
    expect(items(answer, 'ratelimit-policy')).toEqual({ account: { q: 6000, w: 60 }, key: { q: 6, w: 60 } })
    const { account, key } = items(answer, 'ratelimit')
    expect([account?.['r'], key?.['r']]).toEqual([6000 - n - 1, 6 - n - 1])
    expect(key?.['t']).toBeGreaterThan(0)
    expect(answer.headers.get('points-remaining')).toBe('99990')
  })
  for (const refused of [
    await client.solve(lumped.id, secret, lumped.example),
    await client.solve(lumped.id, secret, {}),
  ]) {
    expect(refused.json).toMatchObject({ status: 429, code: 'rate-limited', retryable: true })
    expect(refused.json.detail).toContain('The key may make 6 calls a minute')
    const { key } = items(refused, 'ratelimit')
    expect(key?.['r']).toBe(0)
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThanOrEqual(key?.['t'] ?? 0)
  }
  await sql("UPDATE rates SET minute = minute - interval '1 minute' WHERE subject IN ($1, $2)", [id, accountId])
  expect(items(await client.solve(lumped.id, secret, lumped.example), 'ratelimit')['key']?.['r']).toBe(5)
  expect(await sql('SELECT sum(points)::int AS sum FROM ledger WHERE key_id = $1', [id])).toEqual([{ sum: 20 }])
})

test('a key without points is refused those, and its refused calls count against no limit', async () => {
  const { client } = await signUp(one.url)
  const { secret } = await makeKey(client, { rate: 3, quota: 5 })
  await earlyInMinute()
  for (let n = 0; n < 5; n++) {
    const answer = await client.solve(lumped.id, secret, lumped.example)
    expect(answer.json).toMatchObject({ status: 429, code: 'quota-exceeded', retryable: false })
    expect(answer.headers.get('retry-after')).toBeNull()
    expect(items(answer, 'ratelimit')['key']?.['r']).toBe(3)
  }
})

test.each(['account', 'key'])(
  '64 clients on two processes make exactly the calls a minute of their %s',
  async (whose) => {
    const { client, accountId } = await signUp(one.url)
    if (whose === 'account') await sql('UPDATE accounts SET rate = 40 WHERE id = $1', [accountId])
    const keys = [
      await makeKey(client, whose === 'key' ? { rate: 40 } : {}),
      ...(whose === 'key' ? [] : [await makeKey(client)]),
    ]
    const answers = await Promise.all(
      Array.from({ length: 64 }, async (_, i) => {
        const own = new Client((i % 2 ? one : two).url)
        const secret = keys[(i >> 1) % keys.length]?.secret ?? ''
        return [await own.solve(lumped.id, secret, lumped.example), await own.solve(lumped.id, secret, lumped.example)]
      }),
    )
    const statuses = answers.flat().map((a) => a.status)
    expect(new Set(statuses)).toEqual(new Set([200, 429]))
    const minutes = await sql<{ calls: number }>(
      "SELECT count(*)::int AS calls FROM ledger WHERE account_id = $1 GROUP BY date_trunc('minute', at)",
      [accountId],
    )
    const calls = minutes.map((row) => row.calls)
    expect(Math.max(...calls)).toBe(40)
    expect(calls.reduce((a, b) => a + b)).toBe(statuses.filter((s) => s === 200).length)
  },
)

test('a key has 256 calls under way at most, and another key is not held up by them', async () => {
  const { client } = await signUp(one.url)
  const [busy, other] = [await makeKey(client), await makeKey(client)]
  const { compute, crowd } = one.service.deps
  const { solve } = compute
  const { passed, open } = gate()
  let inside = 0
  compute.solve = async (task) => {
    inside++
    await passed
    return solve(task)
  }
  try {
    const waiting = Array.from({ length: 256 }, () => client.solve(lumped.id, busy.secret, lumped.example))
    while (inside < 256) await sleep(10)
    const refused = await client.solve(lumped.id, busy.secret, lumped.example)
    expect(refused.json).toMatchObject({ status: 429, code: 'too-many-at-once', retryable: true })
    expect(refused.headers.get('retry-after')).toBe('1')
    const headers = { authorization: `Bearer ${other.secret}` }
    expect((await client.call('/v1/usage', { headers })).status).toBe(200)
    open()
    const statuses = (await Promise.all(waiting)).map((answer) => answer.status)
    expect(new Set(statuses)).toEqual(new Set([200]))
    expect(() => Array.from({ length: 256 }, () => crowd.enter(busy.id))).not.toThrow()
  } finally {
    open()
    compute.solve = solve
  }
})
