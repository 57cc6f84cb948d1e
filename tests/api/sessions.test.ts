import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { Client } from './harness/client.ts'
import { PASSWORD, makeKey, query, signUp } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'

let service: TestService
beforeAll(async () => {
  service = await startTestService()
})
afterAll(() => service.close())

const signIn = (client: Client, mail: string, password = PASSWORD) =>
  client.post('/portal/v1/sign-in', { mail, password })

describe('a session', () => {
  test('gets a new id at sign-in, and a planted one dies', async () => {
    const { client, mail } = await signUp(service.url)
    const planted = new Client(service.url)
    planted.cookies = new Map(client.cookies)
    const before = client.cookies.get('soakstone')
    expect((await signIn(client, mail)).status).toBe(200)
    expect(client.cookies.get('soakstone')).not.toBe(before)
    expect((await planted.call('/portal/v1/session')).status).toBe(401)
    expect((await client.call('/portal/v1/session')).status).toBe(200)
  })

  test('ends on the server at sign-out', async () => {
    const { client } = await signUp(service.url)
    const kept = new Client(service.url)
    kept.cookies = new Map(client.cookies)
    expect((await client.post('/portal/v1/sign-out')).status).toBe(204)
    expect((await kept.call('/portal/v1/session')).json).toMatchObject({ status: 401, code: 'sign-in-needed' })
    expect((await new Client(service.url).post('/portal/v1/sign-out')).status).toBe(204)
  })

  test('has a cookie that scripts and other sites cannot use', async () => {
    const { mail } = await signUp(service.url)
    const answer = await signIn(new Client(service.url), mail)
    expect(answer.headers.getSetCookie()).toHaveLength(1)
    expect(answer.headers.getSetCookie()[0]).toMatch(
      /^soakstone=[^;]+; Path=\/; Expires=[^;]+; HttpOnly; SameSite=Lax$/,
    )
  })

  test('writes nothing when it is read', async () => {
    const { client } = await signUp(service.url)
    const rows = () => query(service.databaseUrl, 'SELECT sid, expire, xmin::text FROM sessions ORDER BY sid')
    const before = await rows()
    await client.call('/portal/v1/session')
    await new Client(service.url).call('/portal/v1/session')
    expect(await rows()).toEqual(before)
  })

  test('shows who is signed in and what the role may do', async () => {
    const { client, mail, accountId } = await signUp(service.url)
    const { json } = await client.call('/portal/v1/session')
    expect(json).toMatchObject({
      person: { mail, name: 'Jo Tester' },
      account: { id: accountId, name: 'Test House' },
      role: 'owner',
    })
    expect(json.permissions).toContain('keys:create')
  })

  test('with a forged cookie is none', async () => {
    const { client } = await signUp(service.url)
    const forged = new Client(service.url)
    forged.cookies.set('soakstone', `${client.cookies.get('soakstone')?.slice(0, -4)}AAAA`)
    expect((await forged.call('/portal/v1/session')).status).toBe(401)
  })
})

test('behind https the cookie is bound to the host and secure', async () => {
  const env = { PUBLIC_URL: 'https://soakstone.example', TRUST_PROXY: '1' }
  const secure = await startTestService({ databaseUrl: service.databaseUrl, env })
  try {
    const { mail } = await signUp(service.url)
    const headers = { origin: 'https://soakstone.example', 'x-forwarded-proto': 'https' }
    const answer = await new Client(secure.url).post('/portal/v1/sign-in', { mail, password: PASSWORD }, headers)
    expect(answer.headers.getSetCookie()[0]).toMatch(
      /^__Host-soakstone=[^;]+; Path=\/; Expires=[^;]+; HttpOnly; Secure; SameSite=Lax$/,
    )
    expect(answer.headers.get('strict-transport-security')).toMatch(/max-age=31536000/)
  } finally {
    await secure.close()
  }
})

test('staff sign in only where the service is reached from its own machine alone', async () => {
  const open = await startTestService({ databaseUrl: service.databaseUrl, env: { HOST: '0.0.0.0' } })
  try {
    const answer = await new Client(open.url).post('/support/v1/sign-in', {
      mail: 'support@example.org',
      password: PASSWORD,
    })
    expect(answer.json).toMatchObject({ status: 403, code: 'forbidden' })
  } finally {
    await open.close()
  }
})

describe('sign-in', () => {
  test('answers an unknown address as it does a wrong password, after about as long', async () => {
    const { mail } = await signUp(service.url)
    const client = new Client(service.url)
    const times: Record<'known' | 'unknown', number[]> = { known: [], unknown: [] }
    const texts = new Set<string>()
    for (let n = 0; n < 6; n++)
      for (const kind of ['known', 'unknown'] as const) {
        const started = performance.now()
        const answer = await signIn(
          client,
          kind === 'known' ? mail : `nobody-${n}@example.org`,
          'not the password at all',
        )
        times[kind].push(performance.now() - started)
        expect(answer.status).toBe(401)
        texts.add(JSON.stringify({ ...answer.json, requestId: '' }))
      }
    expect(texts.size).toBe(1)
    const median = (list: number[]) => list.sort((a, b) => a - b)[Math.floor(list.length / 2)] as number
    const [known, unknown] = [median(times.known), median(times.unknown)]
    expect(unknown).toBeGreaterThan(known / 2)
    expect(unknown).toBeLessThan(known * 2)
  })

  test('takes the address in any case', async () => {
    const { mail } = await signUp(service.url)
    expect((await signIn(new Client(service.url), mail.toUpperCase())).status).toBe(200)
  })
})

describe('sign-up', () => {
  const wish = { mail: 'taken@example.org', password: PASSWORD, name: 'Jo Tester', accountName: 'Test House' }
  const signUpWith = (change: object) => new Client(service.url).post('/portal/v1/sign-up', { ...wish, ...change })

  test('refuses an address that is in use', async () => {
    expect((await signUpWith({})).status).toBe(201)
    expect((await signUpWith({ mail: 'TAKEN@example.org' })).json).toMatchObject({ status: 409, code: 'mail-in-use' })
  })

  test.each([
    ['short', 'fourteen chars'],
    ['longer than is compared', 'ä'.repeat(37)],
    ['well known', 'passwordpassword1234'],
    ['one word of the service', 'soakstonesoakstone'],
    ['the address again', 'taken@example.org'],
    ['one letter', 'aaaaaaaaaaaaaaaaaaaa'],
    ['a run of letters', 'ghijklmnopqrstuvwx'],
  ])('refuses a password that is %s', async (_, password) => {
    const answer = await signUpWith({ password })
    expect(answer.json).toMatchObject({ status: 422, code: 'invalid-input' })
    expect(answer.json.errors[0].pointer).toBe('#/password')
    expect(answer.text).not.toContain(password)
  })

  test.each([
    ['NUL', 'Jo\u0000Tester'],
    ['half a surrogate pair', 'Jo \ud800 Tester'],
    ['a line break', 'Jo\r\nTester'],
    ['blanks at the end', 'Jo Tester '],
    ['nothing', ''],
    ['too much', 'x'.repeat(101)],
  ])('refuses a name with %s', async (_, name) => {
    const answer = await signUpWith({ mail: 'name@example.org', name })
    expect(answer.json).toMatchObject({ status: 422 })
    expect(answer.json.errors[0].pointer).toBe('#/name')
  })

  test.each(['Zoë Ångström-李', '👩‍🔬 emoji', 'e\u0301 decomposed', '<script>alert(1)</script>'])(
    'keeps the name %s as it is',
    async (name) => {
      const client = new Client(service.url)
      await client.post('/portal/v1/sign-up', { ...wish, mail: `n${Math.random()}@example.org`, name })
      expect((await client.call('/portal/v1/session')).json.person.name).toBe(name)
    },
  )

  test('takes no field that would give rights', async () => {
    for (const field of ['role', 'trialLimit', 'id', 'accountId'])
      expect((await signUpWith({ mail: 'rights@example.org', [field]: 'owner' })).json.errors[0]).toMatchObject({
        code: 'unknown-field',
      })
  })
})

test('an account has at most 100 living keys', async () => {
  const { client } = await signUp(service.url)
  const made = []
  for (let n = 0; n < 100; n++) made.push(await makeKey(client))
  expect((await client.post('/portal/v1/keys', { name: 'one more' })).json).toMatchObject({
    status: 409,
    code: 'too-many-keys',
  })
  await client.post(`/portal/v1/keys/${made[0]?.id}/revoke`)
  expect((await client.post('/portal/v1/keys', { name: 'one more' })).status).toBe(201)
})
