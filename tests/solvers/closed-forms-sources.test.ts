import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { ask, askSingle, single } from './ask.ts'
import { proof, seed } from './counts.ts'
import { decades, uniform } from './draw.ts'

/* Relations of settled cycles, sources and bodies of one temperature, and their limits. */

const runs = { numRuns: proof ? 1000 : 60, seed }
const solid = { conductivity: 1.5, volumetricHeatCapacity: 2.5e6 }
const a = 1.5 / 2.5e6
const asked = (id: string, body: object, output = 'temperature') =>
  askSingle(id, body as Record<string, unknown>, output)
const value = (id: string, body: object, output = 'temperature') => asked(id, body, output).value
const close = (one: { value: number; bound: number }, two: { value: number; bound: number }, left = 0) =>
  expect(Math.abs(one.value - two.value)).toBeLessThanOrEqual(one.bound + two.bound + left)

describe('a half space in a settled cycle', () => {
  const year = { ...solid, cycleMean: 9, amplitude: 11, period: 31557600 }
  const drawn = fc.tuple(decades(1e-2, 20), uniform, fc.integer({ min: -40, max: 40 }))
  it('is the same a period later, and by its minimum half a period before', () => {
    fc.assert(
      fc.property(drawn, ([x, u, turns]) => {
        const t = Math.round(u * year.period)
        const body = { ...year, timeOfMaximum: 17e6, depths: [x], times: [t] }
        for (const output of ['temperature', 'heatFlux', 'surfaceHeatFlux']) {
          const now = asked('semi-infinite-periodic-surface', body, output)
          close(now, asked('semi-infinite-periodic-surface', { ...body, times: [t + turns * year.period] }, output))
          const { timeOfMaximum, ...rest } = body
          const lowest = { ...rest, timeOfMinimum: timeOfMaximum - year.period / 2 }
          close(now, asked('semi-infinite-periodic-surface', lowest, output))
        }
      }),
      runs,
    )
  })
  it('is highest a time lag after the drive, by its amplitude', () => {
    for (const [id, film] of [
      ['semi-infinite-periodic-surface', {}],
      ['semi-infinite-periodic-ambient', { filmCoefficient: 6 }],
    ] as const)
      for (const depth of [0, 1, 9]) {
        const body = { ...year, ...film, timeOfMaximum: 17e6, depths: [depth] }
        const { result } = ask(id, { ...body, times: [0], outputs: ['amplitude', 'timeLag'] })
        const lag = single(result['timeLag']!)
        const highest = value(id, { ...body, times: [17e6 + lag] })
        expect(highest).toBeCloseTo(9 + single(result['amplitude']!), 11)
        // Nine metres are more than three damping depths: the lag passes half a period and is not reduced.
        if (depth === 9) expect(lag).toBeGreaterThan(year.period / 2)
      }
  })
  it('at one wavelength keeps e^(−2π) of the amplitude (Carslaw & Jaeger §2.6, printed 0.0019, from memory)', () => {
    const damping = value('semi-infinite-periodic-surface', { ...year, timeOfMaximum: 0, times: [0] }, 'dampingDepth')
    const body = { ...year, timeOfMaximum: 0, depths: [2 * Math.PI * damping], times: [0] }
    expect(value('semi-infinite-periodic-surface', body, 'amplitude') / 11).toBeCloseTo(0.0018674427317079889, 15)
    const day = { conductivity: 2, density: 2400, specificHeat: 1000, period: 86400, cycleMean: 0, amplitude: 1 }
    const concrete = { ...day, timeOfMaximum: 0, times: [0] }
    expect(value('semi-infinite-periodic-surface', concrete, 'dampingDepth')).toBeCloseTo(0.1513879513212096, 14)
  })
  it('behind an ever better film follows the fluid; behind none it rests at the mean', () => {
    const body = { ...year, timeOfMaximum: 17e6, depths: [0, 2], times: [-5e6, 8e6] }
    const outputs = ['temperature', 'heatFlux', 'amplitude', 'timeLag', 'heatPerHalfCycle']
    const held = ask('semi-infinite-periodic-surface', { ...body, outputs }).result
    const film = ask('semi-infinite-periodic-ambient', { ...body, filmCoefficient: 1e9, outputs }).result
    for (const name of outputs)
      [held[name]!]
        .flat(2)
        .forEach((one, i) =>
          expect(Math.abs([film[name]!].flat(2)[i]! - one)).toBeLessThan(
            name === 'timeLag' ? 1e-9 * year.period : 2e-8 * (1 + Math.abs(one)),
          ),
        )
    const still = ask('semi-infinite-periodic-ambient', { ...body, filmCoefficient: 0, outputs }).result
    expect(still['temperature']).toEqual([
      [9, 9],
      [9, 9],
    ])
    expect([still['heatFlux'], still['amplitude'], still['heatPerHalfCycle']]).toEqual([
      [
        [0, 0],
        [0, 0],
      ],
      [0, 0],
      0,
    ])
  })
  it('takes up in half a cycle what its surface flux brings', () => {
    const body = { ...year, filmCoefficient: 8, timeOfMaximum: 0, depths: [] }
    const times = Array.from({ length: 4000 }, (_, i) => ((i + 0.5) / 4000) * year.period)
    const { result } = ask('semi-infinite-periodic-ambient', {
      ...body,
      depths: [0],
      times,
      outputs: ['surfaceHeatFlux', 'heatPerHalfCycle'],
    })
    const entering = (result['surfaceHeatFlux'] as number[]).reduce((sum, q) => sum + Math.max(0, q), 0)
    expect((entering * year.period) / 4000 / single(result['heatPerHalfCycle']!)).toBeCloseTo(1, 6)
  })
})

describe('sources', () => {
  const body = { ...solid, initialTemperature: 0 }
  it('a line is late by its logarithm, 2.0 % low at 4at/r² = 20', () => {
    const line = { ...body, linePower: 4 * Math.PI * 1.5, radii: [1] }
    const at = (ratio: number) => value('line-source', { ...line, times: [ratio / (4 * a)] })
    expect((Math.log(20) - 0.5772156649015329) / at(20) - 1).toBeCloseTo(-0.020009688440358494, 10)
    expect(at(1e8)).toBeCloseTo(Math.log(1e8) - 0.5772156649015329, 7)
    const near = { ...line, radii: [1e-4], times: [1e6] }
    expect(value('line-source', near, 'heatFlux') * 2 * Math.PI * 1e-4).toBeCloseTo(4 * Math.PI * 1.5, 6)
  })
  it('a power settles at P/(4πkr), an energy peaks at r²/(6a), and both release what they say', () => {
    const power = { ...body, power: 30, radii: [0.2], times: [1e17] }
    expect(value('point-source', power)).toBeCloseTo(30 / (4 * Math.PI * 1.5 * 0.2), 4)
    const dose = { ...body, energy: 1e5, radii: [0.2] }
    const peak = (t: number) => value('point-source', { ...dose, times: [t] })
    const instant = 0.04 / (6 * a)
    const largest = ((1e5 / 2.5e6) * (3 / (2 * Math.PI * Math.E)) ** 1.5) / 0.008
    expect(peak(instant) / largest).toBeCloseTo(1, 13)
    expect(peak(instant * 1.01)).toBeLessThan(peak(instant))
    expect(peak(instant * 0.99)).toBeLessThan(peak(instant))
    const radii = Array.from({ length: 2000 }, (_, i) => (i + 0.5) * 0.002)
    const rises = (ask('point-source', { ...dose, radii, times: [1e5] }).result['temperature'] as number[][])[0]!
    const stored = rises.reduce((sum, T, i) => sum + 2.5e6 * T * 4 * Math.PI * radii[i]! ** 2 * 0.002, 0)
    expect(stored / 1e5).toBeCloseTo(1, 8)
  })
  it('a power is doses one after the other, and a line is points side by side', () => {
    const power = value('point-source', { ...body, power: 7, radii: [0.1], times: [4e4] })
    const steps = Array.from({ length: 4000 }, (_, i) => (i + 0.5) * 10)
    const doses = ask('point-source', { ...body, energy: 70, radii: [0.1], times: steps }).result[
      'temperature'
    ] as number[][]
    expect(doses.reduce((sum, [T]) => sum + T!, 0) / power).toBeCloseTo(1, 6)
    const line = value('line-source', { ...body, linePower: 7, radii: [0.1], times: [4e4] })
    const radii = Array.from({ length: 2000 }, (_, i) => Math.hypot(0.1, (i + 0.5) * 0.002))
    const points = ask('point-source', { ...body, power: 7 * 0.002, radii, times: [4e4] }).result[
      'temperature'
    ] as number[][]
    expect((2 * points[0]!.reduce((sum, T) => sum + T, 0)) / line).toBeCloseTo(1, 8)
  })
  it('checks the probe and tells how late it is', () => {
    const { checks, numbers } = ask('line-source', {
      ...body,
      linePower: 5,
      probeRadius: 0.01,
      radii: [0.02],
      times: [0, 100],
    }) as unknown as {
      checks: { id: string; holds: boolean; value: number }[]
      numbers: { fourier: number[]; length: number }
    }
    const found = Object.fromEntries(checks.map(({ id, holds }) => [id, holds]))
    expect(found).toEqual({ 'late-for-logarithm': false, 'outside-the-probe': true, 'probe-is-thin': false })
    expect(numbers.length).toBe(0.02)
    expect(numbers.fourier[1]! / ((a * 100) / 0.0004)).toBeCloseTo(1, 14)
  })
})

describe('a body of one temperature in a fluid that changes', () => {
  const tank = { heatCapacity: 4e5, area: 2, filmCoefficient: 10, initialTemperature: 12 }
  const tau = 4e5 / 20
  const varying = (ambient: object, t: number, output = 'temperature') =>
    asked('lumped-varying-ambient', { ...tank, ambient, times: [t] }, output)
  it('that rests is the body in a constant fluid', () => {
    fc.assert(
      fc.property(decades(1, 1e6), (t) => {
        for (const output of ['temperature', 'heatGained'])
          close(
            varying({ kind: 'ramp', start: 40, rampRate: 0 }, t, output),
            asked('lumped-convection', { ...tank, ambientTemperature: 40, times: [t] }, output),
          )
      }),
      runs,
    )
  })
  it('in a ramp comes to lag by its time constant, and begins as the square of time', () => {
    expect(varying({ kind: 'ramp', start: 12, rampRate: 0.01 }, 50 * tau).value).toBeCloseTo(12 + 0.01 * 49 * tau, 8)
    const early = varying({ kind: 'ramp', start: 12, rampRate: 0.01 }, 1e-3, 'heatGained').value
    expect(early / ((20 * 0.01 * 1e-6) / 2)).toBeCloseTo(1, 6)
  })
  it('in a cycle settles to 1/√(1 + ω²τ²) of the amplitude, whatever it began with', () => {
    const period = 30000
    const cycle = { kind: 'cycle', cycleMean: 20, amplitude: 8, period, timeOfMaximum: 0 }
    const W = (2 * Math.PI * tau) / period
    const settled = 8 / Math.hypot(1, W)
    const times = Array.from({ length: 400 }, (_, i) => 60 * period + (i / 400) * period)
    const answered = ask('lumped-varying-ambient', { ...tank, ambient: cycle, times }).result['temperature'] as number[]
    expect(Math.max(...answered) - 20).toBeCloseTo(settled, 3)
    expect(Math.min(...answered) - 20).toBeCloseTo(-settled, 3)
    const lowest = { ...cycle, timeOfMaximum: undefined, timeOfMinimum: period / 2 }
    close(varying(cycle, 12345), varying(JSON.parse(JSON.stringify(lowest)) as object, 12345))
  })
  it('in a slow cycle at its height is the body in a constant fluid, in a fast one that at the mean', () => {
    const at = (period: number) =>
      varying({ kind: 'cycle', cycleMean: 20, amplitude: 8, period, timeOfMaximum: 0 }, 7000).value
    const constant = (ambientTemperature: number) =>
      value('lumped-convection', { ...tank, ambientTemperature, times: [7000] })
    expect(at(1e12)).toBeCloseTo(constant(28), 9)
    expect(at(1e-3)).toBeCloseTo(constant(20), 6)
  })
  it('holds the balance C·dT/dt = hA(Tₐ − T) at every instant', () => {
    fc.assert(
      fc.property(decades(10, 1e5), uniform, decades(100, 1e6), (t, from, period) => {
        const cycle = { kind: 'cycle', cycleMean: 20, amplitude: 8, period, timeOfMaximum: from * period }
        const step = 1e-4 * Math.min(t, period, tau)
        const [before, now, after] = [t - step, t, t + step].map((time) => varying(cycle, time).value)
        const ambient = 20 + 8 * Math.cos(2 * Math.PI * (t / period - from))
        const rate = (after! - before!) / (2 * step)
        expect(Math.abs(rate * tau - (ambient - now!))).toBeLessThan(1e-6 * 30 + (1e-12 * tau) / step)
      }),
      runs,
    )
  })
  it('without a film stays as it is', () => {
    const body = { ...tank, filmCoefficient: 0, times: [1e6], outputs: ['temperature', 'heatGained'] }
    for (const ambient of [
      { kind: 'ramp', start: 50, rampRate: 1 },
      { kind: 'cycle', cycleMean: 1, amplitude: 9, period: 60, timeOfMaximum: 0 },
    ]) {
      const { result } = ask('lumped-varying-ambient', { ...body, ambient })
      expect(result).toEqual({ temperature: [12], heatGained: [0] })
    }
  })
})
