import type { LateCourse } from '../../bodies/late-course.ts'
import { type Annulus, annulusModes, type Mode } from '../../math/annulus-modes.ts'
import { fluxOf, passesNoHeat } from '../../statement/side.ts'
import { annulusOf, driveOf, type HollowInput, wallOf } from './solve.ts'

/** The steady state above the start, A + B·ln(ρ/ρ₁) by the laws of the two faces; undefined where neither gives heat back. */
function steadyOf({ innerRadius, inner, outer }: Annulus, [first, last]: readonly [number, number]) {
  const outerRadius = innerRadius + 1
  const across = Math.log1p(1 / innerRadius)
  // a·A + b·B = c at either face.
  const [a1, b1] = inner.held ? [1, 0] : [inner.film, -1 / innerRadius]
  const [a2, b2] = outer.held ? [1, across] : [outer.film, 1 / outerRadius + outer.film * across]
  const divisor = a1 * b2 - a2 * b1
  if (!(divisor > 0)) return undefined
  const [A, B] = [(first * b2 - last * b1) / divisor, (a1 * last - a2 * first) / divisor]
  return (fromInner: number) => A + B * Math.log1p(fromInner / innerRadius)
}

/** The way of the wall to its end state; where neither side gives heat back, the slowest mode alone is told. */
export function lateOf(input: HollowInput): LateCourse {
  const annulus = annulusOf(input)
  const length = wallOf(input)
  const scale = input.diffusivity / length / length
  const distances = input.radii.map((r) => (r - input.innerRadius) / length)
  const slowest = annulusModes(annulus, [], Infinity).at(-1)!.w
  const rate = scale * slowest
  const drives = [driveOf(input.inner, input).value, driveOf(input.outer, input).value] as const
  const steady = steadyOf(annulus, drives)
  if (!steady) return { rate }
  const [first, second] = annulusModes(annulus, [...distances, 0, 0.5, 1], 40 / slowest) as [Mode, Mode]
  const amount = ({ gains, w, norm }: Mode) => (gains[0] * drives[0] + gains[1] * drives[1]) / (w * norm)
  const ends = [...distances, 0, 0.5, 1].map(steady)
  const largest = ends.slice(-3).reduce((most, one) => Math.max(most, Math.abs(one)), 0)
  if (largest === 0) return { rate }
  const own = ends.slice(0, -3)
  const blind = [input.inner, input.outer].findIndex((side) => passesNoHeat(side) && fluxOf(side) === 0)
  const told = own.every((end) => Math.abs(end) > 1e-6 * largest)
  const most = second.values.slice(-3).reduce((so, one) => Math.max(so, Math.abs(one)), 0) * Math.abs(amount(second))
  return {
    rate,
    ...(told ? { shares: own.map((end, j) => (amount(first) * first.values[j]!) / end) } : {}),
    // Where a face is insulated, it is what lags.
    ...(blind >= 0 && Math.abs(steady(blind)) > 1e-6 * largest
      ? { centre: (amount(first) * first.values.at(-3 + 2 * blind)!) / steady(blind) }
      : {}),
    second: { rate: scale * second.w, most: most / largest },
  }
}
