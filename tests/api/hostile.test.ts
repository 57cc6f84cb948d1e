import { connect } from 'node:net'
import { gzipSync } from 'node:zlib'
import fc from 'fast-check'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { cases } from '../../solvers/cases/index.ts'
import { operations } from '../../api/operations.ts'
import { Client } from './harness/client.ts'
import { makeKey, query, signUp } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'

const proof = process.env['SOAKSTONE_PROOF'] === '1'
const seed = Number(process.env['SOAKSTONE_SEED'] || 1)

let service: TestService
let client: Client
let secret: string
beforeAll(async () => {
  service = await startTestService()
  ;({ client } = await signUp(service.url))
  ;({ secret } = await makeKey(client))
  await query(service.databaseUrl, 'UPDATE accounts SET trial_limit = 1000000000000')
})
afterAll(() => service.close())

/* Texts, since JSON.stringify writes none of these. */
const numbers = [
  '1e999',
  '-1e999',
  '1e308',
  '-1e308',
  '5e-324',
  '-0',
  '9007199254740993',
  '"12"',
  '0',
  '-1',
  'null',
  'true',
  '[]',
  '{}',
  '1e400',
  '"NaN"',
  '0.1e-400',
]

describe.each(cases.map((c) => [c.id, c] as const))('%s', (_, c) => {
  const fields = Object.keys(c.example)
  test.each(fields)('answers or refuses any number as %s, and never NaN', async (field) => {
    for (const number of numbers) {
      const body = JSON.stringify({ ...c.example, [field]: '@' }).replace(
        '"@"',
        Array.isArray(c.example[field]) ? `[${number}]` : number,
      )
      const answer = await client.solve(c.id, secret, body)
      expect([200, 422], `${field}: ${number} ${answer.text.slice(0, 300)}`).toContain(answer.status)
      if (answer.status === 200 || number !== '"NaN"') expect(answer.text).not.toMatch(/NaN|Infinity/)
      if (answer.status === 200) expect(JSON.stringify(answer.json.result)).not.toContain('null')
      else expect(answer.json.errors.every((e: { pointer: string }) => e.pointer.startsWith('#'))).toBe(true)
    }
  })
})

test('no body whatever gives a fault of ours', async () => {
  const bodies = operations.filter((o) => o.body && (o.access === 'key' || o.access === 'public'))
  const junk = fc.oneof(
    fc.json({ maxDepth: 40 }),
    fc.string({ unit: 'binary' }),
    mutated(bodies.map((o) => o.example?.body)),
  )
  await fc.assert(
    fc.asyncProperty(fc.constantFrom(...bodies), junk, async (o, body) => {
      const answer = await client.call(o.path, { method: 'POST', body, headers: { authorization: `Bearer ${secret}` } })
      expect(answer.status, answer.text).toBeLessThan(500)
      expect(answer.headers.get('content-type')).toMatch(/^application\/(problem\+)?json; charset=utf-8$/)
    }),
    { numRuns: proof ? 3000 : 300, seed },
  )
})

/** A good body with one value changed for the worse. */
function mutated(bodies: unknown[]): fc.Arbitrary<string> {
  return fc.tuple(fc.constantFrom(...bodies), fc.nat(30), fc.jsonValue()).map(([body, at, value]) => {
    const entries = Object.entries(body as object)
    const [name = 'x'] = entries[at % entries.length] ?? []
    return JSON.stringify({ ...(body as object), [name]: value })
  })
}

test.each([
  ['too deep a list', '['.repeat(33) + ']'.repeat(33), 'too-deep'],
  ['brackets in a text', '"' + '['.repeat(1000) + '"', 'invalid-input'],
  ['a byte that is not UTF-8', Buffer.from([0x22, 0xff, 0x22]), 'malformed-json'],
  ['half a surrogate pair', '{"\\ud800": 1}', 'invalid-input'],
  ['NUL in a name', '{"\\u0000": 1}', 'invalid-input'],
  [
    'a hundred thousand names',
    JSON.stringify(Object.fromEntries(Array.from({ length: 100_000 }, (_, i) => [i, i]))),
    'too-many-parts',
  ],
  ['a hundred thousand objects', `[${'{},'.repeat(100_000)}{}]`, 'too-many-parts'],
  ['two hundred thousand wrong entries', JSON.stringify({ times: Array(200_000).fill('x') }), 'invalid-input'],
])('refuses %s quickly', async (_, body, code) => {
  const started = performance.now()
  const path = `/v1/cases/${cases[0]?.id}/solve`
  const headers = { authorization: `Bearer ${secret}`, 'content-type': 'application/json' }
  const response = await fetch(service.url + path, { method: 'POST', body, headers })
  const problem = (await response.json()) as { code: string }
  expect(problem.code).toBe(code)
  expect(performance.now() - started).toBeLessThan(10_000)
})

test('counts a body after decompression, and knows the usual compression', async () => {
  const send = (body: Buffer, encoding: string) =>
    fetch(`${service.url}/v1/cases/${cases[0]?.id}/solve`, {
      method: 'POST',
      body,
      headers: { authorization: `Bearer ${secret}`, 'content-type': 'application/json', 'content-encoding': encoding },
    })
  const bomb = await send(gzipSync(Buffer.alloc(64 * 1024 * 1024, 0x20)), 'gzip')
  expect(await bomb.json()).toMatchObject({ status: 413, code: 'body-too-large' })
  expect((await send(gzipSync(JSON.stringify(cases[0]?.example)), 'gzip')).status).toBe(200)
  expect(await (await send(Buffer.from('{}'), 'gzip')).json()).toMatchObject({ status: 400 })
  expect(await (await send(Buffer.from('{}'), 'compress')).json()).toMatchObject({ status: 415 })
})

test.each([
  ['/v1/cases/..%2f..%2fetc%2fpasswd', 404],
  ['/v1/cases/%00', 404],
  ['/v1/cases/%E0%A4%A', 400],
  ['/v1/cases/', 404],
  ['/V1/cases', 404],
  ['/v1/cases/__proto__', 404],
  ['/v1/cases/constructor', 404],
  ['/v1/requests/%27%20OR%201=1', 401],
  ['/assets/../../package.json', 404],
  ['/assets/%2e%2e/%2e%2e/%2e%2e/package.json', 404],
])('answers %s with %i as a problem', async (path, status) => {
  const answer = await client.call(path)
  expect(answer.json).toMatchObject({ status, requestId: expect.stringMatching(/^req_/) })
})

test.each([
  '/v1/requests/req_%00',
  '/v1/requests/x',
  `/v1/requests/req_${'f'.repeat(32)}`,
  '/v1/requests/%27%20OR%201=1',
])('finds nothing at %s', async (path) => {
  expect((await client.call(path, { headers: { authorization: `Bearer ${secret}` } })).json).toMatchObject({
    status: 404,
    code: 'not-found',
  })
})

test.each([
  ['from=2026-02-30', 'from'],
  ['from=2026-03-02&to=2026-03-01', 'from'],
  ['from=1990-01-01', 'from'],
  ['to=0001-01-01', 'to'],
  ['to=0000-01-01', 'to'],
  ['from=0000-01-01', 'from'],
  ['to=1999-12-31', 'to'],
  ['to=10000-01-01', 'to'],
  ['groupBy=mail', 'groupBy'],
  ['groupBy=day&groupBy=key', 'groupBy'],
  ['groupBy=', 'groupBy'],
  ['to=', 'to'],
])('refuses the usage of %s', async (parameters, name) => {
  const answer = await client.call(`/portal/v1/usage?${parameters}`)
  expect(answer.json).toMatchObject({ status: 422, code: 'invalid-parameter', errors: [{ parameter: name }] })
})

test.each(['2000-01-01', '9999-12-31'])('knows the day %s', async (to) => {
  for (const [path, headers] of [
    ['/portal/v1/usage', {}],
    ['/v1/usage', { authorization: `Bearer ${secret}` }],
  ] as const) {
    const answer = await client.call(`${path}?to=${to}`, { headers })
    expect(answer.json).toMatchObject({ to, rows: [] })
    expect(answer.json.from >= '2000-01-01').toBe(true)
    for (const early of ['to=0001-01-01', 'from=0000-01-01&to=0000-01-02']) {
      const refused = await client.call(`${path}?${early}`, { headers })
      expect(refused.json).toMatchObject({ status: 422, code: 'invalid-parameter' })
    }
  }
})

test.each(['%00', 'x', 'key_%00', `key_${'0'.repeat(33)}`])('revokes no key at %s', async (id) => {
  expect((await client.post(`/portal/v1/keys/${id}/revoke`)).json).toMatchObject({ status: 404, code: 'not-found' })
})

test.each([
  'cursor=x',
  'cursor=%00',
  `cursor=${Buffer.from('req_1').toString('base64url')}`,
  'status=bad',
  `keyId=${'x'.repeat(61)}`,
  'keyId=%00',
  'keyId=key_1',
])('refuses the requests of %s', async (parameters) => {
  expect((await client.call(`/portal/v1/requests?${parameters}`)).json).toMatchObject({
    status: 422,
    code: 'invalid-parameter',
  })
})

test('what a field name says is kept without control characters and keys', async () => {
  const body = `{"${secret}": 1, "\\u0000\\ud800<script>": 2}`
  const answer = await client.solve(cases[0]?.id ?? '', secret, body)
  expect(answer.json.code).toBe('invalid-input')
  await service.service.deps.requestLog.flush()
  const seen = await client.call(`/portal/v1/requests/${answer.headers.get('request-id')}`)
  expect(seen.json.problem).toEqual(answer.json)
  expect(seen.text + answer.text).not.toContain(secret)
})

/** What a bare connection answers to some bytes. */
const raw = (bytes: string) =>
  new Promise<string>((resolve, reject) => {
    const socket = connect(service.service.port, '127.0.0.1', () => socket.write(bytes))
    let text = ''
    socket
      .on('data', (chunk) => (text += String(chunk)))
      .on('close', () => resolve(text))
      .on('error', reject)
  })

test.each([
  ['what is no HTTP', 'hello\r\n\r\n', 400, 'malformed-request'],
  [
    'headers that are too large',
    `GET /healthz HTTP/1.1\r\nHost: x\r\nA: ${'x'.repeat(17_000)}\r\n\r\n`,
    431,
    'header-too-large',
  ],
  [
    'two lengths',
    'POST /healthz HTTP/1.1\r\nHost: x\r\nContent-Length: 1\r\nContent-Length: 2\r\n\r\na',
    400,
    'malformed-request',
  ],
  [
    'a length and chunks',
    'POST /healthz HTTP/1.1\r\nHost: x\r\nContent-Length: 1\r\nTransfer-Encoding: chunked\r\n\r\n0\r\n\r\n',
    400,
    'malformed-request',
  ],
  [
    'an expectation',
    'GET /healthz HTTP/1.1\r\nHost: x\r\nConnection: close\r\nExpect: x\r\n\r\n',
    417,
    'expectation-failed',
  ],
  ['no Host', 'GET /healthz HTTP/1.1\r\nConnection: close\r\n\r\n', 400, 'malformed-request'],
  ['two Hosts', 'GET /healthz HTTP/1.1\r\nConnection: close\r\nHost: a\r\nHost: b\r\n\r\n', 400, 'malformed-request'],
  ['headers that come too slowly', 'GET /healthz HTTP/1.1\r\nHost: x\r\n', 408, 'request-timeout'],
])('refuses %s as a problem', async (_, bytes, status, code) => {
  const started = performance.now()
  const [head = '', body = ''] = (await raw(bytes)).split('\r\n\r\n')
  expect(head).toMatch(new RegExp(`^HTTP/1.1 ${status} `))
  expect(head).toContain('application/problem+json')
  expect(JSON.parse(body)).toMatchObject({ status, code })
  expect(head).toContain(`Request-Id: ${JSON.parse(body).requestId}`)
  expect(performance.now() - started).toBeLessThan(17_000)
})
