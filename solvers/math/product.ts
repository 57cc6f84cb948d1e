import { completed, completedError, remaining, REMAINING_ERROR } from './convective-half-space.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'
import type { Moment, UnitBody } from './unit-body.ts'

/** One direction of a body whose answer is a product: its own answer at point j and time i, as if it were alone. */
export interface Factor {
  remaining(j: number, i: number): Estimate
  completed(j: number, i: number): Estimate
  /** Of the whole; absent where the direction has no end. */
  meanRemaining?(i: number): Estimate
  heatFraction?(i: number): Estimate
  /** Terms of its series at time i. */
  terms(i: number): number
}

export function bodyFactor(unit: UnitBody, moments: readonly Moment[]): Factor {
  return {
    remaining: (j, i) => unit.remaining(j, moments[i]!),
    completed: (j, i) => unit.completed(j, moments[i]!),
    meanRemaining: (i) => unit.meanRemaining(moments[i]!),
    heatFraction: (i) => unit.heatFraction(moments[i]!),
    terms: (i) => (moments[i]!.fourier > 0 ? unit.terms(moments[i]!) : 0),
  }
}

/**
 * A direction without end, from a face that is stepped or meets a fluid.
 *
 * `distances` are those of the points from the face; `reached` is √(at) and `films` h√(at)/k of each time, Infinity where the face is held.
 */
export function halfSpaceFactor(
  distances: readonly number[],
  reached: readonly number[],
  films: readonly number[],
): Factor {
  const eta = (j: number, i: number) => distances[j]! / (2 * reached[i]!)
  return {
    remaining(j, i) {
      const value = Math.min(1, remaining(eta(j, i), films[i]!))
      return { value, error: REMAINING_ERROR * value + TINY, method: 'closed-form' }
    },
    completed(j, i) {
      const value = completed(eta(j, i), films[i]!)
      return { value, error: completedError(eta(j, i)) * value + TINY, method: 'closed-form' }
    },
    terms: () => 0,
  }
}

/** A direction whose faces pass no heat. */
export const idleFactor: Factor = {
  remaining: () => ({ value: 1, error: 0, method: 'closed-form' }),
  completed: () => ({ value: 0, error: 0, method: 'closed-form' }),
  meanRemaining: () => ({ value: 1, error: 0, method: 'closed-form' }),
  heatFraction: () => ({ value: 0, error: 0, method: 'closed-form' }),
  terms: () => 0,
}

/** What is left of each direction, multiplied. */
export function product(parts: readonly Estimate[]): Estimate {
  return parts.reduce((a, b) => ({
    value: a.value * b.value,
    error: a.error * b.value + b.error * a.value + a.error * b.error + EPS * a.value * b.value,
    method: 'product',
  }))
}

/** 1 − (1 − u₁)(1 − u₂)… as u₁ + u₂(1 − u₁) + …: a sum of positive terms, so nothing cancels. */
export function union(parts: readonly { done: Estimate; left: Estimate }[]): Estimate {
  let { done: sum, left } = parts[0]!
  for (const next of parts.slice(1)) {
    const added = next.done.value * left.value
    sum = {
      value: Math.min(1, sum.value + added),
      error: sum.error + next.done.error * left.value + next.done.value * left.error + 2 * EPS * (sum.value + added),
      method: 'product',
    }
    left = product([left, next.left])
  }
  return { ...sum, error: Math.min(1, sum.error), method: 'product' }
}
