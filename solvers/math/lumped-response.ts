import { type Cycle, phaseAt, waveAt } from './cycle-phase.ts'
import { gauss } from './gauss.ts'
import { EPS, type Estimate, TINY } from './rounding.ts'

/*
 * A body with one temperature, at 0 when a drive of its fluid begins; s = t/τ.
 *
 *   step    1 − e^(−s)
 *   ramp    T/(rt) = 1 − (1 − e^(−s))/s
 *   cosine  y′τ = cos φ − y:   y = [cos(φ − ψ) − e^(−s)·cos(φ₀ − ψ)]/√(1 + W²),   W = ωτ,   tan ψ = W
 *
 * Source    F. P. Incropera, D. P. DeWitt, Fundamentals of Heat and Mass Transfer, ch. 5.3 (from memory), by the integral
 *           of e^(−(t − u)/τ) over what the fluid does.
 */

/** What the fluid does from time 0 on. */
export type Ambient = { kind: 'ramp'; start: number; rampRate: number } | { kind: 'cycle'; cycle: Cycle }

/** Rounding of the inputs and operations in s, at worst those of a corrected sphere. */
export const RATIO_ERROR = 26 * EPS

const closed = (value: number, error: number): Estimate => ({ value, error, method: 'closed-form' })

export function stepShare(s: number): Estimate {
  const value = -Math.expm1(-s)
  return closed(value, value * (RATIO_ERROR + 4 * EPS))
}

/** The share of the fluid's own rise; s/2 for a small s, by its power series where the difference would cancel. */
export function rampShare(s: number): Estimate {
  if (s >= 1) {
    const value = 1 + Math.expm1(-s) / s
    return closed(value, value * (RATIO_ERROR + 12 * EPS))
  }
  let term = s / 2
  let value = term
  for (let n = 2; n < 24 && Math.abs(term) > EPS * value; n++) {
    term *= -s / (n + 1)
    value += term
  }
  return closed(value, value * (RATIO_ERROR + 12 * EPS))
}

/** What a cosine of amplitude 1 has done to the body, τ the time constant. */
export function cosineShare(time: number, s: number, cycle: Cycle, tau: number): Estimate {
  if (s === 0) return closed(0, 0)
  const start = phaseAt(0, cycle)
  const turned = ((2 * Math.PI) / cycle.period) * time
  if (s <= 1 && turned <= 1) return early(s, turned, start)
  const W = ((2 * Math.PI) / cycle.period) * tau
  const size = 1 / Math.hypot(1, W)
  const lag = Math.atan(W)
  const lagSlack = EPS * (2 + (40 * W) / (1 + W * W))
  const now = waveAt(phaseAt(time, cycle), lag, lagSlack)
  const before = waveAt(start, lag, lagSlack)
  const left = Math.exp(-s)
  const error =
    now.error +
    left * (before.error + (RATIO_ERROR * s + 4 * EPS) * Math.abs(before.value)) +
    40 * EPS * Math.abs(now.value)
  return closed(size * (now.value - left * before.value), size * (error + 40 * EPS * left) + TINY)
}

/** s·∫ cos(φ₀ + θw)·e^(−s(1 − w)) dw from 0 to 1, its two parts apart: both have one sign. */
function early(s: number, turned: number, start: { angle: number; slack: number }): Estimate {
  const even = s * gauss((w) => Math.cos(turned * w) * Math.exp(-s * (1 - w)), 0, 1)
  const odd = s * gauss((w) => Math.sin(turned * w) * Math.exp(-s * (1 - w)), 0, 1)
  const cos = waveAt(start)
  const sin = waveAt(start, Math.PI / 2)
  const value = cos.value * even - sin.value * odd
  const relative = 4 * RATIO_ERROR
  const error = even * (cos.error + relative * Math.abs(cos.value)) + odd * (sin.error + relative * Math.abs(sin.value))
  return closed(value, error)
}

/** The lowest and highest that a cosine reaches between time 0 and a time, over its amplitude. */
export function rangeSoFar(time: number, cycle: Cycle): { lowest: number; highest: number } {
  if (time >= cycle.period) return { lowest: -1, highest: 1 }
  const from = phaseAt(0, cycle).angle
  const to = from + ((2 * Math.PI) / cycle.period) * time
  const passes = (angle: number) =>
    Math.floor((to - angle) / (2 * Math.PI)) > Math.floor((from - angle) / (2 * Math.PI))
  const ends = [Math.cos(from), Math.cos(to)]
  const lowest = passes(Math.PI) ? -1 : Math.min(...ends)
  const highest = passes(0) ? 1 : Math.max(...ends)
  return cycle.sign === 1 ? { lowest, highest } : { lowest: -highest, highest: -lowest }
}
