const leading = [1, 2, 2.5, 5, 10]

/** The smallest step of 1, 2, 2.5 or 5 times a power of ten that cuts a span into at most so many parts. */
export function niceStep(span: number, most: number): number {
  if (!(span > 0 && Number.isFinite(span))) throw new RangeError(`no step cuts a span of ${span}`)
  const raw = span / most
  const power = 10 ** Math.floor(Math.log10(raw))
  return (leading.find((l) => l * power >= raw * (1 - 1e-9)) ?? 10) * power
}

/** The multiples of a step from low to high, both ends included when they are multiples. */
export function multiples(step: number, low: number, high: number): number[] {
  const first = Math.ceil(low / step - 1e-9)
  const last = Math.floor(high / step + 1e-9)
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => Number(((first + i) * step).toPrecision(12)))
}

/** The smallest multiple of a nice step that is not below the value. */
export function niceCeiling(value: number): number {
  const step = niceStep(value, 10)
  return Number((Math.ceil(value / step - 1e-9) * step).toPrecision(12))
}
