import { and, eq } from 'drizzle-orm'
import type { Request, Response } from 'express'
import { memberships, staff } from '../../drizzle/schema.ts'
import type { Deps } from '../deps.ts'
import { type FoundKey, refuseOutOfScope } from '../keys/authenticate.ts'
import { isWithin } from '../keys/networks.ts'
import type { Access, Caller, KeyCaller, Operation } from '../operation.ts'
import { type Permission, type Scope, type StaffPermission, reachOf, staffMay } from '../permissions.ts'
import { Problem } from '../problems.ts'
import { refuseOtherPages } from './cors.ts'

type WithoutKey = Exclude<Access, 'key'>
type Gate = (o: Operation, req: Request, deps: Deps) => Promise<Caller>

/** How each kind of access but a key is proved. Rights are read anew for each call, so that a change counts at once. */
const gates: Record<WithoutKey, Gate> = {
  public: async () => ({ kind: 'public' }),
  session: async (o, req, { db }) => {
    const { personId, accountId } = req.session
    if (!personId || !accountId) throw new Problem('sign-in-needed')
    const [member] = await db
      .select({ role: memberships.role })
      .from(memberships)
      .where(and(eq(memberships.personId, personId), eq(memberships.accountId, accountId)))
    if (!member) throw new Problem('sign-in-needed')
    const reach = reachOf(member.role, o.permission as Permission)
    if (!reach) throw new Problem('forbidden', `The role "${member.role}" does not include this.`)
    return { kind: 'session', personId, accountId, role: member.role, reach }
  },
  staff: async (o, req, { db, config }) => {
    const { staffId } = req.session
    if (!staffId || !config.loopback) throw new Problem('sign-in-needed')
    const [agent] = await db.select({ role: staff.role }).from(staff).where(eq(staff.id, staffId))
    if (!agent) throw new Problem('sign-in-needed')
    if (!staffMay(agent.role, o.permission as StaffPermission)) throw new Problem('forbidden')
    return { kind: 'staff', staffId, role: agent.role }
  },
}

export function authenticate(o: Operation & { access: WithoutKey }, req: Request, deps: Deps): Promise<Caller> {
  return gates[o.access](o, req, deps)
}

/** What a key that lives may do from here and for this page; throws what it may not. */
export function authorizeKey(o: Operation, found: FoundKey, req: Request, res: Response, deps: Deps): KeyCaller {
  refuseOtherPages(req, res, found.origins, deps.config)
  const address = req.ip ?? ''
  if (found.addresses.length > 0 && !isWithin(address, found.addresses))
    throw new Problem('address-refused', `The key may not be used from ${address}.`)
  refuseOutOfScope(found, o.scope as Scope)
  const { keyId, secretId, accountId, environment } = found
  return { kind: 'key', keyId, secretId, accountId, environment }
}
