import { describe, expect, test } from 'vitest'
import { askOperation, type Extremes, prepared, refusalOf } from './ask-operation.ts'

const extremes = (caseId: string, body: Record<string, unknown>) => askOperation<Extremes>('extremes', caseId, body)

const pour = {
  thickness: 1,
  exposedFaces: 1,
  conductivity: 2.3,
  volumetricHeatCapacity: 2.4e6,
  filmCoefficient: 6,
  initialTemperature: 20,
  ambientTemperature: 15,
  source: { kind: 'hydration', adiabaticRise: 48, timeConstant: 72000 },
  until: 604800,
}

describe('a pour of concrete', () => {
  test('is hottest at its core when the worked example says', () => {
    const { result, accuracy, points } = extremes('slab-internal-heat', { ...pour, depth: 1 })
    expect(result.maximum.value).toBeCloseTo(62.5561029145537, 12)
    expect(result.maximum.time).toBeCloseTo(207880.2795, 4)
    expect(result.maximum.time / 3600).toBeCloseTo(57.7445220837902, 7)
    expect(result.maximum.atEnd).toBe(false)
    expect(result.minimum).toEqual({ value: 20, time: 0, atEnd: true })
    expect(accuracy.bound['value']!.absolute).toBeLessThan(1e-11)
    expect(accuracy.bound['time']!.absolute).toBeLessThan(1)
    expect(points).toBeGreaterThanOrEqual(24)
  })

  test('differs most between core and face later', () => {
    const { result, units, accuracy } = extremes('slab-internal-heat', { ...pour, depths: [1, 0] })
    expect(result.maximum.value).toBeCloseTo(26.1042285602378, 10)
    expect(Math.abs(result.maximum.time - 3600 * 73.4822475551773)).toBeLessThanOrEqual(
      accuracy.bound['time']!.absolute + 1e-5,
    )
    expect(result.maximum.time).toBeCloseTo(264536.0912, 4)
    expect(units['value']).toBe('K')
  })

  test('is looked at within the span alone', () => {
    const { result } = extremes('slab-internal-heat', { ...pour, depth: 1, from: 3600, until: 7200 })
    expect(result.maximum).toMatchObject({ time: 7200, atEnd: true })
    expect(result.minimum).toMatchObject({ time: 3600, atEnd: true })
  })
})

test('a pulse is highest at its end, a kink', () => {
  const pulse = {
    conductivity: 1,
    diffusivity: 1e-6,
    initialTemperature: 20,
    imposedHeatFlux: 1000,
    pulseDuration: 3600,
  }
  const { result } = extremes('semi-infinite-surface-flux', { ...pulse, depth: 0, until: 86400 })
  expect(result.maximum).toMatchObject({ time: 3600, atEnd: false })
  expect(result.maximum.value).toBeCloseTo(20 + 2000 * Math.sqrt(3600e-6 / Math.PI), 11)
})

test('deeper it is highest later, where the two fluxes balance', () => {
  const [a, d, x] = [1e-6, 3600, 0.1]
  const pulse = { conductivity: 1, diffusivity: a, initialTemperature: 20, imposedHeatFlux: 1000, pulseDuration: d }
  const { result, accuracy } = extremes('semi-infinite-surface-flux', { ...pulse, depth: x, until: 1e6 })
  // dT/dt is 0 where exp(-x2/4at)/t^(1/2) = exp(-x2/4a(t-d))/(t-d)^(1/2).
  const f = (t: number) => ((x * x) / (4 * a)) * (1 / (t - d) - 1 / t) - 0.5 * Math.log(t / (t - d))
  let [low, high] = [d * 1.0001, 1e6]
  for (let n = 0; n < 200; n++) {
    const middle = (low + high) / 2
    if (f(middle) > 0) low = middle
    else high = middle
  }
  expect(Math.abs(result.maximum.time - low)).toBeLessThanOrEqual(accuracy.bound['time']!.absolute)
  expect(result.maximum.time / low).toBeCloseTo(1, 9)
})

test('a settled cycle has its amplitude and its lag', () => {
  const year = 31557600
  const cycle = { cycleMean: 10, amplitude: 12, period: year, timeOfMaximum: 0, conductivity: 1, diffusivity: 5e-7 }
  const { result } = extremes('semi-infinite-periodic-surface', {
    ...cycle,
    depth: 1,
    from: -year / 2,
    until: 20.5 * year,
  })
  const damping = Math.sqrt((5e-7 * year) / Math.PI)
  expect(result.maximum.value).toBeCloseTo(10 + 12 * Math.exp(-1 / damping), 12)
  expect(result.minimum.value).toBeCloseTo(10 - 12 * Math.exp(-1 / damping), 12)
  // The first of many that are alike.
  expect(result.maximum.time / year).toBeCloseTo(1 / damping / (2 * Math.PI), 9)
  expect(result.minimum.time / year).toBeCloseTo(1 / damping / (2 * Math.PI) - 0.5, 9)
})

test('what does not change is highest and lowest where it starts', () => {
  const idle = { heatCapacity: 1, area: 1, filmCoefficient: 0, initialTemperature: 60, ambientTemperature: 20 }
  const start = { value: 60, time: 0, atEnd: true }
  expect(extremes('lumped-convection', { ...idle, until: 100 }).result).toEqual({ maximum: start, minimum: start })
})

describe('a call that makes no sense', () => {
  test.each([
    ['no end', { until: undefined }, '#/until', 'missing-field'],
    ['a span that ends before it begins', { from: 10, until: 5 }, '#/until', 'out-of-range'],
    ['no place', { depth: undefined }, '#/depth', 'missing-field'],
    ['a depth outside', { depth: 2 }, '#/depth', 'depth-outside-body'],
  ])('is refused: %s', (_, change, pointer, code) => {
    const issues = refusalOf('extremes', 'slab-internal-heat', { ...pour, depth: 1, ...change })
    expect(issues.map((issue) => `${issue.pointer} ${issue.code}`)).toContain(`${pointer} ${code}`)
  })

  test('is priced as twenty-four numbers', () => {
    const idle = { heatCapacity: 1, area: 1, filmCoefficient: 0, initialTemperature: 60, ambientTemperature: 20 }
    expect(prepared('extremes', 'lumped-convection', { ...idle, until: 1 }).points).toBe(24)
  })
})
