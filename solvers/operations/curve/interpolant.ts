/** A smooth stretch of a curve as a Chebyshev series, so that it can be differentiated. */
export interface Interpolant {
  middle: number
  half: number
  coefficients: readonly number[]
}

const COUNT = 16
const nodes = Array.from({ length: COUNT }, (_, k) => Math.cos((Math.PI * (k + 0.5)) / COUNT))

/** The series through the values at the nodes of a stretch. */
export function interpolate(valuesAt: (at: number[]) => readonly number[], from: number, to: number): Interpolant {
  const middle = (from + to) / 2
  const half = (to - from) / 2
  const values = valuesAt(nodes.map((node) => Math.min(to, Math.max(from, middle + half * node))))
  // About one of the values, so that a large constant does not cost the digits of the change.
  const constant = values[COUNT / 2]!
  const coefficients = nodes.map((_, n) => {
    const sum = values.reduce((s, v, k) => s + (v - constant) * Math.cos((Math.PI * n * (k + 0.5)) / COUNT), 0)
    return ((n === 0 ? 1 : 2) * sum) / COUNT
  })
  coefficients[0]! += constant
  return { middle, half, coefficients }
}

export function derivative({ middle, half, coefficients: c }: Interpolant): Interpolant {
  const d = new Array<number>(c.length).fill(0)
  for (let n = c.length - 1; n > 0; n--) d[n - 1] = (d[n + 1] ?? 0) + (2 * n * c[n]!) / half
  d[0]! /= 2
  return { middle, half, coefficients: d }
}

/** By Clenshaw's recurrence. */
export function valueAt({ middle, half, coefficients: c }: Interpolant, at: number): number {
  const x = (at - middle) / half
  let [next, afterNext] = [0, 0]
  for (let n = c.length - 1; n > 0; n--) [next, afterNext] = [2 * x * next - afterNext + c[n]!, next]
  return x * next - afterNext + c[0]!
}

/** What the derivative may be off: what the last terms leave out, and the noise that stands in them. */
export function slopeError({ half, coefficients: c }: Interpolant): number {
  const tail = c.slice(-4).reduce((most, v) => Math.max(most, Math.abs(v)), 0)
  return (tail * COUNT * COUNT) / half
}

/** Whether the series tells the shape of the stretch at all: its terms get smaller. */
export function isResolved({ coefficients: c }: Interpolant): boolean {
  const size = (terms: readonly number[]) => terms.reduce((most, v) => Math.max(most, Math.abs(v)), 0)
  return size(c.slice(-4)) <= 0.01 * size(c.slice(1, 5))
}
