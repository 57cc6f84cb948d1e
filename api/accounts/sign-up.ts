import { accounts, audit, memberships, people } from '../../drizzle/schema.ts'
import { DomainError } from '../../solvers/errors.ts'
import { errorCode } from '../database.ts'
import type { Deps } from '../deps.ts'
import { newId } from '../ids.ts'
import { Problem } from '../problems.ts'
import { easilyGuessed, MIN_PASSWORD } from './password-rules.ts'

const UNIQUE_VIOLATION = '23505'

interface Wish {
  mail: string
  password: string
  name: string
  accountName: string
}

/** Opens an account with its owner. */
export async function signUp({ db, compute }: Deps, { mail, password, name, accountName }: Wish) {
  if (easilyGuessed(password, [mail, name, accountName]))
    throw new DomainError([
      {
        pointer: '#/password',
        code: 'wrong-form',
        detail: 'The password is made of little but well-known words, names of this account or repetition.',
        accepted: `at least ${MIN_PASSWORD} characters that are not easily guessed`,
      },
    ])
  const passwordHash = await compute.hashPassword(password)
  const [personId, accountId] = [newId('prsn'), newId('acct')]
  try {
    await db.transaction(async (tx) => {
      await tx.insert(people).values({ id: personId, mail, name, passwordHash })
      await tx.insert(accounts).values({ id: accountId, name: accountName })
      await tx.insert(memberships).values({ accountId, personId, role: 'owner' })
      await tx
        .insert(audit)
        .values({ id: newId('aud'), actorKind: 'person', actorId: personId, accountId, action: 'account opened' })
    })
  } catch (error) {
    if (errorCode(error) === UNIQUE_VIOLATION) throw new Problem('mail-in-use')
    throw error
  }
  return { personId, accountId }
}
