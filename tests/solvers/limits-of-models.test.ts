import erfc from '@stdlib/math-base-special-erfc'
import { describe, expect, it } from 'vitest'
import type { Check, Numbers } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { operationsOf } from '../../solvers/operations/index.ts'
import { solve } from '../../solvers/operations/solve.ts'
import { askSingle, caseOf } from './ask.ts'

/* What an answer says of its own model: how long it holds, to which side it errs, and what stands for what. */

type Body = Record<string, unknown>
interface Answer {
  numbers: Numbers
  checks: Check[]
  warnings: { code: string }[]
  errs?: 'early' | 'late'
  result: Record<string, number[] | number[][]>
  accuracy: { note: string }
}
const ask = (id: string, body: Body) => solve.prepare(caseOf(id), body, 'full').run() as Answer
const checkOf = (answer: Answer, id: string) => answer.checks.find((check) => check.id === id)

const solid = { conductivity: 1.5, diffusivity: 7.5e-7 }
const start = { initialTemperature: 20 }

describe('a half space of a given thickness', () => {
  const halves = [
    ['semi-infinite-surface-temperature', { surfaceTemperature: 0 }],
    ['semi-infinite-surface-ramp', { rampRate: 0.001 }],
    ['semi-infinite-surface-flux', { imposedHeatFlux: 300 }],
    ['semi-infinite-convection', { filmCoefficient: 20, ambientTemperature: 0 }],
  ] as const

  it.each(halves)('holds until its far face is felt by 1 %%: %s', (id, drive) => {
    const body = { ...solid, ...start, ...drive, thickness: 0.3, depths: [0.1] }
    const { numbers } = ask(id, { ...body, times: [60] })
    const until = numbers.validUntil as number
    expect(erfc(0.3 / (2 * Math.sqrt(7.5e-7 * until)))).toBeCloseTo(0.01, 7)
    for (const [share, holds] of [
      [0.99, true],
      [1.01, false],
    ] as const) {
      const answer = ask(id, { ...body, times: [until * share] })
      expect(checkOf(answer, 'body-deep-enough')!.holds).toBe(holds)
      expect(answer.warnings.some(({ code }) => code === 'body-too-thin')).toBe(!holds)
      expect(answer.errs).toBe('late')
    }
    const { numbers: without, errs } = ask(id, { ...body, thickness: undefined, times: [60] })
    expect(without.validUntil).toBeUndefined()
    expect(errs).toBeUndefined()
  })

  it('is late against the slab that it stands for', () => {
    const { validUntil } = ask('semi-infinite-surface-temperature', {
      ...solid,
      ...start,
      surfaceTemperature: 0,
      thickness: 0.3,
      depths: [0.3],
      times: [60],
    }).numbers
    const body = { ...solid, ...start, surfaceTemperature: 0, depths: [0.3], times: [3 * (validUntil as number)] }
    const half = askSingle('semi-infinite-surface-temperature', body, 'completedFraction')
    const slab = askSingle(
      'slab-surface-temperature',
      { ...body, thickness: 0.3, exposedFaces: 1 },
      'completedFraction',
    )
    expect(slab.value).toBeGreaterThan(half.value)
    expect(slab.value / half.value).toBeCloseTo(2, 1)
  })
})

describe('a ramp', () => {
  it('is nearly a step in its middle, and says by how much it is not', () => {
    const body = { ...solid, ...start, rampRate: 0.01, rampDuration: 1000, depths: [0, 0.05] }
    const answer = ask('semi-infinite-surface-ramp', { ...body, times: [5000] })
    const steps = [0, 0.05].map((x) => 20 + 10 * erfc(x / (2 * Math.sqrt(7.5e-7 * 4500))))
    const off = (answer.result['temperature'] as number[][])[0]!.map((T, j) => Math.abs(T - steps[j]!) / 10)
    expect(checkOf(answer, 'step-at-half-ramp')!.value).toBeCloseTo(Math.max(...off), 12)
    // tr²/24 of the second derivative of the step by time.
    const [eta, t] = [0.05 / (2 * Math.sqrt(7.5e-7 * 4500)), 4500]
    const second = ((eta * Math.exp(-eta * eta)) / Math.sqrt(Math.PI)) * (eta * eta - 1.5)
    expect(off[1]! / Math.abs((1000 * 1000 * second) / (24 * t * t))).toBeCloseTo(1, 1)
    expect(checkOf(ask('semi-infinite-surface-ramp', { ...body, times: [400] }), 'step-at-half-ramp')).toBeUndefined()
  })
})

describe('a settled cycle', () => {
  it('says how deep it goes and how soon its start is forgotten', () => {
    const cycle = { cycleMean: 10, amplitude: 10, period: 86_400, timeOfMaximum: 0, times: [0] }
    for (const [id, film] of [
      ['semi-infinite-periodic-surface', {}],
      ['semi-infinite-periodic-ambient', { filmCoefficient: 12 }],
    ] as const) {
      const { numbers } = ask(id, { ...solid, ...cycle, ...film, depths: [0] })
      const deep = { ...solid, ...cycle, ...film, depths: [0, numbers.penetrationDepth as number] }
      const { result } = ask(id, { ...deep, outputs: ['amplitude'] })
      const [face, there] = result['amplitude'] as number[]
      expect(there! / face!).toBeCloseTo(0.01, 12)
      expect(numbers.cyclesToSettle).toBe(4)
    }
    const lumped = { heatCapacity: 4e5, area: 2, filmCoefficient: 5, ...start, times: [100] }
    const { numbers } = ask('lumped-varying-ambient', {
      ...lumped,
      ambient: { kind: 'cycle', cycleMean: 10, amplitude: 10, period: 7200, timeOfMaximum: 0 },
    })
    expect(numbers.cyclesToSettle).toBe(Math.ceil((40_000 * Math.log(100)) / 7200))
  })

  it('has forgotten a start at the mean after as many cycles, at any depth', () => {
    // The transient of a surface that follows sin ωt from 0 on: a quadrature over the decays of the half space.
    const [w, depthOf] = [2 * Math.PI, (X: number) => X / Math.sqrt(Math.PI)]
    const left = (X: number, cycles: number) => {
      let sum = 0
      const n = 4000
      // ∫ e^(−s²t)·sin(sx)·2sω/(s⁴ + ω²) ds/π by the midpoint rule, a = 1, P = 1.
      for (let k = 0; k < n; k++) {
        const s = ((k + 0.5) * 8) / n
        sum += (Math.exp(-s * s * cycles) * Math.sin(s * depthOf(X)) * 2 * s * w) / (s ** 4 + w * w)
      }
      return (sum * 8) / n / Math.PI
    }
    const worst = (cycles: number) =>
      Math.max(...Array.from({ length: 120 }, (_, k) => Math.abs(left(k * 0.1, cycles))))
    expect(worst(4)).toBeLessThan(0.01)
    expect(worst(3)).toBeGreaterThan(0.01)
  })
})

describe('a face that is held', () => {
  it('shortens the time to half by one percent where a film of the coefficient told stands before it', () => {
    for (const [id, other, body] of [
      ['slab-surface-temperature', 'slab-convection', { thickness: 0.2, exposedFaces: 2, depths: [0.1] }],
      ['cylinder-surface-temperature', 'cylinder-convection', { radius: 0.1, radii: [0] }],
      ['sphere-surface-temperature', 'sphere-convection', { radius: 0.1, radii: [0] }],
    ] as const) {
      const own = { ...solid, ...start, ...body }
      const held = { ...own, surfaceTemperature: 0 }
      const { filmForHeldFace: film } = ask(id, { ...held, times: [60] }).numbers
      const reach = (caseId: string, input: Body) => {
        const operation = operationsOf(caseOf(caseId)).find((o) => o.id === 'time-to-reach')!
        const { depths, radii, ...rest } = input as Body & { depths?: number[]; radii?: number[] }
        const place = depths ? { depth: depths[0] } : { radius: undefined, radii }
        const asked = depths ? { ...rest, ...place } : { ...rest, radii }
        const answer = operation.prepare(caseOf(caseId), { ...asked, target: 10 }, 'full').run() as {
          result: { crossings: number[] }
          conservativeSide: string
        }
        expect(answer.conservativeSide).toContain('later')
        return answer.result.crossings[0]!
      }
      const early = reach(id, held) / reach(other, { ...own, filmCoefficient: film, ambientTemperature: 0 })
      expect(1 - early).toBeGreaterThan(0.008)
      expect(1 - early).toBeLessThan(0.012)
    }
  })

  it('of a half space is one percent of the step at the first time', () => {
    const body = { ...solid, ...start, depths: [0], times: [3600, 600] }
    const { filmForHeldFace } = ask('semi-infinite-surface-temperature', { ...body, surfaceTemperature: 0 }).numbers
    const film = { ...body, times: [600], filmCoefficient: filmForHeldFace, ambientTemperature: 0 }
    expect(askSingle('semi-infinite-convection', film, 'remainingFraction').value).toBeCloseTo(0.01, 5)
  })
})

describe('the side to which an answer errs', () => {
  const told = (id: string, body: Body) => ask(id, body).errs

  it('is early for one temperature in place of a body, and late for a line in place of a probe', () => {
    const lumped = caseOf('lumped-convection').example
    expect(told('lumped-convection', lumped)).toBe('early')
    expect(told('lumped-convection', { ...lumped, filmCoefficient: 0 })).toBeUndefined()
    const line = { ...solid, ...start, linePower: 10, probeRadius: 0.002, radii: [0.002], times: [10] }
    expect(told('line-source', line)).toBe('late')
    const probe = { ...solid, ...start, radius: 0.002, radii: [0.002], times: [10] }
    const real = askSingle(
      'cylinder-in-infinite-medium',
      { ...probe, boundary: { kind: 'line-power', linePower: 10 } },
      'temperature',
    )
    expect(real.value).toBeGreaterThan(askSingle('line-source', line, 'temperature').value)
  })

  it('of two bodies in contact is late where the own one is thin, early where the other is', () => {
    const body = { ...solid, ...start, other: { ...solid, initialTemperature: 60 }, depths: [0.001], times: [1] }
    expect(told('semi-infinite-contact', body)).toBeUndefined()
    expect(told('semi-infinite-contact', { ...body, thickness: 0.05 })).toBe('late')
    expect(told('semi-infinite-contact', { ...body, other: { ...body.other, thickness: 0.05 } })).toBe('early')
  })

  it('is told beside a bound that says what it does not cover', () => {
    for (const c of cases)
      expect(ask(c.id, c.example).accuracy.note).toContain('Inputs and model decide the real error; see uncertainty')
  })
})
