import { afterAll, beforeAll, expect, test } from 'vitest'
import { createCompute } from '../../api/compute/compute.ts'
import slab from '../../solvers/cases/slab-convection/case.ts'
import { Client } from './harness/client.ts'
import { makeKey, query, signUp } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'

let service: TestService
beforeAll(async () => {
  service = await startTestService()
})
afterAll(() => service.close())

const large = { ...slab.example, depths: [0, 0.05], times: Array.from({ length: 90_000 }, (_, i) => i + 1) }

test('the service answers others while a large solve is under way', async () => {
  const { client, accountId } = await signUp(service.url)
  await query(service.databaseUrl, 'UPDATE accounts SET trial_limit = 1000000 WHERE id = $1', [accountId])
  const { secret } = await makeKey(client)
  let done = false
  const solving = client.solve(slab.id, secret, large).finally(() => (done = true))
  let others = 0
  while (!done) {
    expect((await new Client(service.url).call('/healthz')).status).toBe(200)
    if (!done) others++
  }
  const answer = await solving
  expect(answer.status, answer.text.slice(0, 300)).toBe(200)
  expect(answer.headers.get('points-charged')).toBe('180003')
  expect(answer.json.result.temperature).toHaveLength(90_000)
  expect(others).toBeGreaterThan(5)
})

test('a solve that takes too long is ended, costs nothing, and the next one works', async () => {
  const { client, accountId } = await signUp(service.url)
  await query(service.databaseUrl, 'UPDATE accounts SET trial_limit = 1000000 WHERE id = $1', [accountId])
  const { secret } = await makeKey(client)
  const hasty = createCompute(1, { limit: 5, waiting: 1 })
  const { compute } = service.service.deps
  const { solve } = compute
  compute.solve = hasty.solve
  const answer = await client.solve(slab.id, secret, large).finally(() => (compute.solve = solve))
  await hasty.close()
  expect(answer.json).toMatchObject({ status: 503, code: 'solve-too-slow', retryable: true })
  expect((await client.call('/portal/v1/usage')).json).toMatchObject({ account: { used: 0 }, total: { points: 0 } })
  expect((await client.solve(slab.id, secret, { ...large, times: large.times.slice(0, 5000) })).status).toBe(200)
})

test('more than can wait is refused rather than kept', async () => {
  const compute = createCompute(1, { limit: 10_000, waiting: 2 })
  const asked = await Promise.allSettled(
    Array.from({ length: 10 }, () => compute.hashPassword('a password of the test')),
  )
  await compute.close()
  const refused = asked.filter((a) => a.status === 'rejected').map((a) => a.reason as Error)
  expect(refused.length).toBeGreaterThan(0)
  expect(refused.length).toBeLessThan(10)
  for (const reason of refused) expect(reason).toMatchObject({ code: 'unavailable' })
})
