/**
 * A face of a slab of length 1: what it is driven by, and how.
 *
 *   α·g + β·θ = drive,   g the gradient out of the body, α = 1/(1 + Bi), β = Bi/(1 + Bi)
 *
 * so that one law holds for a face that is held (α = 0), behind a film, or given its flux (β = 0).
 */
export interface Face {
  alpha: number
  beta: number
}

export function faceOf(biot: number): Face {
  if (biot === Infinity) return { alpha: 0, beta: 1 }
  return { alpha: 1 / (1 + biot), beta: biot / (1 + biot) }
}

/** A number and what the rounding of what it was made of may move it by, in units of EPS. */
export interface Drive {
  value: number
  slack: number
}

export const idle: Drive = { value: 0, slack: 0 }

/** A piece of the initial profile: linear from one place to another; a jump where both are the same. */
export interface Rise {
  from: number
  to: number
  width: number
  rise: Drive
  /** Temperature at `from`. */
  start: number
}

/** Heat released in the body: size·e^(−rate·Fo), in temperature per Fourier number. */
export interface Source {
  size: number
  rate: number
}

/** Everything that moves the slab, as temperatures above its reference, which is that of the left face at the start. */
export interface Load {
  left: Drive
  right: Drive
  /** From face to face; empty for a slab at one temperature. */
  rises: readonly Rise[]
  source: Source
}

export interface TwoSidedBody {
  left: Face
  right: Face
}

/** Where a value is asked: from the left face and from the right, both as shares of the thickness, and the piece it is in. */
export interface Place {
  near: number
  far: number
  /** Index of the rise that holds the place; 0 where there is none. */
  piece: number
  /** Distance to the ends of the piece. */
  fromStart: number
  toEnd: number
  /** Initial temperature there, above the reference. */
  initial: number
  /** What the distances may be off in units of EPS of the thickness, where they are differences; `fromStart` may be exact. */
  shift: number
}

/** One time: the Fourier number, and its root, which is computed apart since the first can vanish. */
export interface Moment {
  fourier: number
  root: number
}

/** Temperature at the right face at the start. */
export function endOf(load: Load): number {
  const last = load.rises[load.rises.length - 1]
  return last ? last.start + last.rise.value : 0
}

/** Mean of the initial profile. */
export function meanOf(load: Load): number {
  return load.rises.reduce((sum, r) => sum + r.width * (r.start + r.rise.value / 2), 0)
}

/** (1 − e^(−x))/x for x ≥ 0. */
export function meanDecay(x: number): number {
  return x < 1e-300 ? 1 : -Math.expm1(-x) / x
}

/** sin x/x. */
export function sinc(x: number): number {
  return Math.abs(x) < 1e-9 ? 1 : Math.sin(x) / x
}
