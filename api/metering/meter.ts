import type pg from 'pg'
import type { Logger } from 'pino'
import { databaseIsAway } from '../database.ts'
import { Problem } from '../problems.ts'
import { type Charged, chargeAll } from './charge.ts'
import { gather } from '../gather.ts'
import type { Charge } from './grant.ts'
import { limitHeaders, secondsUntil } from './limit-headers.ts'
import { closeCharges, refundCharge } from './refund.ts'
import { durably, UnknownOutcome } from './transaction.ts'

/** Transactions a process has under way at once, and charges that go in one. */
const AT_ONCE = 2
const MOST = 500

export interface Meter {
  /** Spends and counts the call before its answer leaves, and gives the headers of its limits; throws a refusal. */
  spend(charge: Charge): Promise<{ headers: Record<string, string> }>
  /** Lets an open charge stand, now that its answer is there; throws where it was refunded meanwhile. */
  close(requestId: string): Promise<void>
  /** Counters the charge of a call that failed after it; some of its points where only a part did. */
  refund(requestId: string, points?: number): Promise<void>
}

type Outcome = { charged: Charged } | { error: unknown }

export function createMeter(pool: pg.Pool, log: Logger): Meter {
  const charge = gather((charges: Charge[]) => chargeGathered(pool, charges), { atOnce: AT_ONCE, most: MOST })
  const closeOne = gather((ids: string[]) => closeGathered(pool, ids), { atOnce: 1, most: MOST })

  async function spend(one: Charge): Promise<{ headers: Record<string, string> }> {
    const outcome = await charge(one)
    if ('error' in outcome) {
      if (outcome.error instanceof UnknownOutcome)
        log.warn({ requestId: one.requestId }, 'a charge has an unknown outcome')
      throw outcome.error
    }
    const { charged } = outcome
    if (!charged.decision.granted) throw refusalOf(one.points, charged)
    return { headers: limitHeaders(charged) }
  }

  async function close(requestId: string): Promise<void> {
    if (!(await closeOne(requestId)))
      throw new Problem('unavailable', 'The answer took so long that its charge was taken for lost and refunded.')
  }

  async function refund(requestId: string, points?: number): Promise<void> {
    await durably(pool, (client) => refundCharge(client, requestId, points))
  }

  return { spend, close, refund }
}

/** Clients that were refused together should not come back together. */
const SPREAD = 3

function refusalOf(points: number, charged: Charged): Problem {
  const { decision, resetsAt, minuteEnds, now } = charged
  if (decision.granted) throw new Error('what was granted is no refusal')
  const { of, level, limit, left } = decision
  const headers = limitHeaders(charged)
  if (of === 'calls') {
    const wait = secondsUntil(minuteEnds, now) + Math.floor(Math.random() * SPREAD)
    return new Problem('rate-limited', `The ${level} may make ${limit} calls a minute.`, {
      headers: { ...headers, 'Retry-After': String(wait) },
    })
  }
  return new Problem(
    'quota-exceeded',
    `The call needs ${points} points; the ${level} has ${left} of ${limit} left in this period.`,
    { resetsAt: resetsAt.toISOString(), headers },
  )
}

/* One transaction for all. Where it fails for one call's sake the others must not fail with it: call by call then. */
async function chargeGathered(pool: pg.Pool, charges: Charge[]): Promise<Outcome[]> {
  try {
    const all = await durably(pool, (client) => chargeAll(client, charges))
    return all.map((charged) => ({ charged }))
  } catch (error) {
    if (charges.length === 1 || error instanceof UnknownOutcome || databaseIsAway(error))
      return charges.map(() => ({ error }))
    const outcomes: Outcome[] = []
    for (const one of charges) outcomes.push(...(await chargeGathered(pool, [one])))
    return outcomes
  }
}

async function closeGathered(pool: pg.Pool, ids: string[]): Promise<boolean[]> {
  const closed = await durably(pool, (client) => closeCharges(client, ids))
  return ids.map((id) => closed.has(id))
}
