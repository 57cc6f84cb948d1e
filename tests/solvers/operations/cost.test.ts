import { describe, expect, test } from 'vitest'
import { cases } from '../../../solvers/cases/index.ts'
import { operationsOf } from '../../../solvers/operations/index.ts'
import { caseOf } from '../ask.ts'
import { prepared, refusalOf } from './ask-operation.ts'

const example = caseOf('slab-convection').example
const cost = (body: Record<string, unknown>) => prepared('cost', 'slab-convection', body).run()

test('a solve costs what it answers, and a call its floor', () => {
  const answer = { points: 7, weight: 1, charge: 10, floor: 10, synchronous: true }
  expect(cost({ input: example })).toEqual(answer)
  expect(cost({ operation: 'solve', input: example })).toEqual(answer)
  expect(prepared('cost', 'slab-convection', { input: example }).points).toBe(0)
})

test('what one call may not answer is told', () => {
  const times = Array.from({ length: 100_000 }, (_, i) => i)
  expect(cost({ input: { ...example, times } })).toMatchObject({ points: 200_003, charge: 200_003, synchronous: false })
})

test('each operation of each case costs its points', () => {
  for (const c of cases)
    for (const o of operationsOf(c).filter(({ id }) => id !== 'cost')) {
      const { points } = o.prepare(c, o.example(c), 'full')
      expect(prepared('cost', c.id, { operation: o.id, input: o.example(c) }).run()).toMatchObject({ points })
    }
})

describe('a body that is refused', () => {
  test('is refused through the member that holds it', () => {
    const [issue] = refusalOf('cost', 'slab-convection', { input: { ...example, thickness: -1 } })
    expect(issue).toMatchObject({ pointer: '#/input/thickness', code: 'out-of-range' })
    const [inner] = refusalOf('cost', 'slab-convection', { operation: 'extremes', input: example })
    expect(inner).toMatchObject({ pointer: expect.stringMatching(/^#\/input\//) })
  })
  test('names the operations that the case has', () => {
    const [issue] = refusalOf('cost', 'lumped-convection', { operation: 'depth-reached', input: {} })
    expect(issue).toMatchObject({ pointer: '#/operation', code: 'not-in-list' })
    expect(issue!.accepted).toContain('time-to-reach')
    expect(issue!.accepted).not.toContain('depth-reached')
  })
})
