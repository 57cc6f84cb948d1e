import { randomBytes } from 'node:crypto'
import pg from 'pg'
import { Client } from './client.ts'

export const PASSWORD = 'quiet lime plaster 47'

let people = 0

/** Signs up a new owner with an account of their own. */
export async function signUp(url: string): Promise<{ client: Client; mail: string; accountId: string }> {
  const client = new Client(url)
  const mail = `person-${++people}-${randomBytes(3).toString('hex')}@example.org`
  const answer = await client.post('/portal/v1/sign-up', {
    mail,
    password: PASSWORD,
    name: 'Jo Tester',
    accountName: 'Test House',
  })
  if (answer.status !== 201) throw new Error(`sign-up answered ${answer.status}: ${answer.text}`)
  return { client, mail, accountId: answer.json.account.id }
}

export async function makeKey(
  client: Client,
  wish: Record<string, unknown> = {},
): Promise<{ id: string; secret: string }> {
  const answer = await client.post('/portal/v1/keys', { name: 'Test key', ...wish })
  if (answer.status !== 201) throw new Error(`making a key answered ${answer.status}: ${answer.text}`)
  return { id: answer.json.key.id, secret: answer.json.secret }
}

/** Runs one statement on a database. */
export async function query<R extends pg.QueryResultRow>(
  databaseUrl: string,
  text: string,
  values: unknown[] = [],
): Promise<R[]> {
  const client = new pg.Client({ connectionString: databaseUrl })
  await client.connect()
  try {
    return (await client.query<R>(text, values)).rows
  } finally {
    await client.end()
  }
}
