/** One call answers at most so many priced points. */
export const MAX_POINTS = 200_000
/** A call costs at least so many points. */
export const FLOOR = 10

/** What a call of so many points is charged. */
export function chargeOf(points: number): number {
  return Math.max(FLOOR, Math.ceil(points))
}
