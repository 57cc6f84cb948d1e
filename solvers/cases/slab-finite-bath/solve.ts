import { constant, fieldOutputs, grid, history } from '../../bodies/field-outputs.ts'
import { BathSlab, type BathValues } from '../../math/bath-slab.ts'
import { EPS, type Estimate } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import type { Solution } from '../../solution.ts'
import { exactly, scaled } from '../../bodies/step-response.ts'

export interface BathInput {
  conductivity: number
  volumetricHeatCapacity: number
  diffusivity: number
  thickness: number
  exposedFaces: 1 | 2
  initialTemperature: number
  bathTemperature: number
  bathHeatCapacity: number
  /** Absent where the face is at the temperature of the bath. */
  filmCoefficient?: number
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

/** Half the thickness when both faces are exposed, all of it when one is. */
export const bathLength = ({ thickness, exposedFaces }: BathInput): number => thickness / exposedFaces

/** Capacity of the bath over that of the body. */
export const ratioOf = (input: BathInput): number =>
  input.bathHeatCapacity / (input.volumetricHeatCapacity * bathLength(input))

export const biotOf = (input: BathInput): number =>
  ((input.filmCoefficient ?? Infinity) * bathLength(input)) / input.conductivity

/**
 * Slab at one temperature whose exposed faces, one or both alike, are dipped into a stirred bath of finite heat capacity.
 *
 *   T∞ = (γT_b + Tᵢ)/(1 + γ),   γ = capacity of the bath over that of the body
 *   T = T∞ + (T_b − Tᵢ)·Σ (−1)ⁿ(2γρ/E)·cos(q(1 − X))·e^(−q²Fo),   tan q = γq·Bi/(γq² − Bi),  Fo = at/L²,  X = depth/L
 *   ρ² = (γq)² + (1 − γq²/Bi)²,   E = γ + γ²q²/Bi + ρ²;   heat fraction 1 − Σ (2γ(1 + γ)/E)·e^(−q²Fo)
 *
 * and, until the slowest mode has fallen to 1/e, by the Laplace transform.
 *
 * Shapes    depths: n, from the exposed face;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; heat and bath capacity per m2 of one exposed face.
 * Domain    k, ρc, a, thickness, bath capacity > 0;  h ≥ 0;  0 ≤ depth ≤ thickness;  t ≥ 0.
 * Accuracy  temperatures 1e-12·|T_b − Tᵢ| beside the rounding of inputs and result; flux at the face, heat and heat fraction
 *           1e-11 relative. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    J. Crank, The Mathematics of Diffusion, 2nd ed. 1975, §4.3.5, with a film added.
 */
export function solve(input: BathInput): Solution {
  const { conductivity: k, volumetricHeatCapacity: C, diffusivity, thickness, exposedFaces, depths, times } = input
  const { initialTemperature: Ti, bathTemperature: Tb, filmCoefficient } = input
  const difference = Tb - Ti
  const length = bathLength(input)
  const gamma = ratioOf(input)
  const slab = filmCoefficient === 0 ? undefined : new BathSlab({ gamma, biot: biotOf(input) })
  const moments = times.map((time) => ({
    root: (Math.sqrt(diffusivity) * Math.sqrt(time)) / length,
    fourier: (diffusivity / (length * length)) * time,
  }))
  let last: { i: number; values: BathValues | undefined } | undefined
  const at = (i: number): BathValues | undefined => {
    if (last?.i !== i) last = { i, values: times[i] === 0 ? undefined : slab?.at(moments[i]!) }
    return last.values
  }
  const places = depths.map((depth) => {
    const behind = exposedFaces === 2 && depth > thickness / 2
    const near = behind ? thickness - depth : depth
    return { near: near / length, far: Math.max(0, length - near) / length, behind }
  })
  /** By the share of the difference: what the rounding of the two temperatures moves is no more than that of either. */
  const between = (share: Estimate): Estimate => ({
    value: Ti + difference * share.value,
    error: Math.abs(difference) * (share.error + 4 * EPS) + EPS * (Math.abs(Ti) + Math.abs(Tb)),
    method: share.method,
  })
  const slack = EPS * (Math.abs(Ti) + Math.abs(Tb))
  const driven = (unit: number, e: Estimate): Estimate => {
    const own = scaled(unit * difference, e)
    return { ...own, error: own.error + Math.abs(unit * e.value) * slack }
  }
  /** At time 0 the limit from above; without a film it is infinite, and refused before. */
  const atStart = (share: number) => driven(filmCoefficient ?? 0, exactly(share))
  const fraction = (i: number): Estimate => {
    const values = at(i)
    return values ? scaled((1 + gamma) / gamma, values.gain()) : exactly(0)
  }
  const fields = {
    temperature: grid((i, j) => {
      const { near, far, behind } = places[j]!
      const values = at(i)
      return between(values ? placed(values.temperature(near, far), near, behind, moments[i]!.root) : exactly(0))
    }),
    heatFlux: grid((i, j) => {
      const { near, far, behind } = places[j]!
      const values = at(i)
      const flux = values ? driven(k / length, values.flux(near, far)) : atStart(near === 0 ? 1 : 0)
      return behind ? { ...flux, value: -flux.value } : flux
    }),
    surfaceHeatFlux: history((i) => {
      const values = at(i)
      return values ? driven(k / length, values.surfaceFlux()) : atStart(1)
    }, 'relative'),
    heatGained: history((i) => driven(C * length, at(i)?.gain() ?? exactly(0)), 'relative'),
    meanTemperature: history((i) => between(at(i)?.gain() ?? exactly(0))),
    heatFraction: history((i) => {
      const { value, error, method } = fraction(i)
      return { value: Math.min(1, Math.max(0, value)), error, method }
    }, 'relative'),
    bathTemperature: history((i) => between(at(i)?.bath() ?? exactly(1))),
    equilibriumTemperature: constant(() => between(exactly(slab ? gamma / (1 + gamma) : 0))),
  }
  const terms = moments.reduce((most, m, i) => Math.max(most, times[i]! > 0 && slab ? slab.terms(m) : 0), 0)
  const asked = { times, places: depths.length, outputs: input.outputs }
  return { ...fieldOutputs(asked, fields), terms, scale: Math.abs(difference) }
}

/** A place behind the mid-plane is a difference, and keeps the rounding of the thickness; nothing is steeper than a step of the face. */
function placed(e: Estimate, near: number, behind: boolean, root: number): Estimate {
  if (!behind || near === 0) return e
  const eta = near / (2 * root)
  return { ...e, error: e.error + (8 * EPS * Math.exp(-eta * eta)) / root }
}
