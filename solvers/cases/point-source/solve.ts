import erfcx from '@stdlib/math-base-special-erfcx'
import { fieldOutputs, grid } from '../../bodies/field-outputs.ts'
import { decayOf, FAR, leastError, responseError } from '../../math/half-space-pulse.ts'
import { EPS, type Estimate } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import type { Solution } from '../../solution.ts'
import { exactly } from '../../bodies/step-response.ts'

export interface PointSourceInput {
  conductivity: number
  volumetricHeatCapacity: number
  diffusivity: number
  /** W from time 0 on; or energy. */
  power?: number
  /** J at time 0. */
  energy?: number
  initialTemperature: number
  radii: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

const SQRT_PI = 1.772453850905516
/** (3/(2πe))^1.5: the largest of (η/√π)³·e^(−η²), at η² = 3/2. */
const PEAK = 0.0736156848474257

/**
 * Endless medium at one temperature in which a point releases heat evenly from time 0 on, or all at once at time 0.
 *
 *   power P:   T = Tᵢ + P/(4πkr)·erfc(η),   q = P/(4πr²)·[erfc(η) + (2/√π)·η·e^(−η²)],   η = r/(2√(at))
 *   energy E:  T = Tᵢ + E/(Cr³)·(η/√π)³·e^(−η²),   q = 2kη²/r·(T − Tᵢ)
 *
 * Shapes    radii: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; fluxes positive outward.
 * Domain    k, a, C, r > 0;  t ≥ 0;  P or E of any sign.
 * Accuracy  temperatures 1e-12·|P|/(4πkr), or 1e-12 of the largest rise that E ever causes there, beside the rounding of
 *           inputs and result; fluxes relative (140 + 17η²)ε. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §10.2, §10.4.
 */
export function solve(input: PointSourceInput): Solution {
  const { diffusivity: a, initialTemperature, radii, times, outputs } = input
  const eta = (i: number, j: number) => Math.min(FAR, radii[j]! / (2 * Math.sqrt(a) * Math.sqrt(times[i]!)))
  const { rise, flux, largest } = input.energy === undefined ? steady(input, input.power!) : dose(input, input.energy)
  const started = (at: typeof rise) => (i: number, j: number) =>
    times[i] === 0 ? exactly(0) : at(eta(i, j), radii[j]!)
  const riseAt = started(rise)
  const fields = {
    temperature: grid((i, j) => {
      const { value, error, method } = riseAt(i, j)
      return { value: initialTemperature + value, error: error + EPS * Math.abs(initialTemperature), method }
    }),
    heatFlux: grid(started(flux), 'relative'),
  }
  const nearest = radii.reduce((least, r) => Math.min(least, r), Infinity)
  return { ...fieldOutputs({ times, places: radii.length, outputs }, fields), terms: 0, scale: largest(nearest) }
}

interface Around {
  rise(eta: number, radius: number): Estimate
  flux(eta: number, radius: number): Estimate
  /** Largest rise at a radius, at any time. */
  largest(radius: number): number
}

const closed = (size: number, share: number, eta: number): Estimate => ({
  value: size * share,
  error: Math.abs(size) * (share * (responseError(eta) + 20 * EPS) + leastError(eta)),
  method: 'closed-form',
})

function steady({ conductivity: k }: PointSourceInput, power: number): Around {
  const unit = power / (4 * Math.PI)
  return {
    rise: (eta, r) => closed(unit / k / r, decayOf(eta) * erfcx(eta), eta),
    flux: (eta, r) => closed(unit / r / r, decayOf(eta) * (erfcx(eta) + (2 / SQRT_PI) * eta), eta),
    largest: (r) => Math.abs(unit) / k / r,
  }
}

function dose({ conductivity: k, volumetricHeatCapacity: C }: PointSourceInput, energy: number): Around {
  const unit = (r: number) => energy / C / (r * r * r)
  const share = (eta: number) => decayOf(eta) * (eta / SQRT_PI) ** 3
  return {
    rise: (eta, r) => closed(unit(r), share(eta), eta),
    flux: (eta, r) => closed(((2 * k) / r) * unit(r), eta * eta * share(eta), eta),
    largest: (r) => Math.abs(unit(r)) * PEAK,
  }
}
