import pg from 'pg'
import { expect, test } from 'vitest'
import { startCluster } from '../../scripts/postgres.mjs'

async function ask(url: string, statement: string) {
  const client = new pg.Client(url)
  await client.connect()
  try {
    return (await client.query(statement)).rows as Record<string, unknown>[]
  } finally {
    await client.end()
  }
}

test('a throwaway cluster takes a scram password only, survives a crash, and is gone after its stop', async () => {
  const cluster = await startCluster({ ephemeral: true, durable: true })
  try {
    const [role] = await ask(cluster.url, 'SELECT usesuper FROM pg_user WHERE usename = current_user')
    expect(role).toEqual({ usesuper: false })
    const wrong = new URL(cluster.url)
    wrong.password = 'wrong'
    await expect(ask(wrong.href, 'SELECT 1')).rejects.toThrow(/password authentication failed/)
    await ask(cluster.url, 'CREATE TABLE kept AS SELECT 7 AS n')
    await cluster.crash()
    await expect(ask(cluster.url, 'SELECT 1')).rejects.toThrow(/ECONNREFUSED/)
    await cluster.restart()
    expect(await ask(cluster.url, 'SELECT n FROM kept')).toEqual([{ n: 7 }])
  } finally {
    await cluster.stop()
  }
  await expect(ask(cluster.url, 'SELECT 1')).rejects.toThrow(/ECONNREFUSED/)
})
