import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { idempotencyKeyOf } from '../../api/idempotency/idempotency-key.ts'
import { operations } from '../../api/operations.ts'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import { expectBooks } from './harness/books.ts'
import { Client } from './harness/client.ts'
import { gate } from './harness/gate.ts'
import { makeKey, query, signUp } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'

let one: TestService
let two: TestService
let client: Client
let accountId: string
let key: { id: string; secret: string }
beforeAll(async () => {
  one = await startTestService()
  two = await startTestService({ databaseUrl: one.databaseUrl })
  ;({ client, accountId } = await signUp(one.url))
  key = await makeKey(client)
})
afterAll(async () => {
  await two.close()
  await one.close()
})

const sql = <R extends object>(text: string, values: unknown[] = []) =>
  query<R & Record<string, unknown>>(one.databaseUrl, text, values)
const path = `/v1/cases/${lumped.id}/solve`
const material = operations.find(({ id }) => id === 'createMaterial')
const large = { ...lumped.example, times: Array.from({ length: 300 }, (_, i) => i + 1) }

function send(
  idempotencyKey: string,
  body: unknown = lumped.example,
  { url = one.url, to = path, secret = key.secret } = {},
) {
  const headers = { authorization: `Bearer ${secret}`, 'idempotency-key': idempotencyKey }
  return new Client(url).post(to, body, headers)
}
const charges = async () =>
  Number((await sql<{ n: string }>('SELECT count(*) AS n FROM ledger WHERE account_id = $1', [accountId]))[0]?.n)

test.each([
  ['small', lumped.example],
  ['large', large],
])('50 equal %s calls at once on two processes are charged once and have the same bytes', async (_, body) => {
  const [name, before] = [randomUUID(), await charges()]
  const answers = await Promise.all(
    Array.from({ length: 50 }, (__, i) => send(i % 3 ? name : `"${name}"`, body, { url: (i % 2 ? one : two).url })),
  )
  const ok = answers.filter((a) => a.status === 200)
  const busy = answers.filter((a) => a.status === 409)
  expect(ok.length + busy.length).toBe(50)
  for (const answer of busy) {
    expect(answer.json).toMatchObject({ code: 'call-in-flight', retryable: true })
    expect(answer.headers.get('retry-after')).toBe('1')
  }
  const last = await send(name, body)
  expect(last.headers.get('idempotency-replayed')).toBe('true')
  expect(last.headers.get('points-charged')).toBe('0')
  expect(new Set([...ok, last].map((a) => a.text)).size).toBe(1)
  expect(ok.filter((a) => a.headers.get('idempotency-replayed') === null)).toHaveLength(1)
  expect(await charges()).toBe(before + 1)
  await expectBooks(one.databaseUrl, accountId)
})

test('a key that is used for another body or another address is refused, and another account has keys of its own', async () => {
  const name = randomUUID()
  expect((await send(name)).status).toBe(200)
  const others = [
    await send(name, { ...lumped.example, times: [1] }),
    await send(name, material?.example?.body, { to: material?.path ?? '' }),
  ]
  for (const answer of others) expect(answer.json).toMatchObject({ status: 422, code: 'idempotency-key-reused' })
  const { client: stranger } = await signUp(one.url)
  const strangers = await makeKey(stranger)
  const answer = await send(name, lumped.example, { secret: strangers.secret })
  expect([answer.status, answer.headers.get('idempotency-replayed')]).toEqual([200, null])
})

test('a call under way holds its key, and one that fails gives it back', async () => {
  const { compute } = one.service.deps
  const { solve } = compute
  const { passed, open } = gate()
  const name = randomUUID()
  let entered = () => {}
  const inside = new Promise<void>((resolve) => (entered = resolve))
  compute.solve = async () => {
    entered()
    await passed
    throw new Error('planted')
  }
  const failing = send(name)
  try {
    await inside
    expect((await send(name)).json).toMatchObject({ status: 409, code: 'call-in-flight' })
  } finally {
    open()
  }
  expect((await failing.finally(() => (compute.solve = solve))).status).toBe(500)
  const again = await send(name)
  expect([again.status, again.headers.get('idempotency-replayed')]).toEqual([200, null])
  const poor = await makeKey(client, { quota: 5 })
  const second = randomUUID()
  for (const code of ['quota-exceeded', 'quota-exceeded'])
    expect((await send(second, lumped.example, { secret: poor.secret })).json.code).toBe(code)
})

test('a call that died with its process frees its key after two minutes, unless its charge stands', async () => {
  const [died, charged] = [randomUUID(), randomUUID()]
  expect((await send(charged)).status).toBe(200)
  const fingerprint = '(SELECT fingerprint FROM idempotency WHERE key = $2)'
  await sql(
    `INSERT INTO idempotency (account_id, key, fingerprint, request_id) SELECT $1, $3, ${fingerprint}, 'req_of_the_dead'`,
    [accountId, charged, died],
  )
  expect((await send(died)).status).toBe(409)
  await sql("UPDATE idempotency SET at = at - interval '3 minutes'")
  expect((await send(died)).headers.get('idempotency-replayed')).toBeNull()
  expect((await send(died)).headers.get('idempotency-replayed')).toBe('true')
  expect((await send(charged)).headers.get('idempotency-replayed')).toBe('true')
  await sql("UPDATE idempotency SET at = at - interval '25 hours'")
  expect((await send(charged)).headers.get('idempotency-replayed')).toBeNull()
})

test('what a call made is made once, and its answer is kept whole', async () => {
  const name = randomUUID()
  const answers = await Promise.all(
    Array.from({ length: 20 }, () => send(name, material?.example?.body, { to: material?.path ?? '' })),
  )
  const made = answers.filter((a) => a.status === 201)
  expect(answers.filter((a) => a.status === 409)).toHaveLength(20 - made.length)
  const last = await send(name, material?.example?.body, { to: material?.path ?? '' })
  expect(last.headers.get('idempotency-replayed')).toBe('true')
  for (const header of ['location', 'etag']) expect(last.headers.get(header)).toBe(made[0]?.headers.get(header))
  expect(new Set([...made, last].map((a) => a.text)).size).toBe(1)
  expect(await sql('SELECT FROM materials WHERE account_id = $1', [accountId])).toHaveLength(1)
  const wrong = await send(randomUUID(), { ...material?.example?.body, density: -1 }, { to: material?.path ?? '' })
  expect(wrong.status).toBe(422)
})

test('a batch that is sent again is charged once, whole, in part or not at all', async () => {
  const line = (id: string, input: unknown) => `${JSON.stringify({ id, case: lumped.id, input })}\n`
  const [good, wrong] = [line('good', lumped.example), line('wrong', {})]
  const batch = async (name: string, body: string) => {
    const headers = { authorization: `Bearer ${key.secret}`, 'idempotency-key': name }
    return client.post('/v1/batches', body, { ...headers, 'content-type': 'application/x-ndjson' })
  }
  for (const [body, points] of [
    [good + wrong, '10'],
    [wrong, '0'],
  ] as const) {
    const name = randomUUID()
    const [first, again] = [await batch(name, body), await batch(name, body)]
    expect([first.status, again.status]).toEqual([200, 200])
    expect(again.text).toBe(first.text)
    expect([first, again].map((a) => a.headers.get('points-charged'))).toEqual([points, '0'])
    expect((await batch(name, good)).status).toBe(points === '0' ? 200 : 422)
  }
  await expectBooks(one.databaseUrl, accountId)
})

test.each(['', '""', '"open', 'two words', 'a,b', 'ü', 'x'.repeat(256)])('%j is no key', async (header) => {
  expect(() => idempotencyKeyOf(header)).toThrow('The header is no key.')
})

test('a header that is no key is refused by its name', async () => {
  const answer = await send('two words')
  expect(answer.json).toMatchObject({ status: 422, code: 'invalid-parameter' })
  expect(answer.json.errors).toMatchObject([{ header: 'Idempotency-Key', code: 'wrong-form' }])
})
