import type { Numbers } from '../case.ts'
import { bathModes } from '../math/bath-roots.ts'
import { slabEigenvalue } from '../math/slab-eigenvalues.ts'

/**
 * The way of a body to its end once its slowest mode alone is left: what remains at a place is its share times e^(−rate·t).
 * Source: C. O. Ball's f and j of heating curves (from memory); H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed.
 * 1959, chapters 3, 7 and 9 for the modes.
 */
export interface LateCourse {
  /** Decay rate of the slowest mode, 1/s. */
  rate: number
  /** What the slowest mode is at each place at time 0, as a share of the change there; absent where a place has no change of its own. */
  shares?: readonly number[]
  /** The same at the centre or insulated face, where a body has one. */
  centre?: number
  /** The next mode: its decay rate, and the most it is anywhere at time 0, as a share of the change. */
  second?: { rate: number; most: number }
}

/** What of a share of the change one term may leave out. */
const LEFT_OUT = 0.01

export function lateNumbers({ rate, shares, centre, second }: LateCourse): Numbers {
  // A rate may vanish, or its inverse be beyond all numbers.
  const slowestTimeConstant = 1 / rate
  if (!Number.isFinite(slowestTimeConstant * Math.LN10)) return {}
  return {
    slowestTimeConstant,
    ...(centre !== undefined && centre > 0 ? { lagTime: Math.log(centre) / rate } : {}),
    fValue: Math.LN10 / rate,
    ...(shares && shares.length > 0 ? { jValue: [...shares] } : {}),
    ...(second ? { validFrom: Math.max(0, Math.log(second.most / LEFT_OUT) / second.rate) } : {}),
  }
}

/** A slab of length L with a film at one face, or held there, and no heat at the other: C₁ cos(z₁X), X = 1 − depth/L. */
export function slabCourse(
  { diffusivity, length, biot }: { diffusivity: number; length: number; biot: number },
  fromFar: readonly number[],
): LateCourse {
  const [z1, z2] =
    biot === Infinity
      ? ([Math.PI / 2, 1.5 * Math.PI] as const)
      : ([slabEigenvalue(biot, 0), slabEigenvalue(biot, 1)] as const)
  const coefficient = (z: number) => (4 * Math.sin(z)) / (2 * z + Math.sin(2 * z))
  const rateOf = (z: number) => (diffusivity / length / length) * z * z
  const first = coefficient(z1)
  return {
    rate: rateOf(z1),
    shares: fromFar.map((x) => first * Math.cos((z1 * Math.min(length, x)) / length)),
    centre: first,
    second: { rate: rateOf(z2), most: Math.abs(coefficient(z2)) },
  }
}

/** A slab and its bath: 2(1 + γ)·(size/E)·cos(qX) of the way to the temperature that both end at. */
export function bathCourse(
  { diffusivity, length, biot, gamma }: { diffusivity: number; length: number; biot: number; gamma: number },
  fromFar: readonly number[],
): LateCourse {
  const { roots, sizes, divisors } = bathModes({ gamma, biot }, 2)
  const coefficient = (n: number) => (2 * (1 + gamma) * sizes[n]!) / divisors[n]!
  const rateOf = (n: number) => (diffusivity / length / length) * roots[n]! * roots[n]!
  return {
    rate: rateOf(0),
    shares: fromFar.map((x) => coefficient(0) * Math.cos((roots[0]! * Math.min(length, x)) / length)),
    centre: coefficient(0),
    second: { rate: rateOf(1), most: coefficient(1) },
  }
}

/** One temperature for the whole body: nothing lags, and one term is all there is. */
export const lumpedCourse = (capacity: number, conductance: number): LateCourse => ({
  rate: conductance / capacity,
  centre: 1,
})

/** A product: rates add up, shares multiply. A direction that passes no heat has a rate of 0. */
export function productCourse(directions: readonly LateCourse[]): LateCourse {
  const moving = directions.filter(({ rate }) => rate > 0)
  const rate = moving.reduce((sum, one) => sum + one.rate, 0)
  const centre = moving.reduce((product, one) => product * one.centre!, 1)
  const count = moving[0]?.shares?.length ?? 0
  const shares = Array.from({ length: count }, (_, j) => moving.reduce((product, one) => product * one.shares![j]!, 1))
  return { rate, centre, shares }
}

/**
 * Time from which the product of first terms is right to 1 %: each direction leaves out its second term, beside what the others have left.
 */
export function productValidFrom(directions: readonly LateCourse[]): Numbers {
  const moving = directions.filter(({ rate }) => rate > 0)
  if (moving.length === 0) return {}
  const leftOut = (t: number) =>
    moving.reduce((sum, { second }, i) => {
      const others = moving.filter((_, k) => k !== i)
      const left = others.reduce((share, one) => share * Math.min(1, one.centre! * Math.exp(-one.rate * t)), 1)
      return sum + second!.most * Math.exp(-second!.rate * t) * left
    }, 0)
  let low = 0
  let high = moving.reduce((most, { second }) => Math.max(most, Math.log(1e4) / second!.rate), 0)
  // Sixty halvings leave no more than the rounding of the time.
  for (let n = 0; n < 60; n++) {
    const middle = (low + high) / 2
    if (leftOut(middle) > LEFT_OUT) low = middle
    else high = middle
  }
  return { validFrom: high }
}
