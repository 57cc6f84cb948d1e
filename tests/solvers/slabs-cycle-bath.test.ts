import { describe, expect, it } from 'vitest'
import { bathModes } from '../../solvers/math/bath-roots.ts'
import { BathSlab } from '../../solvers/math/bath-slab.ts'
import { DomainError } from '../../solvers/errors.ts'
import type { OutputName } from '../../solvers/outputs.ts'
import { ask, askSingle, single, solveDirect } from './ask.ts'
import { D } from './exact/functions.ts'
import { bathRows, cycleRows } from './exact/slab-rows.ts'

const unit = { conductivity: 1, diffusivity: 1, initialTemperature: 0, bathTemperature: 1 }

/** What is wrong with answers to rows of exact values, bounds included; `scaleOf` is what each promise is relative to. */
function wrongWith(
  id: string,
  rows: readonly { body: Record<string, unknown>; expected: Record<string, string> }[],
  promised: (output: string, body: Record<string, unknown>, expected: Record<string, string>) => number,
): string[] {
  return rows.flatMap(({ body, expected }) =>
    Object.entries(expected).flatMap(([output, text]) => {
      const { value, bound } = askSingle(id, body, output)
      const error = Number(new D(value).minus(text).abs())
      const label = `${output} ${JSON.stringify(body)}`
      if (!(error <= bound)) return [`off ${error}, bound ${bound}: ${label}`]
      const most = 10 * promised(output, body, expected)
      return bound <= most ? [] : [`bound ${bound}, ten times promised ${most}: ${label}`]
    }),
  )
}

describe('a bath of finite capacity', () => {
  it('meets exact values within its bounds, which keep the promise', () => {
    const rows = bathRows.map(({ body, expected }) => ({ body: { ...unit, ...body }, expected }))
    const failures = wrongWith('slab-finite-bath', rows, (output, _, e) => {
      if (/emperature$/.test(output)) return 1e-12
      return 1e-11 * Math.max(Math.abs(Number(e[output])), output === 'heatFlux' ? Number(e['surfaceHeatFlux']) : 0)
    })
    expect(failures).toEqual([])
  })

  it('a planted error of 1e-10 in a root breaks a bound', () => {
    const slab = new BathSlab({ gamma: 0.7, biot: 2 })
    const m = { fourier: 0.6, root: Math.sqrt(0.6) }
    const exact = slab.at(m).surfaceFlux()
    slab.modes.roots[0]! *= 1 + 1e-10
    const moved = slab.at(m).surfaceFlux()
    expect(Math.abs(moved.value - exact.value)).toBeGreaterThan(exact.error + moved.error)
  })

  it('agrees on both sides of the change from the transform to the series', () => {
    for (const gamma of [1e-6, 0.03, 1, 40, 1e7])
      for (const biot of [1e-7, 0.2, 5, 1e6, Infinity]) {
        const slab = new BathSlab({ gamma, biot })
        const at = 1 / slab.modes.roots[0]! ** 2
        const moment = (fourier: number) => ({ fourier, root: Math.sqrt(fourier) })
        const [before, after] = [slab.at(moment(at * (1 - 1e-13))), slab.at(moment(at * (1 + 1e-13)))]
        for (const name of ['bath', 'surfaceFlux', 'gain'] as const) {
          const [x, y] = [before[name](), after[name]()]
          expect([x.method, y.method]).toEqual(['contour', 'eigen-series'])
          const allowed = x.error + y.error + 1e-12 * Math.abs(x.value)
          expect(Math.abs(x.value - y.value), `${name} ${gamma} ${biot}`).toBeLessThanOrEqual(allowed)
        }
        const [x, y] = [before.temperature(0.3, 0.7), after.temperature(0.3, 0.7)]
        expect(Math.abs(x.value - y.value)).toBeLessThanOrEqual(x.error + y.error + 1e-12)
      }
  })

  it('has the roots of its equation, in order', () => {
    for (const gamma of [1e-9, 0.1, 1, 1e4])
      for (const biot of [1e-6, 1, 1e5]) {
        const { roots } = bathModes({ gamma, biot }, 10)
        roots.forEach((q, n) => {
          expect(q).toBeGreaterThan(n * Math.PI)
          expect(q).toBeLessThanOrEqual((n + 1) * Math.PI)
          // tan q·(γq² − Bi) = γqBi, multiplied out and by its own size.
          const left = Math.sin(q) * (gamma * q * q - biot) - Math.cos(q) * gamma * q * biot
          const size = (gamma * q * q + biot) * Math.max(Math.abs(Math.sin(q)), 1e-3) + gamma * q * biot
          expect(Math.abs(left) / size).toBeLessThan(1e-11 * (1 + n))
        })
      }
  })

  it('loses what the body gains, and both come to the equilibrium', () => {
    const body = {
      conductivity: 0.5,
      density: 1040,
      specificHeat: 3700,
      thickness: 0.03,
      exposedFaces: 2,
      initialTemperature: 62,
      bathTemperature: 8,
      bathHeatCapacity: 170_000,
      filmCoefficient: 450,
      depths: [0, 0.015, 0.02],
      times: [1, 60, 600, 1e6],
    }
    const outputs = [
      'bathTemperature',
      'heatGained',
      'equilibriumTemperature',
      'temperature',
      'heatFraction',
      'meanTemperature',
    ]
    const { result } = ask('slab-finite-bath', { ...body, outputs })
    const bath = result['bathTemperature'] as number[]
    const end = single(result['equilibriumTemperature']!)
    ;(result['heatGained'] as number[]).forEach((Q, i) => {
      expect((bath[i]! - 8) / (-Q / 170_000)).toBeCloseTo(1, 11)
      expect(Q / (1040 * 3700 * 0.015)).toBeCloseTo((result['meanTemperature'] as number[])[i]! - 62, 11)
      expect((result['heatFraction'] as number[])[i]! * (end - 62)).toBeCloseTo(
        (result['meanTemperature'] as number[])[i]! - 62,
        11,
      )
    })
    for (const T of (result['temperature'] as number[][])[3]!) expect(T).toBeCloseTo(end, 12)
    expect(bath[3]).toBeCloseTo(end, 12)
  })

  it('a large bath is a fluid, a film of none leaves both as they are', () => {
    const body = {
      conductivity: 1,
      diffusivity: 1,
      thickness: 1,
      exposedFaces: 1,
      initialTemperature: 20,
      depths: [0, 0.4],
      times: [0.01, 0.3, 2],
    }
    const bath = { ...body, bathTemperature: 50, bathHeatCapacity: 1e12, filmCoefficient: 3 }
    const fluid = ask('slab-convection', { ...body, ambientTemperature: 50, filmCoefficient: 3 }).result[
      'temperature'
    ] as number[][]
    const found = ask('slab-finite-bath', bath).result['temperature'] as number[][]
    found.flat().forEach((T, k) => expect(T).toBeCloseTo(fluid.flat()[k]!, 9))
    const still = ask('slab-finite-bath', {
      ...bath,
      filmCoefficient: 0,
      outputs: ['temperature', 'bathTemperature', 'equilibriumTemperature'],
    }).result
    expect(new Set([still['temperature']].flat(3))).toEqual(new Set([20]))
    expect(still['bathTemperature']).toEqual([50, 50, 50])
    expect(still['equilibriumTemperature']).toBe(20)
  })
})

describe('a slab in a settled cycle', () => {
  it('meets exact values within its bounds, which keep the promise', () => {
    const failures = wrongWith('slab-periodic', cycleRows, (output, body, e) => {
      const of = (name: string) => Math.abs(Number(e[name]))
      const time = Math.abs((body['times'] as number[])[0]!) + (body['timeOfMaximum'] as number)
      // The rounding of the times themselves.
      const turned = (4 * Math.PI * time * 2 ** -53) / (body['period'] as number)
      if (output === 'temperature')
        return (body['amplitude'] as number) * (1e-12 + turned) + 2e-15 * Math.abs(body['cycleMean'] as number)
      if (/eatFlux$/.test(output)) return of('admittance') * (body['amplitude'] as number) * (1e-11 + turned)
      if (/^time|Time/.test(output)) return 1e-11 * ((body['period'] as number) + of(output))
      return 1e-11 * of(output)
    })
    expect(failures).toEqual([])
  })

  const wave = { cycleMean: 10, amplitude: 8, period: 86_400, timeOfMaximum: 43_200, times: [0, 20_000, -7000] }
  const solid = { conductivity: 1.5, volumetricHeatCapacity: 2e6 }

  it('thick, follows as a half space does', () => {
    for (const [film, half] of [
      [{}, 'semi-infinite-periodic-surface'],
      [{ filmCoefficient: 9 }, 'semi-infinite-periodic-ambient'],
    ] as const) {
      const outputs = ['temperature', 'heatFlux', 'surfaceHeatFlux', 'amplitude', 'timeLag']
      const common = { ...solid, ...wave, ...film, depths: [0, 0.1, 2], outputs }
      const thick = ask('slab-periodic', { ...common, thickness: 9, exposedFaces: 1 }).result
      const deep = ask(half, common).result
      for (const name of outputs)
        [thick[name]].flat(3).forEach((v, k) => {
          const exact = [deep[name]].flat(3)[k] as number
          expect(Math.abs((v as number) - exact)).toBeLessThanOrEqual(1e-11 * Math.max(1, Math.abs(exact)))
        })
    }
  })

  it('thin, stores with all of its capacity, a quarter of a period ahead', () => {
    const outputs: OutputName[] = ['arealHeatCapacity', 'admittanceTimeLead']
    const { result } = ask('slab-periodic', { ...solid, ...wave, thickness: 1e-4, exposedFaces: 1, outputs })
    expect(single(result['arealHeatCapacity']!) / (2e6 * 1e-4)).toBeCloseTo(1, 9)
    expect(single(result['admittanceTimeLead']!) / 86_400).toBeCloseTo(0.25, 6)
  })

  it('stores most at 1.18 damping depths', () => {
    const damping = Math.sqrt((1.5 / 2e6) * (86_400 / Math.PI))
    const stored = (ratio: number) =>
      single(
        solveDirect('slab-periodic', {
          ...solid,
          cycleMean: 0,
          amplitude: 1,
          period: 86_400,
          timeOfMaximum: 0,
          thickness: ratio * damping,
          exposedFaces: 1,
          times: [0],
          outputs: ['arealHeatCapacity'],
        }).outputs.arealHeatCapacity!.values,
      )
    expect(stored(1.182510186215676)).toBeGreaterThan(stored(1.17))
    expect(stored(1.182510186215676)).toBeGreaterThan(stored(1.195))
  })

  it('is alike on both sides of the middle, where the flux turns', () => {
    const body = { ...solid, ...wave, filmCoefficient: 6, thickness: 0.25, exposedFaces: 2, depths: [0.0625, 0.1875] }
    const { result } = ask('slab-periodic', { ...body, outputs: ['temperature', 'heatFlux', 'timeLag'] })
    for (const [a, b] of result['temperature'] as number[][]) expect(a).toBe(b)
    for (const [a, b] of result['heatFlux'] as number[][]) expect(a).toBe(-b!)
  })

  it('lags by more than a period far inside', () => {
    const body = { ...solid, ...wave, thickness: 3, exposedFaces: 1, depths: [2], outputs: ['timeLag'] }
    expect(single(ask('slab-periodic', body).result['timeLag']!)).toBeGreaterThan(2 * 86_400)
  })
})

describe('refusals', () => {
  const base = {
    conductivity: 1,
    diffusivity: 1e-6,
    thickness: 0.2,
    initialTemperature: 20,
    depths: [0.1],
    times: [0, 60],
  }
  const held = { kind: 'temperature', surfaceTemperature: 30 }
  const insulated = { kind: 'insulated' }
  const profile = (depths: number[], temperatures = depths.map(() => 20)) => ({
    initialTemperature: undefined,
    initialProfile: { depths, temperatures },
  })
  const sides = { left: held, right: insulated }
  const refused = (id: string, body: Record<string, unknown>): [string, string][] => {
    try {
      ask(id, JSON.parse(JSON.stringify(body)))
    } catch (error) {
      if (error instanceof DomainError) return error.issues.map(({ pointer, code }) => [pointer, code])
      throw error
    }
    return []
  }

  it.each<[string, string, Record<string, unknown>, [string, string][]]>([
    [
      'a kind that there is not',
      'slab-two-sides',
      { ...base, left: { kind: 'glued' }, right: held },
      [['#/left/kind', 'not-in-list']],
    ],
    [
      'a film without its coefficient',
      'slab-two-sides',
      { ...base, left: { kind: 'convection', ambientTemperature: 5 }, right: held },
      [['#/left/filmCoefficient', 'missing-field']],
    ],
    [
      'a field of another kind',
      'slab-surface-flux',
      { ...base, imposedHeatFlux: 5, back: { kind: 'insulated', imposedHeatFlux: 3 } },
      [['#/back/imposedHeatFlux', 'unknown-field']],
    ],
    [
      'a flux at a stepped face at time 0',
      'slab-two-sides',
      { ...base, ...sides, outputs: ['leftHeatFlux'] },
      [['#/times/0', 'singular-at-time-zero']],
    ],
    [
      'a flux at a jump at time 0',
      'slab-initial-profile',
      { ...base, ...profile([0, 0.1, 0.1, 0.2], [30, 20, 10, 10]), ...sides, outputs: ['heatFlux'] },
      [['#/times/0', 'singular-at-time-zero']],
    ],
    [
      'a steady state of a body that warms for ever',
      'slab-two-sides',
      { ...base, left: { kind: 'flux', imposedHeatFlux: 5 }, right: insulated, outputs: ['steadyTemperature'] },
      [['#/outputs/0', 'output-not-defined']],
    ],
    [
      'the same of a constant power without a film',
      'slab-internal-heat',
      {
        ...base,
        exposedFaces: 1,
        ambientTemperature: 0,
        filmCoefficient: 0,
        source: { kind: 'constant', powerDensity: 5 },
        outputs: ['steadyTemperature'],
      },
      [['#/outputs/0', 'output-not-defined']],
    ],
    [
      'two starts',
      'slab-two-sides',
      { ...base, initialProfile: profile([0, 0.2]).initialProfile, ...sides },
      [['#/initialProfile', 'conflicting-fields']],
    ],
    [
      'no start',
      'slab-two-sides',
      { ...base, initialTemperature: undefined, ...sides },
      [['#/initialTemperature', 'missing-field']],
    ],
    [
      'a profile that ends elsewhere, turns back, or stays',
      'slab-two-sides',
      { ...base, ...profile([0.01, 0.1, 0.05, 0.1, 0.1, 0.1, 0.3]), ...sides },
      [
        ['#/initialProfile/depths/0', 'out-of-range'],
        ['#/initialProfile/depths/6', 'out-of-range'],
        ['#/initialProfile/depths/2', 'out-of-range'],
        ['#/initialProfile/depths/5', 'conflicting-fields'],
      ],
    ],
    [
      'a profile with a temperature too few',
      'slab-two-sides',
      { ...base, ...profile([0, 0.1, 0.2], [20, 21]), ...sides },
      [['#/initialProfile/temperatures', 'wrong-length']],
    ],
    [
      'a flux at a face without film at time 0',
      'slab-finite-bath',
      { ...base, exposedFaces: 1, bathTemperature: 5, bathHeatCapacity: 1e5, outputs: ['surfaceHeatFlux'] },
      [['#/times/0', 'singular-at-time-zero']],
    ],
    [
      'an initial temperature of a settled cycle',
      'slab-periodic',
      { ...base, exposedFaces: 1, cycleMean: 5, amplitude: 3, period: 60, timeOfMaximum: 0 },
      [['#/initialTemperature', 'unknown-field']],
    ],
  ])('%s', (_, id, body, issues) => {
    expect(refused(id, body)).toEqual(issues)
  })

  it('but a face that is held at its own temperature has a flux at time 0', () => {
    const body = {
      ...base,
      left: { kind: 'temperature', surfaceTemperature: 20 },
      right: insulated,
      outputs: ['leftHeatFlux'],
    }
    expect((ask('slab-two-sides', body).result['leftHeatFlux'] as number[])[0]).toBe(0)
  })
})
