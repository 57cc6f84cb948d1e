import type { Deps } from './deps.ts'
import { forgetKeys } from './idempotency/claim.ts'
import { pruneLimits } from './http/limits.ts'
import { sweep } from './metering/sweep.ts'
import { dropOldLog } from './requests/retention.ts'

const MINUTE = 60_000

/** What any process may do at any time: coming partitions, charges left without an answer, counters that ran out. */
export function keepHouse({ pool, log }: Deps): () => Promise<void> {
  const chores: Record<string, () => Promise<unknown>> = {
    partitions: () => pool.query('SELECT create_partitions(current_date - 1, current_date + 7)'),
    sweep: async () => {
      const settled = await sweep(pool)
      if (settled > 0) log.info({ settled }, 'charges of failed calls were refunded')
    },
    retention: async () => {
      const days = await dropOldLog(pool)
      if (days > 0) log.info({ days }, 'days of the log that are no longer kept were dropped')
    },
    limits: () => pruneLimits(pool),
    idempotency: () => forgetKeys(pool),
  }
  let round = Promise.resolve()
  const doAll = () => {
    round = round.then(async () => {
      for (const [name, chore] of Object.entries(chores))
        await chore().catch((error: Error) =>
          log.warn({ chore: name, error: error.message }, 'a chore failed and waits for its next turn'),
        )
    })
  }
  doAll()
  const timer = setInterval(doAll, MINUTE)
  return () => {
    clearInterval(timer)
    return round
  }
}
