import type pg from 'pg'
import { createDatabase } from '../database.ts'
import { createKey } from '../keys/queries.ts'
import { reachOf } from '../permissions.ts'
import { account, agents, members } from './firm.ts'
import { keyWorks, layOutFirm, layOutUsage } from './lay-out.ts'
import { demoSecrets, keepSecrets } from './secrets.ts'

export interface Demo {
  signIns: { role: string; mail: string; password: string }[]
  key: string
}

interface Wish {
  pool: pg.Pool
  /** Where passwords and key are kept. */
  folder: string
  publicUrl: string
}

/** The owner of the demo's account, as the caller of what an owner may do. */
export function demoOwner() {
  const owner = members[0]
  const reach = reachOf('owner', 'keys:create')
  if (!owner || !reach) throw new Error('the demo has no owner')
  return { kind: 'session' as const, personId: owner.id, accountId: account.id, role: 'owner' as const, reach }
}

/** Lays out the demo where it is not there yet; gives its sign-ins and a key that works. */
export async function seedDemo({ pool, folder, publicUrl }: Wish): Promise<Demo> {
  const db = createDatabase(pool)
  const secrets = await demoSecrets(folder)
  await layOutFirm(db, secrets)
  await layOutUsage(pool, publicUrl)
  if (!(await keyWorks(db, secrets.key))) {
    secrets.key = (await createKey(db, demoOwner(), { name: 'Demo' })).secret
    await keepSecrets(folder, secrets)
  }
  const signIns = [...members, ...agents].map(({ role, mail }) => ({
    role,
    mail,
    password: secrets.signIns[role]?.password ?? '',
  }))
  return { signIns, key: secrets.key }
}
