import { afterAll, beforeAll, expect, test } from 'vitest'
import { Client } from './harness/client.ts'
import { makeKey, signUp } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'

let service: TestService
beforeAll(async () => {
  service = await startTestService()
})
afterAll(() => service.close())

const wall = {
  conductivity: 2,
  density: 2400,
  specificHeat: 1000,
  thickness: 0.2,
  exposedFaces: 2,
  filmCoefficient: 10,
  initialTemperature: 20,
  ambientTemperature: -5,
  depths: [0, 0.1],
  times: [3600, 36000],
}

test('a person signs up, makes a key, solves a wall and sees that very call', async () => {
  const { client, accountId } = await signUp(service.url)
  const { id, secret } = await makeKey(client, { name: 'First' })
  const solved = await new Client(service.url).solve('slab-convection', secret, wall)
  expect(solved.status, solved.text).toBe(200)
  expect(solved.json.result.temperature[0][0]).toBeCloseTo(13.7751886477336, 9)
  expect(solved.json.result.temperature[1][1]).toBeCloseTo(2.4362336338823, 9)
  expect(solved.headers.get('points-charged')).toBe('10')
  expect(solved.headers.get('points-remaining')).toBe('99990')
  expect(solved.json.points).toBe(7)
  const requestId = solved.headers.get('request-id') as string

  await service.service.deps.requestLog.flush()
  const seen = await client.call(`/portal/v1/requests/${requestId}`)
  expect(seen.json).toMatchObject({
    id: requestId,
    status: 200,
    points: 10,
    case: 'slab-convection',
    key: { id, name: 'First' },
  })
  expect(seen.json.ledger).toMatchObject([{ kind: 'charge', points: 10 }])
  const usage = await client.call('/portal/v1/usage?groupBy=day,key,case')
  expect(usage.json.rows).toMatchObject([
    { keyId: id, keyName: 'First', case: 'slab-convection', calls: 1, points: 10, refused: 0 },
  ])
  expect(usage.json.account).toMatchObject({ limit: 100_000, used: 10 })
  const keys = await client.call('/portal/v1/keys')
  expect(keys.json.keys).toMatchObject([{ id, used: 10, createdBy: 'Jo Tester', prefix: `${secret.slice(0, 17)}…` }])
  expect(keys.text).not.toContain(secret)
  expect(keys.json.keys[0].lastUsedAt).not.toBeNull()
  expect(accountId).toMatch(/^acct_/)
})

test('equal calls have equal bytes and tags', async () => {
  const { client } = await signUp(service.url)
  const { secret } = await makeKey(client)
  const [one, two] = [
    await client.solve('slab-convection', secret, wall),
    await client.solve('slab-convection', secret, wall),
  ]
  expect(two.text).toBe(one.text)
  expect(two.headers.get('etag')).toBe(one.headers.get('etag'))
})

test('a large solve runs in a thread and answers as a small one does', async () => {
  const { client } = await signUp(service.url)
  const { secret } = await makeKey(client)
  const times = Array.from({ length: 3000 }, (_, i) => i * 60)
  const whole = await client.solve('slab-convection', secret, { ...wall, times })
  expect(whole.status, whole.text).toBe(200)
  const part = await client.solve('slab-convection', secret, { ...wall, times: times.slice(0, 5) })
  expect(whole.json.result.temperature.slice(0, 5)).toEqual(part.json.result.temperature)
})
