/** Where a curve is looked at first: increasing, with the points between which it is smooth. */
export interface Grid {
  points: readonly number[]
  /** The first and last point and every kink between them. */
  breaks: readonly number[]
}

/** Points a decade of the first look over time; where the curve changes, each gap is cut to the finer figure. */
const COARSE = 0.5
export const PER_DECADE = 6

/** Below this no time matters: a body of 1 nm with the largest diffusivity is done at 1e-20 s. */
const SHORTEST = 1e-22
/** A kink is followed from this share of its own size on; nearer, two doubles do not tell it apart well. */
const NEAREST = 1e-9
/** Up to so many stretches each is looked at by decades, beyond it at a few shares of its length. */
const MANY_STRETCHES = 40
const fewShares = [1e-3, 0.03, 0.15, 0.4, 0.7]
/** Shares of the span before its end: a turn between the last two points of a decade would not be seen. */
const beforeEnd = [0.3, 0.1, 0.03, 0.01, 1e-3]
/** Points of a cycle. */
const PER_PERIOD = 24

function distinct(points: readonly number[]): number[] {
  const sorted = Float64Array.from(points).sort()
  return [...sorted.filter((p, i) => i === 0 || p !== sorted[i - 1])]
}

/** Offsets by decades from the shortest to below a length. */
function decades(shortest: number, length: number, each: number): number[] {
  const count = Math.ceil(each * Math.log10(length / shortest))
  return Array.from({ length: Math.max(0, count) }, (_, k) => shortest * 10 ** (k / each))
}

/** What the case says of its own course: where it changes its law, and the period of what repeats. */
export interface Course {
  instants: readonly number[]
  period: number | undefined
  /** A settled cycle has no start that its course is reckoned from. */
  settled: boolean
}

/** Times by decades after the start and after each instant at which the course changes, and by the period. */
export function timeGrid(course: Course, from: number, to: number): Grid {
  const instants = distinct(course.instants.filter((t) => t > 0 && t < to))
  const starts = course.settled ? [from] : [0, ...instants]
  const many = starts.length > MANY_STRETCHES
  const points = course.settled
    ? []
    : starts.flatMap((start, i) => {
        const length = (starts[i + 1] ?? to) - start
        const shortest = start === 0 ? Math.min(SHORTEST, 1e-6 * length) : Math.max(NEAREST * start, 1e-9 * length)
        return [
          start,
          ...(many ? fewShares.map((s) => s * length) : decades(shortest, length, COARSE)).map(
            (offset) => start + offset,
          ),
        ]
      })
  const { period } = course
  const step = period && period / PER_PERIOD
  const turns = step ? Array.from({ length: Math.ceil((to - from) / step) }, (_, k) => from + k * step) : []
  const late = many ? [] : beforeEnd.map((share) => to - share * (to - from))
  const inside = [...points, ...turns, ...late].filter((t) => t > from && t < to)
  return { points: distinct([from, ...inside, to]), breaks: distinct([from, ...instants.filter((t) => t > from), to]) }
}

/** No depth of a body without end matters below this; and bodies with an end are thinner than that. */
const SHALLOWEST = 1e-13
const ENDLESS = 1e4

/** Places by decades from each face and joint, both ways, and evenly between them. */
export function placeGrid(joints: readonly number[]): Grid {
  const breaks = distinct(joints)
  const points = breaks.flatMap((joint, i) => {
    const next = breaks[i + 1]
    if (next === undefined) return [joint]
    const length = next - joint
    const near = decades(length < ENDLESS ? 1e-9 * length : SHALLOWEST, length, PER_DECADE)
    const even = Array.from({ length: 31 }, (_, k) => joint + ((k + 1) / 32) * length)
    return [joint, ...near.map((d) => joint + d), ...near.map((d) => next - d), ...even]
  })
  const [first, last] = [breaks[0]!, breaks.at(-1)!]
  return { points: distinct(points.filter((p) => p >= first && p <= last)), breaks }
}
