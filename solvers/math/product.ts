import { completed, completedError, remaining, REMAINING_ERROR } from './convective-half-space.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'
import type { Moment, Share, UnitBody } from './unit-body.ts'

/** One direction of a body whose answer is a product: its own answer at point j and time i, as if it were alone. */
export interface Factor {
  /** θ, at least cost, to an absolute error: a temperature needs no more. */
  left(j: number, i: number): Estimate
  remaining(j: number, i: number): Estimate
  completed(j: number, i: number): Estimate
  /** Of the whole; absent where the direction has no end. */
  meanRemaining?(i: number): Estimate
  heatFraction?(i: number): Estimate
  /** Terms of its series at time i. */
  terms(i: number): number
}

/** `places` are those of the points among the places of the unit body, which are all different. */
export function bodyFactor(unit: UnitBody, places: readonly number[], moments: readonly Moment[]): Factor {
  return {
    left: oncePerPlace(places, (j, i) => leftOf(unit.share(j, moments[i]!))),
    remaining: oncePerPlace(places, (j, i) => unit.remaining(j, moments[i]!)),
    completed: oncePerPlace(places, (j, i) => unit.completed(j, moments[i]!)),
    meanRemaining: (i) => unit.meanRemaining(moments[i]!),
    heatFraction: (i) => unit.heatFraction(moments[i]!),
    terms: (i) => (moments[i]!.fourier > 0 ? unit.terms(moments[i]!) : 0),
  }
}

function leftOf(share: Share): Estimate {
  return share.of === 'remaining' ? share : { value: 1 - share.value, error: share.error + EPS, method: share.method }
}

/** Points that share a coordinate share its answer: it is kept for one time while the points of that time are asked for. */
function oncePerPlace(places: readonly number[], find: (j: number, i: number) => Estimate): Factor['remaining'] {
  const known: Estimate[] = []
  const knownAt: number[] = []
  return (point, i) => {
    const j = places[point]!
    if (knownAt[j] !== i) {
      known[j] = find(j, i)
      knownAt[j] = i
    }
    return known[j]!
  }
}

/**
 * A direction without end, from a face that is stepped or meets a fluid.
 *
 * `distances` are the different ones from the face, and `places` those of the points among them; `reached` is √(at) and `films` h√(at)/k of
 * each time, Infinity where the face is held.
 */
export function halfSpaceFactor(
  distances: readonly number[],
  places: readonly number[],
  reached: readonly number[],
  films: readonly number[],
): Factor {
  const eta = (j: number, i: number) => distances[j]! / (2 * reached[i]!)
  const left = oncePerPlace(places, (j, i) => {
    const value = Math.min(1, remaining(eta(j, i), films[i]!))
    return { value, error: REMAINING_ERROR * value + TINY, method: 'closed-form' }
  })
  return {
    left,
    remaining: left,
    completed: oncePerPlace(places, (j, i) => {
      const value = completed(eta(j, i), films[i]!)
      return { value, error: completedError(eta(j, i)) * value + TINY, method: 'closed-form' }
    }),
    terms: () => 0,
  }
}

/** A direction whose faces pass no heat. */
export const idleFactor: Factor = {
  left: () => ({ value: 1, error: 0, method: 'closed-form' }),
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
