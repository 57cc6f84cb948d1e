import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { OutputName } from '../../solvers/outputs.ts'
import { contract, sensitivity, single, solveDirect, temperaturesOf } from './ask.ts'
import { closedFormRows } from './closed-form-rows.ts'
import { proof, seed } from './counts.ts'
import { D } from './exact/functions.ts'

/* Closed forms against exact answers: bounds that hold, that are near the promise, and that follow the true error. */

const count = proof ? 5000 : 150

describe.each(Object.entries(closedFormRows))('bounds of %s', (_name, arbitrary) => {
  it(
    'hold, are no more than ten times the promise, follow the true error, and break when an answer is off by 1e-9',
    { timeout: 3_600_000 },
    () => {
      const failures: string[] = []
      const ratios: number[] = []
      let caught = 0
      let shown = 0
      for (const row of fc.sample(fc.noBias(arbitrary), { numRuns: count, seed })) {
        const names = Object.keys(row.exact) as OutputName[]
        const solution = solveDirect(row.caseId, { ...row.body, outputs: names })
        for (const name of names) {
          const output = solution.outputs[name]!
          const value = single(output.values)
          const bound = output.bound.absolute + output.bound.relative * Math.abs(value)
          const error = Number(new D(value).minus(row.exact[name]!).abs())
          if (!(error <= bound)) failures.push(`${name} ${value} off ${error}, bound ${bound}: ${row.label}`)
          const { K, largest } = sensitivity(row.caseId, row.body, name)
          const of = { scale: solution.scale, temperatures: temperaturesOf(row.body), surface: largest }
          const promised = contract(name, value, K, of)
          if (!(bound <= 10 * promised))
            failures.push(`${name} ${value} bound ${bound}, ten times promised ${10 * promised}: ${row.label}`)
          if (error > 0) ratios.push(bound / error)
          // Planted: an answer that is off by 1e-9 of its own size, where the contract lets it be seen.
          if (Math.abs(value) * 1e-9 < 20 * promised) continue
          shown++
          if (new D(value).mul('1.000000001').minus(row.exact[name]!).abs().gt(bound)) caught++
        }
      }
      ratios.sort((a, b) => a - b)
      expect(failures).toEqual([])
      expect(caught).toBe(shown)
      expect(shown).toBeGreaterThan(count / 4)
      expect(ratios[Math.floor(ratios.length / 2)]).toBeLessThan(1000)
    },
  )
})
