import { createDatabase } from '../database.ts'
import { revokeKey } from '../keys/change-key.ts'
import { createKey, selectKeys } from '../keys/queries.ts'
import { withDemo } from './from-environment.ts'
import { demoOwner } from './seed-demo.ts'

const NAME = 'Command line'
/** Older keys of this command are revoked, so that asking often does not fill the account. */
const KEPT = 5

const secret = await withDemo(async (_, pool) => {
  const db = createDatabase(pool)
  const made = (await selectKeys(db, demoOwner())).filter((key) => key.name === NAME && key.revokedAt === null)
  for (const old of made.slice(KEPT - 1)) await revokeKey(db, demoOwner(), old.id)
  return (await createKey(db, demoOwner(), { name: NAME })).secret
})
console.log(secret)
