import { afterAll, beforeAll, expect, test } from 'vitest'
import { parseList } from 'structured-headers'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import { defaultLimits } from '../../api/http/limits.ts'
import { Client } from './harness/client.ts'
import { type TestService, startTestService } from './harness/service.ts'

const limits = { ...defaultLimits, 'sign-in': { windowSeconds: 60, limit: 3 }, try: { windowSeconds: 60, limit: 5 } }
let one: TestService
let two: TestService
beforeAll(async () => {
  one = await startTestService({ limits })
  two = await startTestService({ limits, databaseUrl: one.databaseUrl })
})
afterAll(async () => {
  await two.close()
  await one.close()
})

test('the calls of one address count together, whichever process they reach', async () => {
  const statuses = []
  for (let n = 0; n < 8; n++) {
    const client = new Client((n % 2 ? one : two).url)
    const answer = await client.post(`/portal/v1/try/${lumped.id}/solve`, lumped.example, {
      'x-forwarded-for': `203.0.113.${n}`,
    })
    statuses.push(answer.status)
    expect(parseList(answer.headers.get('ratelimit') ?? '')).toHaveLength(1)
    expect(answer.headers.get('ratelimit-policy')).toMatch(/^"try"; q=5; w=60/)
    if (answer.status === 200) continue
    expect(answer.json).toMatchObject({ status: 429, code: 'rate-limited', retryable: true })
    expect(Number(answer.headers.get('retry-after'))).toBeGreaterThan(0)
  }
  expect(statuses).toEqual([200, 200, 200, 200, 200, 429, 429, 429])
})

test('guessing passwords is slowed', async () => {
  const guess = (client: Client) =>
    client.post('/portal/v1/sign-in', { mail: 'someone@example.org', password: 'a guess' })
  const statuses = []
  for (let n = 0; n < 5; n++) statuses.push((await guess(new Client(one.url))).status)
  expect(statuses).toEqual([401, 401, 401, 429, 429])
})

test('a trial without a key has fewer numbers, and is in no ledger', async () => {
  const wide = await startTestService({ databaseUrl: one.databaseUrl })
  try {
    const times = Array.from({ length: 10_001 }, (_, i) => i)
    const answer = await new Client(wide.url).post(`/portal/v1/try/${lumped.id}/solve`, { ...lumped.example, times })
    expect(answer.json).toMatchObject({ status: 413, code: 'too-many-values' })
    const { rows } = await wide.service.deps.pool.query(
      'SELECT (SELECT count(*) FROM ledger) + (SELECT count(*) FROM log) AS rows',
    )
    expect(Number(rows[0].rows)).toBe(0)
  } finally {
    await wide.close()
  }
})
