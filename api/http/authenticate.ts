import { and, eq } from 'drizzle-orm'
import type { Request } from 'express'
import { memberships, staff } from '../../drizzle/schema.ts'
import type { Deps } from '../deps.ts'
import { authenticateKey } from '../keys/authenticate.ts'
import type { Access, Caller, Operation } from '../operation.ts'
import { type Permission, type StaffPermission, reachOf, staffMay } from '../permissions.ts'
import { Problem } from '../problems.ts'

type Gate = (o: Operation, req: Request, deps: Deps) => Promise<Caller>

/** How each kind of access is proved. Rights are read anew for each call, so that a change counts at once. */
const gates: Record<Access, Gate> = {
  public: async () => ({ kind: 'public' }),
  key: (_, req, { findKey }) => authenticateKey(findKey, req.headers.authorization),
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

export function authenticate(o: Operation, req: Request, deps: Deps): Promise<Caller> {
  return gates[o.access](o, req, deps)
}
