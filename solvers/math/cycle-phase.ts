import { EPS } from './rounding.ts'

/** A cosine on a clock: at its highest (or, by sign −1, its lowest) at the instant. */
export interface Cycle {
  cycleMean: number
  amplitude: number
  period: number
  instant: number
  sign: 1 | -1
}

export interface Phase {
  /** 2π(t − instant)/P, less whole turns. */
  angle: number
  /** What the rounding of time, instant and period may turn it by. */
  slack: number
}

/**
 * Phase of a cycle at a time. Both instants are reduced modulo the period before they are subtracted, which is exact; a
 * cosine of the whole angle would lose what the turns have.
 *
 * Shapes    a time.
 * Units     s; radians.
 * Domain    any time and instant; period > 0.
 * Accuracy  the slack: each of the three numbers errs by ε of itself, and the period as often as it has passed.
 * Errors    none.
 * Source    none; the definition.
 */
export function phaseAt(time: number, { period, instant }: Pick<Cycle, 'period' | 'instant'>): Phase {
  const angle = ((2 * Math.PI) / period) * ((time % period) - (instant % period))
  const rounding = ((4 * Math.PI) / period) * (Math.abs(time) + Math.abs(instant))
  return { angle, slack: EPS * (rounding + 6 * Math.abs(angle)) }
}

export interface Wave {
  value: number
  /** What it may be off, at most 2. */
  error: number
}

/** cos(angle − shift), with the error that the slack of both makes. */
export function waveAt({ angle, slack }: Phase, shift = 0, shiftSlack = 0): Wave {
  const turned = angle - shift
  const off = slack + shiftSlack + EPS * (Math.abs(turned) + Math.abs(shift))
  const value = Math.cos(turned)
  return { value, error: Math.min(2, (Math.abs(Math.sin(turned)) + off / 2) * off + 2 * EPS * Math.abs(value)) }
}
