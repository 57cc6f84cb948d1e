import { eq, sql } from 'drizzle-orm'
import type pg from 'pg'
import { accounts, keys as keyTable, memberships, people, secrets as secretTable, staff } from '../../drizzle/schema.ts'
import type { Database } from '../database.ts'
import { hashKey, newKey } from '../keys/key.ts'
import { secretRow } from '../keys/queries.ts'
import { allScopes } from '../permissions.ts'
import { chargeAll } from '../metering/charge.ts'
import { durably } from '../metering/transaction.ts'
import { insertLog } from '../requests/log.ts'
import { callsOf } from './calls.ts'
import { account, agents, givenKey, keys, members } from './firm.ts'
import { seeded } from './random.ts'
import type { DemoSecrets } from './secrets.ts'

const DAYS = 21
const DAY = 86_400_000
const SEED = 4600

/** Accounts, people and keys of the demo, as the secrets say; what is there already is left or mended. */
export async function layOutFirm(db: Database, secrets: DemoSecrets): Promise<void> {
  const passwordHash = (role: string) => secrets.signIns[role]?.hash ?? ''
  await db.insert(accounts).values(account).onConflictDoNothing()
  for (const { role, ...person } of members) {
    const hash = { passwordHash: passwordHash(role) }
    await db
      .insert(people)
      .values({ ...person, ...hash })
      .onConflictDoUpdate({ target: people.id, set: hash })
    await db.insert(memberships).values({ accountId: account.id, personId: person.id, role }).onConflictDoNothing()
  }
  for (const agent of agents) {
    const hash = { passwordHash: passwordHash(agent.role) }
    await db
      .insert(staff)
      .values({ ...agent, ...hash })
      .onConflictDoUpdate({ target: staff.id, set: hash })
  }
  for (const { id, name, by, quota } of keys) {
    const secret = id === givenKey.id ? secrets.key : newKey('trial')
    const createdAt = sql`now() - interval '${sql.raw(String(DAYS + 1))} days'`
    const maker = members[by]?.id ?? ''
    const shown = {
      id,
      name,
      quota,
      accountId: account.id,
      environment: 'trial' as const,
      createdBy: maker,
      createdAt,
      scopes: allScopes,
    }
    const row = secretRow(id, secret)
    const laid = await db
      .insert(keyTable)
      .values({ ...shown, prefix: row.prefix })
      .onConflictDoNothing()
      .returning({ id: keyTable.id })
    if (laid.length > 0) await db.insert(secretTable).values(row)
  }
}

/** True where the key opens the demo's account. */
export async function keyWorks(db: Database, key: string): Promise<boolean> {
  const rows = await db
    .select({ revokedAt: keyTable.revokedAt, accountId: keyTable.accountId })
    .from(keyTable)
    .innerJoin(secretTable, eq(secretTable.keyId, keyTable.id))
    .where(eq(secretTable.hash, hashKey(key)))
  return rows.some((row) => row.revokedAt === null && row.accountId === account.id)
}

/** Three weeks of calls up to yesterday, written as real calls are. Does nothing where the account has calls. */
export async function layOutUsage(pool: pg.Pool, publicUrl: string): Promise<void> {
  const { rows } = await pool.query<{ used: boolean; today: string }>(
    `SELECT EXISTS (SELECT FROM ledger WHERE account_id = $1) AS used, (now() AT TIME ZONE 'UTC')::date::text AS today`,
    [account.id],
  )
  if (!rows[0] || rows[0].used) return
  const today = Date.parse(rows[0].today)
  await pool.query('SELECT create_partitions($1::date, current_date + 7)', [new Date(today - (DAYS + 1) * DAY)])
  const random = seeded(SEED)
  await durably(pool, async (client) => {
    for (let back = DAYS; back >= 1; back--) {
      const day = new Date(today - back * DAY)
      const calls = callsOf(day, random, publicUrl)
      const charged = await chargeAll(
        client,
        calls.flatMap((call) => call.charge ?? []),
        day.toISOString().slice(0, 10),
      )
      if (charged.some((one) => !one.decision.granted)) throw new Error('the demo asks for more than its limit')
      await insertLog(
        client,
        calls.map((call) => call.entry),
      )
    }
  })
}
