import { describe, expect, it } from 'vitest'
import { ask, askSingle, contract, sensitivity, single, temperaturesOf } from './ask.ts'
import { D } from './exact/functions.ts'
import { fluxRatios, questions } from './reference-rows.ts'

/* Every reference value, computed at 55 digits by two unrelated routes (tests/reference/README.md). */
describe('reference values', () => {
  it('reads the rows of all kinds', () => {
    const kinds = new Set(questions.map((q) => q.row.replace(/-\d+$/, '')))
    for (const kind of ['A1', 'A2', 'B1', 'B2', 'D1', 'I-semi', 'I-slab', 'I-slabstep']) expect(kinds).toContain(kind)
    expect(questions.length).toBeGreaterThan(600)
  })

  it('are met within the accuracy promised, by a bound that is at least the true error', () => {
    const failures: string[] = []
    for (const q of questions) {
      const { value, bound, scale } = askSingle(q.caseId, q.body, q.output)
      const error = Number(new D(value).minus(q.expected).abs())
      const { K, largest } = sensitivity(q.caseId, q.body, q.output)
      const of = { scale, temperatures: temperaturesOf(q.body), surface: largest }
      const promised = contract(q.output, Number(q.expected), K, of)
      const limit = q.absoluteOnly ? Math.max(promised, 1e-30) : promised
      // The row itself is printed to 20 digits.
      if (!(error <= limit)) failures.push(`${q.row} ${q.output}: off ${error}, promised ${limit}`)
      if (!(error <= bound + 1e-20 * Math.abs(value)) && !q.absoluteOnly)
        failures.push(`${q.row} ${q.output}: off ${error}, bound ${bound}`)
      if (!(bound <= 10 * limit))
        failures.push(`${q.row} ${q.output}: bound ${bound}, ten times promised ${10 * limit}`)
    }
    expect(failures).toEqual([])
  })

  it('include local fluxes of the half space', () => {
    for (const { row, caseId, body, film, expected } of fluxRatios) {
      const { value, bound } = askSingle(caseId, body, 'heatFlux')
      const error = Math.abs(value - film * Number(expected))
      expect(error, row).toBeLessThanOrEqual(bound + 4e-16 * Math.abs(value))
    }
  })

  it('are the answer to the printed curl', () => {
    const body = {
      conductivity: 2,
      density: 2400,
      specificHeat: 1000,
      thickness: 0.2,
      exposedFaces: 2,
      filmCoefficient: 10,
      initialTemperature: 20,
      ambientTemperature: -5,
      depths: [0, 0.1],
      times: [3600, 36000],
    }
    const { result, accuracy } = ask('slab-convection', body)
    const exact = [
      [13.7751886477336, 18.4537678393556],
      [0.905112123363939, 2.4362336338823],
    ]
    exact
      .flat()
      .forEach((expected, i) => expect((result['temperature'] as number[][]).flat()[i]).toBeCloseTo(expected, 12))
    expect(single(accuracy.bound['temperature']!.absolute)).toBeLessThan(2.5e-10)
  })
})
