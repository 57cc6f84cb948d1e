import fc from 'fast-check'
import { D } from './exact/functions.ts'

/*
 * Random numbers that spread as they are meant to. fc.double draws evenly from all doubles of its range, nearly all of
 * which lie next to zero; these draw evenly from the range.
 */

const STEPS = 2 ** 31 - 1

/** Evenly from 0 to 1, both included. */
export const uniform: fc.Arbitrary<number> = fc.noBias(fc.integer({ min: 0, max: STEPS })).map((n) => n / STEPS)

/** Evenly in the logarithm. */
export const decades = (from: number, to: number): fc.Arbitrary<number> =>
  uniform.map((u) => 10 ** (Math.log10(from) + u * (Math.log10(to) - Math.log10(from))))

/** The same as a decimal of 20 digits, which no double is. */
export const exactDecades = (from: number, to: number): fc.Arbitrary<D> =>
  fc
    .tuple(decades(from, to), uniform)
    .map(([d, v]) => new D(d).mul(new D(1).plus(new D(v).mul('1e-9'))).toSignificantDigits(20))

/** Degrees Celsius between −50 and 50, of 20 digits. */
export const exactTemperature: fc.Arbitrary<D> = fc
  .tuple(uniform, uniform)
  .map(([u, v]) => new D(u).mul(100).minus(50).plus(new D(v).mul('1e-9')).toSignificantDigits(20))
