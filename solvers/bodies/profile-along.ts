import { EPS, type Estimate } from '../math/rounding.ts'
import type { InitialProfile } from '../statement/initial-profile.ts'
import type { Place, Rise } from '../math/two-sided-body.ts'

/** The pieces of a profile, above its first temperature and along a body of length 1; none where it is uniform. */
export function risesOf({ depths, temperatures }: InitialProfile, length: number): Rise[] {
  const reference = temperatures[0]!
  if (temperatures.every((T) => T === reference)) return []
  return depths.slice(1).map((to, k) => ({
    from: depths[k]! / length,
    to: to / length,
    width: (to - depths[k]!) / length,
    start: temperatures[k]! - reference,
    rise: {
      value: temperatures[k + 1]! - temperatures[k]!,
      slack: Math.abs(temperatures[k + 1]!) + Math.abs(temperatures[k]!),
    },
  }))
}

/** A jump right at a face has nothing on its outer side: after time 0 the body is as if it were not there. */
export function withoutEdges({ depths, temperatures }: InitialProfile): InitialProfile {
  const from = depths.findLastIndex((depth) => depth === depths[0])
  const end = depths.indexOf(depths.at(-1)!) + 1
  return { depths: depths.slice(from, end), temperatures: temperatures.slice(from, end) }
}

/** A depth along a body of length 1, with the piece of the profile that holds it. */
export function placeOf(depth: number, profile: InitialProfile, length: number, reference: number): Place {
  const uniform = profile.temperatures.every((T) => T === reference)
  const near = depth / length
  const far = (length - depth) / length
  if (uniform) return { near, far, piece: 0, fromStart: near, toEnd: far, initial: 0, shift: 0 }
  const piece = pieceOf(profile, depth)
  const from = profile.depths[piece]!
  const to = profile.depths[piece + 1]!
  return {
    near,
    far,
    piece,
    fromStart: (depth - from) / length,
    toEnd: (to - depth) / length,
    initial: linear(profile, piece, depth) - reference,
    shift: from === 0 ? 0 : 4,
  }
}

/** The first piece of some width that reaches as far as the depth. */
function pieceOf({ depths }: InitialProfile, depth: number): number {
  let low = 1
  let high = depths.length - 1
  while (low < high) {
    const middle = (low + high) >> 1
    if (depths[middle]! >= depth) high = middle
    else low = middle + 1
  }
  if (depths[low - 1] === depths[low]) low += low + 1 < depths.length ? 1 : -1
  return low - 1
}

function linear({ depths, temperatures }: InitialProfile, piece: number, depth: number): number {
  const [x0, x1] = [depths[piece]!, depths[piece + 1]!]
  const [T0, T1] = [temperatures[piece]!, temperatures[piece + 1]!]
  // From the nearer end, so that the end itself is met.
  return depth - x0 <= x1 - depth
    ? T0 + ((T1 - T0) * (depth - x0)) / (x1 - x0)
    : T1 - ((T1 - T0) * (x1 - depth)) / (x1 - x0)
}

/** The initial temperature at a depth; at a jump the mean of its two sides. */
export function temperatureIn(profile: InitialProfile, depth: number): number {
  const at = profile.depths.indexOf(depth)
  if (at < 0) return linear(profile, pieceOf(profile, depth), depth)
  const again = profile.depths[at + 1] === depth ? at + 1 : at
  return (profile.temperatures[at]! + profile.temperatures[again]!) / 2
}

/** Whether the profile jumps at a depth. */
export function jumpsAt({ depths, temperatures }: InitialProfile, depth: number): boolean {
  const at = depths.indexOf(depth)
  return at >= 0 && depths[at + 1] === depth && temperatures[at] !== temperatures[at + 1]
}

/** Slopes of the profile on both sides of a depth, K/m. */
export function slopesAt(
  { depths, temperatures }: InitialProfile,
  depth: number,
): { before: Estimate; after: Estimate } {
  const slope = (k: number): Estimate => {
    const width = depths[k + 1]! - depths[k]!
    const [from, to] = [temperatures[k]!, temperatures[k + 1]!]
    const value = (to - from) / width
    // The temperatures are rounded, and as parts of a difference may be far larger than it.
    const given = (Math.abs(from) + Math.abs(to)) / width
    return { value, error: EPS * (8 * Math.abs(value) + given), method: 'closed-form' }
  }
  const pieces = depths.slice(1).flatMap((to, k) => (to > depths[k]! ? [k] : []))
  const before = pieces.findLast((k) => depths[k]! < depth) ?? pieces[0]!
  const after = pieces.find((k) => depths[k + 1]! > depth) ?? pieces.at(-1)!
  return { before: slope(before), after: slope(after) }
}

/** Mean of a profile above a reference. */
export function meanOf({ depths, temperatures }: InitialProfile, length: number, reference: number): number {
  return depths.slice(1).reduce((sum, to, k) => {
    const middle = (temperatures[k]! - reference + (temperatures[k + 1]! - reference)) / 2
    return sum + ((to - depths[k]!) / length) * middle
  }, 0)
}

/** The temperatures just inside the two faces: a jump at a face itself holds no heat. */
export function startAtFaces(profile: InitialProfile): { first: number; last: number } {
  const { temperatures } = withoutEdges(profile)
  return { first: temperatures[0]!, last: temperatures.at(-1)! }
}
