import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { cases } from '../../solvers/cases/index.ts'
import { ask, askSingle } from './ask.ts'
import { seed } from './counts.ts'
import { decades } from './draw.ts'

const runs = { seed, numRuns: 200 }

describe('the rate of temperature', () => {
  it('is that of erfc in the half space, within its bound', () => {
    fc.assert(
      fc.property(decades(1e-2, 1e8), decades(0.01, 6), (time, eta) => {
        const x = 2 * eta * Math.sqrt(1e-6 * time)
        const solid = { conductivity: 2, diffusivity: 1e-6 }
        const body = { ...solid, initialTemperature: 10, surfaceTemperature: -5, depths: [x], times: [time] }
        const { value, bound } = askSingle('semi-infinite-surface-temperature', body, 'rate')
        // d/dt of −15 erfc(x/(2√(at))).
        const exact = (-15 * eta * Math.exp(-eta * eta)) / (Math.sqrt(Math.PI) * time)
        expect(Math.abs(value - exact)).toBeLessThanOrEqual(bound + 1e-14 * Math.abs(exact))
        expect(bound).toBeLessThan((1e-9 * 15) / time)
      }),
      runs,
    )
  })

  it('is that of the exponential in a lumped body', () => {
    fc.assert(
      fc.property(decades(1e-3, 20), (taus) => {
        const body = { heatCapacity: 5000, area: 2, filmCoefficient: 5, initialTemperature: 80, ambientTemperature: 20 }
        const { value, bound } = askSingle('lumped-convection', { ...body, times: [taus * 500] }, 'rate')
        const exact = (-60 * Math.exp(-taus)) / 500
        expect(Math.abs(value - exact)).toBeLessThanOrEqual(bound + 1e-14 * Math.abs(exact))
        expect(bound).toBeLessThan(1e-9)
      }),
      runs,
    )
  })

  it('balances the heat that flows in: C·∂T̄/∂t of a slab under a flux is the flux', () => {
    const body = {
      conductivity: 1.4,
      volumetricHeatCapacity: 2e6,
      thickness: 0.1,
      imposedHeatFlux: 60,
      back: { kind: 'insulated' },
    }
    const late = { ...body, initialTemperature: 18, depths: [0, 0.03, 0.1], times: [200_000] }
    const { result } = ask('slab-surface-flux', { ...late, outputs: ['rate'] })
    for (const rate of (result['rate'] as number[][])[0]!) expect(rate * 2e6 * 0.1).toBeCloseTo(60, 7)
  })

  it('is refused at the change itself and where the drive changes its law', () => {
    const body = {
      conductivity: 1.7,
      diffusivity: 8e-7,
      imposedHeatFlux: 500,
      pulseDuration: 600,
      initialTemperature: 20,
    }
    for (const time of [0, 600]) {
      const at = { ...body, depths: [0.01], times: [100, time], outputs: ['rate'] }
      expect(() => ask('semi-infinite-surface-flux', at)).toThrow('no one rate')
    }
    const sides = [599, 601].map(
      (time) => askSingle('semi-infinite-surface-flux', { ...body, depths: [0], times: [time] }, 'rate').value,
    )
    expect(sides[0]).toBeGreaterThan(0)
    expect(sides[1]).toBeLessThan(0)
  })

  it('is an output of every case that has a temperature', () => {
    for (const c of cases) expect('rate' in c.outputs).toBe('temperature' in c.outputs)
  })
})
