import { audit } from '../../drizzle/schema.ts'
import type { Deps } from '../deps.ts'
import { instantOf, newId } from '../ids.ts'
import { readableText } from '../http/readable.ts'
import { withoutKeys } from '../keys/key.ts'
import type { StaffCaller } from '../operation.ts'
import { readRequest, requestsOfPrefix } from '../requests/queries.ts'

/** Finds calls of any account. The look is on record before its result is seen. */
export async function findRequests(
  { db, pool }: Deps,
  caller: StaffCaller,
  { query, reason }: { query: string; reason: string },
) {
  const subject = withoutKeys(query)
  await db.insert(audit).values({ ...look(caller, 'requests found', reason), subject })
  if (!instantOf(subject)) return requestsOfPrefix(pool, subject.endsWith('…') ? subject : `${subject}…`)
  const request = await readRequest(pool, subject)
  if (!request) return []
  const { bytesIn: _in, bytesOut: _out, ledger: _ledger, solver: _solver, problem, ...entry } = request
  return [{ ...entry, problem: problem?.code ?? null }]
}

/** Reads one call of any account; the look is on record, with the account it concerned, also where nothing was found. */
export async function readAnyRequest({ db, pool }: Deps, caller: StaffCaller, requestId: string, reason: string) {
  const request = await readRequest(pool, requestId)
  const subject = readableText(requestId).slice(0, 100)
  const accountId = request?.account?.id ?? null
  await db.insert(audit).values({ ...look(caller, 'request read', reason), accountId, subject })
  return request
}

const look = (caller: StaffCaller, action: string, reason: string) => ({
  id: newId('aud'),
  actorKind: 'staff' as const,
  actorId: caller.staffId,
  action,
  reason: withoutKeys(reason),
})
