import { EPS } from '../../math/rounding.ts'
import type { Curve } from './curve.ts'
import { merged, originOf, reserveOf, type Scan, slopeAt, turnAt, turnsIn } from './scan.ts'

export interface Crossing {
  at: number
  /** What the place of the crossing may be off. */
  bound: number
  direction: 'rising' | 'falling'
  /** Derivative there; absent where the curve jumps. */
  slope?: number
}

/** Every point at which a scanned curve certainly passes the target. */
export function crossingsOf(curve: Curve, looked: Scan, target: number): Crossing[] {
  const whole = withOwnBounds(curve, withTurns(curve, looked, target), target)
  const crossings: Crossing[] = []
  let last: number | undefined
  whole.points.forEach((_, i) => {
    const side = sideOf(whole, i, target)
    if (side === 0) return
    if (last !== undefined && sideOf(whole, last, target) === -side)
      crossings.push(locate(curve, whole, target, last, i))
    last = i
  })
  return crossings
}

/** On which side of the target a value lies, or 0 where its bound does not let it be told. */
function sideOf({ values, bounds }: Scan, i: number, target: number): -1 | 0 | 1 {
  const difference = values[i]! - target
  return Math.abs(difference) <= bounds[i]! && !(bounds[i] === 0 && difference !== 0) ? 0 : difference > 0 ? 1 : -1
}

/** Values of one look share a bound, the largest: those that it leaves in doubt are asked for alone. */
function withOwnBounds(curve: Curve, looked: Scan, target: number): Scan {
  const doubtful = looked.points.flatMap((_, i) =>
    looked.values[i] !== target && sideOf(looked, i, target) === 0 ? [i] : [],
  )
  if (doubtful.length === 0) return looked
  const bounds = [...looked.bounds]
  for (const i of doubtful.slice(0, MOST_ALONE)) bounds[i] = curve.sample([looked.points[i]!]).bounds[0]!
  return { ...looked, bounds }
}
const MOST_ALONE = 200

/** Adds the turns that may pass the target between two points that do not. */
function withTurns(curve: Curve, looked: Scan, target: number): Scan {
  const { values } = looked
  const turns = ([1, -1] as const).flatMap((sign) =>
    turnsIn(looked, sign)
      .filter((i) => {
        const missing = sign * (target - values[i]!)
        return missing > 0 && missing <= reserveOf(looked, i)
      })
      .map((i) => turnAt(curve, looked, i, sign)),
  )
  if (turns.length === 0) return looked
  return merged(looked, {
    points: turns.map((t) => t.at),
    values: turns.map((t) => t.value),
    bounds: turns.map((t) => t.bound),
  })
}

type Bracket = [number, number]

function locate(curve: Curve, whole: Scan, target: number, low: number, high: number): Crossing {
  const { points, values, breaks } = whole
  const rising = values[high]! > target
  const direction = rising ? 'rising' : 'falling'
  const past = (value: number) => (rising ? value - target : target - value)
  const limits: Bracket = [points[low]!, points[high]!]
  const origin = originOf(breaks, limits[0])
  const near = narrowed(curve, past, limits, origin)
  if (!near) return { at: origin, bound: nearest(origin), direction }
  const at = root(curve, past, near)
  const slope = slopeAt(curve, breaks, at, (limits[1] - limits[0]) / 2)
  const bound = certainty(curve, past, at, Math.abs(slope), limits)
  return { at, bound, direction, ...(Number.isFinite(slope) ? { slope } : {}) }
}

const spacing = (at: number) => Math.max(2 * EPS * Math.abs(at), Number.MIN_VALUE)
/** Sections of one look at a wide bracket. */
const SECTIONS = 16
/** Nearer to the start nothing is told apart from it. */
const NOTHING = 1e-300

const nearest = (origin: number) => Math.max(NOTHING, spacing(origin))

/**
 * Cuts a bracket by decades of the distance from the start of its stretch, until its ends are of one size. A curve that
 * jumps at that start has nothing to cut.
 */
function narrowed(curve: Curve, past: (value: number) => number, [a, b]: Bracket, origin: number): Bracket | undefined {
  for (let round = 0; round < 8 && b - origin > 4 * (a - origin); round++) {
    const least = a > origin ? a - origin : nearest(origin)
    const ratio = (b - origin) / least
    const inside = Array.from({ length: SECTIONS - 1 }, (_, k) => origin + least * ratio ** (k / SECTIONS))
      .slice(a > origin ? 1 : 0)
      .filter((p) => p > a && p < b)
    const values = curve.sample(inside).values
    const first = values.findIndex((value) => past(value) >= 0)
    if (first === 0 && a === origin) return undefined
    const [before, after] = first < 0 ? [inside.at(-1) ?? a, b] : [inside[first - 1] ?? a, inside[first]!]
    ;[a, b] = [before, after]
  }
  return [a, b]
}

/** Chandrupatla's method: inverse quadratic interpolation where it is safe, bisection elsewhere. */
function root(curve: Curve, past: (value: number) => number, [from, to]: Bracket): number {
  const f = (x: number) => past(curve.sample([x]).values[0]!)
  let [a, b] = [to, from]
  let [fa, fb] = [f(a), f(b)]
  let [c, fc] = [a, fa]
  let share = 0.5
  for (let n = 0; n < 200 && fa !== 0 && fb !== 0; n++) {
    const x = a + share * (b - a)
    const fx = f(x)
    if (fx > 0 === fa > 0) [c, fc] = [a, fa]
    else [c, fc, b, fb] = [b, fb, a, fa]
    ;[a, fa] = [x, fx]
    const least = spacing(Math.abs(fa) < Math.abs(fb) ? a : b) / Math.abs(b - c)
    if (fa === 0 || !(least < 0.5) || Math.abs(b - a) <= 2 * spacing(a)) break
    const [xi, phi] = [(a - b) / (c - b), (fa - fb) / (fc - fb)]
    const quadratic = phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi
    share = quadratic
      ? (fa / (fb - fa)) * (fc / (fb - fc)) + (((c - a) / (b - a)) * (fa / (fc - fa)) * fb) / (fc - fb)
      : 0.5
    share = Math.min(1 - least, Math.max(least, share))
  }
  return Math.abs(fa) <= Math.abs(fb) ? a : b
}

/** The distance at which, on both sides, the value differs from the target by more than its bound. */
function certainty(
  curve: Curve,
  past: (value: number) => number,
  at: number,
  steepness: number,
  limits: Bracket,
): number {
  const [here] = curve.sample([at]).bounds
  const start = steepness > 0 ? (1.05 * here!) / steepness : 0
  const reach = (side: 1 | -1, limit: number): number => {
    let step = Math.max(start, 2 * spacing(at))
    for (let n = 0; n < 200; n++, step *= 1.5) {
      const point = at + side * step
      if (side * (limit - point) <= 0) break
      const { values, bounds } = curve.sample([point])
      if (side * past(values[0]!) > bounds[0]!) return step
    }
    return Math.abs(limit - at)
  }
  return Math.max(reach(-1, limits[0]), reach(1, limits[1])) + 2 * spacing(at)
}
