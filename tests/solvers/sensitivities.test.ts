import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { outputNamesOf } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { DomainError } from '../../solvers/errors.ts'
import { solve } from '../../solvers/operations/solve.ts'
import { admissible } from './admissible.ts'
import { caseOf } from './ask.ts'
import { proof, seed } from './counts.ts'
import { decades, uniform } from './draw.ts'
import { exactHalfSpace, exactSlab } from './exact/film.ts'
import { D } from './exact/functions.ts'
import { exactSphere } from './exact/round.ts'

type Body = Record<string, unknown>
interface Asked {
  points: number
  result: { temperature: number[] | number[][]; sensitivities: Record<string, number[] | number[][]> }
  accuracy: { scale: number; bound: { sensitivities: { absolute: number; relative: number } } }
}

const outputs = ['temperature', 'sensitivities']
const askAll = (id: string, body: Body) => solve.prepare(caseOf(id), { ...body, outputs }, 'full').run() as Asked

/** The largest of what each sensitivity is off, as a share of what it may be. */
function worst({ result, accuracy }: Asked, exact: Record<string, number>): number {
  expect(Object.keys(result.sensitivities).sort()).toEqual(Object.keys(exact).sort())
  const bound = accuracy.bound.sensitivities.absolute
  return Math.max(
    ...Object.entries(exact).map(
      ([name, value]) =>
        Math.abs([result.sensitivities[name]!].flat(2)[0]! - value) / (bound + 1e-15 * Math.abs(value)),
    ),
  )
}

const decimal = (value: number) => new D(value)
const STEP = new D('1e-20')

/** ∂T/∂ln p of a temperature in decimal arithmetic, by a difference that is exact to 1e-35. */
function exactly(at: (parameters: Record<string, D>) => D, parameters: Record<string, number>): Record<string, number> {
  const all = Object.fromEntries(Object.entries(parameters).map(([name, value]) => [name, decimal(value)]))
  const moved = (name: string, by: D) => at({ ...all, [name]: all[name]!.mul(by.plus(1)) })
  return Object.fromEntries(
    Object.keys(parameters).map((name) => [
      name,
      moved(name, STEP).minus(moved(name, STEP.neg())).div(STEP.mul(2)).toNumber(),
    ]),
  )
}

const runs = (numRuns: number) => ({ seed, numRuns, endOnFailure: true })
const drives = { initialTemperature: 20, ambientTemperature: -5 }

describe('sensitivities', () => {
  it('are those of the exponential in a lumped body, within their bound', () => {
    fc.assert(
      fc.property(decades(1e-3, 20), (taus) => {
        const body = { heatCapacity: 5000, area: 2, filmCoefficient: 5, ...drives, times: [taus * 500] }
        const exact = -25 * taus * Math.exp(-taus)
        const answer = askAll('lumped-convection', body)
        expect(worst(answer, { heatCapacity: -exact, area: exact, filmCoefficient: exact })).toBeLessThanOrEqual(1)
        expect(answer.accuracy.bound.sensitivities.absolute).toBeLessThan(1e-9)
      }),
      runs(proof ? 500 : 25),
    )
  })

  it('are those of erfc in a half space held at its face', () => {
    fc.assert(
      fc.property(decades(1e-2, 8), decades(1e-2, 1e8), (eta, time) => {
        const depth = 2 * eta * Math.sqrt(1e-6 * time)
        const body = { conductivity: 2, diffusivity: 1e-6, initialTemperature: 10, surfaceTemperature: -5 }
        const answer = askAll('semi-infinite-surface-temperature', { ...body, depths: [depth], times: [time] })
        const exact = (-15 * eta * Math.exp(-eta * eta)) / Math.sqrt(Math.PI)
        expect(worst(answer, { conductivity: 0, diffusivity: exact })).toBeLessThanOrEqual(1)
      }),
      runs(proof ? 500 : 25),
    )
  })

  it('are those of a half space behind a film, by decimal arithmetic', () => {
    fc.assert(
      fc.property(decades(1e-2, 6), decades(1e-3, 1e3), (eta, beta) => {
        const [k, a, time] = [1.5, 7e-7, 3600]
        const root = Math.sqrt(a * time)
        const [depth, h] = [2 * eta * root, (beta * k) / root]
        const body = { conductivity: k, diffusivity: a, filmCoefficient: h, ...drives, depths: [depth], times: [time] }
        const exact = exactly(
          ({ conductivity, diffusivity, filmCoefficient }) => {
            const reach = diffusivity!.mul(time).sqrt()
            const share = exactHalfSpace(
              decimal(depth).div(reach.mul(2)),
              filmCoefficient!.mul(reach).div(conductivity!),
            )
            return share.completed.mul(-25)
          },
          { conductivity: k, diffusivity: a, filmCoefficient: h },
        )
        expect(worst(askAll('semi-infinite-convection', body), exact)).toBeLessThanOrEqual(1)
      }),
      runs(proof ? 200 : 7),
    )
  })

  it('are those of a slab behind a film, at its faces and far face too', () => {
    const place = fc.oneof(fc.constantFrom(0, 1), uniform)
    fc.assert(
      fc.property(decades(1e-2, 1e3), decades(1e-4, 5), place, (biot, fourier, delta) => {
        const [k, a, thickness] = [2, 8e-7, 0.2]
        const [h, time, depth] = [(biot * k) / thickness, (fourier * thickness * thickness) / a, delta * thickness]
        const body = { conductivity: k, diffusivity: a, thickness, exposedFaces: 1, filmCoefficient: h, ...drives }
        const exact = exactly(
          ({ conductivity, diffusivity, thickness: d, filmCoefficient }) => {
            const bi = filmCoefficient!.mul(d!).div(conductivity!)
            return exactSlab(bi, diffusivity!.mul(time).div(d!.mul(d!)), decimal(depth).div(d!)).completed.mul(-25)
          },
          { conductivity: k, diffusivity: a, thickness, filmCoefficient: h },
        )
        const answer = askAll('slab-convection', { ...body, depths: [depth], times: [time] })
        expect(worst(answer, exact)).toBeLessThanOrEqual(1)
        expect(answer.accuracy.bound.sensitivities.absolute).toBeLessThan(1e-6)
      }),
      runs(proof ? 200 : 7),
    )
  })

  it('are those of a sphere, also just under its face where the change has only begun', () => {
    const radiusShare = fc.oneof(
      uniform,
      uniform.map((u) => 1 - 1e-3 * u),
      fc.constantFrom(0, 1),
    )
    fc.assert(
      fc.property(decades(1e-1, 100), decades(1e-6, 1), radiusShare, (biot, fourier, rho) => {
        const [k, a, radius] = [0.5, 1.4e-7, 0.05]
        const [h, time, r] = [(biot * k) / radius, (fourier * radius * radius) / a, rho * radius]
        const body = {
          conductivity: k,
          diffusivity: a,
          radius,
          filmCoefficient: h,
          ...drives,
          radii: [r],
          times: [time],
        }
        const exact = exactly(
          ({ conductivity, diffusivity, radius: R, filmCoefficient }) => {
            const bi = filmCoefficient!.mul(R!).div(conductivity!)
            const depth = new D(1).minus(decimal(r).div(R!))
            return exactSphere(bi, diffusivity!.mul(time).div(R!.mul(R!)), depth).completed.mul(-25)
          },
          { conductivity: k, diffusivity: a, radius, filmCoefficient: h },
        )
        const answer = askAll('sphere-convection', body)
        expect(worst(answer, exact)).toBeLessThanOrEqual(1)
        const size = Math.max(25, ...Object.values(exact).map(Math.abs))
        expect(answer.accuracy.bound.sensitivities.absolute).toBeLessThan(1e-6 * size)
      }),
      runs(proof ? 200 : 7),
    )
  })

  it('follow a period through a thousand cycles', () => {
    const body = { conductivity: 1, diffusivity: 1e-6, cycleMean: 10, amplitude: 8, timeOfMaximum: 7200, depths: [0] }
    const [period, time] = [3600, 3_601_000]
    const answer = askAll('semi-infinite-periodic-surface', { ...body, period, times: [time] })
    const phase = (2 * Math.PI * (time - 7200)) / period
    const exact = {
      conductivity: 0,
      diffusivity: 0,
      amplitude: 8 * Math.cos(phase),
      period: 8 * phase * Math.sin(phase),
    }
    expect(worst(answer, exact)).toBeLessThanOrEqual(1)
  })
})

/** What carries watts: all of them in one proportion change no temperature. */
const carriers =
  /(conductivity|density|volumetricHeatCapacity|heatCapacity|bathHeatCapacity|filmCoefficient|filmCoefficients\.\w+|contactConductance|imposedHeatFlux|[pP]ower|powerDensity|energy)$/

describe.each(cases.map((c) => [c.id, c] as const))('sensitivities of %s', (id, c) => {
  const inputs: Body[] = [c.example, ...(c.variants ?? []).map(({ input }) => input)]
  const placed = inputs.filter((body) => (c.places === 'none' || body['depths']) ?? body['radii'] ?? body['points'])

  it('come to nothing over all that carries heat, moved in one proportion', () => {
    const told = placed.filter((body) => !JSON.stringify(body).includes('"diffusivity"'))
    expect(told.length).toBeGreaterThan(0)
    for (const body of told) {
      // A duration has no one sensitivity at its own end.
      const times = (body['times'] as number[]).map((time) => time * 1.2345)
      const { result, accuracy } = askAll(id, { ...body, times })
      const carrying = Object.entries(result.sensitivities).filter(([name]) => carriers.test(name))
      const sums = carrying.map(([, grid]) => [grid].flat(2)).reduce((sum, grid) => sum.map((v, i) => v + grid[i]!))
      const limit = accuracy.bound.sensitivities.absolute * carrying.length
      for (const sum of sums) expect(Math.abs(sum)).toBeLessThanOrEqual(limit)
      expect(limit).toBeLessThan(1e-5 * Math.max(1, accuracy.scale))
    }
  })

  it('are numbers with a bound for any admissible input', () => {
    const names = outputNamesOf(c)
    expect(names).toContain('sensitivities')
    fc.assert(
      fc.property(admissible(c), (body) => {
        const placeless = c.places !== 'none' && !(body['depths'] ?? body['radii'] ?? body['points'])
        fc.pre(!placeless)
        try {
          const { result, accuracy } = askAll(id, { ...body, times: (body['times'] as number[]).slice(0, 1) })
          expect(Object.values(result.sensitivities).flat(2).every(Number.isFinite)).toBe(true)
          expect(Number.isFinite(accuracy.bound.sensitivities.absolute)).toBe(true)
        } catch (error) {
          if (!(error instanceof DomainError)) throw error
        }
      }),
      runs(proof ? 100 : 3),
    )
  })
})

describe('asking for sensitivities', () => {
  const half = { initialTemperature: 20, imposedHeatFlux: 500, pulseDuration: 600, depths: [0.01] }

  it('opens a material into its properties', () => {
    const body = { material: 'concrete-dense-2400', ...half, times: [100] }
    const { result } = askAll('semi-infinite-surface-flux', body)
    const names = ['conductivity', 'density', 'specificHeat', 'imposedHeatFlux', 'pulseDuration']
    expect(Object.keys(result.sensitivities).sort()).toEqual(names.sort())
  })

  it('is refused for a duration at its own end', () => {
    const body = { conductivity: 2, diffusivity: 1e-6, ...half, times: [100, 600] }
    expect(() => askAll('semi-infinite-surface-flux', body)).toThrow('no one sensitivity to pulseDuration')
  })

  it('leaves out what changes no number, and is priced as twelve values each', () => {
    const other = { conductivity: 1.3, volumetricHeatCapacity: 2e6, initialTemperature: 60, thickness: 0.1 }
    const own = { conductivity: 0.4, volumetricHeatCapacity: 3e6, initialTemperature: 33 }
    const body = { ...own, other, depths: [0, 0.001], times: [1, 5, 9] }
    const answer = askAll('semi-infinite-contact', body)
    const names = ['conductivity', 'volumetricHeatCapacity', 'other.conductivity', 'other.volumetricHeatCapacity']
    expect(Object.keys(answer.result.sensitivities)).toEqual(names)
    expect(answer.points).toBe(6 + 6 * 4 * 12)
  })
})
