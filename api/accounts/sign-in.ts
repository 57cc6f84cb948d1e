import { and, eq } from 'drizzle-orm'
import { accounts, memberships, people, staff } from '../../drizzle/schema.ts'
import type { Database } from '../database.ts'
import type { Deps } from '../deps.ts'
import { countSubject } from '../http/limits.ts'
import { permissionsOf } from '../permissions.ts'
import { Problem } from '../problems.ts'

interface Credentials {
  mail: string
  password: string
}

/** Who has this mail and password; one answer, after one comparison, whatever does not fit. */
export async function signIn(deps: Deps, { mail, password }: Credentials) {
  const { db, compute } = deps
  await countSubject(deps, 'mail', `person ${mail}`)
  const [person] = await db
    .select({ id: people.id, passwordHash: people.passwordHash, accountId: memberships.accountId })
    .from(people)
    .innerJoin(memberships, eq(memberships.personId, people.id))
    .where(eq(people.mail, mail))
    .orderBy(memberships.createdAt)
    .limit(1)
  const fits = await compute.checkPassword(password, person?.passwordHash)
  if (!person || !fits) throw new Problem('sign-in-refused')
  return { personId: person.id, accountId: person.accountId }
}

/** Staff have no second step yet, so they sign in only from the machine itself. */
export async function staffSignIn(deps: Deps, { mail, password }: Credentials) {
  const { db, compute, config } = deps
  if (!config.loopback)
    throw new Problem('forbidden', 'Staff sign in only where the service listens on its own machine alone.')
  await countSubject(deps, 'mail', `staff ${mail}`)
  const [agent] = await db
    .select({ id: staff.id, passwordHash: staff.passwordHash })
    .from(staff)
    .where(eq(staff.mail, mail))
  const fits = await compute.checkPassword(password, agent?.passwordHash)
  if (!agent || !fits) throw new Problem('sign-in-refused')
  return agent.id
}

/** What a session shows of its person and account; read anew, so that a changed role counts at once. */
export async function readSession(db: Database, personId: string, accountId: string) {
  const [row] = await db
    .select({
      person: { name: people.name, mail: people.mail },
      account: { id: accounts.id, name: accounts.name },
      role: memberships.role,
    })
    .from(memberships)
    .innerJoin(people, eq(people.id, memberships.personId))
    .innerJoin(accounts, eq(accounts.id, memberships.accountId))
    .where(and(eq(memberships.personId, personId), eq(memberships.accountId, accountId)))
  if (!row) throw new Problem('sign-in-needed')
  return { ...row, permissions: permissionsOf(row.role) }
}

export async function staffSession(db: Database, staffId: string) {
  const [row] = await db
    .select({ person: { name: staff.name, mail: staff.mail }, role: staff.role })
    .from(staff)
    .where(eq(staff.id, staffId))
  return row
}
