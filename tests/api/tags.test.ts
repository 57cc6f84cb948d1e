import express from 'express'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { mount } from '../../api/http/mount.ts'
import { recordCalls } from '../../api/http/record.ts'
import { operation } from '../../api/operation.ts'
import { documentOf } from '../../openapi/document.ts'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import { Client } from './harness/client.ts'
import { makeKey, signUp } from './harness/people.ts'
import { PUBLIC_URL, type TestService, startTestService } from './harness/service.ts'

let service: TestService
let client: Client
let key: { id: string; secret: string }
beforeAll(async () => {
  service = await startTestService()
  ;({ client } = await signUp(service.url))
  key = await makeKey(client)
})
afterAll(() => service.close())

const TRACE = '4bf92f3577b34da6a3ce929d0e0e4736'
const solve = (headers: Record<string, string>, body: unknown = lumped.example) =>
  client.post(`/v1/cases/${lumped.id}/solve`, body, { authorization: `Bearer ${key.secret}`, ...headers })
const read = async (id: string | null) => {
  await service.service.deps.requestLog.flush()
  return (await client.call(`/portal/v1/requests/${id}`)).json
}

test("a call is found by its caller's tag, and usage is grouped by it", async () => {
  const tagged = await solve({ 'client-reference': 'Study 7/wall' })
  await solve({ 'client-reference': 'Study 7/wall' }, {})
  await solve({})
  expect(await read(tagged.headers.get('request-id'))).toMatchObject({ reference: 'Study 7/wall', traceId: null })
  const found = (await client.call('/portal/v1/requests?reference=Study%207%2Fwall')).json.requests
  expect(found.map((r: { status: number }) => r.status)).toEqual([422, 200])
  const usage = (await client.call('/portal/v1/usage?groupBy=reference')).json
  expect(usage.rows).toEqual([
    { reference: 'Study 7/wall', calls: 1, points: 10, refused: 1 },
    { reference: null, calls: 1, points: 10, refused: 0 },
  ])
})

test.each(['', ' ', 'x'.repeat(65), 'tab\there', 'gr\u00fcn'])('%j is no tag', async (reference) => {
  const answer = await solve({ 'client-reference': reference })
  expect(answer.json).toMatchObject({ status: 422, code: 'invalid-parameter' })
  expect(answer.json.errors).toMatchObject([{ header: 'Client-Reference' }])
})

test.each([
  [`00-${TRACE}-00f067aa0ba902b7-01`, TRACE],
  [`01-${TRACE}-00f067aa0ba902b7-01-more`, TRACE],
  [`ff-${TRACE}-00f067aa0ba902b7-01`, null],
  [`00-${'0'.repeat(32)}-00f067aa0ba902b7-01`, null],
  [`00-${TRACE}-${'0'.repeat(16)}-01`, null],
  [`00-${TRACE.toUpperCase()}-00f067aa0ba902b7-01`, null],
  ['nonsense', null],
])('the trace of %s is %s', async (traceparent, traceId) => {
  const answer = await solve({ traceparent })
  expect(answer.status).toBe(200)
  expect((await read(answer.headers.get('request-id'))).traceId).toBe(traceId)
})

test('an operation that will end says so in every answer and in its document', async () => {
  const ending = operation({
    id: 'endingOperation',
    document: 'openapi',
    method: 'get',
    path: '/v1/ending',
    tag: 'Health',
    summary: 'Will end',
    access: 'public',
    deprecated: {
      since: new Date('2026-03-01T00:00:00Z'),
      sunset: new Date('2027-03-01T12:00:00Z'),
      successor: '/v1/cases',
    },
    status: 204,
    handle: () => ({}),
  })
  const none = () => undefined
  const app = express().use(recordCalls(service.service.deps))
  app.use(mount([ending], service.service.deps, { portal: none, support: none }))
  app.use(((_error, _req, res, _next) => void res.status(422).end()) as express.ErrorRequestHandler)
  const server = app.listen(0, '127.0.0.1')
  await new Promise((resolve) => server.once('listening', resolve))
  try {
    const { port } = server.address() as { port: number }
    for (const [address, status] of [
      ['/v1/ending', 204],
      ['/v1/ending?nonsense=1', 422],
    ] as const) {
      const answer = await fetch(`http://127.0.0.1:${port}${address}`)
      expect(answer.status).toBe(status)
      expect(answer.headers.get('deprecation')).toBe('@1772323200')
      expect(answer.headers.get('sunset')).toBe('Mon, 01 Mar 2027 12:00:00 GMT')
      expect(answer.headers.get('link')).toBe(
        `<${PUBLIC_URL}/changelog>; rel="deprecation"; type="text/html", </v1/cases>; rel="successor-version"`,
      )
    }
  } finally {
    server.close()
  }
  const { paths } = documentOf('openapi', [ending], '1.0.0') as {
    paths: Record<string, { get: { deprecated: boolean } }>
  }
  expect(paths['/v1/ending']?.get.deprecated).toBe(true)
})
