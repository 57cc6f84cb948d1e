import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { SlabFilm } from '../../solvers/math/slab-film.ts'
import type { OutputName } from '../../solvers/outputs.ts'
import { condition, contract, single, solveDirect } from './ask.ts'
import { proof, seed } from './counts.ts'
import { exactSlab } from './exact/film.ts'
import { D } from './exact/functions.ts'
import { randomRows } from './random-rows.ts'

/* Bounds against exact answers: never below the true error, never far above it, never above ten times the promise. */

const count = proof ? 10_000 : 40
/**
 * A fraction below 1e-290 may be answered as zero, and so may a flux or heat that is so small a share of its unit. That is a drive times a film,
 * k/L or a heat capacity, up to some 1e20: fluxes long after the end need it (Bi 1e6, Fo 374: 6e-280).
 */
const NOTHING = 1e-270

describe.each(Object.entries(randomRows))('bounds of %s', (_id, arbitrary) => {
  it('hold, are no more than ten times the promise, and follow the true error', { timeout: 3_600_000 }, () => {
    const failures: string[] = []
    const ratios: number[] = []
    for (const row of fc.sample(arbitrary, { numRuns: count, seed })) {
      const names = Object.keys(row.exact) as OutputName[]
      const solution = solveDirect(row.caseId, { ...row.body, outputs: names })
      for (const name of names) {
        const output = solution.outputs[name]!
        const value = single(output.values)
        const bound = output.bound.absolute + output.bound.relative * Math.abs(value)
        const error = Number(new D(value).minus(row.exact[name]!).abs())
        if (!(error <= bound)) failures.push(`${name} off ${error}, bound ${bound}: ${row.label}`)
        const promised = contract(name, value, condition(row.caseId, row.body, name), row)
        if (!(bound <= 10 * promised + NOTHING))
          failures.push(`${name} bound ${bound}, ten times promised ${10 * promised}: ${row.label}`)
        if (error > 0) ratios.push(bound / error)
      }
    }
    ratios.sort((a, b) => a - b)
    expect(failures).toEqual([])
    expect(ratios[Math.floor(ratios.length / 2)]).toBeLessThan(1000)
  })
})

describe('a planted error', () => {
  it('of 1e-10 in the first coefficient of the series breaks a bound', () => {
    const slab = { biot: 2, deltas: Float64Array.of(0.4), inner: Float64Array.of(0.6), shifts: Float64Array.of(0) }
    const moment = { fourier: 0.25, root: 0.5 }
    const exact = exactSlab(new D(2), new D('0.25'), new D('0.4'))
    const solver = new SlabFilm(slab)
    const off = () => {
      const remaining = solver.remaining(0, moment)
      const completed = solver.completed(0, moment)
      const heat = solver.heatFraction(moment)
      const excess = (e: { value: number; error: number }, y: D) => Number(new D(e.value).minus(y).abs()) / e.error
      return [excess(remaining, exact.remaining), excess(completed, exact.completed), excess(heat, exact.heat)]
    }
    expect(off().every((share) => share <= 1)).toBe(true)
    solver.series.weights[0]! *= 1 + 1e-10
    expect(off().every((share) => share > 1)).toBe(true)
  })
})

describe('behind the mid-plane', () => {
  const wall = { conductivity: 2, volumetricHeatCapacity: 2.4e6, thickness: 0.2, exposedFaces: 2 }
  const film = { ...wall, filmCoefficient: 10, initialTemperature: 20, ambientTemperature: -5 }
  it.each([5e-324, 1e-30, 1e-27, 1e-20, 1e-9])('a bound stays near the promise at %f s', (time) => {
    for (const depth of [0.11, 0.15, 0.19999, 0.2]) {
      const outputs: OutputName[] = ['temperature', 'remainingFraction']
      const { outputs: found } = solveDirect('slab-convection', { ...film, depths: [depth], times: [time], outputs })
      expect(found.temperature!.bound.absolute).toBeLessThan(2.5e-10)
      expect(found.remainingFraction!.bound.relative).toBeLessThan(1e-10)
    }
  })
})
