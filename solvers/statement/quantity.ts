import { z } from 'zod'
import { asNumberList } from './number-lists.ts'
import { acceptedUnits } from '../units/units.ts'
import { figure } from './validate.ts'

/** A physical quantity as a field: how it is named, what it may be and what it usually is. */
export interface QuantityDescription {
  /** As printed in formulas; plain text with Unicode sub- and superscripts. */
  symbol: string
  /** UCUM code of the unit that a plain number has. */
  unit: string
  label: string
  min: number
  max: number
  /** Zero is allowed beside min..max. */
  zero?: boolean
  /** Only checks read it. */
  changesNoNumber?: true
  /** Values met in practice; outside them the answer carries a warning. */
  typical?: readonly [number, number]
  /** One short line for the form and the reference. */
  hint?: string
}

export function acceptedOf(d: QuantityDescription): string {
  const unit = d.unit === '1' ? '' : ` ${d.unit}`
  return `${d.zero ? '0, or ' : ''}a number from ${figure(d.min)} to ${figure(d.max)}${unit}`
}

/** A number in SI (temperatures in degrees Celsius), with everything its readers need in its metadata. */
export function quantity(d: QuantityDescription) {
  const number = z
    .number()
    .min(d.zero ? 0 : d.min)
    .max(d.max)
  return (
    d.zero ? number.refine((value) => value <= 0 || value >= d.min, { params: { code: 'out-of-range' } }) : number
  ).meta({
    title: d.label,
    description: [d.label, d.hint].filter(Boolean).join(': ') + `. Unit ${d.unit}; ${acceptedOf(d)}.`,
    'x-symbol': d.symbol,
    'x-ucum': d.unit,
    'x-units': [...acceptedUnits(d.unit)],
    'x-accepted': acceptedOf(d),
    ...(d.hint ? { 'x-hint': d.hint } : {}),
    ...(d.changesNoNumber ? { 'x-changes-no-number': true } : {}),
    ...(d.zero ? { 'x-zero-or': d.min } : {}),
    ...(d.typical ? { 'x-typical': [...d.typical] } : {}),
  })
}

/** A list of one quantity, kept in the order given. */
export function quantities(d: QuantityDescription, maximum: number) {
  const element = quantity(d)
  const schema = z
    .array(element)
    .min(1)
    .max(maximum)
    .meta({
      title: d.label,
      description: `${[d.label, d.hint].filter(Boolean).join(': ')}. Unit ${d.unit}; 1 to ${maximum} values, each ${acceptedOf(d)}.`,
      'x-symbol': d.symbol,
      'x-ucum': d.unit,
      'x-accepted': `1 to ${maximum} values, each ${acceptedOf(d)}`,
      ...(d.hint ? { 'x-hint': d.hint } : {}),
      ...(d.typical ? { 'x-typical': [...d.typical] } : {}),
    })
  return asNumberList(schema, { element, unit: d.unit, min: d.min, max: d.max, most: maximum })
}
