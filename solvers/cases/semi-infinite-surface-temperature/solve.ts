import erf from '@stdlib/math-base-special-erf'
import erfcx from '@stdlib/math-base-special-erfcx'
import { EPS, type Estimate, TINY } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import type { Solution } from '../../solution.ts'
import { exactly, type StepResponse, stepOutputs } from '../../bodies/step-response.ts'

export interface HalfSpaceInput {
  conductivity: number
  diffusivity: number
  effusivity: number
  initialTemperature: number
  surfaceTemperature: number
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

const SQRT_PI = 1.772453850905516

/**
 * Half space at one temperature whose surface is held at another from time 0 on.
 *
 *   T = Tₛ + (Tᵢ − Tₛ)·erf(η),   η = x/(2√(at))
 *   q = e(Tₛ − Tᵢ)/√(πt)·e^(−η²),   Q = 2e(Tₛ − Tᵢ)·√(t/π),   e = √(kρc)
 *
 * Shapes    depths: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; heat per m2.
 * Domain    k, a > 0;  depth ≥ 0;  t ≥ 0, fluxes at the surface t > 0.
 * Accuracy  temperatures 1e-12·|Tₛ − Tᵢ| beside the rounding of inputs and result; fractions, fluxes and heats
 *           relative (24 + 17η²)ε. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §2.4.
 */
export function solve(input: HalfSpaceInput): Solution {
  const { initialTemperature, surfaceTemperature, times, depths, outputs } = input
  const step = { times, places: depths.length, outputs, initial: initialTemperature, drive: surfaceTemperature }
  return { ...stepOutputs(step, responseOf(input)), terms: 0, scale: Math.abs(surfaceTemperature - initialTemperature) }
}

const closed = (value: number, relative: number): Estimate => ({
  value,
  error: relative * value + TINY,
  method: 'closed-form',
})

function responseOf(input: HalfSpaceInput): StepResponse {
  const { diffusivity: a, effusivity: e, times, depths } = input
  const started = (i: number) => times[i]! > 0
  // √a·√t, since a·t can vanish. Beyond 27.5 e^(−η²) underflows.
  const eta = (i: number, j: number) => Math.min(27.5, depths[j]! / (2 * Math.sqrt(a) * Math.sqrt(times[i]!)))
  const decay = (n: number) => (n === 27.5 ? 0 : Math.exp(-n * n))
  const relative = (n: number) => EPS * (24 + 17 * n * n)
  const completed = (i: number, j: number) =>
    started(i) ? closed(decay(eta(i, j)) * erfcx(eta(i, j)), relative(eta(i, j))) : exactly(0)
  const surface = (i: number) => e / (SQRT_PI * Math.sqrt(times[i]!))
  return {
    share: (i, j) => ({ ...completed(i, j), of: 'completed' }),
    completed,
    remaining: (i, j) => (started(i) ? closed(erf(eta(i, j)), 14 * EPS) : exactly(1)),
    flux: (i, j) => (started(i) ? closed(surface(i) * decay(eta(i, j)), relative(eta(i, j))) : exactly(0)),
    surfaceFlux: (i) => closed(surface(i), 12 * EPS),
    heat: (i) => closed((2 * e * Math.sqrt(times[i]!)) / SQRT_PI, 12 * EPS),
  }
}
