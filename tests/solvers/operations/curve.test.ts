import { describe, expect, test } from 'vitest'
import { courseOf } from '../../../solvers/operations/course.ts'
import { crossingsOf } from '../../../solvers/operations/curve/crossing.ts'
import type { Curve } from '../../../solvers/operations/curve/curve.ts'
import { timeGrid } from '../../../solvers/operations/curve/grid.ts'
import { scan } from '../../../solvers/operations/curve/scan.ts'
import { extremeOf } from '../../../solvers/operations/extremes.ts'
import { caseOf } from '../ask.ts'

/* Curves whose crossings and turns are known, looked at as those of the cases are. */

function curveOf(value: (t: number) => number, bound = 1e-13): Curve & { asked: number } {
  const curve = {
    asked: 0,
    sample(at: readonly number[]) {
      curve.asked += at.length
      return { values: at.map(value), bounds: at.map(() => bound) }
    },
  }
  return curve
}

const plain = { instants: [], period: undefined, settled: false }

describe('crossings', () => {
  test.each([1e-12, 1e-3, 1, 1e6, 1e14])('of a fall with the time constant %s', (tau) => {
    const curve = curveOf((t) => Math.exp(-t / tau))
    const found = crossingsOf(curve, scan(curve, timeGrid(plain, 0, 1e17)), 0.25)
    expect(found).toHaveLength(1)
    expect(Math.abs(found[0]!.at / (tau * Math.log(4)) - 1)).toBeLessThan(1e-15)
    expect(found[0]!.slope! * tau).toBeCloseTo(-0.25, 12)
    expect(found[0]!.bound / tau).toBeGreaterThan(3e-13)
    expect(found[0]!.bound / tau).toBeLessThan(6e-13)
    expect(curve.asked).toBeLessThan(400)
  })

  test.each([0.5, 0.3, 0.25 + 1e-9])('of a hump that passes its target by a share of %s, and by a hair', (target) => {
    // Four times x (1 - x) of x = exp(-t): 1 at t = log 2.
    const curve = curveOf((t) => Math.exp(-t) * -Math.expm1(-t))
    const found = crossingsOf(curve, scan(curve, timeGrid(plain, 0, 1e17)), Math.min(target, 0.25 - 1e-9))
    const share = Math.sqrt(1 - 4 * Math.min(target, 0.25 - 1e-9))
    expect(found.map(({ direction }) => direction)).toEqual(['rising', 'falling'])
    expect(found[0]!.at).toBeCloseTo(-Math.log((1 + share) / 2), 8)
    expect(found[1]!.at).toBeCloseTo(-Math.log((1 - share) / 2), 8)
    found.forEach(({ at, bound }, i) => {
      expect(Math.abs(at + Math.log((1 + (i ? -share : share)) / 2))).toBeLessThanOrEqual(bound)
    })
    expect(crossingsOf(curve, scan(curve, timeGrid(plain, 0, 1e17)), 0.25 + 1e-9)).toEqual([])
  })

  test('that cannot be told from the start or from the end are none', () => {
    const curve = curveOf((t) => 1 - Math.exp(-t), 1e-6)
    const looked = scan(curve, timeGrid(plain, 0, 1e17))
    expect(crossingsOf(curve, looked, 1 - 1e-7)).toEqual([])
    expect(crossingsOf(curve, looked, 1 - 1e-5)).toHaveLength(1)
  })

  test('of a history are found on each of its stretches', () => {
    const times = Array.from({ length: 101 }, (_, i) => i * 3600)
    const saw = (t: number) => Math.abs(((t / 3600) % 2) - 1)
    const curve = curveOf(saw)
    const found = crossingsOf(curve, scan(curve, timeGrid({ ...plain, instants: times }, 0, 360_000)), 0.3)
    expect(found).toHaveLength(100)
    found.forEach(({ at, slope }, i) => {
      expect(Math.abs(at / 3600 - (i + (i % 2 ? 0.3 : 0.7)))).toBeLessThan(1e-12)
      expect(Math.abs(slope! * 3600)).toBeCloseTo(1, 9)
    })
  })
})

test('turns at a kink and between are found, ends are ends', () => {
  const saw = (t: number) => Math.abs(((t / 3600) % 2) - 1) + t * 1e-9
  const curve = curveOf(saw)
  const instants = Array.from({ length: 11 }, (_, i) => i * 3600)
  const looked = scan(curve, timeGrid({ ...plain, instants }, 100, 35_000))
  expect(extremeOf(curve, looked, 1)).toMatchObject({ at: 28_800, value: 1 + 2.88e-5 })
  expect(extremeOf(curve, looked, -1).at).toBe(3600)
  const wave = curveOf((t) => Math.sin(t))
  const turn = extremeOf(wave, scan(wave, timeGrid({ instants: [], period: 2 * Math.PI, settled: true }, -10, 10)), 1)
  expect(Math.abs(turn.at + 1.5 * Math.PI)).toBeLessThan(1e-9)
  expect(turn.value).toBeCloseTo(1, 14)
})

test.each([1e-2, 1e-4, 1e-6])('a turn that is a share of %s before the end of the span is seen', (share) => {
  const curve = curveOf((t) => Math.cos(t))
  const turn = extremeOf(curve, scan(curve, timeGrid(plain, 0, Math.PI * (1 + share))), -1)
  expect(turn.value + 1).toBeLessThan(1e-15)
  const looked = scan(curve, timeGrid(plain, 0, Math.PI * (1 + share)))
  const late = crossingsOf(curve, looked, Math.cos(Math.PI * (1 + share / 2)))
  expect(late.map(({ direction }) => direction)).toEqual(['falling', 'rising'])
})

test('the course of a case is read from its fields, nested ones too', () => {
  const history = { kind: 'temperature', times: [0, 60, 120], values: [1, 2, 3], interpolation: 'linear' }
  const asked = { pulseDuration: 30, boundary: history, layers: [{ thickness: 1, period: 'none' }] }
  const c = caseOf('semi-infinite-surface-flux')
  const resolved = { times: [], outputs: [], cycle: { period: 86400 } }
  expect(courseOf(c, asked, resolved)).toEqual({ instants: [30, 0, 60, 120], period: 86400, settled: false })
})
