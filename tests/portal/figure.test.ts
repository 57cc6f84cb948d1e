import fc from 'fast-check'
import { expect, test } from 'vitest'
import { contour, region } from '../../portal/src/figure/contour.ts'
import { gridOf, nearest } from '../../portal/src/figure/grid.ts'
import { type Field, changeOf, cools, rangeOf, temperatureRange, washText } from '../../portal/src/figure/field.ts'
import { layoutOf } from '../../portal/src/figure/layout.ts'
import { degrees, markText, plain } from '../../portal/src/figure/measures.ts'
import { multiples, niceCeiling, niceStep } from '../../portal/src/figure/steps.ts'
import { timeAxis } from '../../portal/src/figure/time-axis.ts'
import { jsonText } from '../../portal/src/components/json-text.ts'

const xs = Array.from({ length: 21 }, (_, i) => i)
const ys = Array.from({ length: 31 }, (_, i) => i)
const plane = (a: number, b: number) => ys.map((y) => xs.map((x) => a * x + b * y))

test('a contour of a plane is the straight line, from edge to edge', () => {
  const lines = contour(xs, ys, plane(1, 2), 20.5)
  expect(lines).toHaveLength(1)
  for (const [x, y] of lines[0] ?? []) expect(x + 2 * y).toBeCloseTo(20.5, 9)
  const ends = [lines[0]?.[0], lines[0]?.at(-1)].map((point) => point?.join()).sort()
  expect(ends).toEqual(['0,10.25', '20,0.25'])
})

test('a level that is never reached has no contour', () => {
  expect(contour(xs, ys, plane(1, 2), 1000)).toEqual([])
  expect(region(xs, ys, plane(1, 2), 1000)).toEqual([])
})

test('the outline of a region is closed and encloses its area', () => {
  const [outline = []] = region(xs, ys, plane(1, 0), 12)
  expect(outline[0]).toEqual(outline.at(-1))
  const area = outline.slice(1).reduce((sum, [x, y], i) => sum + (outline[i]![0] * y - x * outline[i]![1]) / 2, 0)
  expect(Math.abs(area)).toBeCloseTo(8 * 30, 6)
})

test('every point of a contour has the level, for any field', () => {
  fc.assert(
    fc.property(
      fc.array(fc.array(fc.double({ min: -5, max: 5, noNaN: true }), { minLength: 4, maxLength: 4 }), {
        minLength: 4,
        maxLength: 4,
      }),
      (values) => {
        const line = [0, 1, 2, 3]
        for (const [x, y] of contour(line, line, values, 0.1234567).flat()) {
          const [c, r] = [Math.min(2, Math.floor(x)), Math.min(2, Math.floor(y))]
          const [u, v] = [x - c, y - r]
          const at =
            (values[r]![c]! * (1 - u) + values[r]![c + 1]! * u) * (1 - v) +
            (values[r + 1]![c]! * (1 - u) + values[r + 1]![c + 1]! * u) * v
          expect(at).toBeCloseTo(0.1234567, 6)
        }
      },
    ),
  )
})

test('a grid stays within its limit, is ordered, and holds what was asked for', () => {
  const size = fc.double({ min: 1e-3, max: 1e9, noNaN: true })
  const parts = fc.array(fc.double({ min: 0.001, max: 1, noNaN: true }), { maxLength: 40 })
  fc.assert(
    fc.property(size, size, parts, parts, (extent, end, d, t) => {
      const wanted = { depths: d.map((part) => part * extent), times: t.map((part) => part * end) }
      const { depths, times } = gridOf({ extent, end, ...wanted })
      expect(depths.length * times.length).toBeLessThanOrEqual(10_000)
      for (const axis of [depths, times]) expect(axis).toEqual([...axis].sort((a, b) => a - b))
      const shown = (value: number, last: number) => Math.min(last, Number(value.toPrecision(12)))
      for (const time of wanted.times.slice(0, 15)) expect(times).toContain(shown(time, end))
      for (const depth of wanted.depths.slice(0, 15)) expect(depths).toContain(shown(depth, extent))
      expect(depths.at(-1), 'the body ends there').toBeLessThanOrEqual(extent)
      expect(times.at(-1)).toBeLessThanOrEqual(end)
      expect(depths.at(-1)).toBeCloseTo(extent, 3)
    }),
  )
  expect(nearest([0, 1, 4], 2.4)).toBe(1)
})

test('steps are 1, 2, 2.5 or 5 times a power of ten, and enough of them', () => {
  fc.assert(
    fc.property(fc.double({ min: 1e-9, max: 1e12, noNaN: true }), (span) => {
      const step = niceStep(span, 14)
      expect(span / step).toBeLessThanOrEqual(14 + 1e-6)
      expect(span / step).toBeGreaterThan(4.9)
      expect(niceCeiling(span)).toBeGreaterThanOrEqual(span * (1 - 1e-9))
    }),
  )
  expect(multiples(2.5, -10, 10)).toEqual([-10, -7.5, -5, -2.5, 0, 2.5, 5, 7.5, 10])
})

const field = (initial: number, drive: number, values: number[][]): Field => ({
  places: values[0]!.map((_, i) => i / 10),
  along: 'depth',
  times: values.map((_, i) => i * 3600),
  values,
  initial,
  near: { kind: 'film', level: drive },
  far: { kind: 'insulated' },
})

test('a range is never empty, and all that is drawn from it is finite', () => {
  expect(temperatureRange([20, 20])).toEqual({ low: 19, high: 21, step: 0.5 })
  const temperature = fc.double({ min: -273, max: 5000, noNaN: true })
  const difference = fc.oneof(fc.constant(0), fc.double({ min: 1e-14, max: 1000, noNaN: true }))
  fc.assert(
    fc.property(temperature, difference, (initial, more) => {
      const flat = field(initial, initial + more, [
        [initial, initial],
        [initial, initial],
      ])
      const { low, high, step } = rangeOf(flat)
      expect(high).toBeGreaterThan(low)
      expect(low).toBeLessThanOrEqual(initial + 1e-6 * step)
      expect(high).toBeGreaterThanOrEqual(initial + more - 1e-6 * step)
      const marks = multiples(step, low, high).map((level) => markText(level, step))
      expect(marks.length).toBeGreaterThan(1)
      expect(marks.length).toBeLessThan(12)
      expect(new Set(marks).size, marks.join()).toBe(marks.length)
      const { y, across } = layoutOf(flat, 900, true)
      for (const place of [y(initial), across(initial + more)]) expect(Number.isFinite(place)).toBe(true)
      expect(degrees(initial, high - low)).not.toMatch(/NaN/)
    }),
  )
})

test('where no temperature drives a body, what it does is read from its answers', () => {
  const warming: Field = {
    ...field(0, 0, [
      [5, 5, 5],
      [9, 7, 6],
      [14, 9, 7],
    ]),
    initial: undefined,
    near: { kind: 'acting', sign: 'flux' },
  }
  expect(changeOf(warming)).toEqual({ from: 5, to: 10 })
  expect(cools(warming)).toBe(false)
  expect(washText(warming)).toBe('Hatched: above 9 °C.')
  expect(rangeOf(warming)).toEqual({ low: 4, high: 14, step: 2 })
})

test('places that do not start at 0 fill the plan from edge to edge', () => {
  const radii: Field = {
    ...field(20, 5, [
      [20, 20, 20],
      [18, 19, 19.5],
    ]),
    places: [0.05, 0.06, 0.1],
    along: 'radius',
  }
  const { x, left, right } = layoutOf(radii, 900, true)
  expect(x(0.05)).toBe(left)
  expect(x(0.1)).toBe(right)
  const { depths } = gridOf({ from: 0.05, extent: 0.1, end: 60, depths: [0.01, 0.07], times: [] })
  expect([depths[0], depths.at(-1)]).toEqual([0.05, 0.1])
  expect(depths).toContain(0.07)
})

test('the marks of times that begin before 0 lie among them', () => {
  const { measure, ticks } = timeAxis(43_200, -43_200)
  expect(measure.unit).toBe('h')
  expect(ticks).toEqual([-12, -9, -6, -3, 0, 3, 6, 9, 12].map((hours) => hours * 3600))
})

test('numbers carry no zeros that only fill up, and a true minus', () => {
  expect(plain(3168810000)).toBe('3.169 × 10⁹')
  expect(plain(8333330000000, 6)).toBe('8.33333 × 10¹²')
  expect(plain(12345)).toBe('12345')
  expect(plain(86_400)).toBe('86400')
  expect(plain(-0.00002)).toBe('−2 × 10⁻⁵')
  expect(plain(-12.5)).toBe('−12.5')
  expect(plain(0)).toBe('0')
})

test('the hatching of a plan is said in words', () => {
  const cooling = [0, 1, 2, 3, 4].map((row) => [20 - 5 * row, 20 - 4 * row, 20 - 2 * row])
  expect(washText(field(20, -10, cooling))).toBe('Nowhere below 0 °C. Hatched: below 10 °C.')
  const frozen = cooling.map((row) => row.map((value) => value - 4))
  expect(washText(field(20, -10, frozen))).toBe('Hatched: below 0 °C.')
  expect(
    washText(
      field(20, 20, [
        [20, 20],
        [20, 20],
      ]),
    ),
  ).toBeUndefined()
})

test('laid-out JSON is the same JSON', () => {
  fc.assert(
    fc.property(fc.jsonValue(), (value) => {
      expect(JSON.parse(jsonText(value))).toEqual(JSON.parse(JSON.stringify(value)))
    }),
  )
})
