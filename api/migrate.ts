import { fileURLToPath } from 'node:url'
import { drizzle } from 'drizzle-orm/node-postgres'
import { migrate } from 'drizzle-orm/node-postgres/migrator'
import pg from 'pg'

const migrationsFolder = fileURLToPath(new URL('../drizzle/migrations', import.meta.url))
/** Any number will do, as long as every process takes the same. */
const LOCK = 4_600_001

/** Brings a database to the newest schema; of several processes one does it and the others wait. */
export async function migrateDatabase(connectionString: string): Promise<void> {
  const client = new pg.Client({ connectionString })
  await client.connect()
  try {
    await client.query('SELECT pg_advisory_lock($1)', [LOCK])
    await migrate(drizzle(client), { migrationsFolder })
    await client.query('SELECT create_partitions(current_date - 1, current_date + 7)')
  } finally {
    await client.end()
  }
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const url = process.env['DATABASE_URL']
  if (!url) throw new Error('DATABASE_URL is missing.')
  await migrateDatabase(url)
}
