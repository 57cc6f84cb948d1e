import { UcumLhcUtils } from '@lhncbc/ucum-lhc'
import { type Fraction, fractionOf, minus, numberOf, productOf, times } from './exact.ts'
import { unitOf } from './units.ts'

export type Conversion = (value: number) => number

/** How far the library's own arithmetic may be from the exact conversion. */
const AGREES = 1e-12

const same: Conversion = (value) => value
const known = new Map<string, Conversion>()

/**
 * The conversion of an accepted unit to SI (temperatures to degrees Celsius), or undefined where the quantity does not
 * take the unit.
 *
 * The UCUM library says what a code means; it sees accepted codes only, since it fails on some that are none. It
 * multiplies doubles one after another, so that 212 [degF] comes out 6e-14 too high: the number itself is converted
 * as a fraction and rounded once, and the two must agree.
 */
export function conversionOf(si: string, code: string): Conversion | undefined {
  const unit = unitOf(si, code)
  if (!unit) return undefined
  if (code === si) return same
  const name = `${code} ${si}`
  const found = known.get(name) ?? exact(productOf(unit.factor), fractionOf(unit.zero ?? '0'))
  if (!known.has(name)) confirm(si, code, found(1))
  known.set(name, found)
  return found
}

function exact(factor: Fraction, zero: Fraction): Conversion {
  return (value) => (Number.isFinite(value) ? numberOf(times(minus(fractionOf(value), zero), factor)) : value)
}

function confirm(si: string, code: string, expected: number): void {
  const { status, toVal, msg } = UcumLhcUtils.getInstance().convertUnitTo(code, 1, si)
  if (status !== 'succeeded' || toVal === null) throw new Error(`${code} is not convertible to ${si}: ${msg.join(' ')}`)
  if (Math.abs(toVal - expected) > AGREES * Math.abs(expected))
    throw new Error(`1 ${code} is ${toVal} ${si} by the library and ${expected} by the list of units`)
}
