import { afterAll, beforeAll, expect, test } from 'vitest'
import { parseList } from 'structured-headers'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import { defaultLimits, pruneLimits } from '../../api/http/limits.ts'
import { Client } from './harness/client.ts'
import { signUp } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'

const limits = {
  ...defaultLimits,
  mail: { windowSeconds: 60, limit: 4 },
  'sign-in': { windowSeconds: 60, limit: 3 },
  try: { windowSeconds: 60, limit: 5 },
}
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

test('another site uses up no calls of its visitors', async () => {
  const sent = { mail: 'visitor@example.org', password: 'a guess' }
  for (let n = 0; n < 5; n++) {
    const answer = await new Client(one.url).post('/portal/v1/sign-in', sent, { origin: 'https://elsewhere.example' })
    expect(answer.json).toMatchObject({ status: 403, code: 'cross-site' })
    expect(answer.headers.get('ratelimit')).toBeNull()
  }
  expect((await new Client(one.url).post('/portal/v1/sign-in', sent)).status).toBe(401)
  await one.service.deps.pool.query('DELETE FROM rate_limits')
})

test('guessing the password of one mail address is slowed from wherever it comes, be it known or not', async () => {
  const proxied = await startTestService({ limits, databaseUrl: one.databaseUrl, env: { TRUST_PROXY: '1' } })
  const { mail } = await signUp(proxied.url)
  const answers = new Set<string>()
  try {
    for (const address of [mail, 'unknown@example.org']) {
      const statuses = []
      for (let n = 0; n < 6; n++) {
        const headers = { 'x-forwarded-for': `203.0.113.${n}` }
        const sent = { mail: n % 2 ? address : address.toUpperCase(), password: 'a guess' }
        const answer = await new Client(proxied.url).post('/portal/v1/sign-in', sent, headers)
        statuses.push(answer.status)
        if (answer.status !== 429) continue
        expect(Number(answer.headers.get('retry-after'))).toBeGreaterThan(0)
        answers.add(JSON.stringify({ ...answer.json, requestId: '' }))
      }
      expect(statuses).toEqual([401, 401, 401, 401, 429, 429])
      await one.service.deps.pool.query("DELETE FROM rate_limits WHERE key LIKE 'sign-in %'")
    }
    expect(answers.size).toBe(1)
    const { rows } = await one.service.deps.pool.query("SELECT key FROM rate_limits WHERE key LIKE 'mail %'")
    expect(rows).toHaveLength(2)
    expect(JSON.stringify(rows)).not.toContain('example.org')
  } finally {
    await proxied.close()
    await one.service.deps.pool.query('DELETE FROM rate_limits')
  }
})

test('counters that have run out are removed', async () => {
  const { pool } = one.service.deps
  await pool.query(`INSERT INTO rate_limits (key, hits, resets_at)
    VALUES ('ended', 1, now() - interval '1 second'), ('running', 1, now() + interval '1 minute')`)
  await pruneLimits(pool)
  const { rows } = await pool.query("SELECT key FROM rate_limits WHERE key IN ('ended', 'running')")
  expect(rows).toEqual([{ key: 'running' }])
})

test('guessing passwords is slowed', async () => {
  const guess = (client: Client) =>
    client.post('/portal/v1/sign-in', { mail: 'someone@example.org', password: 'a guess' })
  const statuses = []
  for (let n = 0; n < 5; n++) statuses.push((await guess(new Client(one.url))).status)
  expect(statuses).toEqual([401, 401, 401, 429, 429])
})

test('a trial without a key writes no longer axes than it may answer numbers', async () => {
  await one.service.deps.pool.query('DELETE FROM rate_limits')
  const times = Array.from({ length: 10_001 }, (_, i) => i)
  const body = { ...lumped.example, outputs: ['timeConstant'], times }
  const answer = await new Client(one.url).post(`/portal/v1/try/${lumped.id}/solve`, body)
  expect(answer.json).toMatchObject({ status: 413, code: 'too-many-values' })
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
