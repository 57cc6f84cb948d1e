import { dampingDepthOf, type PeriodicInput, solvePeriodic } from '../../bodies/periodic-half-space.ts'
import type { Solution } from '../../solution.ts'

export interface AmbientInput extends PeriodicInput {
  filmCoefficient: number
}

/**
 * Half space whose ambient temperature follows a cosine, long after it began.
 *
 *   T = Tₘ + A·g·e^(−X)·cos(ω(t − t₊) − ψ − X),   g·e^(−iψ) = 1/(1 + (1 + i)k/(hδ))
 *   with r = hδ/k:   g = r/√((r + 1)² + 1),   tan ψ = 1/(r + 1),   flux of the surface √2·h/√((r + 1)² + 1) per kelvin
 *
 * Shapes    depths: n;  times: m;  grids have m rows of n; amplitude and time lag have n numbers.
 * Units     SI, temperatures in °C; heat per m2.
 * Domain    k, a, P > 0;  h ≥ 0, without division by h;  A ≥ 0;  depth ≥ 0;  times of any sign.
 * Accuracy  temperatures 1e-12·A beside the rounding of inputs and result; amplitude, lag, depth and heat relative
 *           (16 + 8X)ε; fluxes as much of the flux at the surface. Far from the clock's zero the rounding of the times
 *           themselves is most of it, and counted. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §2.8.
 */
export function solve(input: AmbientInput): Solution {
  const { filmCoefficient: h, conductivity: k } = input
  const r = (h / k) * dampingDepthOf(input)
  const size = Math.hypot(r + 1, 1)
  return solvePeriodic(input, { gain: r / size, lag: Math.atan2(1, r + 1), fluxGain: (Math.SQRT2 * h) / size })
}
