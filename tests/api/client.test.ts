import { createServer, type IncomingHttpHeaders, type RequestListener } from 'node:http'
import type { AddressInfo } from 'node:net'
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest'
import { CutError, createClient, pages, ProblemError } from '../../openapi/client/index.ts'
import slab from '../../solvers/cases/slab-convection/case.ts'
import { makeKey, query, signUp } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'

const wall = {
  conductivity: 2,
  density: 2400,
  specificHeat: 1000,
  thickness: 0.2,
  exposedFaces: 2 as const,
  filmCoefficient: 10,
  initialTemperature: 20,
  ambientTemperature: -5,
  depths: [0, 0.1],
  times: [3600, 36000],
}

describe('against the service', () => {
  let service: TestService
  beforeAll(async () => {
    service = await startTestService()
  })
  afterAll(() => service.close())

  async function newClient() {
    const { client, accountId } = await signUp(service.url)
    const { secret } = await makeKey(client)
    return { accountId, soakstone: createClient({ baseUrl: service.url, key: secret }) }
  }

  test('a wall is solved, its answer typed, and charged once', async () => {
    const { accountId, soakstone } = await newClient()
    const { data, response } = await soakstone.POST('/v1/cases/slab-convection/solve', { body: wall })
    expect(response.status).toBe(200)
    if (!data || !('temperature' in data.result)) throw new Error('no answer')
    expect(data.result.temperature?.[0]?.[0]).toBeCloseTo(13.7751886477336, 12)
    const rows = await query(service.databaseUrl, 'SELECT points FROM ledger WHERE account_id = $1', [accountId])
    expect(rows).toEqual([{ points: '10' }])
  })

  test('a refusal is an error with its problem', async () => {
    const { soakstone } = await newClient()
    const body = { ...wall, depths: [7] }
    const { error } = await soakstone.POST('/v1/cases/slab-convection/solve', { body })
    expect(error).toMatchObject({ code: 'invalid-input', errors: [{ pointer: '#/depths/0' }] })
    const stranger = createClient({ baseUrl: service.url, key: 'none' })
    const answer = await stranger.GET('/v1/usage', {})
    expect(answer.error).toMatchObject({ code: 'key-unknown' })
  })

  test('a batch comes line by line, with its summary in the end', async () => {
    const { soakstone } = await newClient()
    const lines = [0, 0.1, 9].map((depth, i) => ({ id: `r${i}`, case: slab.id, input: { ...wall, depths: [depth] } }))
    const answers = soakstone.batch(lines)
    const told: [string | null, number][] = []
    let next = await answers.next()
    for (; !next.done; next = await answers.next()) told.push([next.value.id, next.value.status])
    expect(told).toEqual([
      ['r0', 200],
      ['r1', 200],
      ['r2', 422],
    ])
    expect(next.value).toMatchObject({ ok: 2, failed: 1 })
    await expect(soakstone.batch([]).next()).rejects.toBeInstanceOf(ProblemError)
  })

  test('the pages of a list are followed to the last', async () => {
    const { soakstone } = await newClient()
    const ids: string[] = []
    let count = 0
    const get = (cursor: string | undefined) =>
      soakstone.GET('/v1/materials', { params: { query: { limit: '40', ...(cursor ? { cursor } : {}) } } })
    for await (const page of pages(get)) {
      count++
      ids.push(...page.materials.map(({ id }) => id))
    }
    expect(count).toBeGreaterThan(2)
    expect(new Set(ids).size).toBe(ids.length)
  })
})

describe('on a bad day', () => {
  const closing: (() => void)[] = []
  afterEach(() => closing.splice(0).forEach((close) => close()))

  /** A service that answers each call in turn as it is told, and what it was called with. */
  async function answering(...answers: RequestListener[]) {
    const calls: IncomingHttpHeaders[] = []
    const server = createServer((req, res) => {
      calls.push(req.headers)
      answers[Math.min(calls.length, answers.length) - 1]?.(req, res)
    })
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
    closing.push(
      () => server.closeAllConnections(),
      () => server.close(),
    )
    const waits: number[] = []
    const wait = async (milliseconds: number) => void waits.push(milliseconds)
    const baseUrl = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
    return { soakstone: createClient({ baseUrl, key: 'k', wait }), calls, waits }
  }

  const problem =
    (status: number, retryable: boolean, headers: Record<string, string> = {}): RequestListener =>
    (_, res) =>
      res
        .writeHead(status, { 'content-type': 'application/problem+json', ...headers })
        .end(JSON.stringify({ code: 'told', status, retryable }))
  const fine: RequestListener = (_, res) =>
    res.writeHead(200, { 'content-type': 'application/json' }).end('{"result":{}}')
  const lost: RequestListener = (req) => req.socket.destroy()

  const solve = (soakstone: ReturnType<typeof createClient>) =>
    soakstone.POST('/v1/cases/slab-convection/solve', { body: wall })

  test('a call is made again under the same key, as late as it was told', async () => {
    const busy = problem(429, true, { 'retry-after': '7' })
    const { soakstone, calls, waits } = await answering(busy, problem(503, true), lost, fine)
    expect((await solve(soakstone)).response.status).toBe(200)
    expect(new Set(calls.map((headers) => headers['idempotency-key'])).size).toBe(1)
    expect(calls[0]?.['idempotency-key']).toMatch(/^[\w-]{36}$/)
    expect(calls).toHaveLength(4)
    expect(waits[0]).toBe(7000)
    expect(waits[1]).toBeGreaterThanOrEqual(500)
    expect(waits[2]).toBeGreaterThan(waits[1] ?? Infinity)
  })

  test.each([
    ['what will not succeed later', problem(429, false), 429],
    ['what was told to wait longer than a minute', problem(503, true, { 'retry-after': '61' }), 503],
    ['what is wrong in itself', problem(422, false), 422],
    ['a fault of the service', problem(500, true), 500],
  ])('%s is not made again', async (_, answer, status) => {
    const { soakstone, calls } = await answering(answer, fine)
    expect((await solve(soakstone)).response.status).toBe(status)
    expect(calls).toHaveLength(1)
  })

  test('it gives up after three more calls', async () => {
    const { soakstone, calls } = await answering(problem(503, true))
    expect((await solve(soakstone)).response.status).toBe(503)
    expect(calls).toHaveLength(4)
    const gone = await answering(lost)
    await expect(solve(gone.soakstone)).rejects.toThrow()
    expect(gone.calls).toHaveLength(4)
  })

  test('a change without a key is not made again when its answer was lost', async () => {
    const { soakstone, calls } = await answering(lost, fine)
    const params = { path: { materialId: 'mat_1' } }
    await expect(soakstone.DELETE('/v1/materials/{materialId}', { params })).rejects.toThrow()
    expect(calls).toHaveLength(1)
  })

  const line = '{"id":"r0","status":200,"points":1,"answer":{}}\n'
  test.each<[string, RequestListener]>([
    ['ends without its summary', (_, res) => res.writeHead(200).end(line)],
    ['breaks', (_, res) => res.writeHead(200).write(line, () => res.destroy())],
    ['ends within a line', (_, res) => res.writeHead(200).end(line + '{"summary":{"ok"')],
  ])('a batch that %s is told to be cut', async (_, answer) => {
    const { soakstone } = await answering(answer)
    const answers = soakstone.batch([{ id: 'r0', case: slab.id, input: wall }])
    expect((await answers.next()).value).toMatchObject({ id: 'r0' })
    await expect(answers.next()).rejects.toBeInstanceOf(CutError)
  })
})
