import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { contentBalance, heatBalance } from '../../solvers/bodies/heat-balance.ts'
import type { Check } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { solve as solveFlux } from '../../solvers/cases/semi-infinite-surface-flux/solve.ts'
import { solve as solveSlab, type SlabInput } from '../../solvers/cases/slab-convection/solve.ts'
import { DomainError } from '../../solvers/errors.ts'
import { solve } from '../../solvers/operations/solve.ts'
import type { Solution } from '../../solvers/solution.ts'
import { admissible } from './admissible.ts'
import { proof, seed } from './counts.ts'

const storing = cases.filter((c) => 'heatGained' in c.outputs)

function balanceOf(c: (typeof cases)[number], body: Record<string, unknown>): Check | undefined {
  try {
    const { checks } = solve.prepare(c, { ...body, outputs: ['heatGained'] }, 'full').run() as { checks: Check[] }
    return checks.find(({ id }) => id === 'heat-balance')
  } catch (error) {
    if (error instanceof DomainError) return undefined
    throw error
  }
}

/** What an answer says, but a thousandth more of one of its outputs. */
function spoilt<I>(solver: (input: I) => Solution, name: 'surfaceHeatFlux' | 'heatGained' | 'temperature') {
  return (input: I): Solution => {
    const { outputs, ...rest } = solver(input)
    const grown = (values: unknown): unknown => (Array.isArray(values) ? values.map(grown) : Number(values) * 1.001)
    const output = outputs[name]!
    return { ...rest, outputs: { ...outputs, [name]: { ...output, values: grown(output.values) } } } as Solution
  }
}

describe('the balance of heat', () => {
  it.each(storing.map((c) => [c.id, c] as const))('holds in the examples of %s', (_, c) => {
    const balances = [c.example, ...(c.variants ?? []).map(({ input }) => input)].map((body) => balanceOf(c, body))
    expect(balances.some((balance) => balance !== undefined)).toBe(true)
    for (const balance of balances) {
      if (!balance) continue
      expect(balance.holds).toBe(true)
      expect(balance.value).toBeLessThan(1e-7)
      expect(balance.limit).toBeLessThan(2e-5)
    }
  })

  it.each(storing.map((c) => [c.id, c] as const))('holds for any admissible input of %s', (_, c) => {
    fc.assert(
      fc.property(admissible(c), (body) => {
        const balance = balanceOf(c, body)
        if (balance) expect(balance.holds, JSON.stringify({ body, balance })).toBe(true)
      }),
      { seed, numRuns: proof ? 2000 : 40, endOnFailure: true },
    )
  })

  it('is broken by a flux or a heat that is a thousandth too large', () => {
    const body: SlabInput = {
      conductivity: 2,
      diffusivity: 8e-7,
      volumetricHeatCapacity: 2.5e6,
      thickness: 0.2,
      exposedFaces: 2,
      filmCoefficient: 10,
      initialTemperature: 20,
      ambientTemperature: -5,
      depths: [],
      times: [7200],
      outputs: ['heatGained'],
    }
    expect(heatBalance(solveSlab, body, { surfaceHeatFlux: 1 })[0]!.holds).toBe(true)
    for (const name of ['surfaceHeatFlux', 'heatGained'] as const)
      expect(heatBalance(spoilt(solveSlab, name), body, { surfaceHeatFlux: 1 })[0]!.holds).toBe(false)
  })

  it('under a flux that is given is broken by temperatures a thousandth too far', () => {
    const solid = { conductivity: 2, diffusivity: 1e-6, effusivity: 2000, volumetricHeatCapacity: 2e6 }
    const body = { ...solid, initialTemperature: 0, imposedHeatFlux: 500, depths: [], times: [600] }
    const input = { ...body, outputs: ['heatGained' as const] }
    const around = {
      diffusivity: 1e-6,
      capacityAt: () => 2e6,
      places: (depths: number[]) => ({ depths }) as unknown as Partial<typeof input>,
    }
    expect(contentBalance(solveFlux, input, around)[0]!.holds).toBe(true)
    expect(contentBalance(spoilt(solveFlux, 'temperature'), input, around)[0]!.holds).toBe(false)
  })
})
