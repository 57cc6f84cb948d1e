import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { newKey } from '../../api/keys/key.ts'
import { type Operation, problemsOf, usesSession } from '../../api/operation.ts'
import { operations } from '../../api/operations.ts'
import type { ProblemCode } from '../../api/problems.ts'
import type { Answer } from './harness/client.ts'
import { answerFaults } from './harness/documents.ts'
import { query } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'
import { proof } from '../solvers/counts.ts'
import { type World, callerOf, createWorld, exampleBody, pathIn } from './harness/world.ts'

let service: TestService
let world: World
beforeAll(async () => {
  service = await startTestService()
  world = await createWorld(service)
})
afterAll(() => service.close())

interface Change {
  headers?: Record<string, string>
  body?: unknown
  path?: string
  method?: string
}

function ask(
  o: Operation,
  { headers = {}, path = pathIn(world, o), method = o.method.toUpperCase(), ...change }: Change = {},
) {
  const caller = callerOf(world, o)
  const body = 'body' in change ? change.body : exampleBody(o)
  return caller.client.call(path, { method, headers: { ...caller.headers, ...headers }, body })
}

/** The answer is the problem expected, one that the operation lists, and as its document says. */
function expectProblem(o: Operation, answer: Answer, code: ProblemCode): void {
  expect(answer.json?.code, answer.text).toBe(code)
  expect(problemsOf(o)).toContain(code)
  expect(answerFaults(o, answer)).toEqual([])
  expect(answer.json.requestId).toBe(answer.headers.get('request-id'))
  expect(answer.json.type).toBe(`http://soakstone.example/problems/${code}`)
}

const each = (list: readonly Operation[]) => list.map((o) => [o.id, o] as const)

/*
 * The same question to another case is the same code with another description. Each question is walked with a case
 * without places and one with them, all of it; with the other cases it answers its example and names a wrong field.
 */
const walkedCases = ['lumped-convection', 'slab-convection']
const walked = operations.filter((o) => proof || o.caseId === undefined || walkedCases.includes(o.caseId))

describe.each(each(operations))('%s', (_, o) => {
  test('accepts its own example, and answers as its document says', async () => {
    const answer = await ask(o)
    expect(answer.status, answer.text).toBe(o.status)
    expect(answerFaults(o, answer)).toEqual([])
    if (o.access !== 'public') expect(answer.headers.get('cache-control')).toBe('no-store')
    if (o.answer) expect(answer.headers.get('etag')).toMatch(/^"[\w-]{27}"$/)
    expect(answer.headers.get('x-content-type-options')).toBe('nosniff')
  })
})

describe.each(each(operations.filter((o) => o.body)))('%s', (_, o) => {
  test('names a field that it does not have, and no prototype is touched', async () => {
    const given = JSON.stringify(o.example?.body).replace(
      /^\{/,
      '{"__proto__":{"polluted":1},"constructor":{},"nonsense":1,',
    )
    const answer = await ask(o, { body: given })
    expectProblem(o, answer, 'invalid-input')
    const unknown = answer.json.errors
      .filter((e: { code: string }) => e.code === 'unknown-field')
      .map((e: { pointer: string }) => e.pointer)
    expect(unknown.sort()).toEqual(['#/__proto__', '#/constructor', '#/nonsense'])
    expect(({} as Record<string, unknown>)['polluted']).toBeUndefined()
  })
})

describe.each(each(walked))('%s', (_, o) => {
  test('refuses another method and names its own', async () => {
    const answer = await ask(o, { method: 'PATCH', body: '{}' })
    expectProblem(o, answer, 'method-not-allowed')
    expect(answer.headers.get('allow')?.split(', ')).toContain(o.method.toUpperCase())
  })

  test('refuses a query parameter that it does not have', async () => {
    const answer = await ask(o, { path: `${pathIn(world, o)}?nonsense=1` })
    expectProblem(o, answer, 'invalid-parameter')
    expect(answer.json.errors).toMatchObject([{ parameter: 'nonsense', code: 'unknown-field' }])
  })

  test('refuses a query parameter behind a second question mark', async () => {
    const answer = await ask(o, { path: `${pathIn(world, o)}??nonsense=1` })
    expectProblem(o, answer, 'invalid-parameter')
    expect(answer.json.errors).toMatchObject([{ parameter: '?nonsense', code: 'unknown-field' }])
  })

  test('refuses to answer in another form than JSON', async () => {
    expectProblem(o, await ask(o, { headers: { accept: 'text/csv' } }), 'not-acceptable')
  })
})

describe.each(each(operations.filter((o) => o.method === 'get' && o.answer)))('%s', (_, o) => {
  test('is not sent again to whoever has it', async () => {
    const first = await ask(o)
    const headers = { 'if-none-match': first.headers.get('etag') ?? '', 'cache-control': 'max-age=0' }
    const again = await ask(o, { headers })
    expect([200, 304]).toContain(again.status)
    expect(again.status === 304).toBe(again.headers.get('etag') === first.headers.get('etag'))
    expect(answerFaults(o, again)).toEqual([])
    expect((await ask(o, { headers: { ...headers, 'if-none-match': '"another"' } })).status).toBe(200)
  })
})

describe.each(each(walked.filter((o) => o.access === 'key')))('%s', (_, o) => {
  test.each([
    ['no key', undefined, 'key-missing'],
    ['a key that was never given out', `Bearer ${newKey('trial')}`, 'key-unknown'],
    ['a misspelt key', 'Bearer soak_trial_0123456789ABCDEFGHIJKLMNOPQRSTUV1ggZdX', 'key-unknown'],
    ['another kind of credentials', 'Basic c29hazpzdG9uZQ==', 'key-unknown'],
    ['an empty header', '', 'key-unknown'],
  ] as const)('refuses %s', async (__, authorization, code) => {
    const headers: Record<string, string> = authorization === undefined ? {} : { authorization }
    const answer = await world.nobody.call(pathIn(world, o), {
      method: o.method.toUpperCase(),
      headers,
      body: o.example?.body,
    })
    expectProblem(o, answer, code)
    expect(answer.headers.get('www-authenticate')).toMatch(/^Bearer realm="soakstone"/)
  })
})

describe.each(each(walked.filter((o) => o.body)))('%s', (_, o) => {
  test.each([
    ['what is not JSON', '{"times": [1,', 'malformed-json'],
    ['an empty body', '', 'malformed-json'],
    ['NaN', '{"times": [NaN]}', 'malformed-json'],
    ['a comment', '{"a": 1 /* one */}', 'malformed-json'],
    ['what is nested too deeply', '['.repeat(8000) + ']'.repeat(8000), 'too-deep'],
    ['a name that stands twice', '{"a": 1, "\\u0061": 2}', 'duplicate-name'],
    ['a body that is no object', '[]', 'invalid-input'],
    ['null', 'null', 'invalid-input'],
    ['a large body', `"${'x'.repeat(4 * 1024 * 1024)}"`, 'body-too-large'],
  ] as const)('refuses %s', async (__, body, code) => {
    expectProblem(o, await ask(o, { body }), code)
  })

  test('takes a body of its limit, and names the limit to a larger one', async () => {
    const body = JSON.stringify(o.example?.body)
    const limit = o.body?.limit ?? 0
    const answer = await ask(o, { body: body.padEnd(limit) })
    expect(answer.status, answer.text).not.toBe(413)
    expectProblem(o, await ask(o, { body: body.padEnd(limit + 1) }), 'body-too-large')
    expect((await ask(o, { body: body.padEnd(limit + 1) })).json.detail).toMatch(
      `${limit < 2 ** 20 ? `${limit / 1024} kB` : `${limit / 2 ** 20} MB`}, counted after decompression`,
    )
  })

  test('names each field that is missing', async () => {
    expectProblem(o, await ask(o, { body: {} }), 'invalid-input')
  })

  test('refuses another kind of body', async () => {
    const body = JSON.stringify(o.example?.body)
    expectProblem(o, await ask(o, { body, headers: { 'content-type': 'text/plain' } }), 'unsupported-media-type')
    expectProblem(
      o,
      await ask(o, { body, headers: { 'content-type': 'application/json; charset=latin1' } }),
      'unsupported-media-type',
    )
  })

  test.each([
    'charset = utf-16',
    'charset=utf-8; charset=utf-16',
    'charset="utf-16"',
    'charset=',
    'x=1; Charset=UTF-16',
  ])('refuses a body with %s', async (parameters) => {
    const headers = { 'content-type': `application/json; ${parameters}` }
    expectProblem(o, await ask(o, { body: JSON.stringify(o.example?.body), headers }), 'unsupported-media-type')
  })

  test('refuses a byte order mark', async () => {
    expectProblem(o, await ask(o, { body: `\uFEFF${JSON.stringify(o.example?.body)}` }), 'malformed-json')
  })

  test('lists at most 50 faults', async () => {
    const body = Object.fromEntries(Array.from({ length: 1000 }, (__, i) => [`f${i}`, i]))
    const answer = await ask(o, { body })
    expectProblem(o, answer, 'invalid-input')
    expect(answer.json.errors.length).toBeLessThanOrEqual(50)
  })
})

describe.each(each(operations.filter((o) => usesSession(o) && o.method !== 'get')))('%s', (_, o) => {
  test.each([
    ['no origin', { origin: '' }],
    ['another origin', { origin: 'https://elsewhere.example' }],
    ['no page at all', { origin: 'null' }],
    ['a page of the same site', { 'sec-fetch-site': 'same-site' }],
    ['a page of another site', { 'sec-fetch-site': 'cross-site' }],
  ])('refuses a call from %s', async (__, headers) => {
    expectProblem(o, await ask(o, { headers }), 'cross-site')
  })
})

const solves = walked.filter((o) => o.metered && o.caseOperation === 'solve')

describe.each(each(solves))('%s', (_, o) => {
  test('refuses more than one call may ask, before any work', async () => {
    const times = Array.from({ length: 100_000 }, (__, i) => i + 1)
    const places = o.example?.body?.['depths']
      ? { depths: [0, 0.001, 0.002] }
      : { outputs: ['temperature', 'remainingFraction', 'completedFraction'] }
    expectProblem(o, await ask(o, { body: { ...o.example?.body, ...places, times } }), 'too-many-points')
  })
})

describe.each(each(walked.filter((o) => o.metered)))('%s', (_, o) => {
  test('refuses once the points of the period are used up, and consumes nothing', async () => {
    await query(service.databaseUrl, 'UPDATE periods SET "limit" = used + 9')
    const before = await query(service.databaseUrl, 'SELECT sum(used) FROM periods')
    const answer = await ask(o)
    expectProblem(o, answer, 'quota-exceeded')
    expect(answer.json).toMatchObject({ retryable: false })
    expect(answer.json.resetsAt).toMatch(/T00:00:00\.000Z$/)
    expect(answer.headers.get('points-remaining')).toBe('9')
    expect(await query(service.databaseUrl, 'SELECT sum(used) FROM periods')).toEqual(before)
    await query(service.databaseUrl, 'UPDATE periods SET "limit" = 100000')
  })
})
