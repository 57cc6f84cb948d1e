import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { newKey } from '../../api/keys/key.ts'
import { operations } from '../../api/operations.ts'
import { allScopes } from '../../api/permissions.ts'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import { Client } from './harness/client.ts'
import { answerFaults } from './harness/documents.ts'
import { expectBooks } from './harness/books.ts'
import { makeKey, query, signUp } from './harness/people.ts'
import { PUBLIC_URL, type TestService, startTestService } from './harness/service.ts'

let service: TestService
let owner: Client
let accountId: string
beforeAll(async () => {
  service = await startTestService({ env: { TRUST_PROXY: '1' } })
  ;({ client: owner, accountId } = await signUp(service.url))
})
afterAll(() => service.close())

const sql = (text: string, values: unknown[] = []) => query<Record<string, unknown>>(service.databaseUrl, text, values)
const usage = (secret: string, headers: Record<string, string> = {}) =>
  new Client(service.url).call('/v1/usage', { headers: { authorization: `Bearer ${secret}`, ...headers } })
const keyOf = async (id: string) =>
  (await owner.call('/portal/v1/keys')).json.keys.find((key: { id: string }) => key.id === id)

describe.each(operations.filter((o) => o.access === 'key' && (!o.caseId || o.caseId === lumped.id)))('$id', (o) => {
  test('is refused to a key that has every scope but its own', async () => {
    const key = await makeKey(owner, { scopes: allScopes.filter((scope) => scope !== o.scope) })
    const answer = await new Client(service.url).call(o.path.replace(/\{\w+\}/g, 'any'), {
      method: o.method.toUpperCase(),
      headers: { authorization: `Bearer ${key.secret}` },
      body: o.example?.body,
    })
    expect(answer.json).toMatchObject({ status: 403, code: 'scope-missing' })
    expect(answer.headers.get('www-authenticate')).toBe(
      `Bearer realm="soakstone", error="insufficient_scope", scope="${o.scope}"`,
    )
    expect(answer.headers.get('ratelimit')).toMatch(/^"account";r=\d+;t=\d+$/)
    expect(answerFaults(o, answer)).toEqual([])
    await owner.post(`/portal/v1/keys/${key.id}/revoke`)
  })
})

test('a key is used from its networks only, be they IPv4 or IPv6, and no header but the proxy says where it is', async () => {
  const { secret, id } = await makeKey(owner, { addresses: ['203.0.113.9/24', '203.0.113.0/24', '2001:db8::/32'] })
  expect((await keyOf(id)).addresses).toEqual(['203.0.113.0/24', '2001:db8::/32'])
  const from = async (address: string) => (await usage(secret, { 'x-forwarded-for': address })).json.code
  for (const inside of ['203.0.113.4', '198.51.100.1, 203.0.113.4', '2001:db8:77::1', '::ffff:203.0.113.1'])
    expect(await from(inside)).toBeUndefined()
  for (const outside of ['198.51.100.1', '203.0.113.4, 198.51.100.1', '2001:db9::1', 'nonsense'])
    expect(await from(outside)).toBe('address-refused')
})

test.each([
  ['addresses', ['203.0.113.0/33'], '#/addresses/0'],
  ['addresses', ['example.org'], '#/addresses/0'],
  ['origins', ['https://app.example.org/'], '#/origins/0'],
  ['origins', ['http://app.example.org'], '#/origins/0'],
  ['origins', ['https://APP.example.org'], '#/origins/0'],
  ['origins', ['null'], '#/origins/0'],
  ['origins', ['*'], '#/origins/0'],
  ['scopes', [], '#/scopes'],
  ['scopes', ['everything'], '#/scopes/0'],
  ['rate', 0, '#/rate'],
  ['rate', 6001, '#/rate'],
  ['expiresAt', '2020-01-01T00:00:00Z', '#/expiresAt'],
  ['expiresAt', 'tomorrow', '#/expiresAt'],
  ['environment', 'live', '#/environment'],
])('a key with %s %j is refused, by its pointer', async (name, value, pointer) => {
  const answer = await owner.post('/portal/v1/keys', { name: 'Wrong', [name]: value })
  expect(answer.json).toMatchObject({ status: 422, code: 'invalid-input' })
  expect(answer.json.errors[0]).toMatchObject({ pointer, accepted: expect.any(String) })
})

describe('a page', () => {
  const page = 'https://app.example.org'
  const read = (list: string | null) => (list ?? '').toLowerCase().split(', ')

  test('may ask before it calls, and is told what it may send and read', async () => {
    const path = `/v1/cases/${lumped.id}/solve`
    const answer = await new Client(service.url).call(path, {
      method: 'OPTIONS',
      headers: {
        origin: page,
        'access-control-request-method': 'POST',
        'access-control-request-headers': 'authorization,content-type',
      },
    })
    expect(answer.status).toBe(204)
    expect(answer.headers.get('access-control-allow-origin')).toBe('*')
    expect(read(answer.headers.get('access-control-allow-headers'))).toEqual(
      expect.arrayContaining(['authorization', 'content-type', 'if-none-match']),
    )
    expect(read(answer.headers.get('access-control-allow-methods'))).toContain('post')
    expect(answer.headers.get('access-control-max-age')).toBe('7200')
    expect(answer.headers.get('access-control-allow-credentials')).toBeNull()
  })

  test('uses a key that names it, and reads limits and refusals; another cannot use it, and reads why', async () => {
    const { secret } = await makeKey(owner, { origins: [page] })
    const plain = await makeKey(owner)
    const ok = await usage(secret, { origin: page })
    expect(ok.status).toBe(200)
    const refused = await new Client(service.url).post(`/v1/cases/${lumped.id}/solve`, '{', {
      authorization: `Bearer ${secret}`,
      origin: page,
    })
    expect(refused.json.code).toBe('malformed-json')
    for (const answer of [ok, refused]) {
      expect(answer.headers.get('access-control-allow-origin')).toBe(page)
      expect(read(answer.headers.get('vary'))).toContain('origin')
      expect(read(answer.headers.get('access-control-expose-headers'))).toEqual(
        expect.arrayContaining([
          'request-id',
          'ratelimit',
          'ratelimit-policy',
          'retry-after',
          'points-remaining',
          'etag',
        ]),
      )
    }
    for (const [key, origin] of [
      [secret, 'https://other.example.org'],
      [secret, 'null'],
      [plain.secret, page],
    ] as const) {
      const other = await usage(key, { origin })
      expect(other.json).toMatchObject({ status: 403, code: 'origin-refused' })
      expect(other.headers.get('access-control-allow-origin')).toBe(origin)
    }
    expect((await usage(plain.secret, { origin: PUBLIC_URL })).status).toBe(200)
    const bare = await fetch(`${service.url}/v1/usage`, { headers: { authorization: `Bearer ${secret}` } })
    expect(bare.status).toBe(200)
    const unknown = await usage(newKey('trial'), { origin: page })
    expect(unknown.status).toBe(401)
    expect(unknown.headers.get('access-control-allow-origin')).toBe('*')
  })

  test('has no way into the portal', async () => {
    const answer = await owner.call('/portal/v1/keys', { headers: { origin: page } })
    expect(answer.headers.get('access-control-allow-origin')).toBeNull()
  })
})

test('a key that has expired says so, and lives again with a later end', async () => {
  const { secret, id } = await makeKey(owner, { expiresAt: '2099-01-01T01:00:00+02:00' })
  expect((await keyOf(id)).expiresAt).toBe('2098-12-31T23:00:00.000Z')
  await sql("UPDATE keys SET expires_at = now() - interval '1 second' WHERE id = $1", [id])
  const answer = await usage(secret)
  expect(answer.json).toMatchObject({ status: 401, code: 'key-expired' })
  expect(answer.headers.get('www-authenticate')).toBe('Bearer realm="soakstone", error="invalid_token"')
  const changed = await owner.call(`/portal/v1/keys/${id}`, { method: 'PUT', body: { name: 'Longer' } })
  expect(changed.json.key).toMatchObject({ name: 'Longer', expiresAt: null, scopes: allScopes })
  expect((await usage(secret)).status).toBe(200)
})

test('settings that are changed count from the next call, the quota in the period that has begun', async () => {
  const { secret, id } = await makeKey(owner)
  const client = new Client(service.url)
  expect((await client.solve(lumped.id, secret, lumped.example)).status).toBe(200)
  const change = (body: object) =>
    owner.call(`/portal/v1/keys/${id}`, { method: 'PUT', body: { name: 'Key', ...body } })
  await change({ quota: 15 })
  expect((await client.solve(lumped.id, secret, lumped.example)).json).toMatchObject({ code: 'quota-exceeded' })
  await change({ quota: 20 })
  expect((await client.solve(lumped.id, secret, lumped.example)).headers.get('points-remaining')).toBe('0')
  await change({ scopes: ['usage:read'] })
  expect((await client.solve(lumped.id, secret, lumped.example)).json).toMatchObject({ code: 'scope-missing' })
  await owner.post(`/portal/v1/keys/${id}/revoke`)
  expect((await change({})).json).toMatchObject({ status: 409, code: 'key-revoked' })
  const done = await sql('SELECT action FROM audit WHERE subject = $1 ORDER BY at, id', [id])
  expect(done.map((row) => row['action'])).toEqual([
    'key created',
    ...['key changed', 'key changed', 'key changed'],
    'key revoked',
  ])
})

test('a rotated key goes on with both secrets for a while, the old one seen in use, and ends any older one', async () => {
  const first = await makeKey(owner, { quota: 1000 })
  const rotate = async (overlapHours: number) =>
    (await owner.post(`/portal/v1/keys/${first.id}/rotate`, { overlapHours })).json
  const second = await rotate(24)
  expect(second.secret).not.toBe(first.secret)
  expect(second.key).toMatchObject({
    id: first.id,
    quota: 1000,
    oldSecret: { prefix: `${first.secret.slice(0, 17)}…` },
  })
  const hours = (Date.parse(second.key.oldSecret.endsAt) - Date.now()) / 3_600_000
  expect(hours).toBeGreaterThan(23)
  expect(hours).toBeLessThan(25)
  for (const secret of [first.secret, second.secret])
    expect((await new Client(service.url).solve(lumped.id, secret, lumped.example)).status).toBe(200)
  await service.service.deps.requestLog.flush()
  expect(await keyOf(first.id)).toMatchObject({ used: 20, oldSecret: { lastUsedAt: expect.any(String) } })
  const third = await rotate(1)
  expect((await usage(first.secret)).json).toMatchObject({ status: 401, code: 'key-expired' })
  expect((await usage(second.secret)).status).toBe(200)
  const fourth = await rotate(0)
  expect(fourth.key.oldSecret).toBeNull()
  for (const secret of [first.secret, second.secret, third.secret]) expect((await usage(secret)).status).toBe(401)
  expect((await usage(fourth.secret)).status).toBe(200)
  await sql("UPDATE secrets SET ends_at = now() + interval '1 hour' WHERE key_id = $1", [first.id])
  await owner.post(`/portal/v1/keys/${first.id}/revoke`)
  expect((await usage(fourth.secret)).json).toMatchObject({ status: 401, code: 'key-unknown' })
})

test('metered keys need a plan, count by the month, and are told apart in usage', async () => {
  const { client, accountId: account } = await signUp(service.url)
  const refused = await client.post('/portal/v1/keys', { name: 'Metered', environment: 'metered' })
  expect(refused.json).toMatchObject({ status: 402, code: 'plan-needed' })
  await sql('UPDATE accounts SET metered_limit = 25 WHERE id = $1', [account])
  const [trial, metered] = [await makeKey(client), await makeKey(client, { environment: 'metered' })]
  expect(metered.secret).toMatch(/^soak_metered_[0-9A-Za-z]{38}$/)
  const solve = (secret: string) => new Client(service.url).solve(lumped.id, secret, lumped.example)
  const answers = [await solve(trial.secret), await solve(metered.secret), await solve(metered.secret)]
  expect(answers.map((a) => a.headers.get('points-remaining'))).toEqual(['99990', '15', '5'])
  const over = await solve(metered.secret)
  expect(over.json).toMatchObject({ code: 'quota-exceeded' })
  const [next] = await sql(
    "SELECT (date_trunc('month', now() AT TIME ZONE 'UTC') + interval '1 month')::date::text AS day",
  )
  expect(over.json.resetsAt).toBe(`${next?.['day']}T00:00:00.000Z`)
  await service.service.deps.meter.refund(answers[2]?.headers.get('request-id') ?? '')
  expect((await solve(metered.secret)).headers.get('points-remaining')).toBe('5')
  await service.service.deps.requestLog.flush()
  const { json } = await client.call('/portal/v1/usage?groupBy=environment')
  expect(json.rows).toEqual([
    { environment: 'metered', calls: 2, points: 20, refused: 1 },
    { environment: 'trial', calls: 1, points: 10, refused: 0 },
  ])
  expect(json.account).toMatchObject({ limit: 100_000, used: 10, metered: { limit: 25, used: 20 } })
  await expectBooks(service.databaseUrl, account, { logged: false })
})

test('a key that is reported as leaked ends at once, its account sees why, and nobody else learns anything', async () => {
  const { secret, id } = await makeKey(owner)
  const anyone = new Client(service.url)
  const { json: format } = await anyone.call('/v1/key-format')
  expect(new RegExp(`^${format.regularExpression}$`).test(secret)).toBe(true)
  const report = (key: string) => anyone.post(format.report, { key })
  const answers = [await report(secret), await report(secret), await report(newKey('metered'))]
  for (const { status, text } of answers) expect([status, text]).toEqual([204, ''])
  expect((await usage(secret)).json).toMatchObject({ code: 'key-unknown' })
  expect(await keyOf(id)).toMatchObject({ revokedFor: 'leaked' })
  const done = await sql('SELECT actor_kind, actor_id, action, account_id FROM audit WHERE subject = $1 ORDER BY at', [
    id,
  ])
  expect(done[1]).toEqual({
    actor_kind: 'call',
    actor_id: answers[0]?.headers.get('request-id'),
    action: 'key reported as leaked and revoked',
    account_id: accountId,
  })
  expect(done).toHaveLength(2)
  const wrong = await report(`${secret.slice(0, -1)}!`)
  expect(wrong.json).toMatchObject({ status: 422 })
  expect(wrong.text).not.toContain(secret.slice(0, 20))
})

test('a key is revoked in every process within a second', async () => {
  const other = await startTestService({ databaseUrl: service.databaseUrl })
  try {
    const { secret, id } = await makeKey(owner)
    const ask = () => new Client(other.url).call('/v1/usage', { headers: { authorization: `Bearer ${secret}` } })
    expect((await ask()).status).toBe(200)
    await owner.post(`/portal/v1/keys/${id}/revoke`)
    const deadline = Date.now() + 1000
    let status = 200
    do status = (await ask()).status
    while (status === 200 && Date.now() < deadline)
    expect(status).toBe(401)
  } finally {
    await other.close()
  }
})
