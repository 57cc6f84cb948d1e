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
  return timeUnits.find(({ until }) => end < until) ?? { unit: 's', size: 1 }
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

export function plain(value: number, digits = 4): string {
  return String(Number(value.toPrecision(digits))).replace('-', MINUS)
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
