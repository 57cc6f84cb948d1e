import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { DomainError } from '../../solvers/errors.ts'
import { exponentialIntegral } from '../../solvers/math/exponential-integral.ts'
import { i2erfcx } from '../../solvers/math/i2erfcx.ts'
import { ierfcx } from '../../solvers/math/ierfcx.ts'
import { solve } from '../../solvers/operations/solve.ts'
import { ask, askSingle, caseOf, single } from './ask.ts'

/* Printed values that the closed forms meet, and what they refuse. */

const value = (id: string, body: object, output = 'temperature') =>
  askSingle(id, body as Record<string, unknown>, output).value

describe('printed values', () => {
  const read = (name: string): unknown =>
    JSON.parse(readFileSync(new URL(`../reference/${name}.json`, import.meta.url), 'utf8'))
  const kept = (
    read('published') as {
      kept: { item: string; inputs: { x: string }; quantity: string; printed: string; recomputed: string }[]
    }
  ).kept
  const of: Record<string, (x: number) => number> = {
    E1: exponentialIntegral,
    '2 ierfc(x)': (x) => 2 * Math.exp(-x * x) * ierfcx(x),
    '4 i2erfc(x)': (x) => 4 * Math.exp(-x * x) * i2erfcx(x),
  }
  const rows = kept.filter(({ quantity }) => quantity in of)
  it('of tables are found (Abramowitz & Stegun table 5.1, Carslaw & Jaeger appendix II, from memory)', () => {
    expect(rows.length).toBeGreaterThanOrEqual(9)
    for (const { quantity, inputs, printed, recomputed } of rows) {
      const found = of[quantity]!(Number(inputs.x))
      expect(Math.abs(found - Number(printed))).toBeLessThan(0.51 * 10 ** -printed.split('.')[1]!.length)
      expect(found / Number(recomputed)).toBeCloseTo(1, 13)
    }
  })
  it('Çengel, Heat Transfer, ch. 4: 1250 W/m2 of sun on an aluminium block for 20 min (from memory)', () => {
    const block = { conductivity: 237, diffusivity: 9.71e-5, imposedHeatFlux: 1250, initialTemperature: 20 }
    expect(value('semi-infinite-surface-flux', { ...block, depths: [0], times: [1200] })).toBeCloseTo(
      22.03150064379335,
      12,
    )
  })
  it('a hot surface under a finger: steel of 80 °C for a second, in perfect contact and at 2000 W/(m2.K)', () => {
    const skin = {
      conductivity: 0.37,
      volumetricHeatCapacity: 3.4e6,
      initialTemperature: 35,
      depths: [1e-4],
      times: [1],
    }
    const steel = { conductivity: 50, density: 7800, specificHeat: 450, initialTemperature: 80 }
    const at = (extra: object, name: string) =>
      single(
        ask('semi-infinite-contact', {
          ...skin,
          other: steel,
          ...extra,
          outputs: ['temperature', 'surfaceTemperature'],
        }).result[name]!,
      )
    expect(at({}, 'surfaceTemperature')).toBeCloseTo(76.4874799220679, 12)
    expect(at({}, 'temperature')).toBeCloseTo(69.4459795140651, 12)
    expect(at({ contactConductance: 2000 }, 'surfaceTemperature')).toBeCloseTo(65.5921821890346, 12)
    expect(at({ contactConductance: 2000 }, 'temperature')).toBeCloseTo(59.4499044534787, 12)
  })
})

describe('refusals', () => {
  const refused = (id: string, body: object): string[] => {
    try {
      // Through JSON, which leaves out what is undefined.
      solve.prepare(caseOf(id), JSON.parse(JSON.stringify({ ...caseOf(id).example, ...body })), 'full')
    } catch (error) {
      if (!(error instanceof DomainError)) throw error
      return error.issues.map(({ pointer, code, detail, accepted }) => {
        expect(detail.length).toBeGreaterThan(10)
        expect(accepted).toBeTruthy()
        return `${pointer} ${code}`
      })
    }
    return []
  }
  it.each([
    [
      'semi-infinite-convection',
      { filmCoefficient: 0, imposedHeatFlux: 5, outputs: ['temperature', 'completedFraction'] },
      '#/outputs/1 output-not-defined',
    ],
    ['semi-infinite-surface-flux', { outputs: ['remainingFraction'] }, '#/outputs/0 output-not-defined'],
    ['semi-infinite-surface-flux', { pulseDuration: 0 }, '#/pulseDuration out-of-range'],
    ['semi-infinite-surface-ramp', { outputs: ['heatFraction'] }, '#/outputs/0 output-not-defined'],
    ['semi-infinite-surface-ramp', { rampRate: 2e6 }, '#/rampRate out-of-range'],
    ['semi-infinite-periodic-surface', { initialTemperature: 5 }, '#/initialTemperature unknown-field'],
    ['semi-infinite-periodic-surface', { timeOfMaximum: undefined }, '#/timeOfMaximum missing-field'],
    ['semi-infinite-periodic-surface', { timeOfMinimum: 5 }, '#/timeOfMinimum conflicting-fields'],
    ['semi-infinite-periodic-ambient', { outputs: ['heatGained'] }, '#/outputs/0 output-not-defined'],
    ['semi-infinite-contact', { contactConductance: 0 }, '#/contactConductance out-of-range'],
    [
      'semi-infinite-contact',
      { contactConductance: undefined, times: [5, 0], outputs: ['surfaceHeatFlux'] },
      '#/times/1 singular-at-time-zero',
    ],
    [
      'semi-infinite-contact',
      { other: { conductivity: 1, diffusivity: 1e-6 } },
      '#/other/initialTemperature missing-field',
    ],
    [
      'semi-infinite-contact',
      { other: { conductivity: 1, initialTemperature: 3 } },
      '#/other/volumetricHeatCapacity missing-field',
    ],
    ['semi-infinite-contact', { outputs: ['meanTemperature'] }, '#/outputs/0 output-not-defined'],
    ['line-source', { radii: [1, 0] }, '#/radii/1 depth-outside-body'],
    ['line-source', { radii: undefined }, '#/radii missing-field'],
    ['line-source', { depths: [1] }, '#/depths unknown-field'],
    ['point-source', { energy: 3 }, '#/energy conflicting-fields'],
    ['point-source', { power: undefined }, '#/power missing-field'],
    ['lumped-varying-ambient', { ambient: { kind: 'ramp', start: 5 } }, '#/ambient/rampRate missing-field'],
    [
      'lumped-varying-ambient',
      { ambient: { kind: 'cycle', cycleMean: 5, amplitude: 1, period: 9 } },
      '#/ambient/timeOfMaximum missing-field',
    ],
    ['lumped-varying-ambient', { outputs: ['remainingFraction'] }, '#/outputs/0 output-not-defined'],
    ['lumped-varying-ambient', { ambientTemperature: 5 }, '#/ambientTemperature unknown-field'],
  ])('%s %j', (id, body, issue) => {
    expect(refused(id, {})).toEqual([])
    expect(refused(id, body)).toContain(issue)
  })
})
