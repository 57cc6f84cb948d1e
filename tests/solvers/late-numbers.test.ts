import { describe, expect, it } from 'vitest'
import { cases } from '../../solvers/cases/index.ts'
import type { Numbers } from '../../solvers/case.ts'
import { solve } from '../../solvers/operations/solve.ts'
import { caseOf } from './ask.ts'

type Body = Record<string, unknown>
interface Answer {
  numbers: Numbers
  result: { temperature: number[][] | number[] }
}

const ask = (id: string, body: Body) =>
  solve.prepare(caseOf(id), { ...body, outputs: ['temperature'] }, 'full').run() as Answer
const numbersOf = (id: string, body: Body) => ask(id, body).numbers as Record<string, number> & { jValue: number[] }

/** The change of each place, and what is left of it at each time. */
function remaining(id: string, body: Body, tau: number, times: number[]) {
  const { temperature } = ask(id, { ...body, times: [0, 60 * tau, ...times] }).result
  const [start, end, ...rest] = temperature.map((row) => [row].flat())
  const changes = start!.map((T, j) => T - end![j]!)
  return { changes, left: rest.map((row) => row.map((T, j) => (T - end![j]!) / changes[j]!)) }
}

const bodies = cases.flatMap((c) =>
  [c.example, ...(c.variants ?? []).map(({ input }) => input)]
    .filter((body) => (c.places === 'none' || body['depths']) ?? body['radii'] ?? body['points'])
    .map((body) => [c.id, body] as const),
)
const withLag = bodies.filter(([id, body]) => numbersOf(id, body).jValue)

describe('the slowest mode', () => {
  it('is told of every body that has one', () => {
    const told = new Set(bodies.filter(([id, body]) => numbersOf(id, body)['slowestTimeConstant']).map(([id]) => id))
    const endless = cases.map(({ id }) => id).filter((id) => /^semi-infinite|^edge|^corner|-source$|medium$/.test(id))
    expect([...told].sort()).toEqual(
      cases
        .map(({ id }) => id)
        .filter((id) => !endless.includes(id))
        .sort(),
    )
    const lagging = [
      'slab-convection',
      'slab-surface-temperature',
      'slab-two-sides',
      'slab-surface-flux',
      'slab-internal-heat',
    ]
    const more = [
      'slab-initial-profile',
      'slab-finite-bath',
      'hollow-cylinder-convection',
      'brick-rectangular',
      'bar-rectangular',
    ]
    expect(new Set(withLag.map(([id]) => id))).toEqual(
      new Set([
        ...lagging,
        ...more,
        'short-cylinder-convection',
        ...['cylinder', 'sphere'].flatMap((body) => [`${body}-convection`, `${body}-surface-temperature`]),
      ]),
    )
  })

  it.each(withLag)('is what late answers of %s follow', (id, body) => {
    const { slowestTimeConstant: tau, fValue, jValue, validFrom } = numbersOf(id, body)
    expect(fValue! / tau!).toBeCloseTo(Math.LN10, 12)
    const late = validFrom! + 12 * tau!
    const { left } = remaining(id, body, tau!, [late, late + fValue!])
    const [now, after] = left
    jValue.forEach((j, k) => {
      // A face that is held has no change of its own way.
      if (Math.abs(j) < 1e-9) return
      expect(now![k]! / (j * Math.exp(-late / tau!))).toBeCloseTo(1, 4)
      expect(now![k]! / after![k]!).toBeCloseTo(10, 3)
    })
  })

  it.each(withLag)('is right to one percent from validFrom on in %s', (id, body) => {
    const { slowestTimeConstant: tau, jValue, validFrom } = numbersOf(id, body)
    if (validFrom === 0) return
    const { changes, left } = remaining(id, body, tau!, [validFrom!])
    const largest = Math.max(...changes.map(Math.abs))
    left[0]!.forEach((share, k) => {
      const off = Math.abs(share - jValue[k]! * Math.exp(-validFrom! / tau!)) * Math.abs(changes[k]!)
      if (changes[k] !== 0) expect(off).toBeLessThan(0.0125 * largest)
    })
  })

  it('leaves out one percent at the centre at validFrom itself', () => {
    const solid = { conductivity: 1, diffusivity: 1e-6, initialTemperature: 0 }
    const wall = { ...solid, thickness: 0.1, exposedFaces: 1, surfaceTemperature: 1, depths: [0.1], times: [1] }
    const ball = { ...solid, radius: 0.1, filmCoefficient: 30, ambientTemperature: 1, radii: [0], times: [1] }
    for (const [id, body] of [
      ['slab-surface-temperature', wall],
      ['sphere-convection', ball],
      ['cylinder-convection', ball],
    ] as const) {
      const { slowestTimeConstant: tau, jValue, validFrom } = numbersOf(id, body)
      const { left } = remaining(id, body, tau!, [validFrom!])
      expect(Math.abs(left[0]![0]! - jValue[0]! * Math.exp(-validFrom! / tau!))).toBeCloseTo(0.01, 4)
    }
  })

  it('of a heated floor is that of scenario S03: z₁ = 0.65406343, 14108.763 s', () => {
    const floor = { conductivity: 1.4, volumetricHeatCapacity: 2e6, thickness: 0.065, initialTemperature: 18 }
    const back = { kind: 'convection', filmCoefficient: 10.8, ambientTemperature: 18 }
    const { slowestTimeConstant: tau } = numbersOf('slab-surface-flux', {
      ...floor,
      imposedHeatFlux: 60,
      back,
      depths: [0.065],
      times: [18918],
    })
    expect(Math.abs(tau! - 14108.763)).toBeLessThan(1e-3)
    // As printed the eighth digit is one too high.
    expect(Math.abs(Math.sqrt((0.065 * 0.065) / 7e-7 / tau!) - 0.65406343)).toBeLessThan(2e-8)
  })

  it('gives the constants f·a/R² of food that is held at its face', () => {
    const solid = { conductivity: 1, diffusivity: 1, initialTemperature: 0, surfaceTemperature: 1, times: [1] }
    const f = (id: string, body: Body) => numbersOf(id, { ...solid, ...body })['fValue']
    expect(f('slab-surface-temperature', { thickness: 2, exposedFaces: 2, depths: [1] })).toBeCloseTo(
      0.9332025882374364,
      14,
    )
    expect(f('cylinder-surface-temperature', { radius: 1, radii: [0] })).toBeCloseTo(0.3981516603039994, 14)
    expect(f('sphere-surface-temperature', { radius: 1, radii: [0] })).toBeCloseTo(Math.LN10 / Math.PI ** 2, 14)
  })
})
