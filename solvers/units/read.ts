import { type Issue, pointerOf } from '../errors.ts'
import { conversionOf } from './convert.ts'
import { acceptedUnits, unitOf } from './units.ts'
import { kindOf } from '../statement/validate.ts'

/** A number with the code of its unit, as a body may state any quantity. */
type Stated = Record<string, unknown>

/** Codes of the scales that have a zero of their own. */
const SCALES = /Cel|\[degF\]/g
const ratioOf: Record<string, string> = { Cel: 'K', '[degF]': '[degR]' }

/** Texts of a caller are quoted to this length. */
const QUOTED = 60
const acceptedOf = (si: string) => `one of ${acceptedUnits(si).join(', ')}`

/** The SI value of `{value, unit}`, or the issues that it has. */
export function readStated(si: string, given: Stated, path: readonly PropertyKey[]): number | Issue[] {
  const issues = unknownNames(given, path)
  const { value, unit } = given
  const name = path.join('/')
  if (typeof value !== 'number')
    issues.push(
      missingOr(value, [...path, 'value'], `${name}/value is ${kindOf(value)}; a number is expected.`, 'a number'),
    )
  if (typeof unit !== 'string') {
    const detail = `${name}/unit is ${kindOf(unit)}; the code of a unit is expected.`
    issues.push(missingOr(unit, [...path, 'unit'], detail, acceptedOf(si)))
  } else {
    const convert = conversionOf(si, unit)
    if (convert && typeof value === 'number' && issues.length === 0) return convert(value)
    if (!convert) issues.push(refusedUnit(si, unit, [...path, 'unit']))
  }
  return issues
}

function unknownNames(given: Stated, path: readonly PropertyKey[]): Issue[] {
  const names = Object.keys(given).filter((name) => name !== 'value' && name !== 'unit')
  return names.slice(0, QUOTED).map((name) => ({
    pointer: pointerOf([...path, name.slice(0, 4 * QUOTED)]),
    code: 'unknown-field',
    detail: `There is no field "${name.slice(0, QUOTED)}" here.`,
    accepted: 'value, unit',
  }))
}

function missingOr(given: unknown, path: readonly PropertyKey[], wrong: string, accepted: string): Issue {
  const pointer = pointerOf(path)
  if (given !== undefined) return { pointer, code: 'wrong-type', detail: wrong, accepted }
  return { pointer, code: 'missing-field', detail: `${path.join('/')} is missing.`, accepted }
}

function refusedUnit(si: string, code: string, path: readonly PropertyKey[]): Issue {
  const detail = `"${code.slice(0, QUOTED)}" is not a unit that is taken here.${hintOf(si, code)}`
  return { pointer: pointerOf(path), code: 'unit-not-accepted', detail, accepted: acceptedOf(si) }
}

/** What to write instead of a scale of temperature that stands where only a ratio can. */
function hintOf(si: string, code: string): string {
  if (code.length > QUOTED || code.search(SCALES) < 0) return ''
  const better = code.replace(SCALES, (scale) => ratioOf[scale] ?? scale)
  if (better === 'K' || better === '[degR]')
    return si === 'K' ? ' A difference of temperatures has no zero to convert: it takes K or [degR], never Cel.' : ''
  const instead = unitOf(si, better) ? ` Write ${better}.` : ' Write K, or [degR] in imperial products.'
  return ` Cel and [degF] are scales with a zero of their own and stand in no product.${instead}`
}
