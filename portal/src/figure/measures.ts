/* How times, lengths and temperatures are written on a drawing. */

export interface Measure {
  unit: string
  /** SI units in one of these. */
  size: number
}

const timeUnits: readonly (Measure & { until: number; steps: readonly number[] })[] = [
  { unit: 'ms', size: 1e-3, until: 2, steps: [] },
  { unit: 's', size: 1, until: 300, steps: [5, 10, 15, 30, 60] },
  { unit: 'min', size: 60, until: 3 * 3600, steps: [5, 10, 15, 30, 60] },
  { unit: 'h', size: 3600, until: 4 * 86_400, steps: [1, 2, 3, 6, 12, 24] },
  { unit: 'd', size: 86_400, until: 3 * 365 * 86_400, steps: [] },
  { unit: 'a', size: 365.25 * 86_400, until: Infinity, steps: [] },
]

export function timeMeasure(end: number): Measure {
  return timeUnits.find(({ until }) => Math.abs(end) < until) ?? { unit: 's', size: 1 }
}

/** A step of clock or calendar in which an end of so many units has five to eight parts, or none that fits. */
export function clockStep(measure: Measure, end: number): number | undefined {
  const steps = timeUnits.find(({ unit }) => unit === measure.unit)?.steps ?? []
  return steps.find((step) => end / step <= 8 && end / step >= 3)
}

const lengthUnits: readonly (Measure & { until: number })[] = [
  { unit: 'µm', size: 1e-6, until: 1e-3 },
  { unit: 'mm', size: 1e-3, until: 20 },
  { unit: 'm', size: 1, until: Infinity },
]

export function lengthMeasure(extent: number): Measure {
  return lengthUnits.find(({ until }) => extent < until) ?? { unit: 'm', size: 1 }
}

export const MINUS = '\u2212'
export const THIN = '\u202f'

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹'

/** A power of ten after a mantissa. */
export function timesTen(mantissa: string, exponent: number): string {
  const power = String(exponent)
    .replace('-', '⁻')
    .replace(/\d/g, (d) => SUPERSCRIPTS[Number(d)]!)
  return `${mantissa.replace('-', MINUS)} × 10${power}`
}

/** So many digits, and never a zero that only fills up: what is very large or small is set with a power of ten. */
export function plain(value: number, digits = 4): string {
  const size = Math.abs(value)
  if (size >= 1e6 || (size > 0 && size < 1e-4)) {
    const [mantissa, exponent] = value.toExponential(digits - 1).split('e') as [string, string]
    return timesTen(String(Number(mantissa)), Number(exponent))
  }
  const integers = size >= 1 ? Math.floor(Math.log10(size)) + 1 : 0
  return String(Number(value.toPrecision(Math.max(digits, integers)))).replace('-', MINUS)
}

/** A mark of a scale: enough digits to tell it from its neighbour. */
export function markText(level: number, step: number): string {
  const digits = level === 0 ? 4 : Math.ceil(Math.log10(Math.abs(level) / step)) + 2
  return plain(level, Math.min(12, Math.max(4, digits)))
}

export function inMeasure(value: number, { size }: Measure, digits = 4): string {
  return plain(value / size, digits)
}

/** A temperature with as many decimals as the range of the drawing deserves. */
export function degrees(value: number, range: number): string {
  const decimals = Math.min(12, Math.max(1, 2 - Math.floor(Math.log10(Math.max(range, 1e-9)))))
  const text = value.toFixed(range > 5 ? 1 : decimals)
  return (Number(text) === 0 ? text.replace('-', '') : text).replace('-', MINUS)
}

/** A time that was asked for: where it is not round in the unit of the list, with the seconds that were sent. */
export function sentTime(seconds: number, measure: Measure): string {
  const value = seconds / measure.size
  const text = plain(value, 6)
  const rounded = Math.abs(Number(value.toPrecision(6)) - value) > 1e-12 * Math.abs(value)
  const odd = rounded || (value !== 0 && Math.abs(value) < 1e-3)
  return measure.size !== 1 && odd ? `${text} (${plain(seconds, 12)} s)` : text
}
