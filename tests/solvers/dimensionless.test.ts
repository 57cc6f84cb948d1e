import { readFileSync } from 'node:fs'
import fc from 'fast-check'
import { describe, expect, it, test } from 'vitest'
import { cases } from '../../solvers/cases/index.ts'
import { DomainError } from '../../solvers/errors.ts'
import { costOf } from '../../solvers/operations/cost.ts'
import { solve } from '../../solvers/operations/solve.ts'
import { caseOf } from './ask.ts'
import { decades, uniform } from './draw.ts'

interface Full {
  points: number
  input: Record<string, unknown>
  axes: Record<string, number[]>
  units: Record<string, string>
  result: { remainingFraction: number[][]; completedFraction: number[][]; heatFraction: number[] }
  accuracy: { bound: Record<string, { absolute: number; relative: number }>; scale: number }
  numbers: Record<string, unknown>
  warnings: unknown[]
}
const outputs = ['remainingFraction', 'completedFraction', 'heatFraction']
const ask = (id: string, body: Record<string, unknown>) => solve.prepare(caseOf(id), body, 'full').run() as Full

/* Rows of the reference whose length, conductivity and heat capacity are 1, by the case that they are of. */
const caseIds: Record<string, string> = {
  B1: 'slab-surface-temperature',
  B2: 'slab-convection',
  C1: 'cylinder-surface-temperature',
  C2: 'cylinder-convection',
  C3: 'sphere-surface-temperature',
  C4: 'sphere-convection',
}
interface Row {
  id: string
  case: string
  note?: string
  inputs: { position_m: number; time_s: number; film_W_m2K?: number }
  expected: { theta: string; heat_fraction: string }
}
const rows = ['B_slab', 'C_cylinder_sphere']
  .flatMap(
    (name) => JSON.parse(readFileSync(new URL(`../reference/values/${name}.json`, import.meta.url), 'utf8')) as Row[],
  )
  .filter((row) => row.case in caseIds && row.note?.endsWith('dimensionless'))

const filmed = Object.values(caseIds).filter((id) => id.endsWith('convection'))
const held = Object.values(caseIds).filter((id) => !id.endsWith('convection'))

describe('dimensionless numbers', () => {
  it('are taken by the cases that can be asked by them', () => {
    expect(
      cases
        .filter((c) => c.dimensionless)
        .map(({ id }) => id)
        .sort(),
    ).toEqual(Object.values(caseIds).sort())
    expect(new Set(rows.map((row) => row.case))).toEqual(new Set(Object.keys(caseIds)))
  })

  test.each(rows.map((row) => [row.id, row] as const))('%s', (_, { case: group, inputs, expected }) => {
    const { film_W_m2K: biot, time_s: time, position_m: position } = inputs
    const body = { ...(biot === undefined ? {} : { biot }), fourier: [time], positionRatio: [position], outputs }
    const { result, accuracy } = ask(caseIds[group]!, body)
    const found = {
      remainingFraction: result.remainingFraction[0]![0]!,
      completedFraction: result.completedFraction[0]![0]!,
      heatFraction: result.heatFraction[0]!,
    }
    const theta = Number(expected.theta)
    const heat = Number(expected.heat_fraction)
    const exact = { remainingFraction: theta, completedFraction: 1 - theta, heatFraction: heat }
    for (const [name, value] of Object.entries(found)) {
      const { absolute, relative } = accuracy.bound[name]!
      const true_ = exact[name as keyof typeof exact]
      /* What is printed of the exact value, and the subtraction from 1, are rounded. */
      expect(Math.abs(value - true_)).toBeLessThanOrEqual(absolute + relative * Math.abs(value) + 2.3e-16)
      expect(Math.abs(value - true_)).toBeLessThanOrEqual(1e-11 * true_ + 2.3e-16)
    }
  })

  it.each(filmed)('%s answers what the same body answers in SI', (id) => {
    const round = !id.startsWith('slab')
    const size = round ? { radius: 0.05 } : { thickness: 0.1, exposedFaces: 2 }
    fc.assert(
      fc.property(decades(1e-4, 1e4), decades(1e-3, 10), uniform, (biot, fourier, ratio) => {
        const place = round ? { radii: [ratio * 0.05] } : { depths: [(1 - ratio) * 0.05] }
        const common = {
          conductivity: 2,
          volumetricHeatCapacity: 2.4e6,
          initialTemperature: 20,
          ambientTemperature: 20,
        }
        const [k, a, L] = [2, 2 / 2.4e6, 0.05]
        const body = { ...common, ...size, filmCoefficient: (biot * k) / L, times: [(fourier * L * L) / a], ...place }
        const inSi = ask(id, { ...body, outputs }).result
        const { result } = ask(id, { biot, fourier: [fourier], positionRatio: [ratio], outputs })
        const pairs = [
          [result.remainingFraction[0]![0]!, inSi.remainingFraction[0]![0]!],
          [result.completedFraction[0]![0]!, inSi.completedFraction[0]![0]!],
          [result.heatFraction[0]!, inSi.heatFraction[0]!],
        ] as const
        for (const [one, other] of pairs) expect(Math.abs(one - other)).toBeLessThanOrEqual(1e-10 * other + 1e-13)
      }),
      { numRuns: 60 },
    )
  })

  it('are echoed, and the answer holds no temperature and no unit but 1', () => {
    const body = { biot: 1, fourier: [0.1, 1], positionRatio: [0, 1], outputs }
    const answer = ask('slab-convection', body)
    expect(answer.input).toEqual(body)
    expect(answer.axes).toEqual({ fourier: [0.1, 1], positionRatio: [0, 1] })
    expect(new Set(Object.values(answer.units))).toEqual(new Set(['1']))
    expect(answer.accuracy.scale).toBe(1)
    expect(answer.numbers).toEqual({ biot: 1, fourier: [0.1, 1] })
    expect(answer.warnings).toEqual([])
    expect(answer.points).toBe(10 + 3)
    expect(solve.other(caseOf('slab-convection'))!.answer.parse(answer)).toEqual(answer)
  })

  it('give the values of the charts', () => {
    const centre = ask('slab-convection', { biot: 1, fourier: [1], positionRatio: [0] })
    expect(centre.result.remainingFraction[0]![0]).toBeCloseTo(0.5338594014, 10)
    const { result } = ask('slab-convection', { biot: 1, fourier: [0.1, 0.2], positionRatio: [0, 1] })
    expect(result.remainingFraction.map(([inside, face]) => (face! / inside!).toFixed(4))).toEqual(['0.7286', '0.6768'])
  })

  it('reach the ends of their ranges', () => {
    for (const id of Object.values(caseIds)) {
      const films = filmed.includes(id) ? [0, 1e-9, 1e9] : [undefined]
      for (const biot of films) {
        const body = {
          ...(biot === undefined ? {} : { biot }),
          fourier: [0, 1e-300, 1e-12, 1e6, 1e17],
          positionRatio: [0, 0.5, 1],
          outputs,
        }
        const { result } = ask(id, body)
        const all = [...result.remainingFraction.flat(), ...result.completedFraction.flat(), ...result.heatFraction]
        expect(all.filter((value) => !(value >= 0 && value <= 1))).toEqual([])
      }
    }
  })

  it('are answered in short, and cost what they cost', () => {
    const body = { biot: 1, fourier: [0.1], positionRatio: [0.5] }
    const compact = solve.prepare(caseOf('sphere-convection'), body, 'compact').run()
    expect(Object.keys(compact)).toEqual(['result', 'accuracy', 'warnings'])
    const cost = costOf([solve]).prepare(caseOf('sphere-convection'), { input: body }, 'full').run()
    expect(cost).toMatchObject({ points: 4 })
  })
})

describe('refusals of dimensionless numbers', () => {
  const refusals = (id: string, body: Record<string, unknown>) => {
    try {
      ask(id, body)
    } catch (error) {
      if (!(error instanceof DomainError)) throw error
      return error.issues.map(({ pointer, code }) => `${pointer} ${code}`)
    }
    return []
  }
  const good = { biot: 1, fourier: [0.1], positionRatio: [0.5] }
  const slab = caseOf('slab-convection').example

  it.each([
    ['no Biot number where there is a film', { fourier: [1], positionRatio: [0] }, ['#/biot missing-field']],
    ['no Fourier number', { biot: 1, positionRatio: [0] }, ['#/fourier missing-field']],
    ['no place', { biot: 1, fourier: [1] }, ['#/positionRatio missing-field']],
    ['a place outside', { ...good, positionRatio: [0, 1.1] }, ['#/positionRatio/1 out-of-range']],
    ['a Biot number between 0 and its least', { ...good, biot: 1e-10 }, ['#/biot out-of-range']],
    ['a temperature asked', { ...good, outputs: ['temperature'] }, ['#/outputs/0 output-not-defined']],
    ['a flux asked beside', { ...good, outputs: ['heatFraction', 'heatFlux'] }, ['#/outputs/1 output-not-defined']],
    ['sizes beside', { ...good, thickness: 1 }, ['#/thickness unknown-field']],
  ])('%s', (_, body, expected) => {
    expect(refusals('slab-convection', body)).toEqual(expected)
  })

  it.each(held)('%s has no Biot number', (id) => {
    expect(refusals(id, good)).toEqual(['#/biot unknown-field'])
  })

  it('none beside the fields of a body in SI, and none to a case that is not asked by them', () => {
    expect(refusals('slab-convection', { ...slab, biot: 1 })).toContain('#/thickness unknown-field')
    expect(refusals('slab-two-sides', { fourier: [1] })).toContain('#/fourier unknown-field')
  })

  it('takes a heat fraction without a place', () => {
    expect(
      ask('slab-convection', { biot: 1, fourier: [1], outputs: ['heatFraction'] }).result.heatFraction,
    ).toHaveLength(1)
  })
})
