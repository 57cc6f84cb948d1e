import { cases } from '../../solvers/cases/index.ts'
import { DomainError } from '../../solvers/errors.ts'
import { caseOperations } from '../../solvers/operations/index.ts'
import { chargeOf } from '../../solvers/operations/price.ts'
import { caseOperationPath } from '../catalogue/describe.ts'
import { readable } from '../http/readable.ts'
import { render } from '../http/render.ts'
import { newId } from '../ids.ts'
import type { Charge } from '../metering/grant.ts'
import { invalidInput, problemDetails } from '../problems.ts'
import type { LogEntry } from '../requests/log.ts'
import { account, keys } from './firm.ts'
import { type Random, between } from './random.ts'

export interface DemoCall {
  entry: LogEntry
  charge?: Charge
}

/** What the firm asks of: cases of a point a number, so that three weeks of it stay within a trial. */
const usual = cases.filter(({ weight, clock }) => weight === 1 && !clock)

/** One in so many calls has a fault that the domain refuses. */
const FAULTY = 14

/** The calls of one day, in order: each is really asked of its case, so that points, sizes and problems are true. */
export function callsOf(day: Date, random: Random, publicUrl: string): DemoCall[] {
  const rest = day.getUTCDay() % 6 === 0
  const planned = keys.flatMap((key) =>
    Array.from({ length: rest ? Math.ceil(key.calls / 4) : between(random, key.calls - 3, key.calls + 5) }, () => ({
      key,
      at: new Date(day.getTime() + between(random, 6 * 3600, 20 * 3600) * 1000 + between(random, 0, 999)),
    })),
  )
  planned.sort((a, b) => a.at.getTime() - b.at.getTime())
  return planned.map(({ key, at }) => oneCall(key, at, random, publicUrl))
}

function oneCall(key: (typeof keys)[number], at: Date, random: Random, publicUrl: string): DemoCall {
  const c = usual[between(random, 0, usual.length - 1)]
  const o = caseOperations[0]
  if (!c || !o) throw new Error('there is no case to ask')
  const count = between(random, key.times[0], key.times[1])
  const faulty = between(random, 1, FAULTY) === 1
  const times = Array.from({ length: count }, (_, i) => (faulty && i === count - 1 ? -60 : (i + 1) * 600))
  const body = { ...c.example, times }
  const id = newId('req', {
    msecs: at.getTime(),
    random: Uint8Array.from({ length: 16 }, () => between(random, 0, 255)),
  })
  const shared = { at, id, accountId: account.id, keyId: key.id, method: 'POST', path: caseOperationPath(c.id, o.id) }
  const bytesIn = Buffer.byteLength(JSON.stringify(body))
  const started = {
    ...shared,
    caseId: c.id,
    operation: o.id,
    bytesIn,
    milliseconds: between(random, 1200, 4800) / 1000,
  }
  try {
    const call = o.prepare(c, body, 'full')
    const points = chargeOf(call.points)
    const bytesOut = Buffer.byteLength(render(call.run()).text)
    return {
      entry: { ...started, status: 200, points, bytesOut },
      charge: { requestId: id, accountId: account.id, keyId: key.id, caseId: c.id, points, at },
    }
  } catch (error) {
    if (!(error instanceof DomainError)) throw error
    const problem = readable(problemDetails(invalidInput(error.issues), publicUrl, id))
    return {
      entry: {
        ...started,
        status: problem.status,
        points: 0,
        bytesOut: Buffer.byteLength(JSON.stringify(problem)),
        problem,
      },
    }
  }
}
