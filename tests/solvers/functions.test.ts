import erf from '@stdlib/math-base-special-erf'
import erfc from '@stdlib/math-base-special-erfc'
import erfcx from '@stdlib/math-base-special-erfcx'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  completed,
  completedError,
  energyFraction,
  ENERGY_ERROR,
  fluxError,
  fluxFraction,
  remaining,
  REMAINING_ERROR,
} from '../../solvers/math/convective-half-space.ts'
import { ierfcx } from '../../solvers/math/ierfcx.ts'
import { EPS, ERFCX_ERROR } from '../../solvers/math/rounding.ts'
import { slabEigenvalue } from '../../solvers/math/slab-eigenvalues.ts'
import { proof, seed } from './counts.ts'
import { decades } from './draw.ts'
import { exactEnergy, exactHalfSpace } from './exact/film.ts'
import { D, erf as exactErf, erfc as exactErfc, erfcx as exactErfcx, PI } from './exact/functions.ts'

/* Special functions against decimal arithmetic at 60 digits, over the arguments that the domain reaches. */

const count = proof ? 4000 : 250
const errorIn = (value: number, exact: D) => Number(new D(value).minus(exact).div(exact).abs().div(EPS))
/** Worst error over a sample, in units of the roundoff. */
const worst = (arguments_: fc.Arbitrary<number>, value: (x: number) => number, exact: (x: D) => D) =>
  fc
    .sample(arguments_, { numRuns: count, seed })
    .reduce((most, x) => Math.max(most, errorIn(value(x), exact(new D(x)))), 0)

describe('special functions of the library', () => {
  it('erfcx keeps the error that bounds are built on, from 1e-300 to 1e20', () => {
    expect(worst(decades(1e-12, 60), erfcx, exactErfcx)).toBeLessThan(ERFCX_ERROR)
    expect(worst(decades(1e-300, 1e20), erfcx, exactErfcx)).toBeLessThan(ERFCX_ERROR)
    expect(erfcx(0)).toBe(1)
    expect(erfcx(Infinity)).toBe(0)
  })

  it('erf is good to a few units in the last place', () => {
    expect(worst(decades(1e-300, 6), erf, exactErf)).toBeLessThan(3)
  })

  it('erfc is not good enough far out: the scaled form e^(−x²)·erfcx(x) has the error of its exponent instead', () => {
    expect(errorIn(erfc(22.92750178251511), exactErfc(new D(22.92750178251511)))).toBeGreaterThan(500)
    const scaled = (x: number) => Math.exp(-x * x) * erfcx(x)
    // The square is rounded, and the exponential of the engine itself errs by nearly twice as much.
    for (const x of fc.sample(decades(1e-3, 26), { numRuns: count, seed }))
      expect(errorIn(scaled(x), exactErfc(new D(x)))).toBeLessThan(16 + 4 * x * x)
  })

  it('ierfcx holds where the plain difference has cancelled', () => {
    const exact = (x: D) => new D(1).div(PI.sqrt()).minus(x.mul(exactErfcx(x)))
    expect(worst(decades(1e-9, 1.5), ierfcx, exact)).toBeLessThan(100)
    expect(worst(decades(1.5, 1e8), ierfcx, exact)).toBeLessThan(6)
    const plain = 0.5641895835477563 - 1e4 * erfcx(1e4)
    expect(errorIn(plain, exact(new D(1e4)))).toBeGreaterThan(1e6)
    expect(ierfcx(1e300)).toBeGreaterThanOrEqual(0)
  })
})

describe('half space behind a film', () => {
  const etas = decades(1e-9, 26)
  const betas = decades(1e-9, 1e12)
  it('is within its stated errors, for η up to 26 and β from 1e-9 to 1e12', () => {
    for (const [eta, beta] of fc.sample(fc.tuple(etas, betas), { numRuns: count, seed })) {
      const exact = exactHalfSpace(new D(eta), new D(beta))
      const label = `η ${eta} β ${beta}`
      expect(errorIn(completed(eta, beta), exact.completed) * EPS, label).toBeLessThan(completedError(eta))
      expect(errorIn(remaining(eta, beta), exact.remaining) * EPS, label).toBeLessThan(REMAINING_ERROR)
      expect(errorIn(fluxFraction(eta, beta), exact.flux) * EPS, label).toBeLessThan(fluxError(eta))
      expect(errorIn(energyFraction(beta), exactEnergy(new D(beta))) * EPS, label).toBeLessThan(ENERGY_ERROR)
    }
  })

  it('is zero, or off by less than 1e-290, where it underflows', () => {
    for (const eta of [26.5, 27, 27.4, 27.6, 1e3, 1e170]) {
      const exact = eta < 30 ? exactHalfSpace(new D(eta), new D(1)).completed : new D(0)
      expect(Number(new D(completed(eta, 1)).minus(exact).abs())).toBeLessThan(1e-290)
    }
  })

  it('has no step where its forms change, at β = 0.7, β = η and β = 1', () => {
    for (const [eta, beta] of [
      [0.3, 0.7],
      [5, 5],
      [20, 20],
      [1, 1],
    ] as const)
      for (const side of [1 - 1e-12, 1, 1 + 1e-12]) {
        const b = beta * side
        expect(errorIn(completed(eta, b), exactHalfSpace(new D(eta), new D(b)).completed) * EPS).toBeLessThan(
          completedError(eta),
        )
        expect(errorIn(energyFraction(b), exactEnergy(new D(b))) * EPS).toBeLessThan(ENERGY_ERROR)
      }
  })
})

describe('eigenvalues of the slab', () => {
  it('satisfy z tan z = Bi to 3ε for every Bi from 1e-24 to 1e19', () => {
    for (const biot of fc.sample(decades(1e-24, 1e19), { numRuns: Math.ceil(count / 5), seed })) {
      for (let m = 0; m < 4; m++) {
        const z = slabEigenvalue(biot, m)
        const exact = newtonStep(new D(z), new D(biot))
        expect(errorIn(z, exact), `Bi ${biot} root ${m}`).toBeLessThan(3)
        expect(z).toBeGreaterThanOrEqual(m * Math.PI)
        expect(z).toBeLessThanOrEqual((m + 0.5) * Math.PI)
      }
    }
  })
})

/** Two steps of Newton from a double leave more digits than are compared. */
function newtonStep(start: D, biot: D): D {
  let z = start
  for (let i = 0; i < 2; i++) {
    const sin = z.sin()
    const cos = z.cos()
    z = z.minus(
      z
        .mul(sin)
        .minus(biot.mul(cos))
        .div(sin.plus(z.mul(cos)).plus(biot.mul(sin))),
    )
  }
  return z
}
