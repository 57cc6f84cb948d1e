import { expect, test } from 'vitest'
import { gather } from '../../api/gather.ts'
import { type Counters, type Decision, grant } from '../../api/metering/grant.ts'

test('what comes while work is under way goes together, in order, and each gets its own result', async () => {
  const batches: number[][] = []
  const open: (() => void)[] = []
  const ask = gather(
    async (items: number[]) => {
      batches.push(items)
      await new Promise<void>((resolve) => open.push(resolve))
      return items.map((i) => i * 2)
    },
    { atOnce: 1, most: 3 },
  )
  const results = Promise.all([1, 2, 3, 4, 5].map(ask))
  while (batches.flat().length < 5) {
    await new Promise((resolve) => setImmediate(resolve))
    open.shift()?.()
  }
  open.shift()?.()
  expect(await results).toEqual([2, 4, 6, 8, 10])
  expect(batches).toEqual([[1], [2, 3, 4], [5]])
})

test('a failure reaches all of its batch and none after it', async () => {
  let fails = true
  const ask = gather(
    async (items: number[]) => {
      await new Promise((resolve) => setImmediate(resolve))
      if (fails) throw new Error('down')
      return items
    },
    { atOnce: 1, most: 10 },
  )
  const first = await Promise.allSettled([ask(1)])
  expect(first[0]?.status).toBe('rejected')
  fails = false
  expect(await ask(2)).toBe(2)
})

const charge = (accountId: string, keyId: string, points: number) => ({
  requestId: 'r',
  accountId,
  keyId,
  caseId: 'c',
  points,
})
interface Limits {
  points?: [account: number, key: number]
  calls?: [account: number, key: number]
}
const counters = (
  accountId: string,
  keyId: string,
  { points = [1000, Infinity], calls = [6000, Infinity] }: Limits,
): Counters => {
  const tallies = ([account, key]: readonly [number, number]) => ({
    account: { limit: account, used: 0 },
    key: { limit: key, used: 0 },
  })
  return { accountId, keyId, environment: 'trial', points: tallies(points), calls: tallies(calls) }
}
const told = (decisions: readonly Decision[]) =>
  decisions.map((d) => (d.granted ? d.standing.points : `${d.of} of the ${d.level}: ${d.left} of ${d.limit}`))

test('a charge that the key refuses takes nothing from the account, and a smaller one after it may pass', () => {
  const decisions = grant(
    [charge('a', 'k1', 50), charge('a', 'k1', 10), charge('a', 'k2', 90), charge('a', 'k2', 1)],
    [counters('a', 'k1', { points: [100, 20] }), counters('a', 'k2', { points: [100, Infinity] })],
  )
  expect(told(decisions)).toEqual(['points of the key: 20 of 20', 10, 0, 'points of the account: 0 of 100'])
})

test('calls count at both levels, and one that any limit refuses counts at none', () => {
  const decisions = grant(
    [charge('a', 'k1', 0), charge('a', 'k1', 5), charge('a', 'k2', 2000), charge('a', 'k2', 5), charge('a', 'k2', 0)],
    [counters('a', 'k1', { calls: [2, 1] }), counters('a', 'k2', { calls: [2, Infinity] })],
  )
  expect(told(decisions)).toEqual([
    1000,
    'calls of the key: 0 of 1',
    'points of the account: 1000 of 1000',
    995,
    'calls of the account: 0 of 2',
  ])
  expect(decisions[1]?.standing.calls).toEqual({ account: { limit: 2, left: 1 }, key: { limit: 1, left: 0 } })
})

test('trial and metered keys share the calls of their account and not its points', () => {
  const decisions = grant(
    [charge('a', 'k1', 90), charge('a', 'k2', 90), charge('a', 'k2', 1)],
    [
      counters('a', 'k1', { points: [100, Infinity], calls: [2, Infinity] }),
      { ...counters('a', 'k2', { points: [100, Infinity], calls: [2, Infinity] }), environment: 'metered' },
    ],
  )
  expect(told(decisions)).toEqual([10, 10, 'calls of the account: 0 of 2'])
})
