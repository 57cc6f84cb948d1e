import { readFileSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import { operationsOf } from '../../../solvers/operations/index.ts'
import { caseOf } from '../ask.ts'
import { D } from '../exact/functions.ts'
import { kinds, type Row } from '../reference-rows.ts'
import { askOperation, type Depths, prepared, type Reached, refusalOf } from './ask-operation.ts'

const screed = {
  thickness: 0.065,
  conductivity: 1.4,
  volumetricHeatCapacity: 2e6,
  imposedHeatFlux: 60,
  back: { kind: 'convection', ambientTemperature: 18, filmCoefficient: 10.8 },
  initialTemperature: 18,
  depth: 0.065,
}
const reach = (caseId: string, body: Record<string, unknown>) => askOperation<Reached>('time-to-reach', caseId, body)
const screedTo = (asked: Record<string, unknown>) => reach('slab-surface-flux', { ...screed, ...asked }).result

describe('a screed that a mat warms from below', () => {
  test('reaches 22 degrees at its other face', () => {
    const { result, accuracy, input, units } = reach('slab-surface-flux', { ...screed, target: 22 })
    expect(result.outcome).toBe('reached')
    expect(result.crossings).toHaveLength(1)
    expect(result.crossings[0]).toBeCloseTo(18918.4356685342, 9)
    expect(result.directions).toEqual(['rising'])
    expect(result.asymptote).toBeCloseTo(23.5555555555556, 13)
    expect(result.rateAtTarget! * 1e4).toBeCloseTo(1.10254563, 8)
    expect(result.timePerTenthKelvin).toBeCloseTo(906.99194, 5)
    expect(accuracy.bound['crossings']!.absolute).toBeLessThan(1e-9 * 18918)
    expect(input).toMatchObject({ depths: [0.065], quantity: 'temperature', target: 22, sense: 'rises-to' })
    expect(units).toMatchObject({ crossings: 's', target: 'Cel', rateAtTarget: 'K/s' })
  })

  test('takes its time near the end', () => {
    const { crossings, timePerTenthKelvin } = screedTo({ target: 23.5 })
    expect(crossings[0]).toBeCloseTo(65931.72105, 5)
    expect(timePerTenthKelvin).toBeCloseTo(25395.774, 3)
  })

  test('never gets beyond what it tends to', () => {
    const never = { outcome: 'never', crossings: [], directions: [], asymptote: expect.closeTo(23.5555555555556, 13) }
    expect(screedTo({ target: 24 })).toEqual(never)
    expect(screedTo({ target: 17 })).toEqual(never)
    expect(screedTo({ target: 17, sense: 'rises-to' })).toEqual({ ...never, outcome: 'already' })
    expect(screedTo({ target: 22, until: 18918 })).toMatchObject({ outcome: 'never', crossings: [] })
    expect(screedTo({ target: 22, until: 18919 })).toMatchObject({ outcome: 'reached' })
  })

  test('is refused where the target is the end itself', () => {
    const [issue] = refusalOf('time-to-reach', 'slab-surface-flux', { ...screed, target: 18 + 60 / 10.8 })
    expect(issue).toMatchObject({ pointer: '#/target', code: 'target-at-asymptote' })
    expect(refusalOf('time-to-reach', 'slab-surface-flux', { ...screed, target: 23.5555555 })).toEqual([])
  })
})

test('a settled cycle passes its target twice a year', () => {
  const year = 31557600
  const cycle = { cycleMean: 10, amplitude: 12, period: year, timeOfMaximum: 0 }
  const body = { conductivity: 1, diffusivity: 5e-7, ...cycle, depth: 1, target: 5 }
  const { result } = reach('semi-infinite-periodic-surface', { ...body, until: year })
  expect(result.crossings.map((t) => t.toFixed(4))).toEqual(['13690931.5365', '22348876.8621'])
  expect(result.directions).toEqual(['falling', 'rising'])
  expect(result.asymptote).toBeNull()
  const long = reach('semi-infinite-periodic-surface', { ...body, until: 50 * year }).result
  expect(long.crossings).toHaveLength(100)
  expect(long.crossings[99]).toBeCloseTo(49 * year + result.crossings[1]!, 4)
  const [missing] = refusalOf('time-to-reach', 'semi-infinite-periodic-surface', body)
  expect(missing).toMatchObject({ pointer: '#/until', code: 'missing-field' })
  const [tooLong] = refusalOf('time-to-reach', 'semi-infinite-periodic-surface', { ...body, until: 401 * year })
  expect(tooLong).toMatchObject({ pointer: '#/until', code: 'out-of-range' })
})

test('a pour passes a difference of 19 K, and comes back through it', () => {
  const { result, units } = reach('slab-internal-heat', { ...pour, depths: [1, 0], target: 19 })
  expect(result.crossings[0]).toBeCloseTo(110546.338, 3)
  expect(result.directions).toEqual(['rising', 'falling'])
  expect(result.asymptote).toBe(0)
  expect(units['target']).toBe('K')
})

const pour = {
  thickness: 1,
  exposedFaces: 1,
  conductivity: 2.3,
  volumetricHeatCapacity: 2.4e6,
  filmCoefficient: 6,
  initialTemperature: 20,
  ambientTemperature: 15,
  source: { kind: 'hydration', adiabaticRise: 48, timeConstant: 72000 },
}

describe('concrete in the frost', () => {
  const concrete = {
    conductivity: 1.4,
    volumetricHeatCapacity: 2e6,
    filmCoefficient: 20,
    initialTemperature: 12,
    ambientTemperature: -10,
    target: 0,
  }
  test.each([
    ['semi-infinite-convection', { depth: 0.05 }, 6.74168538898472],
    ['edge-quarter-space', { point: { x: 0.05, y: 0.05 } }, 2.1285491187464],
    ['corner-octant', { point: { x: 0.05, y: 0.05, z: 0.05 } }, 1.28204904258648],
  ])('%s freezes in time', (id, place, hours) => {
    const { result } = reach(id, { ...concrete, ...place })
    expect(result.crossings[0]! / 3600).toBeCloseTo(hours, 11)
    expect(result.asymptote).toBe(-10)
  })
})

test('a pulse is passed on the way up and on the way down, and its kink is seen', () => {
  const pulse = {
    conductivity: 1,
    diffusivity: 1e-6,
    initialTemperature: 20,
    imposedHeatFlux: 1000,
    pulseDuration: 3600,
  }
  const peak = 20 + (2000 * Math.sqrt((1e-6 * 3600) / Math.PI)) / 1
  const { result } = reach('semi-infinite-surface-flux', { ...pulse, depth: 0, target: peak - 1e-3 })
  expect(result.directions).toEqual(['rising', 'falling'])
  expect(result.crossings[0]).toBeLessThan(3600)
  // After the pulse the face falls as a root of time: a thousandth of a kelvin is gone within a microsecond.
  const slope = 2000 * Math.sqrt(1e-6 / Math.PI)
  expect((result.crossings[1]! - 3600) * 1e7).toBeCloseTo((1e-3 / slope) ** 2 * 1e7, 3)
  expect(result.asymptote).toBe(20)
  expect(reach('semi-infinite-surface-flux', { ...pulse, depth: 0, target: peak + 1e-6 }).result.outcome).toBe('never')
})

test('a flash ends where its heat is spread evenly, which half of it is reached on the way to', () => {
  const [a, thickness] = [1e-5, 0.003]
  const body = { conductivity: 30, diffusivity: a, thickness, initialTemperature: 20, back: { kind: 'insulated' } }
  const flash = { imposedHeatFlux: 1e10, pulseDuration: 1e-6 }
  const end = 20 + 1e4 / ((30 / a) * thickness)
  const asked = { ...body, ...flash, depth: thickness }
  const { result } = reach('slab-surface-flux', { ...asked, target: (20 + end) / 2 })
  expect(result.asymptote).toBeCloseTo(end, 12)
  // Half of the rise of the back: a t = 0.1388 L2, to as much as the pulse is not one instant.
  expect((a * result.crossings[0]!) / thickness ** 2).toBeCloseTo(0.1388, 4)
  const [mean] = refusalOf('time-to-reach', 'slab-surface-flux', {
    ...body,
    ...flash,
    quantity: 'meanTemperature',
    target: end,
  })
  expect(mean).toMatchObject({ code: 'target-at-asymptote' })
})

test('a face that jumps is there at once, without a rate', () => {
  const body = {
    conductivity: 1,
    diffusivity: 1e-6,
    initialTemperature: 20,
    surfaceTemperature: 0,
    depth: 0,
    target: 10,
  }
  const { result } = reach('semi-infinite-surface-temperature', body)
  expect(result).toEqual({ outcome: 'reached', crossings: [0], directions: ['falling'], asymptote: 0 })
})

test('shares of the change, and the mean, are reached as temperatures are', () => {
  const body = { heatCapacity: 1000, area: 1, filmCoefficient: 10, initialTemperature: 60, ambientTemperature: 20 }
  const half = reach('lumped-convection', { ...body, quantity: 'remainingFraction', target: 0.5 })
  expect(half.result.crossings[0]).toBeCloseTo(100 * Math.LN2, 11)
  expect(half.result.asymptote).toBe(0)
  expect(half.result.rateAtTarget).toBeCloseTo(-0.005, 14)
  expect(half.result.timePerTenthKelvin).toBeUndefined()
  expect(half.units['rateAtTarget']).toBe('/s')
  const idle = reach('lumped-convection', { ...body, filmCoefficient: 0, target: 40 })
  expect(idle.result).toMatchObject({ outcome: 'never', asymptote: 60 })
})

describe('reference times and depths', () => {
  const url = new URL('../../reference/values/J_inverse.json', import.meta.url)
  const rows = JSON.parse(readFileSync(url, 'utf8')) as (Row & { inputs: Record<string, unknown> })[]

  function bodyOf(row: Row) {
    const inputs = { ...row.inputs } as Record<string, number>
    const { caseId, body } = kinds[(row.inputs as Record<string, unknown>)['problem'] as string]!.ask(inputs)
    const { times: _, ...rest } = body
    return { caseId, body: { ...rest, target: inputs['target_C'] }, time: inputs['time_s'] }
  }

  test.each(rows.filter((row) => row.case === 'J1').map((row) => [row.id, row] as const))('%s', (_, row) => {
    const { caseId, body } = bodyOf(row)
    const { result, accuracy } = reach(caseId, body)
    const expected = row.expected['time_s']!
    const off = Number(new D(result.crossings[0]!).minus(expected).abs())
    expect(result.crossings).toHaveLength(1)
    expect(off).toBeLessThanOrEqual(accuracy.bound['crossings']!.absolute)
    expect(accuracy.bound['crossings']!.absolute).toBeLessThanOrEqual(1e-9 * Number(expected))
  })

  test.each(rows.filter((row) => row.case === 'J2').map((row) => [row.id, row] as const))('%s', (_, row) => {
    const { caseId, body, time } = bodyOf(row)
    const { depths: __, ...fields } = body as Record<string, unknown>
    const { result, accuracy } = askOperation<Depths>('depth-reached', caseId, { ...fields, time })
    const off = Number(new D(result.depth!).minus(row.expected['depth_m']!).abs())
    expect(result.depths).toHaveLength(1)
    expect(off).toBeLessThanOrEqual(accuracy.bound['depths']!.absolute)
    expect(accuracy.bound['depths']!.absolute).toBeLessThanOrEqual(1e-9 * result.depth!)
  })

  test('are all there', () => {
    expect(
      rows
        .map((row) => row.case)
        .sort()
        .join(''),
    ).toBe('J1'.repeat(25) + 'J2'.repeat(8))
  })
})

describe('a call that makes no sense', () => {
  const slab = {
    conductivity: 2,
    volumetricHeatCapacity: 2e6,
    thickness: 0.2,
    exposedFaces: 2,
    filmCoefficient: 10,
    initialTemperature: 20,
    ambientTemperature: -5,
    target: 0,
  }
  test.each([
    ['no place', {}, '#/depth', 'missing-field'],
    ['two places', { depth: 0.1, depths: [0, 0.1] }, '#/depths', 'conflicting-fields'],
    ['three depths', { depths: [0, 0.1, 0.2] }, '#/depths', 'wrong-length'],
    ['a place of a mean', { depth: 0.1, quantity: 'meanTemperature' }, '#/depth', 'conflicting-fields'],
    ['a depth outside', { depth: 0.3 }, '#/depth', 'depth-outside-body'],
    ['a second depth outside', { depths: [0, 0.3] }, '#/depths/1', 'depth-outside-body'],
    ['a negative depth', { depth: -0.1 }, '#/depth', 'out-of-range'],
    ['a quantity that it has not', { depth: 0.1, quantity: 'frontDepth' }, '#/quantity', 'not-in-list'],
    ['times', { depth: 0.1, times: [1] }, '#/times', 'unknown-field'],
    [
      'a unit on a difference',
      { depths: [0.1, 0], target: { value: 1, unit: 'Cel' } },
      '#/target',
      'unit-not-accepted',
    ],
    ['a second heat capacity', { depth: 0.1, diffusivity: 1e-6 }, '#/diffusivity', 'conflicting-fields'],
  ])('is refused: %s', (_, change, pointer, code) => {
    const issues = refusalOf('time-to-reach', 'slab-convection', { ...slab, ...change })
    expect(issues.map((issue) => `${issue.pointer} ${issue.code}`)).toContain(`${pointer} ${code}`)
  })

  test('takes a target in another unit', () => {
    const celsius = reach('slab-convection', { ...slab, depth: 0.1, target: 5 }).result.crossings
    const target = { value: 41, unit: '[degF]' }
    expect(reach('slab-convection', { ...slab, depth: 0.1, target }).result.crossings).toEqual(celsius)
  })
})

test('a ramp is followed from its start, and a cycle for as long as is said', () => {
  const body = { heatCapacity: 10000, area: 1, filmCoefficient: 10, initialTemperature: 0, target: 8 }
  const ramp = { kind: 'ramp', start: 0, rampRate: 30 / 3600 }
  const { result } = reach('lumped-varying-ambient', { ...body, ambient: ramp })
  expect(result).toMatchObject({ outcome: 'reached', directions: ['rising'], asymptote: null })
  // T = r (t - tau (1 - exp(-t/tau))), tau 1000 s.
  const t = result.crossings[0]!
  expect((30 / 3600) * (t - 1000 * -Math.expm1(-t / 1000))).toBeCloseTo(8, 11)
  const cycle = { kind: 'cycle', cycleMean: 8, amplitude: 8, period: 7200, timeOfMaximum: 0 }
  const [missing] = refusalOf('time-to-reach', 'lumped-varying-ambient', { ...body, ambient: cycle })
  expect(missing).toMatchObject({ pointer: '#/until', code: 'missing-field' })
  const cycled = reach('lumped-varying-ambient', { ...body, ambient: cycle, until: 72000 }).result
  expect(cycled.crossings).toHaveLength(21)
  expect(cycled.crossings[20]! - cycled.crossings[18]!).toBeCloseTo(7200, 6)
})

test('a target that is passed long before a ramp is at its end is not lost beside it', () => {
  const body = { heatCapacity: 4500, area: 1, filmCoefficient: 10, initialTemperature: 20, target: 208 }
  const ambient = { kind: 'ramp', start: 400, rampRate: -0.034 }
  const { result } = reach('lumped-varying-ambient', { ...body, ambient })
  expect(result).toMatchObject({ outcome: 'reached', directions: ['rising', 'falling'], asymptote: null })
  // T = 400 - r (t - tau) - (380 + r tau) exp(-t/tau), tau 450 s.
  for (const t of result.crossings) expect(415.3 - 0.034 * t - 395.3 * Math.exp(-t / 450)).toBeCloseTo(208, 9)
})

test('a long look is worth a thread, and one that any case may take is short', () => {
  const cycle = { kind: 'cycle', cycleMean: 8, amplitude: 8, period: 7200, timeOfMaximum: 0 }
  const body = { heatCapacity: 1e4, area: 1, filmCoefficient: 10, initialTemperature: 0, target: 8, ambient: cycle }
  const size = (until: number) => prepared('time-to-reach', 'lumped-varying-ambient', { ...body, until }).size
  expect(size(7200)).toBeLessThan(1000)
  expect(size(7200 * 400)).toBeGreaterThan(5000)
})

test('is priced as twelve numbers, and a difference as twice that but for the setting up', () => {
  const { times: _, depths: __, ...body } = caseOf('slab-convection').example
  const points = (place: object) =>
    prepared('time-to-reach', 'slab-convection', { ...body, ...place, target: 5 }).points
  expect(points({ depth: 0.1 })).toBe(12 * (1 + 3))
  expect(points({ depths: [0, 0.1] })).toBe(12 * (2 + 3))
  expect(operationsOf(caseOf('lumped-convection')).map(({ id }) => id)).not.toContain('depth-reached')
})
