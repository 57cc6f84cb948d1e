import { extrapolated, type Slope } from './extrapolate.ts'
import { EPS } from './math/rounding.ts'

/** Halvings of the first step. */
const LEVELS = 6

/** Values asked for each slope: what a slope costs against a value. */
export const SLOPE_COST = 2 * LEVELS

/**
 * The times at which a history must be known for its slopes, and the slopes that follow.
 *
 *   D(H) = [T(t + H) − T(t − H)]/(2H),   H = H₀·2^(−n),   extrapolated to a vanishing step
 *
 * Shapes    n times; 12 n times asked; n slopes from 12 n values.
 * Units     those of the history over seconds.
 * Domain    each time inside an interval in which the history is smooth, with H₀ inside that interval.
 * Accuracy  about 1e-11 of the change over the first step, over that step; each slope says its error.
 * Errors    none.
 * Source    L. F. Richardson, The approximate arithmetical solution by finite differences, Phil. Trans. A 210 (1911).
 */
export function stencilOf(times: readonly number[], firstStepOf: (t: number) => number) {
  const firsts = times.map(firstStepOf)
  const asked = times.flatMap((t, i) => levels.flatMap((n) => [t - firsts[i]! * 2 ** -n, t + firsts[i]! * 2 ** -n]))
  const slope = (i: number, valueAt: (k: number) => number, error: number): Slope => {
    const differences = levels.map((n) => {
      const k = 2 * (i * LEVELS + n)
      const width = asked[k + 1]! - asked[k]!
      const value = (valueAt(k + 1) - valueAt(k)) / width
      // The two times are rounded themselves, which moves their distance.
      return { value, error: (2 * error + 4 * EPS * Math.abs(times[i]! * value)) / width }
    })
    const told = differences.filter((d) => Number.isFinite(d.value) && Number.isFinite(d.error))
    // Where times are so small that nothing can be told, the bound says so.
    return told.length === 0 ? { value: 0, error: Number.MAX_VALUE } : extrapolated(told, 4)
  }
  return { asked, slope }
}

const levels = Array.from({ length: LEVELS }, (_, n) => n)
