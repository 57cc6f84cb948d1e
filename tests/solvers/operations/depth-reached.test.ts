import { describe, expect, test } from 'vitest'
import { askOperation, type Depths, prepared, refusalOf } from './ask-operation.ts'

const main = { conductivity: 1.5, diffusivity: 6.25e-7, initialTemperature: 9, surfaceTemperature: -12 }
const reach = (caseId: string, body: Record<string, unknown>) => askOperation<Depths>('depth-reached', caseId, body)
const ground = (asked: Record<string, unknown>) =>
  reach('semi-infinite-surface-temperature', { ...main, time: 3888000, ...asked })

describe('the frost over a water main', () => {
  test('has come as deep as the worked example says', () => {
    const { result, accuracy, units, points } = ground({ target: 0 })
    expect(result.outcome).toBe('reached')
    expect(result.depths).toHaveLength(1)
    expect(result.depth).toBe(result.depths![0])
    expect(result.depth).toBeCloseTo(1.7451995846927, 13)
    expect(result.gradient).toBeCloseTo(5.5559310982, 10)
    expect(result.depthPerTenthKelvin).toBeCloseTo(0.0179987833, 10)
    expect(accuracy.bound['depths']!.absolute).toBeLessThan(1e-13)
    expect(units).toMatchObject({ depths: 'm', target: 'Cel', gradient: 'K/m' })
    expect(points).toBe(12)
  })

  test('is nowhere beyond what drives it, or at the start', () => {
    expect(ground({ target: 10 }).result).toEqual({ outcome: 'nowhere', depths: [] })
    expect(ground({ target: -13 }).result).toEqual({ outcome: 'nowhere', depths: [] })
    expect(ground({ target: 0, time: 0 }).result).toEqual({ outcome: 'nowhere', depths: [] })
    expect(ground({ target: -12 }).result).toMatchObject({ outcome: 'reached', depths: [0], depth: 0 })
  })
})

const slab = {
  conductivity: 2,
  volumetricHeatCapacity: 2e6,
  thickness: 0.2,
  filmCoefficient: 10,
  initialTemperature: 20,
  ambientTemperature: -5,
}

test('a body that has cooled below the target has it nowhere and is beyond it everywhere', () => {
  const body = { ...slab, exposedFaces: 1, target: 10 }
  expect(reach('slab-convection', { ...body, time: 60 }).result.outcome).toBe('nowhere')
  expect(reach('slab-convection', { ...body, time: 20000 }).result.outcome).toBe('reached')
  expect(reach('slab-convection', { ...body, time: 1e6 }).result.outcome).toBe('everywhere')
})

test('of two faces alike, the depth is that of one', () => {
  const { result } = reach('slab-convection', { ...slab, exposedFaces: 2, time: 7200, target: 12 })
  expect(result.depths).toHaveLength(1)
  expect(result.depth).toBeLessThan(0.1)
})

test('a body heated from both sides has the target at two depths', () => {
  const sides = {
    left: { kind: 'temperature', surfaceTemperature: 30 },
    right: { kind: 'temperature', surfaceTemperature: 50 },
  }
  const body = { conductivity: 2, volumetricHeatCapacity: 2e6, thickness: 0.2, initialTemperature: 0, ...sides }
  const { result } = reach('slab-two-sides', { ...body, time: 600, target: 20 })
  expect(result.depths).toHaveLength(2)
  expect(result.gradient).toBeGreaterThan(0)
  const [near, far] = result.depths!
  // As long as they do not meet, each side is a half space: erfc(x/2(at)^(1/2)) is 2/3 and 2/5.
  expect(near! / (2 * Math.sqrt(600e-6))).toBeCloseTo(0.30457, 4)
  expect((0.2 - far!) / (2 * Math.sqrt(600e-6))).toBeCloseTo(0.59512, 4)
})

test('around a source it is a radius', () => {
  const body = { conductivity: 2, volumetricHeatCapacity: 2e6, initialTemperature: 10, power: 40, time: 1e12 }
  const { result } = askOperation<Depths & { radius: number }>('depth-reached', 'point-source', { ...body, target: 15 })
  expect(result.radii).toEqual([result.radius])
  expect(result.radius).toBeCloseTo(40 / (4 * Math.PI * 2 * 5), 3)
  expect(result.gradient).toBeLessThan(0)
})

test('in a wall of a year it may be at several depths', () => {
  const year = 31557600
  const cycle = { cycleMean: 10, amplitude: 12, period: year, timeOfMaximum: 0, conductivity: 1, diffusivity: 5e-7 }
  const { result } = reach('semi-infinite-periodic-surface', { ...cycle, time: year / 4, target: 10.1 })
  expect(result.depths!.length).toBeGreaterThan(1)
  expect([...result.depths!].sort((a, b) => a - b)).toEqual(result.depths)
})

describe('a call that makes no sense', () => {
  test.each([
    ['no time', { time: undefined }, '#/time', 'missing-field'],
    ['a negative time', { time: -1 }, '#/time', 'out-of-range'],
    ['depths', { depths: [1] }, '#/depths', 'unknown-field'],
    ['no target', { target: undefined }, '#/target', 'missing-field'],
    ['a target below zero', { target: -300 }, '#/target', 'out-of-range'],
  ])('is refused: %s', (_, change, pointer, code) => {
    const issues = refusalOf('depth-reached', 'semi-infinite-surface-temperature', {
      ...main,
      time: 1,
      target: 0,
      ...change,
    })
    expect(issues.map((issue) => `${issue.pointer} ${issue.code}`)).toContain(`${pointer} ${code}`)
  })

  test('is priced before it is asked', () => {
    expect(prepared('depth-reached', 'slab-convection', { ...slab, exposedFaces: 1, time: 1, target: 0 }).points).toBe(
      48,
    )
  })
})
