import { afterAll, beforeAll, expect, test } from 'vitest'
import lumped from '../../solvers/cases/lumped-convection/case.ts'
import { type TestDatabase, createTestDatabase } from '../api/harness/database.ts'
import { Client } from '../api/harness/client.ts'
import { makeKey, query, signUp } from '../api/harness/people.ts'
import { startProcess } from '../api/harness/processes.ts'

let database: TestDatabase
beforeAll(async () => {
  database = await createTestDatabase()
})
afterAll(() => database.drop())

test.each(['SIGTERM', 'SIGINT'] as const)(
  '%s under load cuts no call off, and the process ends well',
  async (signal) => {
    const api = await startProcess(database.url)
    const { client } = await signUp(api.url)
    const key = await makeKey(client)
    const answered: string[] = []
    const refused: string[] = []
    let stopped = false
    const clients = Array.from({ length: 16 }, async () => {
      const own = new Client(api.url)
      while (!stopped)
        try {
          const answer = await own.solve(lumped.id, key.secret, lumped.example)
          expect(answer.status, answer.text).toBe(200)
          answered.push(answer.headers.get('request-id') as string)
        } catch (error) {
          refused.push(String((error as { cause?: { code?: string } }).cause?.code ?? error))
          stopped = true
        }
    })
    while (answered.length < 50 && !stopped) await new Promise((resolve) => setTimeout(resolve, 20))
    expect(await api.end(signal)).toBe(0)
    await Promise.all(clients)
    expect(answered.length).toBeGreaterThanOrEqual(50)
    /* The kernel resets connections that it took but the service never did; a call that was read is answered. */
    expect(
      refused.every((code) => ['ECONNREFUSED', 'ECONNRESET'].includes(code)),
      refused.join(' '),
    ).toBe(true)
    const charged = await query<{ request_id: string }>(
      database.url,
      'SELECT request_id FROM ledger WHERE key_id = $1',
      [key.id],
    )
    expect(charged.map((row) => row.request_id).sort()).toEqual(answered.sort())
    const logged = await query(database.url, 'SELECT FROM log WHERE key_id = $1', [key.id])
    expect(logged).toHaveLength(answered.length)
  },
)

test('a wrong setting or a busy port stops the start with one sentence', async () => {
  await expect(startProcess(database.url, { PORT: 'many' })).rejects.toThrow(
    /ended with 1: PORT is wrong: it must be a port from 0 to 65535\.\n$/,
  )
  await expect(startProcess('mysql://x')).rejects.toThrow(/ended with 1: DATABASE_URL is wrong: .*\n$/)
  const api = await startProcess(database.url)
  try {
    await expect(startProcess(database.url, { PORT: new URL(api.url).port })).rejects.toThrow(
      /is in use; set PORT to another\.\n$/,
    )
  } finally {
    await api.end()
  }
})
