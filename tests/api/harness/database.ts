import { createHash, randomBytes } from 'node:crypto'
import { readFileSync } from 'node:fs'
import { setTimeout as sleep } from 'node:timers/promises'
import pg from 'pg'
import { migrateDatabase } from '../../../api/migrate.ts'

const migrations = new URL('../../../drizzle/migrations/meta/_journal.json', import.meta.url)
const first = new URL('../../../drizzle/migrations/0000_first.sql', import.meta.url)

export interface TestDatabase {
  url: string
  drop(): Promise<void>
}

const named = (url: string, name: string) => Object.assign(new URL(url), { pathname: `/${name}` }).href

/** A database of its own: a clone of one that was migrated once. */
export async function createTestDatabase(): Promise<TestDatabase> {
  const server = process.env['TEST_DATABASE_URL']
  if (!server) throw new Error('TEST_DATABASE_URL is missing: run the tests by npm test.')
  const schema = createHash('sha256')
    .update(readFileSync(migrations))
    .update(readFileSync(first))
    .digest('hex')
    .slice(0, 12)
  const template = `soakstone_template_${schema}`
  const name = `soakstone_test_${randomBytes(6).toString('hex')}`
  await onServer(server, async (client) => {
    await client.query('SELECT pg_advisory_lock(4600002)')
    const { rowCount } = await client.query('SELECT FROM pg_database WHERE datname = $1', [template])
    if (rowCount === 0) {
      await client.query(`CREATE DATABASE "${template}_new"`)
      await migrateDatabase(named(server, `${template}_new`))
      await client.query(`ALTER DATABASE "${template}_new" RENAME TO "${template}"`)
    }
    await client.query(`CREATE DATABASE "${name}" TEMPLATE "${template}"`)
  })
  return { url: named(server, name), drop: () => drop(server, name) }
}

/* The server's own cleaner may be at work in it, whom only the server may end; it is gone soon. */
const NOT_OURS_TO_END = '42501'
const TRIES = 50

async function drop(server: string, name: string): Promise<void> {
  for (let tries = 1; ; tries++)
    try {
      await onServer(server, (client) => client.query(`DROP DATABASE IF EXISTS "${name}" WITH (FORCE)`))
      return
    } catch (error) {
      if ((error as { code?: string }).code !== NOT_OURS_TO_END || tries === TRIES) throw error
      await sleep(200)
    }
}

async function onServer<R>(url: string, work: (client: pg.Client) => Promise<R>): Promise<R> {
  const client = new pg.Client({ connectionString: url })
  await client.connect()
  try {
    return await work(client)
  } finally {
    await client.end()
  }
}
