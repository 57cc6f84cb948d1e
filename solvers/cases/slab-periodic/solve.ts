import { constant, fieldOutputs, grid, history, profile } from '../../bodies/field-outputs.ts'
import { type Cycle, phaseAt, waveAt } from '../../math/cycle-phase.ts'
import { EPS, type Estimate, TINY } from '../../math/rounding.ts'
import { fluxInCycle, type Follower, temperatureInCycle, throughFilm } from '../../math/slab-cycle.ts'
import type { OutputName } from '../../outputs.ts'
import type { Solution } from '../../solution.ts'

export interface SlabCycleInput {
  conductivity: number
  diffusivity: number
  thickness: number
  exposedFaces: 1 | 2
  cycle: Cycle
  /** Absent where the face itself follows the cycle. */
  filmCoefficient?: number
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

/** √(aP/π). */
export const dampingOf = ({ diffusivity, cycle }: Pick<SlabCycleInput, 'diffusivity' | 'cycle'>): number =>
  Math.sqrt(diffusivity / Math.PI) * Math.sqrt(cycle.period)

const ROUNDING = 40 * EPS

/**
 * Slab whose exposed faces, one or both alike, follow a cosine long after it began, or lie in a fluid that does.
 *
 *   T = Tₘ + A·Re[g·cosh((1 + i)y/δ)/cosh((1 + i)L/δ)·e^(iφ)],   δ = √(aP/π),  L = thickness/exposedFaces,  y = L − depth
 *   Y = (1 + i)(k/δ)·tanh((1 + i)L/δ),   g = 1/(1 + Y/h),   admittance |gY|,   areal heat capacity P/2π·|gY|
 *
 * by decaying exponentials only, so that a body of any thickness is answered.
 *
 * Shapes    depths: n, from the exposed face;  times: m;  grids have m rows of n; amplitude and time lag have n numbers.
 * Units     SI, temperatures in °C; admittance and capacity per m2 of one exposed face.
 * Domain    k, a, P, thickness > 0;  h ≥ 0;  A ≥ 0;  0 ≤ depth ≤ thickness;  times of any sign.
 * Accuracy  temperatures 1e-12·A beside the rounding of inputs and result; amplitude, admittance and capacity relative
 *           (40 + 8x/δ)ε; lags and leads 40ε of the period and of themselves; fluxes as much of the flux at the face. Far from the
 *           clock's zero the rounding of the times themselves is most of it, and counted. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.6.
 */
export function solve(input: SlabCycleInput): Solution {
  const { conductivity: k, thickness, exposedFaces, cycle, depths, times, outputs } = input
  const { amplitude: A, cycleMean, period, sign } = cycle
  const damping = dampingOf(input)
  const length = thickness / exposedFaces
  const phi = length / damping
  const bare = fluxInCycle(0, phi, phi)
  const { face, flux } = throughFilm({ ...bare, gain: (bare.gain * k) / damping }, input.filmCoefficient ?? Infinity)
  const places = depths.map((depth) => {
    const behind = exposedFaces === 2 && depth > thickness / 2
    const near = behind ? thickness - depth : depth
    const x = near / damping
    const y = Math.max(0, length - near) / damping
    return { x, y, behind, own: temperatureInCycle(x, y, phi), flow: fluxInCycle(x, y, phi) }
  })
  const phases = times.map((time) => phaseAt(time, cycle))
  /** Of e^(−x) and of angles the rounding grows with the depth; a place behind the mid-plane keeps that of the thickness. */
  const slackOf = (x: number) => ROUNDING + 8 * EPS * (x + Math.min(1, x) * phi)
  const wave = (i: number, size: number, lag: number, x: number): Estimate => {
    const turned = waveAt(phases[i]!, lag, slackOf(x) + 8 * EPS * Math.abs(lag))
    const error = Math.abs(size) * (turned.error + slackOf(x) * (Math.abs(turned.value) + 0.1))
    return { value: sign * size * turned.value, error: error + TINY, method: 'closed-form' }
  }
  const sized = (value: number, x = 0): Estimate => ({
    value,
    error: Math.abs(value) * slackOf(x) + (x > 600 ? TINY : 0),
    method: 'closed-form',
  })
  const turn = (angle: number, x = 0): Estimate => ({
    value: (angle / (2 * Math.PI)) * period,
    error: (period / (2 * Math.PI)) * (slackOf(x) + 8 * EPS * Math.abs(angle)),
    method: 'closed-form',
  })
  const through = ({ gain, lag }: Follower): Follower => ({ gain: face.gain * gain, lag: face.lag + lag })
  const fields = {
    temperature: grid((i, j) => {
      const { x, own } = places[j]!
      const { gain, lag } = through(own)
      const { value, error, method } = wave(i, A * gain, lag, x)
      return { value: cycleMean + value, error: error + EPS * Math.abs(cycleMean), method }
    }),
    heatFlux: grid((i, j) => {
      const { x, behind, flow } = places[j]!
      const { gain, lag } = through(flow)
      const local = wave(i, ((A * k) / damping) * gain, lag, x)
      return behind ? { ...local, value: -local.value } : local
    }),
    surfaceHeatFlux: history((i) => wave(i, A * flux.gain, flux.lag, 0)),
    amplitude: profile((j) => sized(A * through(places[j]!.own).gain, places[j]!.x), 'relative'),
    timeLag: profile((j) => turn(through(places[j]!.own).lag, places[j]!.x)),
    admittance: constant(() => sized(flux.gain), 'relative'),
    admittanceTimeLead: constant(() => turn(-flux.lag)),
    arealHeatCapacity: constant(() => sized((period / (2 * Math.PI)) * flux.gain), 'relative'),
  }
  return { ...fieldOutputs({ times, places: depths.length, outputs }, fields), terms: 0, scale: A }
}
