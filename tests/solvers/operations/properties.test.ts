import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { cases } from '../../../solvers/cases/index.ts'
import type { Case } from '../../../solvers/case.ts'
import { DomainError } from '../../../solvers/errors.ts'
import { operationsOf } from '../../../solvers/operations/index.ts'
import { quantitiesOf } from '../../../solvers/operations/question.ts'
import { proof, seed } from '../counts.ts'
import { askOperation, type Depths, type Extremes, partsOf, type Reached, valueAt } from './ask-operation.ts'
import { uniform } from '../draw.ts'
import { nearby } from './nearby.ts'

const numRuns = proof ? 300 : 8
const having = (operation: string) =>
  cases.filter((c) => operationsOf(c).some(({ id }) => id === operation)).map((c) => [c.id, c] as const)

/** An input that its case takes, apart, with its last time; others are not drawn. */
function partsAt(c: Case, input: Record<string, unknown>) {
  const parts = partsOf(c, input)
  const output = quantitiesOf(c)[0]!
  const time = parts.times.reduce((most, t) => Math.max(most, t), 0)
  fc.pre(time > 0 && (parts.axis !== undefined || c.places === 'none'))
  try {
    c.resolve({ ...parts.fields, ...parts.placed, times: [time], outputs: [output] })
  } catch (error) {
    if (!(error instanceof DomainError)) throw error
    fc.pre(false)
  }
  return { ...parts, output, time, asked: { ...parts.fields, ...parts.placed } }
}

/** The place that was asked for, on the axis that is answered. */
function placeAlong(axis: string, asked: Record<string, unknown>): number | undefined {
  const [depth] = (asked['depths'] as number[] | undefined) ?? []
  const [radius] = (asked['radii'] as number[] | undefined) ?? []
  const outer = asked['radius']
  if (axis === 'radii') return radius
  return depth ?? (radius !== undefined && typeof outer === 'number' ? outer - radius : undefined)
}

/** What changes for ever or is known for a while only is looked at until a time. */
const goesOn = (c: Case, fields: object) => c.clock === true || /"period":|"values":/.test(JSON.stringify(fields))

describe.each(having('time-to-reach'))('%s', (_, c) => {
  test('has the target at every time that is answered, and misses none that it was asked for', () => {
    fc.assert(
      fc.property(nearby(c), (input) => {
        const parts = partsAt(c, input)
        const { asked, output, time } = parts
        const start = valueAt(c, asked, output, 0)
        const target = valueAt(c, asked, output, time)
        fc.pre(Math.abs(target.value - start.value) > 100 * (target.bound + start.bound))
        fc.pre(!c.clock || Math.abs(target.value) <= 1e4)
        // A little further, so that the value passes what it has at that time.
        const until = goesOn(c, asked) ? { until: time } : {}
        const wanted = { ...asked, quantity: output, target: (start.value + target.value) / 2, ...until }
        const { result } = askOperation<Reached>('time-to-reach', c.id, wanted)
        expect(result.outcome).toBe('reached')
        expect(result.crossings.some((at) => at < time)).toBe(true)
        for (const at of result.crossings) {
          const there = valueAt(c, asked, output, at)
          expect(Math.abs(there.value - wanted.target)).toBeLessThanOrEqual(there.bound)
        }
      }),
      { numRuns, seed, endOnFailure: true },
    )
  })
})

describe.each(having('extremes'))('%s', (_, c) => {
  test('is nowhere above its maximum or below its minimum', () => {
    fc.assert(
      fc.property(nearby(c), fc.array(uniform, { maxLength: 12 }), (input, shares) => {
        const { asked, output, time } = partsAt(c, input)
        const { result, accuracy } = askOperation<Extremes>('extremes', c.id, {
          ...asked,
          quantity: output,
          until: time,
        })
        const bound = accuracy.bound['value']!.absolute
        for (const share of [0, ...shares, 1]) {
          const there = valueAt(c, asked, output, share * time)
          expect(there.value).toBeLessThanOrEqual(result.maximum.value + bound + there.bound)
          expect(there.value).toBeGreaterThanOrEqual(result.minimum.value - bound - there.bound)
        }
        for (const { value, time: at } of [result.maximum, result.minimum]) {
          const there = valueAt(c, asked, output, at)
          expect(Math.abs(there.value - value)).toBeLessThanOrEqual(bound + there.bound)
        }
      }),
      { numRuns, seed, endOnFailure: true },
    )
  })
})

describe.each(having('depth-reached'))('%s', (_, c) => {
  test('has the target at every depth that is answered', () => {
    let reached = 0
    fc.assert(
      fc.property(nearby(c), (input) => {
        const { fields, asked, time, axis: placed } = partsAt(c, input)
        fc.pre(placed !== undefined)
        const target = valueAt(c, asked, 'temperature', time).value
        fc.pre(Math.abs(target) <= 9999 && target >= -273)
        const { result, accuracy } = askOperation<Depths>('depth-reached', c.id, { ...fields, time, target })
        const [axis, places] = result.depths ? ['depths', result.depths] : ['radii', result.radii!]
        for (const place of places) {
          const there = valueAt(c, { ...fields, [axis!]: [place] }, 'temperature', time)
          expect(Math.abs(there.value - target)).toBeLessThanOrEqual(there.bound)
        }
        const asked_ = placeAlong(axis!, asked)
        if (asked_ === undefined || places.length === 0) return
        const nearest = places.reduce((best, place) => Math.min(best, Math.abs(place - asked_)), Infinity)
        if (nearest <= accuracy.bound[axis!]!.absolute + 1e-9 * Math.abs(asked_)) reached++
      }),
      { numRuns, seed, endOnFailure: true },
    )
    expect(reached).toBeGreaterThan(0)
  })
})
