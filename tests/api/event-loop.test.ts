import { gzipSync } from 'node:zlib'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { INLINE_BYTES } from '../../api/compute/compute.ts'
import { BODY_LIMIT, TRY_BODY_LIMIT } from '../../api/cases/limits.ts'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import { type TestDatabase, createTestDatabase } from './harness/database.ts'
import { makeKey, signUp } from './harness/people.ts'
import { type ApiProcess, startProcess } from './harness/processes.ts'

const CONNECTIONS = 8
const ROUNDS = 2
const ATTEMPTS = 5
/** Milliseconds that a call beside them may wait: a busy machine, but no body read on the way. */
const PATIENCE = 400

let database: TestDatabase
let service: ApiProcess
let secret: string
beforeAll(async () => {
  database = await createTestDatabase()
  service = await startProcess(database.url)
  const { client } = await signUp(service.url)
  ;({ secret } = await makeKey(client))
})
afterAll(async () => {
  await service.end()
  await database.drop()
})

/** As large as each path takes it, with the most work a byte. */
const worst = (bytes: number) => {
  const filled = (part: (i: number) => string, start: string, end: string) => {
    let text = start
    for (let i = 0; text.length < bytes - 30; i++) text += (i ? ',' : '') + part(i)
    return text + end
  }
  return {
    blanks: ' '.repeat(bytes - 2) + '{}',
    'empty objects': filled(() => '{}', '[', ']'),
    'small objects': filled(() => '{"":0}', '[', ']'),
    names: filled((i) => `"${i.toString(36)}":0`, '{', '}'),
    'wrong times': filled(() => '-1', '{"times":[', ']}'),
    'long lists of lists': filled(() => '[]', '{"times":[', ']}'),
    'a long name': `{"${'x'.repeat(bytes - 20)}": 1}`,
  }
}

const paths = [
  ['with a key', `/v1/cases/${lumped.id}/solve`, BODY_LIMIT],
  ['without a key', `/portal/v1/try/${lumped.id}/solve`, TRY_BODY_LIMIT],
  ['just below the way to a thread', `/portal/v1/try/${lumped.id}/solve`, INLINE_BYTES],
] as const

test.each(
  paths.flatMap(([who, path, bytes]) => Object.keys(worst(1000)).map((name) => [name, who, path, bytes] as const)),
)('the service answers others while it reads %s %s', async (name, _, path, bytes) => {
  const body = gzipSync((worst(bytes) as Record<string, string>)[name] as string)
  const headers = {
    authorization: `Bearer ${secret}`,
    'content-type': 'application/json',
    'content-encoding': 'gzip',
  }
  const send = async () => {
    const statuses: number[] = []
    for (let n = 0; n < ROUNDS; n++) {
      const answer = await fetch(service.url + path, { method: 'POST', headers, body })
      await answer.arrayBuffer()
      statuses.push(answer.status)
    }
    return statuses
  }
  const refused = (await send())[0]
  expect([400, 422]).toContain(refused)
  const once = async () => {
    let under = true
    const sending = Promise.all(Array.from({ length: CONNECTIONS }, send)).finally(() => (under = false))
    let longest = 0
    while (under) {
      const started = performance.now()
      expect((await fetch(`${service.url}/healthz`)).status).toBe(200)
      longest = Math.max(longest, performance.now() - started)
      await new Promise((resolve) => setTimeout(resolve, 5))
    }
    const statuses = (await sending).flat()
    if (process.env['SHOW']) console.log(`MEASURED ${path} ${bytes} ${name}: ${longest.toFixed(0)} ms, ${statuses}`)
    // On a busy machine a body may also be given up, which is said as 503.
    expect(statuses.filter((status) => ![400, 422, 503].includes(status))).toEqual([])
    expect(statuses).toContain(refused)
    return longest
  }
  // A neighbour on the same machine holds a call up now and then; a body read on the way does so every time.
  let least = Infinity
  for (let n = 0; n < ATTEMPTS && least >= PATIENCE; n++) least = Math.min(least, await once())
  expect(least).toBeLessThan(PATIENCE)
})
