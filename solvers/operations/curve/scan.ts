import { EPS } from '../../math/rounding.ts'
import type { Curve } from './curve.ts'
import { type Grid, PER_DECADE } from './grid.ts'
import { derivative, type Interpolant, interpolate, isResolved, slopeError, valueAt } from './interpolant.ts'

/** A curve as looked at, finely where it changes. */
export interface Scan {
  points: number[]
  values: number[]
  bounds: number[]
  breaks: readonly number[]
}

/** Which of the breaks is the last at or before a point. */
function breakBefore(breaks: readonly number[], point: number): number {
  let [low, high] = [0, breaks.length - 1]
  while (low < high) {
    const middle = Math.ceil((low + high) / 2)
    if (breaks[middle]! <= point) low = middle
    else high = middle - 1
  }
  return low
}

/** The kink or start at or before a point, where its time or distance is counted from. */
export function originOf(breaks: readonly number[], point: number): number {
  return breaks[breakBefore(breaks, point)]!
}

/** The smooth stretch around a point. */
function stretchOf(breaks: readonly number[], point: number): [number, number] {
  const index = Math.min(breakBefore(breaks, point), Math.max(0, breaks.length - 2))
  return [breaks[index]!, breaks[index + 1] ?? breaks[index]!]
}

/**
 * Gaps in which the curve changes are cut, and so are their neighbours: first to so many points a decade wherever the
 * change can be told from the bounds, however small beside the rest, then once more where it is a good share of the range.
 */
export function scan(curve: Curve, grid: Grid): Scan {
  const coarse = firstLook(curve, grid)
  const looked = cut(curve, coarse, changes(coarse), (ratio) =>
    ratio > 0 ? Math.ceil(PER_DECADE * Math.log10(ratio)) : 1,
  )
  return cut(curve, looked, changes(looked, 0.01 * spread(looked.values)), () => 3)
}

/** Whether the curve changes on the way to each point: by more than its bounds, and than the least that counts. */
function changes({ values, bounds }: Scan, least = 0): boolean[] {
  return values.map((v, i) => {
    if (i === 0) return false
    const change = Math.abs(v - values[i - 1]!)
    return change > bounds[i]! + bounds[i - 1]! && change > least
  })
}

/** Points that are asked for together, and those that are looked at from the last to the first. */
const TOGETHER = 4
const FEW = 64

/**
 * The points of a grid from the last on, as far as the curve differs from its start: what has not been felt at a time
 * was not felt before, and early times are dear.
 */
function firstLook(curve: Curve, { points, breaks }: Grid): Scan {
  const all = (): Scan => ({ points: [...points], ...curve.sample(points), breaks })
  if (points.length > FEW) return all()
  const first = points[0]!
  let looked: Scan = { points: [first], ...curve.sample([first]), breaks }
  const start = looked.values[0]!
  // At the end the curve may be back at its start: only before it was felt there is nothing more to see.
  let felt = false
  for (let end = points.length; end > 1; end -= TOGETHER) {
    const asked = points.slice(Math.max(1, end - TOGETHER), end)
    const { values, bounds } = curve.sample(asked)
    looked = merged(looked, { points: asked, values, bounds })
    const touched = values.some((value, i) => Math.abs(value - start) > bounds[i]!)
    if (felt && !touched && asked.at(-1)! < breaks[1]!) break
    felt ||= touched
  }
  return looked
}

function cut(curve: Curve, looked: Scan, lively: readonly boolean[], parts: (ratio: number) => number): Scan {
  const { points, breaks } = looked
  const more = points.flatMap((_, i) =>
    i > 0 && (lively[i] || lively[i - 1] || lively[i + 1])
      ? between(points[i - 1]!, points[i]!, originOf(breaks, points[i - 1]!), parts)
      : [],
  )
  return more.length ? merged(looked, { points: more, ...curve.sample(more) }) : looked
}

function spread(values: readonly number[]): number {
  const most = values.reduce((m, v) => Math.max(m, v), -Infinity)
  return most - values.reduce((m, v) => Math.min(m, v), Infinity)
}

/** Points that cut a gap in parts, by ratio of their distance from where the stretch starts if they have one. */
function between(a: number, b: number, origin: number, parts: (ratio: number) => number): number[] {
  const [near, far] = [a - origin, b - origin]
  const count = parts(near > 0 ? far / near : 0)
  const shares = Array.from({ length: Math.max(0, count - 1) }, (_, k) => (k + 1) / count)
  const inside = shares.map((s) => (near > 0 ? origin + near * (far / near) ** s : a + (b - a) * s))
  return inside.filter((p) => p > a && p < b)
}

type Points = Omit<Scan, 'breaks'>

export function merged(a: Scan, b: Points): Scan {
  const all = [
    ...a.points.map((p, i) => [p, a.values[i]!, a.bounds[i]!]),
    ...b.points.map((p, i) => [p, b.values[i]!, b.bounds[i]!]),
  ]
  all.sort((x, y) => x[0]! - y[0]!)
  const [points, values, bounds] = [0, 1, 2].map((n) => all.map((one) => one[n]!))
  return { points: points!, values: values!, bounds: bounds!, breaks: a.breaks }
}

/** A point at which the curve turns, between its neighbours in a scan. */
export interface Turn {
  at: number
  value: number
  /** What the value and the point may be off. */
  bound: number
  atBound: number
}

/** Points of a scan that are higher (sign 1) or lower (-1) than their neighbours; an end has one only. */
export function turnsIn({ values }: Scan, sign: 1 | -1): number[] {
  return values.flatMap((v, i) => {
    const drops = [i - 1, i + 1].flatMap((k) => (values[k] === undefined ? [] : [sign * (v - values[k])]))
    return drops.every((drop) => drop >= 0) && drops.some((drop) => drop > 0) ? [i] : []
  })
}

/**
 * How much higher (sign 1) or lower the curve may be near a turn than at the point that was looked at: as much as it
 * changes around it. Past the last point but one of an end it changes as it did before.
 */
export function reserveOf({ values }: Scan, i: number): number {
  const last = values.length - 1
  const [from, to] = [Math.max(0, i === last ? last - 2 : i - 1), Math.min(last, i === 0 ? 2 : i + 1)]
  let reserve = 0
  for (let k = from; k < to; k++) reserve += Math.abs(values[k + 1]! - values[k]!)
  return reserve
}

/** The turn itself, by the sign of the derivative; a kink or an end may be one. */
export function turnAt(curve: Curve, { points, values, bounds, breaks }: Scan, i: number, sign: 1 | -1): Turn {
  const [before, here, after] = [points[i - 1] ?? points[i]!, points[i]!, points[i + 1] ?? points[i]!]
  const kink = before === here || here === after || originOf(breaks, here) === here
  const windows: [number, number][] = kink
    ? [
        [before, here],
        [here, after],
      ]
    : [[before, after]]
  const known: Turn = { at: here, value: values[i]!, bound: bounds[i]!, atBound: kink ? 0 : after - before }
  return windows
    .flatMap(([from, to]) => (from < to ? (turnWithin(curve, from, to, sign) ?? []) : []))
    .reduce((best, turn) => (sign * (turn.value - best.value) >= (kink ? 0 : -2 * turn.bound) ? turn : best), known)
}

/** Narrows a window on the zero of the derivative until noise grows faster than the series converges. */
function turnWithin(curve: Curve, from: number, to: number, sign: 1 | -1): Turn | undefined {
  let best: { at: number; error: number; curvature: number } | undefined
  let [middle, half] = [(from + to) / 2, (to - from) / 2]
  for (let round = 0; round < 12; round++) {
    const fit = fitOver(curve, Math.max(from, middle - half), Math.min(to, middle + half))
    const slope = derivative(fit)
    const at = zeroOf(slope, sign)
    if (at === undefined) break
    const curvature = Math.abs(valueAt(derivative(slope), at))
    const error = slopeError(fit) / curvature
    if (best && !(error < best.error)) break
    best = { at, error, curvature }
    ;[middle, half] = [at, half / 3]
  }
  if (!best) return undefined
  const { values, bounds } = curve.sample([best.at])
  const noise = bounds[0]! / (best.curvature * half)
  const atBound = Math.min(to - from, 2 * best.error + 4 * noise + 4 * EPS * Math.abs(best.at))
  const lost = (best.curvature * atBound * atBound) / 2
  return { at: best.at, value: values[0]!, bound: bounds[0]! + Math.min(lost, bounds[0]!), atBound }
}

const fitOver = (curve: Curve, from: number, to: number) => interpolate((at) => curve.sample(at).values, from, to)

/** Where a derivative passes zero, falling for a maximum. */
function zeroOf(slope: Interpolant, sign: 1 | -1): number | undefined {
  const { middle, half } = slope
  const at = (share: number) => middle + half * share
  const side = (share: number) => sign * valueAt(slope, at(share))
  const steps = 32
  for (let k = 0; k < steps; k++) {
    let [low, high] = [(2 * k) / steps - 1, (2 * k + 2) / steps - 1]
    if (!(side(low) > 0 && side(high) <= 0)) continue
    for (let n = 0; n < 60; n++) {
      const mid = (low + high) / 2
      if (side(mid) > 0) low = mid
      else high = mid
    }
    return at((low + high) / 2)
  }
  return undefined
}

/** A derivative is told to more digits than anyone reads. */
const ENOUGH = 1e-12

/**
 * The derivative at a point, from a series over a window of some width to either side, which is narrowed until its last
 * terms tell that it has converged as far as noise lets it.
 */
export function slopeAt(curve: Curve, breaks: readonly number[], at: number, width: number): number {
  const [from, to] = stretchOf(breaks, at)
  let best: { slope: number; error: number } | undefined
  let half = Math.min(width, to - from)
  for (let round = 0; round < 12; round++, half /= 3) {
    const window = [Math.max(from, at - half), Math.min(to, at + half)] as const
    if (!(window[1] - window[0] > 64 * EPS * Math.abs(at))) break
    const fit = fitOver(curve, ...window)
    const slope = valueAt(derivative(fit), at)
    const error = slopeError(fit)
    if (!isResolved(fit)) continue
    if (best && !(error < best.error)) break
    best = { slope, error }
    if (error < ENOUGH * Math.abs(slope)) break
  }
  return best?.slope ?? NaN
}
