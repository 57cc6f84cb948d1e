import { expect, test } from 'vitest'
import { gather } from '../../api/gather.ts'
import { grant } from '../../api/metering/grant.ts'

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
const counters = (accountId: string, keyId: string, limit: number, keyLimit: number | null) => ({
  accountId,
  keyId,
  limit,
  used: 0,
  keyLimit,
  keyUsed: 0,
})

test('a charge that the key refuses takes nothing from the account, and a smaller one after it may pass', () => {
  const decisions = grant(
    [charge('a', 'k1', 50), charge('a', 'k1', 10), charge('a', 'k2', 90), charge('a', 'k2', 1)],
    [counters('a', 'k1', 100, 20), counters('a', 'k2', 100, null)],
  )
  expect(decisions).toEqual([
    { granted: false, level: 'key', limit: 20, remaining: 20 },
    { granted: true, remaining: 10 },
    { granted: true, remaining: 0 },
    { granted: false, level: 'account', limit: 100, remaining: 0 },
  ])
})
