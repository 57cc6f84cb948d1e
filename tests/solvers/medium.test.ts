import { describe, expect, it } from 'vitest'
import { DomainError } from '../../solvers/errors.ts'
import { ask, single } from './ask.ts'

/* The endless medium around a cylinder: published values, limits of short and long times, other routes and refusals. */

const numbersOf = (values: number | number[] | number[][]) => [values].flat(2)
/** k = C = R = 1, so that a time is a Fourier number; the start is 0 degrees. */
const unit = { conductivity: 1, volumetricHeatCapacity: 1, radius: 1, initialTemperature: 0 }
const solveMedium = (body: Record<string, unknown>, outputs: readonly string[]) =>
  ask('cylinder-in-infinite-medium', { ...unit, ...body, outputs })
const held = { kind: 'temperature', surfaceTemperature: 1 }
const heated = { kind: 'flux', imposedHeatFlux: 1 }

describe('the medium around a cylinder', () => {
  it('has the published responses at its surface', () => {
    // A. F. van Everdingen, W. Hurst, Trans. AIME 186 (1949), tables of the radial infinite body (from memory), to their digits.
    const rise = solveMedium({ boundary: heated, radii: [1], times: [1, 10, 100] }, ['temperature'])
    numbersOf(rise.result['temperature']!).forEach((T, i) => expect(T).toBeCloseTo([0.802, 1.651, 2.723][i]!, 3))
    const step = solveMedium({ boundary: held, times: [1, 100] }, ['surfaceHeatFlux', 'heatGained'])
    numbersOf(step.result['surfaceHeatFlux']!).forEach((q, i) => expect(q).toBeCloseTo([0.984, 0.346][i]!, 3))
    expect(numbersOf(step.result['heatGained']!)[1]! / (2 * Math.PI)).toBeCloseTo(43.01, 1)
  })

  it('comes to the line source as its radius is forgotten, by the known shares', () => {
    const times = [5, 20, 50]
    const body = { conductivity: 1, volumetricHeatCapacity: 1, initialTemperature: 0, radii: [1], times }
    const line = ask('line-source', { ...body, linePower: 7 })
    const thick = solveMedium({ ...body, boundary: { kind: 'line-power', linePower: 7 } }, ['temperature'])
    const exact = numbersOf(thick.result['temperature']!)
    const off = numbersOf(line.result['temperature']!).map((T, i) => T / exact[i]! - 1)
    off.forEach((share, i) => expect(share).toBeCloseTo([-0.094, -0.026, -0.011][i]!, 3))
    const late = [1e9, 1e15].map((t) => {
      const { result } = solveMedium({ ...body, boundary: { kind: 'line-power', linePower: 7 }, times: [t] }, [
        'temperature',
      ])
      return (
        single(result['temperature']!) -
        single(ask('line-source', { ...body, linePower: 7, times: [t] }).result['temperature']!)
      )
    })
    // The difference goes as ln(Fo)/Fo.
    expect(Math.abs(late[0]!)).toBeLessThan(1e-7)
    expect(Math.abs(late[1]!)).toBeLessThan(1e-12)
  })

  it('is a half space at first, corrected by half the way over the radius', () => {
    for (const fo of [1e-20, 1e-12, 1e-8]) {
      const { result } = solveMedium({ boundary: held, times: [fo] }, ['surfaceHeatFlux', 'heatGained'])
      const flux = 1 / Math.sqrt(Math.PI * fo)
      const corrected = flux + 0.5 - 0.25 * Math.sqrt(fo / Math.PI)
      expect(Math.abs(single(result['surfaceHeatFlux']!) / corrected - 1)).toBeLessThan(1e-12)
      const stored = (2 - fo / 6) * Math.sqrt(fo / Math.PI) + 0.5 * fo
      expect(Math.abs(single(result['heatGained']!) / (2 * Math.PI * stored) - 1)).toBeLessThan(1e-12)
    }
    const film = { kind: 'convection', ambientTemperature: 30, filmCoefficient: 12 }
    const solid = { conductivity: 1.4, volumetricHeatCapacity: 2e6, initialTemperature: 10, times: [600, 7200] }
    const flat = ask('semi-infinite-convection', {
      ...solid,
      ambientTemperature: 30,
      filmCoefficient: 12,
      depths: [0, 0.05],
    })
    const exact = numbersOf(flat.result['temperature']!)
    const off = [1e2, 1e4].map((R) => {
      const body = { ...solid, radius: R, boundary: film, radii: [R, R + 0.05] }
      const { result } = solveMedium(body, ['temperature'])
      return Math.max(...numbersOf(result['temperature']!).map((T, i) => Math.abs(T - exact[i]!)))
    })
    expect(off[0]! / off[1]!).toBeCloseTo(100, 0)
  })

  it('keeps its digits from Fo 1e-18 to 1e37', () => {
    const times = [1e-20, 1e-3, 1, 1e3, 1e10, 1e17]
    for (const boundary of [held, { kind: 'convection', ambientTemperature: 1, filmCoefficient: 1e-3 }]) {
      const outputs = ['temperature', 'surfaceHeatFlux', 'heatGained', 'remainingFraction', 'completedFraction']
      for (const radius of [1, 1e-9]) {
        const { result, accuracy } = ask('cylinder-in-infinite-medium', {
          conductivity: 100,
          diffusivity: 100,
          initialTemperature: 0,
          boundary,
          radius,
          radii: [radius, 3 * radius],
          times,
          outputs,
        })
        for (const name of ['surfaceHeatFlux', 'heatGained', 'remainingFraction', 'completedFraction'])
          expect(accuracy.bound[name]!.relative, name).toBeLessThan(1e-11)
        const [done, left] = ['completedFraction', 'remainingFraction'].map((name) => numbersOf(result[name]!))
        done!.forEach((share, i) => expect(share + left![i]!).toBeCloseTo(1, 12))
      }
    }
    // Carslaw and Jaeger §13.5 (from memory): 2·(1/L − γ/L² + (γ² − π²/6)/L³ …), L = ln 4Fo − 2γ, here Fo = 1e37.
    const { result } = ask('cylinder-in-infinite-medium', {
      conductivity: 100,
      diffusivity: 100,
      initialTemperature: 0,
      boundary: held,
      radius: 1e-9,
      times: [1e17],
      outputs: ['surfaceHeatFlux'],
    })
    const gamma = 0.5772156649015329
    const log = Math.log(4e37) - 2 * gamma
    const exact = 2 * (1 / log - gamma / log ** 2 + (gamma ** 2 - Math.PI ** 2 / 6) / log ** 3)
    expect(single(result['surfaceHeatFlux']!) / (100 / 1e-9)).toBeCloseTo(exact, 6)
  })

  it('stores as fast as it takes up', () => {
    const boundary = { kind: 'convection', ambientTemperature: 40, filmCoefficient: 3, imposedHeatFlux: 20 }
    for (const time of [1e-4, 1, 1e5]) {
      const h = 1e-4 * time
      const { result } = solveMedium({ boundary, times: [time - h, time, time + h] }, ['surfaceHeatFlux', 'heatGained'])
      const [before, , after] = numbersOf(result['heatGained']!)
      const flux = numbersOf(result['surfaceHeatFlux']!)[1]!
      expect((after! - before!) / (2 * h) / (2 * Math.PI * flux)).toBeCloseTo(1, 7)
    }
  })

  it('is not changed by a length, which only tells when the ends are felt', () => {
    const body = { boundary: heated, radii: [1], times: [1e4] }
    const outputs = ['temperature']
    const told = (length: number) =>
      ask('cylinder-in-infinite-medium', { ...unit, ...body, outputs, length }) as unknown as {
        result: Record<string, number[][]>
        warnings: { code: string; value: number }[]
      }
    const [long, short] = [told(1000), told(900)]
    expect(long.warnings.map(({ code }) => code)).not.toContain('end-effects')
    expect(short.warnings.find(({ code }) => code === 'end-effects')?.value).toBeCloseTo(9000, 6)
    expect(short.result).toEqual(long.result)
  })

  it('refuses radii in the hole, shares of no end, and infinite fluxes', () => {
    const refused = (body: Record<string, unknown>, outputs: readonly string[]) => {
      try {
        solveMedium({ times: [1], radii: [1], boundary: held, ...body }, outputs)
      } catch (error) {
        return (error as DomainError).issues.map(({ pointer, code }) => `${pointer} ${code}`)
      }
      return []
    }
    expect(refused({ radii: [2, 0.5] }, ['temperature'])).toEqual(['#/radii/1 depth-outside-body'])
    expect(refused({ boundary: heated }, ['completedFraction'])).toEqual(['#/outputs/0 output-not-defined'])
    expect(refused({ boundary: { kind: 'insulated' } }, ['temperature', 'remainingFraction'])).toEqual([
      '#/outputs/1 output-not-defined',
    ])
    expect(refused({ times: [1, 0] }, ['surfaceHeatFlux'])).toEqual(['#/times/1 singular-at-time-zero'])
    expect(refused({ times: [0] }, ['completedFraction'])).toEqual([])
    expect(refused({}, ['meanTemperature'])).toEqual(['#/outputs/0 output-not-defined'])
    expect(refused({ boundary: { kind: 'wind' } }, ['temperature'])).toEqual(['#/boundary/kind not-in-list'])
  })
})
