import { fieldOutputs, grid, history } from '../../bodies/field-outputs.ts'
import { etaOf, rampAfter, rampDuring, rootAfter, rootAfterAtFace, rootDuring } from '../../math/half-space-drives.ts'
import { afterPulse } from '../../math/half-space-pulse.ts'
import { EPS, type Estimate } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import type { Solution } from '../../solution.ts'
import { exactly, scaled } from '../../bodies/step-response.ts'

export interface HalfSpaceInput {
  conductivity: number
  diffusivity: number
  effusivity: number
  /** K/s, of any sign. */
  rampRate: number
  /** Absent where the ramp never ends. */
  rampDuration?: number
  initialTemperature: number
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

const SQRT_PI = 1.772453850905516

/**
 * Half space at one temperature whose surface temperature rises evenly from time 0 on, for ever or for a while; after
 * that it is held.
 *
 *   T = Tᵢ + r·4t·i²erfc(η),   q = r·e·2√t·ierfc(η),   Q = (4/3)·r·e·t·√(t/π),   η = x/(2√(at)),   e = √(kρc)
 *   after the ramp: each at t less each at t − d
 *
 * Shapes    depths: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; heat per m2.
 * Domain    k, a > 0;  depth ≥ 0;  t ≥ 0;  rate of any sign;  d > 0.
 * Accuracy  temperatures 1e-12·|r|·min(t, d) beside the rounding of inputs and result; fluxes and heats relative
 *           (130 + 17η²)ε, after the ramp too, however long after. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §2.5.
 */
export function solve(input: HalfSpaceInput): Solution {
  const { diffusivity, effusivity: e, rampRate: r, initialTemperature, depths, times, outputs } = input
  const duration = input.rampDuration ?? Infinity
  const rootDiffusivity = Math.sqrt(diffusivity)
  const roots = times.map(Math.sqrt) // √a·√t, since a·t can vanish
  const eta = (i: number, j: number) => etaOf(depths[j]!, rootDiffusivity, roots[i]!)
  const after = (i: number, depth: number) => afterPulse(times[i]!, duration, depth, rootDiffusivity)
  const rise = (i: number, j: number): Estimate => {
    if (times[i] === 0) return exactly(0)
    const ramp = times[i]! > duration ? rampAfter(after(i, depths[j]!), times[i]!) : rampDuring(eta(i, j), times[i]!)
    return scaled(r, ramp)
  }
  const flux = (i: number, j: number): Estimate => {
    if (times[i] === 0) return exactly(0)
    const root = times[i]! > duration ? rootAfter(after(i, depths[j]!), roots[i]!) : rootDuring(eta(i, j), roots[i]!)
    return scaled(r * e, root)
  }
  const surfaceFlux = (i: number): Estimate => {
    const ended = times[i]! > duration
    return scaled(r * e, ended ? rootAfterAtFace(after(i, 0), duration, roots[i]!) : rootDuring(0, roots[i]!))
  }
  const fields = {
    temperature: grid((i, j) => {
      const { value, error, method } = rise(i, j)
      return { value: initialTemperature + value, error: error + EPS * Math.abs(initialTemperature), method }
    }),
    heatFlux: grid(flux, 'relative'),
    surfaceHeatFlux: history(surfaceFlux, 'relative'),
    heatGained: history((i) => heat(input, times[i]!, duration), 'relative'),
  }
  const longest = times.reduce((most, t) => Math.max(most, Math.min(t, duration)), 0)
  const scale = Math.abs(r) * longest
  return { ...fieldOutputs({ times, places: depths.length, outputs }, fields), terms: 0, scale }
}

/** (4/3)·r·e/√π·(t√t − (t − d)√(t − d)); the difference of two cubes, divided out. */
function heat({ rampRate: r, effusivity: e }: HalfSpaceInput, time: number, duration: number): Estimate {
  const factor = (4 / 3 / SQRT_PI) * r * e
  const root = Math.sqrt(time)
  if (time <= duration) return scaled(factor, exactly(time * root))
  const { rootSince, rootSlack } = afterPulse(time, duration, 0, 1)
  const sum = root + rootSince
  const value = (duration / sum) * (time + root * rootSince + rootSince * rootSince)
  // The slope of √(t − d) in this is at most 3/sum of it.
  return scaled(factor, { value, error: value * (24 * EPS + (3 * rootSlack) / sum), method: 'closed-form' })
}
