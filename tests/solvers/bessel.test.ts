import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { besselI, besselI01, besselIK, besselIK01, besselK, besselK01 } from '../../solvers/math/complex-bessel.ts'
import { type Complex, modulus, plus, times } from '../../solvers/math/complex.ts'
import { EPS } from '../../solvers/math/rounding.ts'
import { proof, seed } from './counts.ts'
import { decades, uniform } from './draw.ts'
import { add, divide, exact, exactBessel, type ExactComplex, multiply, size } from './exact/bessel.ts'

/* Scaled modified Bessel functions of complex argument, against decimal series and identities. */

const count = proof ? 1500 : 60
/** The sector that contours use, and a little more. */
const SECTOR = (75 * Math.PI) / 180
const points = (from: number, to: number) =>
  fc
    .sample(fc.noBias(fc.tuple(decades(from, to), uniform)), { numRuns: count, seed })
    .map(([radius, share]) => at(radius, SECTOR * (2 * share - 1)))
const at = (radius: number, angle: number): Complex => ({ re: radius * Math.cos(angle), im: radius * Math.sin(angle) })
/** Relative error in units of the roundoff. */
const errorIn = (value: Complex, true_: ExactComplex) =>
  Number(
    size(add(exact(value.re, value.im), { re: true_.re.neg(), im: true_.im.neg() }))
      .div(size(true_))
      .div(EPS),
  )

function worst(sample: readonly Complex[]) {
  let i = 0
  let k = 0
  for (const z of sample) {
    const true_ = exactBessel(exact(z.re, z.im))
    const { i0, i1 } = besselI01(z)
    const { k0, k1 } = besselK01(z)
    i = Math.max(i, errorIn(i0, true_.i0), errorIn(i1, true_.i1))
    k = Math.max(k, errorIn(k0, true_.k0), errorIn(k1, true_.k1))
  }
  return { i, k }
}
/** The documented accuracies, in units of the roundoff. */
const I_ERROR = 2e-15 / EPS
const K_ERROR = 3e-15 / EPS

describe('the decimal side', () => {
  it('has the product that the two kinds must have, to 30 digits, on both sides of its own change of method', () => {
    for (const z of [at(1e-6, 0.3), at(1, -1), at(20, 1.2), at(39.9, -1.3), at(40.1, 1.3), at(1e9, 0.4)]) {
      const exactZ = exact(z.re, z.im)
      const { i0, i1, k0, k1 } = exactBessel(exactZ)
      const one = multiply(exactZ, add(multiply(i0, k1), multiply(i1, k0)))
      expect(Number(size(add(one, exact(-1, 0)))), `${z.re} ${z.im}`).toBeLessThan(1e-32)
    }
    const { k0, k1 } = exactBessel(exact(39.99, 0))
    expect(Number(divide(k0, k1).re)).toBeCloseTo(1 - 0.5 / 39.99 + 0.375 / 39.99 ** 2, 4)
  })
})

describe('scaled modified Bessel functions', () => {
  it('keep their documented accuracy over 24 decades', () => {
    const ranges = [
      [1e-12, 0.1],
      [0.1, 4],
      [1, 60],
      [60, 1e12],
    ] as const
    for (const [from, to] of ranges) {
      const { i, k } = worst(points(from, to))
      expect(i, `I from ${from} to ${to}`).toBeLessThan(I_ERROR)
      expect(k, `K from ${from} to ${to}`).toBeLessThan(K_ERROR)
    }
  })

  it('keep it on both sides of every change of method', () => {
    const seams = [1.4, 1.9, 2, 2.1, 2.4, 25].flatMap((radius) =>
      [-1.3, -1, -0.5, 0, 0.7, 1.2].flatMap((angle) => [
        at(radius * (1 - 1e-12), angle),
        at(radius * (1 + 1e-12), angle),
      ]),
    )
    const { i, k } = worst(seams)
    expect(i).toBeLessThan(I_ERROR)
    expect(k).toBeLessThan(K_ERROR)
  })

  it('are real on the real axis, and there as tabulated', () => {
    // Abramowitz and Stegun, tables 9.8 and 9.11 (from memory).
    const { i0, i1 } = besselI01({ re: 1, im: 0 })
    const { k0, k1 } = besselK01({ re: 1, im: 0 })
    expect([i0.im, i1.im, k0.im, k1.im]).toEqual([0, 0, 0, 0])
    expect(i0.re * Math.E).toBeCloseTo(1.2660658778, 10)
    expect(i1.re * Math.E).toBeCloseTo(0.565159104, 10)
    expect(k0.re / Math.E).toBeCloseTo(0.4210244382, 10)
    expect(k1.re / Math.E).toBeCloseTo(0.6019072302, 10)
    expect(besselI01({ re: 2, im: 0 }).i0.re * Math.exp(2)).toBeCloseTo(2.2795853023, 10)
    expect(besselK01({ re: 2, im: 0 }).k0.re * Math.exp(-2)).toBeCloseTo(0.1138938727, 10)
  })

  it('are the same when both kinds are asked for at once', () => {
    for (const z of points(1e-6, 1e6)) expect(besselIK01(z)).toEqual({ ...besselI01(z), ...besselK01(z) })
  })

  it('are the same when one order or one kind is asked for', () => {
    for (const z of points(1e-6, 1e6)) {
      const { i0, i1, k0, k1 } = besselIK01(z)
      expect([besselIK(z, 0), besselIK(z, 1)]).toEqual([
        { i: i0, k: k0 },
        { i: i1, k: k1 },
      ])
      expect([besselI(z, 0), besselI(z, 1), besselK(z, 0), besselK(z, 1)]).toEqual([i0, i1, k0, k1])
    }
  })

  it('are conjugate below the real axis', () => {
    for (const z of [at(0.5, 0.8), at(7, 1.2), at(300, 1)]) {
      const below = { re: z.re, im: -z.im }
      expect(besselI01(below).i1.im).toBe(-besselI01(z).i1.im)
      expect(besselK01(below).k1.im).toBe(-besselK01(z).k1.im)
    }
  })

  it('stay finite at the ends of double precision', () => {
    for (const radius of [1e-300, 1e-160, 1e150, 1e160, 1e300])
      for (const angle of [-1.3, 0, 1.3]) {
        const z = at(radius, angle)
        const { i0, i1 } = besselI01(z)
        const { k0, k1 } = besselK01(z)
        // I₀·K₁ + I₁·K₀ = 1/z; both are about z^(−1/2) far out.
        const product = plus(times(i0, times(z, k1)), times(times(z, i1), k0))
        expect(Math.abs(modulus(product) - 1), `${radius} ${angle}`).toBeLessThan(1e-14)
      }
  })
})
