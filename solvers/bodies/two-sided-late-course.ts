import type { LateCourse } from './late-course.ts'
import { temperatureIn } from './profile-along.ts'
import { fluxOf, passesNoHeat } from '../statement/side.ts'
import type { TwoSided } from './two-sided.ts'

/** Below this share of the largest change a place has none of its own to compare with. */
const NONE = 1e-6

/** The way to the end state. A pulse, and a source that decays, go a way of their own: there the rate alone is told. */
export function twoSidedCourse({ problem, profile, reference, places, lasting }: TwoSided): LateCourse {
  const { diffusivity, length, source, pulse, depths } = problem
  const rateOf = (square: number) => (diffusivity / length / length) * square
  const ends = lasting.mode(0).square > 0
  const first = lasting.mode(ends ? 0 : 1)
  const rate = rateOf(first.square)
  if (!ends || pulse !== undefined || source?.timeConstant !== undefined) return { rate }
  const steadyAt = (near: number) => lasting.steady({ near }).value
  const change = (depth: number) => temperatureIn(profile, depth) - reference - steadyAt(depth / length)
  const quarters = [0, 0.25, 0.5, 0.75, 1].map((X) => change(X * length))
  const largest = quarters.reduce((most, one) => Math.max(most, Math.abs(one)), 0)
  if (largest === 0) return { rate }
  const second = lasting.mode(1)
  const own = depths.map(change)
  const told = own.every((one) => Math.abs(one) > NONE * largest)
  const blind = [problem.left, problem.right].findIndex((side) => passesNoHeat(side) && fluxOf(side) === 0)
  const there = change(blind * length)
  return {
    rate,
    ...(told ? { shares: own.map((one, j) => first.at(places[j]!) / one) } : {}),
    // Where a face is insulated, it is what lags.
    ...(blind >= 0 && Math.abs(there) > NONE * largest ? { centre: first.at({ near: blind }) / there } : {}),
    second: { rate: rateOf(second.square), most: second.most / largest },
  }
}
