import { type PeriodicInput, solvePeriodic } from '../../bodies/periodic-half-space.ts'
import type { Solution } from '../../solution.ts'

/**
 * Half space whose surface temperature follows a cosine, long after it began.
 *
 *   T = Tₘ + A·e^(−X)·cos(ω(t − t₊) − X),   q = A·e·√ω·e^(−X)·cos(ω(t − t₊) − X + π/4)
 *   X = x/δ,   δ = √(aP/π),   ω = 2π/P,   heat in each half cycle A·e·√(2P/π)
 *
 * Shapes    depths: n;  times: m;  grids have m rows of n; amplitude and time lag have n numbers.
 * Units     SI, temperatures in °C; heat per m2.
 * Domain    k, a, P > 0;  A ≥ 0;  depth ≥ 0;  times of any sign.
 * Accuracy  temperatures 1e-12·A beside the rounding of inputs and result; amplitude, lag, depth and heat relative
 *           (16 + 8X)ε; fluxes as much of the flux at the surface. Far from the clock's zero the rounding of the times
 *           themselves is most of it, and counted. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §2.6.
 */
export function solve(input: PeriodicInput): Solution {
  const fluxGain = input.effusivity * Math.sqrt((2 * Math.PI) / input.cycle.period)
  return solvePeriodic(input, { gain: 1, lag: 0, fluxGain })
}
