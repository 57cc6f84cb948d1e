import { gauss } from './gauss.ts'
import { EPS } from './rounding.ts'

/*
 * What a half space is left with after a drive that acted from 0 to d: the response at t less that at t − d. Long after
 * the two are nearly alike, and their difference is taken as the integral of the rate between them.
 *
 *   G(t) − G(t − d) = t·∫ G′(tv) dv,   v from 1 − d/t to 1
 */

/** e^(−η²) underflows beyond. */
export const FAR = 27.5

export const decayOf = (eta: number): number => (eta >= FAR ? 0 : Math.exp(-eta * eta))

/** A moment after the drive has ended. */
export interface After {
  /** d/t. */
  share: number
  /** x/(2√(at)) and x/(2√(a(t − d))). */
  eta: number
  etaSince: number
  /** √(t − d). */
  rootSince: number
  /** η as small as the rounding of t and d may make etaSince. */
  etaLeast: number
  /** What that rounding moves √(t − d) by at most. */
  rootSlack: number
  /** And t − d itself. */
  slack: number
}

export function afterPulse(time: number, duration: number, depth: number, rootDiffusivity: number): After {
  const since = time - duration
  const slack = 1.5 * EPS * (time + duration)
  const etaAt = (t: number) => (t > 0 ? Math.min(FAR, depth / (2 * rootDiffusivity * Math.sqrt(t))) : FAR)
  return {
    share: duration / time,
    eta: etaAt(time),
    etaSince: depth === 0 ? 0 : etaAt(since),
    rootSince: Math.sqrt(since),
    etaLeast: etaAt(since + slack),
    rootSlack: Math.sqrt(since + slack) - Math.sqrt(Math.max(0, since - slack)),
    slack,
  }
}

/** Whether the rate changes so little between the two moments that a rule of few points has all its digits. */
export function isSmooth({ share, eta }: After): boolean {
  return share < 0.5 && eta * eta * share <= 1 - share
}

/** ∫ kernel(v)·e^(−η²(1/v − 1)) dv from 1 − share to 1. Relative error of a smooth one 20ε beside the kernel's own. */
export function overPulse({ share, eta }: After, kernel: (v: number) => number): number {
  const square = eta * eta
  return gauss((v) => kernel(v) * Math.exp((square * (v - 1)) / v), 1 - share, share)
}

/** Largest relative error of a response with e^(−η²): η carries the rounding of up to eight inputs and operations. */
export const responseError = (eta: number): number => EPS * (120 + 17 * Math.min(eta, FAR) ** 2)

/** Where e^(−η²) has lost its digits, and its size is all that is known. */
export const leastError = (eta: number): number => (eta > 26.5 ? 1e-305 : 0)
