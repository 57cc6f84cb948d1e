import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { answerBatch } from '../../api/batches/batch.ts'
import { answerLines, type LineTask, MOST_LINES, priceLines } from '../../api/batches/lines.ts'
import type { Compute } from '../../api/compute/compute.ts'
import { Problem } from '../../api/problems.ts'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import slab from '../../solvers/cases/slab-convection/case.ts'
import { expectBooks } from './harness/books.ts'
import { Client } from './harness/client.ts'
import { makeKey, query, signUp } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'

let service: TestService
beforeAll(async () => {
  service = await startTestService()
})
afterAll(() => service.close())

const ndjson = (lines: readonly unknown[]) =>
  lines.map((line) => `${typeof line === 'string' ? line : JSON.stringify(line)}\n`).join('')

async function newAccount(wish: { quota?: number } = {}) {
  const { client, accountId } = await signUp(service.url)
  const { secret } = await makeKey(client, wish)
  const headers = { authorization: `Bearer ${secret}`, 'content-type': 'application/x-ndjson' }
  const send = (body: string, more: Record<string, string> = {}) =>
    new Client(service.url).call('/v1/batches', { method: 'POST', body, headers: { ...headers, ...more } })
  const ledger = () =>
    query<{ kind: string; points: number }>(
      service.databaseUrl,
      'SELECT kind, points::int FROM ledger WHERE account_id = $1 AND points <> 0 ORDER BY kind',
      [accountId],
    )
  return { client, secret, accountId, send, ledger }
}

/* eslint-disable-next-line @typescript-eslint/no-explicit-any */
const linesIn = (text: string): any[] =>
  text
    .trimEnd()
    .split('\n')
    .map((line) => JSON.parse(line))

const one = (id: string, depth = 0) => ({
  id,
  case: slab.id,
  operation: 'solve',
  input: { ...slab.example, depths: [depth], times: [3600] },
})

describe('a batch', () => {
  test('answers each line in its place, with the numbers of the single call, and says what it cost', async () => {
    const { send, secret, accountId, ledger } = await newAccount()
    const single = await new Client(service.url).solve(slab.id, secret, { ...one('').input, detail: 'compact' })
    const answer = await send(
      ndjson([
        one('a'),
        { id: 'b', case: slab.id, input: { ...slab.example, depths: [99] } },
        'no JSON',
        { id: 'c', case: 'no-such-case', input: {} },
        { ...one('d'), operation: 'time-to-reach' },
        one('e'),
      ]),
    )
    expect(answer.status, answer.text).toBe(200)
    expect(answer.headers.get('content-type')).toBe('application/x-ndjson; charset=utf-8')
    const lines = linesIn(answer.text)
    const price = lines[0].points
    expect(lines.map((line) => [line.id, line.status])).toEqual([
      ['a', 200],
      ['b', 422],
      [null, 400],
      ['c', 404],
      ['d', 422],
      ['e', 200],
      [undefined, undefined],
    ])
    expect(lines[0].answer).toEqual(single.json)
    expect(lines[0].answer.result.temperature[0][0]).toBeCloseTo(13.7751886477336, 10)
    expect(lines[1].problem.errors[0]).toMatchObject({ pointer: '#/input/depths/0', code: 'depth-outside-body' })
    expect(lines[1].problem).not.toHaveProperty('requestId')
    expect(lines[2].problem).toMatchObject({ code: 'malformed-json' })
    expect(lines[3].problem).toMatchObject({ code: 'not-found' })
    expect(lines[6]).toEqual({ summary: { ok: 2, failed: 4, points: 2 * price } })
    expect(answer.headers.get('points-charged')).toBe(String(Math.max(10, 2 * price)))
    expect(await ledger()).toEqual([
      { kind: 'charge', points: 10 },
      { kind: 'charge', points: Math.max(10, 2 * price) },
    ])
    await expectBooks(service.databaseUrl, accountId)
  })

  test('costs nothing where no line is answered, and nothing is answered where it costs too much', async () => {
    const { send, accountId, ledger } = await newAccount({ quota: 15 })
    const refused = await send(ndjson([{ ...one('a'), case: 'none' }]))
    expect(linesIn(refused.text).at(-1)).toEqual({ summary: { ok: 0, failed: 1, points: 0 } })
    expect(refused.headers.get('points-charged')).toBe('0')
    const dear = await send(ndjson(Array.from({ length: 5 }, (_, i) => one(`r${i}`))))
    expect(dear.json).toMatchObject({ status: 429, code: 'quota-exceeded' })
    expect(await ledger()).toEqual([])
    await expectBooks(service.databaseUrl, accountId)
  })

  test('is of one to ten thousand lines of its own kind', async () => {
    const { send } = await newAccount()
    const line = ndjson(['{}'])
    for (const body of ['\n\n', line.repeat(MOST_LINES + 1)]) {
      const answer = await send(body)
      expect(answer.json).toMatchObject({ status: 422, errors: [{ pointer: '#', code: 'wrong-length' }] })
    }
    expect((await send(line, { 'content-type': 'application/json' })).status).toBe(415)
    expect((await send(line, { accept: 'application/json' })).status).toBe(406)
    expect((await send(line.repeat(MOST_LINES))).status).toBe(200)
  })

  test('of many lines keeps their order, and knows the materials of its account', async () => {
    const { send, client, accountId } = await newAccount()
    const made = await client.post('/portal/v1/materials', {
      name: 'Lime render',
      group: 'mortar',
      conductivity: 0.7,
      density: 1600,
      specificHeat: 900,
      state: 'dry',
      source: 'Own measurement',
      confidence: 'medium',
    })
    expect(made.status, made.text).toBe(201)
    const { conductivity: _k, density: _d, specificHeat: _c, ...rest } = slab.example as Record<string, unknown>
    const own = { id: 'own', case: slab.id, input: { ...rest, material: made.json.id, times: [60] } }
    const lines = [...Array.from({ length: 1500 }, (_, i) => ({ ...lumpedLine, id: `r${i}` })), own]
    const answered = linesIn((await send(ndjson(lines))).text)
    expect(answered.map(({ id }) => id).slice(0, -1)).toEqual(lines.map(({ id }) => id))
    expect(answered.at(-2).status, JSON.stringify(answered.at(-2))).toBe(200)
    expect(answered.at(-1).summary).toMatchObject({ ok: 1501, failed: 0 })
    await expectBooks(service.databaseUrl, accountId)
  })

  test('that nobody waits for is paid, and the books agree', async () => {
    const { secret, accountId, ledger } = await newAccount()
    const stop = new AbortController()
    const answer = await fetch(`${service.url}/v1/batches`, {
      method: 'POST',
      headers: { authorization: `Bearer ${secret}`, 'content-type': 'application/x-ndjson' },
      body: ndjson(Array.from({ length: 5000 }, (_, i) => ({ ...lumpedLine, id: `r${i}` }))),
      signal: stop.signal,
    })
    await answer.body?.getReader().read()
    stop.abort()
    await expectBooks(service.databaseUrl, accountId)
    expect((await ledger()).map(({ kind }) => kind)).toEqual(['charge'])
  })
})

const lumpedLine = { id: 'r', case: lumped.id, input: { ...lumped.example, times: [60] } }

/* Threads that never come to an end with a line of this name. */
const stuck = (name: string) =>
  ({
    priceLines: async (task: LineTask) => priceLines(task),
    answerLines: async (task: LineTask) => {
      if (task.lines.some((line) => line.includes(name))) throw new Problem('solve-too-slow')
      return answerLines(task)
    },
  }) as unknown as Compute

const batchOf = (lines: readonly unknown[]) => ({
  lines: lines.map((line) => JSON.stringify(line)),
  own: new Map(),
  publicUrl: 'https://api.example.org',
})

test('a line that is never done fails alone', async () => {
  const lines = Array.from({ length: 450 }, (_, i) => ({ ...lumpedLine, id: `r${i}` }))
  const texts: string[] = []
  let [ok, failed] = [0, 0]
  for await (const part of answerBatch(batchOf(lines), stuck('"r333"'))) {
    texts.push(part.text)
    ok += part.ok
    failed += part.failed
  }
  const answered = linesIn(texts.join(''))
  expect([ok, failed]).toEqual([449, 1])
  expect(answered.map(({ id }) => id)).toEqual(lines.map(({ id }) => id))
  expect(answered.filter(({ status }) => status !== 200)).toMatchObject([
    { id: 'r333', problem: { code: 'solve-too-slow' } },
  ])
})

test('what is not answered in time fails, and is told so', async () => {
  for await (const { ok, failed, text } of answerBatch(batchOf([lumpedLine]), stuck('none'), -1)) {
    expect([ok, failed]).toEqual([0, 1])
    expect(linesIn(text)).toMatchObject([
      { id: 'r', status: 503, problem: { code: 'solve-too-slow', retryable: true } },
    ])
  }
})
