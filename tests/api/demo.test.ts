import { mkdtemp, readFile, rm, stat } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { seedDemo } from '../../api/demo/seed-demo.ts'
import { Client } from './harness/client.ts'
import { query } from './harness/people.ts'
import { PUBLIC_URL, type TestService, startTestService } from './harness/service.ts'

let service: TestService
let folder: string
beforeAll(async () => {
  service = await startTestService()
  folder = await mkdtemp(path.join(tmpdir(), 'soakstone-demo-'))
})
afterAll(async () => {
  await service.close()
  await rm(folder, { recursive: true })
})

const seed = () => seedDemo({ pool: service.service.deps.pool, folder, publicUrl: PUBLIC_URL })
const sums = () =>
  query(
    service.databaseUrl,
    `SELECT (SELECT count(*)::int FROM log) AS calls, (SELECT count(*)::int FROM log WHERE status = 422) AS refused,
      (SELECT sum(points)::int FROM log) AS logged, (SELECT sum(points)::int FROM ledger) AS charged,
      (SELECT sum(used)::int FROM periods) AS used, (SELECT count(*)::int FROM periods) AS days,
      (SELECT count(*)::int FROM keys) AS keys`,
  )

test('the demo has three weeks in which log, ledger and counters agree, and laying it out again changes nothing', async () => {
  const first = await seed()
  const [before] = await sums()
  expect(before).toMatchObject({ days: 21, keys: 3 })
  expect(before?.['calls']).toBeGreaterThan(300)
  expect(before?.['refused']).toBeGreaterThan(10)
  expect(before?.['logged']).toBe(before?.['charged'])
  expect(before?.['used']).toBe(before?.['charged'])
  expect(await seed()).toEqual(first)
  expect((await sums())[0]).toEqual(before)
  const file = path.join(folder, 'demo.json')
  expect((await stat(file)).mode & 0o777).toBe(0o600)
  expect(JSON.parse(await readFile(file, 'utf8')).key).toBe(first.key)
})

test('its sign-ins and its key work, and a key that was revoked is replaced', async () => {
  const { signIns, key } = await seed()
  expect(signIns.map((s) => s.role)).toEqual(['owner', 'integrator', 'reader', 'support'])
  for (const { role, mail, password } of signIns) {
    const client = new Client(service.url)
    const answer = await client.post(`/${role === 'support' ? 'support' : 'portal'}/v1/sign-in`, { mail, password })
    expect(answer.json).toMatchObject({ role })
    expect(mail).toMatch(/\.example$/)
  }
  expect(
    (await new Client(service.url).call('/v1/usage', { headers: { authorization: `Bearer ${key}` } })).json.total.calls,
  ).toBeGreaterThan(300)
  await query(service.databaseUrl, 'UPDATE keys SET revoked_at = now()')
  const again = await seed()
  expect(again.key).not.toBe(key)
  expect(
    (await new Client(service.url).call('/v1/usage', { headers: { authorization: `Bearer ${again.key}` } })).status,
  ).toBe(200)
})

test('lost passwords are made anew', async () => {
  const before = await seed()
  await rm(path.join(folder, 'demo.json'))
  const { signIns } = await seed()
  expect(signIns[0]?.password).not.toBe(before.signIns[0]?.password)
  const { mail = '', password = '' } = signIns[0] ?? {}
  expect((await new Client(service.url).post('/portal/v1/sign-in', { mail, password })).status).toBe(200)
})
