import { afterAll, beforeAll, expect, test } from 'vitest'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import { Client } from './harness/client.ts'
import { PASSWORD, makeKey, query, signUp } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'

let service: TestService
beforeAll(async () => {
  service = await startTestService()
})
afterAll(() => service.close())

test('no log line and no table holds a key, a password or a cookie', async () => {
  const { client, mail } = await signUp(service.url)
  const key = await makeKey(client)
  const other = new Client(service.url)
  await other.post('/portal/v1/sign-in', { mail, password: PASSWORD })
  await other.post('/portal/v1/sign-in', { mail, password: PASSWORD, [PASSWORD]: PASSWORD })
  await client.solve(lumped.id, key.secret, lumped.example)
  await client.solve(lumped.id, key.secret, { ...lumped.example, [key.secret]: 1 })
  await client.solve(lumped.id, key.secret, `{"${key.secret}"`)
  await client.call(`/v1/${key.secret}?key=${key.secret}`)
  await client.call(`/v1/cases/${key.secret}`)
  await client.call(`/v1/usage?key=${key.secret}`, { headers: { authorization: `Bearer ${key.secret}` } })
  const encoded = [...key.secret].map((c) => `%${c.charCodeAt(0).toString(16)}`).join('')
  for (const hidden of [key.secret.replaceAll('_', '%5F'), encoded, encoded.replaceAll('%', '%25')]) {
    await client.call(`/v1/${hidden}`)
    await client.call(`/v1/cases/${hidden}`)
  }
  for (const before of [0, 20, 30, 40]) {
    const name = 'x'.repeat(before) + key.secret
    await client.call(`/v1/cases/${name}`)
    await client.solve(lumped.id, key.secret, `{"${name}": 1, "${name}": 2}`)
    await client.solve(lumped.id, key.secret, { ...lumped.example, [name]: 1, outputs: [name] })
  }
  await client.call(`/v1/requests/${key.secret}`, { headers: { authorization: `Bearer ${key.secret}` } })
  const { compute, requestLog } = service.service.deps
  const { solve } = compute
  compute.solve = (task) =>
    Promise.reject(Object.assign(new Error('planted'), { task, password: PASSWORD, authorization: key.secret }))
  await client.solve(lumped.id, key.secret, lumped.example).finally(() => (compute.solve = solve))
  await requestLog.flush()

  const cookies = [...client.cookies.values(), ...other.cookies.values()].map((value) => decodeURIComponent(value))
  const parts = [key.secret.slice(0, 18), key.secret.slice(-20), key.secret.slice(0, 25).replaceAll('_', '%5F')]
  const secrets = [
    ...parts,
    encoded,
    encoded.replaceAll('%', '%25'),
    PASSWORD,
    ...cookies,
    ...cookies.map((c) => c.split('.')[1] ?? c),
  ]
  const tables = await query<{ name: string }>(
    service.databaseUrl,
    "SELECT quote_ident(tablename) AS name FROM pg_tables WHERE schemaname = 'public' AND tablename NOT IN ('log', 'ledger')",
  )
  const dump = await Promise.all(tables.map(({ name }) => query(service.databaseUrl, `SELECT t::text FROM ${name} t`)))
  const kept = JSON.stringify(dump)
  expect(kept).toContain(key.id)
  expect(service.lines.length).toBeGreaterThan(10)
  for (const secret of secrets) {
    expect(service.lines.join('\n')).not.toContain(secret)
    expect(kept).not.toContain(secret)
  }
})

test('a fault is logged with its request id, and its answer hides the reason', async () => {
  const { client } = await signUp(service.url)
  const { db } = service.service.deps
  const { select } = db
  db.select = (() => {
    throw new Error("a reason that is nobody's business")
  }) as unknown as typeof db.select
  const answer = await client.call('/portal/v1/session').finally(() => (db.select = select))
  expect(answer.json).toMatchObject({ status: 500, code: 'internal' })
  expect(answer.text).not.toContain('business')
  const line = service.lines.find((l) => l.includes('business')) ?? ''
  expect(line).toContain(answer.json.requestId)
})

test('a statement that fails is logged without the values that it was given', async () => {
  const { mail } = await signUp(service.url)
  await query(service.databaseUrl, 'ALTER TABLE people RENAME TO people_gone')
  const answer = await new Client(service.url)
    .post('/portal/v1/sign-in', { mail, password: PASSWORD })
    .finally(() => query(service.databaseUrl, 'ALTER TABLE people_gone RENAME TO people'))
  expect(answer.json).toMatchObject({ status: 500, code: 'internal' })
  const lines = service.lines.join('\n')
  expect(lines).toContain(answer.json.requestId)
  expect(lines).not.toContain(mail)
})
