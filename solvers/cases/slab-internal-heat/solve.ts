import { grid, history } from '../../bodies/field-outputs.ts'
import { profileOf, type Start } from '../../statement/initial-profile.ts'
import { EPS, type Estimate } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import type { Side } from '../../statement/side.ts'
import type { Solution } from '../../solution.ts'
import type { TwoSidedProblem } from '../../bodies/two-sided.ts'
import { solveTwoSided } from '../../bodies/two-sided-outputs.ts'
import { latestOf } from '../../math/latest.ts'

export type HeatSource =
  | { kind: 'constant'; powerDensity: number }
  | { kind: 'hydration'; adiabaticRise: number; timeConstant: number; elapsed?: number | undefined }

export type InternalHeatInput = Start & {
  conductivity: number
  volumetricHeatCapacity: number
  diffusivity: number
  thickness: number
  exposedFaces: 1 | 2
  filmCoefficient: number
  ambientTemperature: number
  source: HeatSource
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

/** Half the thickness when both faces are exposed, all of it when one is. */
export const lengthOf = ({ thickness, exposedFaces }: InternalHeatInput): number => thickness / exposedFaces

/** A uniform body with two exposed faces is solved to its mid-plane; one with a profile may differ on both sides of it. */
export const isFolded = (input: InternalHeatInput): boolean => input.exposedFaces === 2 && !('initialProfile' in input)

export function problemOf(input: InternalHeatInput): TwoSidedProblem {
  const { thickness, exposedFaces, depths, filmCoefficient, ambientTemperature } = input
  const folded = isFolded(input)
  const film: Side = { kind: 'convection', filmCoefficient, ambientTemperature }
  return {
    ...input,
    length: folded ? thickness / 2 : thickness,
    depths: folded ? depths.map((depth) => (depth > thickness / 2 ? thickness - depth : depth)) : depths,
    mirrored: depths.map((depth) => folded && depth > thickness / 2),
    left: film,
    right: exposedFaces === 2 && !folded ? film : { kind: 'insulated' },
    start: input,
    source: sourceOf(input),
  }
}

function sourceOf({ source, volumetricHeatCapacity }: InternalHeatInput): NonNullable<TwoSidedProblem['source']> {
  if (source.kind === 'constant') return { rate: source.powerDensity / volumetricHeatCapacity }
  return { rate: riseLeft(source) / source.timeConstant, timeConstant: source.timeConstant }
}

/** Adiabatic rise that is still to come at time 0. */
export function riseLeft(source: Extract<HeatSource, { kind: 'hydration' }>): number {
  return source.adiabaticRise * Math.exp(-(source.elapsed ?? 0) / source.timeConstant)
}

/** Heat given off since time 0, J/m3. */
export function releasedBy({ source, volumetricHeatCapacity }: InternalHeatInput, time: number): number {
  if (source.kind === 'constant') return source.powerDensity * time
  return volumetricHeatCapacity * riseLeft(source) * -Math.expm1(-time / source.timeConstant)
}

/**
 * Slab that is heated from within, evenly: by a constant power, or by a heat of hydration that dies out; its exposed faces, one or both
 * alike, lie in a fluid.
 *
 *   constant:   θ₊ = (p L²/k)·[1/Bi + (1 − X²)/2] as end state
 *   hydration:  source ρc·(ΔT/τ)·e^(−t/τ), whatever the temperature
 *   T = Tₐ + quasi-steady part·e^(−t/τ) + Σ cₙ cos(zₙX)·e^(−zₙ²Fo),   zₙ tan zₙ = Bi = hL/k,  Fo = at/L²,  L = thickness/exposedFaces
 *
 * The mode whose zₙ²a/L² is nearest to 1/τ is kept out of the quasi-steady part, and answered by the difference of two decays over the
 * difference of their rates, which has a limit. Below Fo 0.1 by the Laplace transform.
 *
 * Shapes    depths: n, from the exposed face;  times: m;  grids have m rows of n;  steady temperature n.
 * Units     SI, temperatures in °C; heat per m2 of one exposed face.
 * Domain    k, ρc, a, thickness, τ > 0;  h, ΔT, elapsed ≥ 0;  power of any sign;  0 ≤ depth ≤ thickness;  t ≥ 0. Fo 0..1e38.
 * Accuracy  temperatures 1e-12 of the difference and the largest rise beside the rounding of inputs and result; fluxes and heat
 *           1e-11 of the largest that one drive does. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.14 and §12.5.
 */
export function solve(input: InternalHeatInput): Solution {
  const problem = problemOf(input)
  const { thickness, depths, times } = input
  const length = lengthOf(input)
  const behind = depths.map((depth) => isFolded(input) && depth > thickness / 2)
  // Of a body that is solved whole, heat is told for one of its two faces.
  const share = length / problem.length
  const part = (e: Estimate): Estimate => ({ ...e, value: share * e.value, error: share * e.error })
  return solveTwoSided(problem, input.outputs, scaleOf(input), (slab) => ({
    heatFlux: grid((i, j) => {
      const flux = slab.at(i).flux(j)
      return behind[j] ? { ...flux, value: -flux.value } : flux
    }),
    heatGained: history((i) => part(slab.at(i).heat()), slab.drives() <= 1 ? 'relative' : 'absolute'),
    heatReleased: history((i): Estimate => {
      const value = releasedBy(input, times[i]!) * length
      const elapsed = input.source.kind === 'hydration' ? (input.source.elapsed ?? 0) / input.source.timeConstant : 0
      return { value, error: EPS * (16 + 4 * elapsed) * Math.abs(value), method: 'closed-form' }
    }, 'relative'),
  }))
}

/** Spread of the temperatures and the largest rise. */
export function scaleOf(input: InternalHeatInput): number {
  const { source, conductivity: k, volumetricHeatCapacity: C, filmCoefficient: h, ambientTemperature, times } = input
  const length = lengthOf(input)
  const given = [...profileOf(input, input.thickness).temperatures, ambientTemperature]
  const spread =
    given.reduce((most, T) => Math.max(most, T), -Infinity) - given.reduce((least, T) => Math.min(least, T), Infinity)
  if (source.kind === 'hydration') return spread + source.adiabaticRise
  const power = Math.abs(source.powerDensity)
  const longest = latestOf(times)
  const settled = h === 0 ? Infinity : ((power * length) / k) * (length / 2) + (power * length) / h
  return spread + Math.min(settled, (power * longest) / C)
}
