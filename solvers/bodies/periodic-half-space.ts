import type { Check, Numbers } from '../case.ts'
import { type Field, constant, fieldOutputs, grid, history, profile } from './field-outputs.ts'
import { type Cycle, phaseAt, waveAt } from '../math/cycle-phase.ts'
import { EPS, type Estimate, TINY } from '../math/rounding.ts'
import type { OutputName } from '../outputs.ts'
import type { Solution } from '../solution.ts'

/** What the half spaces in a settled cycle share. */
export interface PeriodicInput {
  conductivity: number
  diffusivity: number
  effusivity: number
  cycle: Cycle
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

/** How the surface follows the drive. */
export interface SurfaceResponse {
  /** Amplitude of the surface over that of the drive. */
  gain: number
  /** Angle by which it lags. */
  lag: number
  /** Amplitude of the surface flux per kelvin of the drive, W/(m2.K). */
  fluxGain: number
}

/** √(aP/π). */
export const dampingDepthOf = ({ diffusivity, cycle }: Pick<PeriodicInput, 'diffusivity' | 'cycle'>): number =>
  Math.sqrt(diffusivity / Math.PI) * Math.sqrt(cycle.period)

const ROUNDING = 16 * EPS

/**
 * A half space whose surface follows a cycle:
 *
 *   T = mean + A·gain·e^(−X)·cos(φ − lag − X),   q = A·fluxGain·e^(−X)·cos(φ − lag − X + π/4),   X = x/δ
 */
export function solvePeriodic(input: PeriodicInput, { gain, lag, fluxGain }: SurfaceResponse): Solution {
  const { cycle, depths, times, outputs } = input
  const { amplitude, cycleMean, period, sign } = cycle
  const damping = dampingDepthOf(input)
  const phases = times.map((time) => phaseAt(time, cycle))
  const deep = depths.map((depth) => depth / damping)
  const part = (size: number, i: number, X: number, shift: number): Estimate => {
    const wave = waveAt(phases[i]!, lag + X + shift, EPS * (8 * X + 8 * lag + 2))
    const scale = sign * size * Math.exp(-X)
    const error = Math.abs(scale) * (wave.error + (ROUNDING + 8 * EPS * X) * Math.abs(wave.value))
    return { value: scale * wave.value, error: error + TINY, method: 'closed-form' }
  }
  const sized = (value: number, X = 0): Estimate => ({
    value,
    error: value * (ROUNDING + 8 * EPS * X) + (X > 600 ? TINY : 0),
    method: 'closed-form',
  })
  const fields: Partial<Record<OutputName, Field>> = {
    temperature: grid((i, j) => {
      const { value, error, method } = part(amplitude * gain, i, deep[j]!, 0)
      return { value: cycleMean + value, error: error + EPS * Math.abs(cycleMean), method }
    }),
    heatFlux: grid((i, j) => part(amplitude * fluxGain, i, deep[j]!, -Math.PI / 4)),
    surfaceHeatFlux: history((i) => part(amplitude * fluxGain, i, 0, -Math.PI / 4)),
    amplitude: profile((j) => sized(amplitude * gain * Math.exp(-deep[j]!), deep[j]!), 'relative'),
    timeLag: profile((j) => sized(((lag + deep[j]!) / (2 * Math.PI)) * period), 'relative'),
    dampingDepth: constant(() => sized(damping), 'relative'),
    heatPerHalfCycle: constant(() => sized((amplitude * fluxGain * period) / Math.PI), 'relative'),
  }
  return { ...fieldOutputs({ times, places: depths.length, outputs }, fields), terms: 0, scale: amplitude }
}

/** ln 100: over so many damping depths the amplitude falls to 1 %. */
const TO_A_HUNDREDTH = 4.605170185988092
/**
 * Whole cycles until a start at the mean is forgotten to 1 % of the amplitude of the drive, wherever one looks: what is left after a
 * time t is at most (t·∂u/∂t)/(ωt) of it, u the answer to a step, and t·∂u/∂t is at most 1/√(2πe) = 0.242 at any depth behind any film.
 */
const CYCLES_TO_SETTLE = 4

export const periodicNumbers = (input: Pick<PeriodicInput, 'diffusivity' | 'cycle'>): Numbers => ({
  penetrationDepth: TO_A_HUNDREDTH * dampingDepthOf(input),
  cyclesToSettle: CYCLES_TO_SETTLE,
})

/** Whether the deepest place feels the cycle at all: 1 % of the surface's amplitude is left at 4.6 damping depths. */
export function cycleIsFelt(input: PeriodicInput): Check {
  const limit = TO_A_HUNDREDTH * dampingDepthOf(input)
  const value = input.depths.reduce((most, depth) => Math.max(most, depth), 0)
  const text = 'The deepest position lies where at least 1 % of the amplitude of the surface is left.'
  return { id: 'cycle-is-felt', holds: value <= limit, value, limit, text }
}

const INITIAL = 'A settled cycle has no start: there is no initial temperature to compare with.'

export const periodicAbsent = {
  heatGained: 'A settled cycle has no start; ask heatPerHalfCycle.',
  meanTemperature: 'The body has no end; each place has the mean of the cycle as its mean over time.',
  remainingFraction: INITIAL,
  completedFraction: INITIAL,
  heatFraction: INITIAL,
  steadyTemperature: 'A settled cycle goes on for ever.',
  timeConstant: 'A body without end has no time constant.',
} as const

export const periodicOutputs = {
  temperature: {},
  heatFlux: {},
  surfaceHeatFlux: {},
  amplitude: {},
  timeLag: {},
  dampingDepth: {},
  heatPerHalfCycle: {},
} as const
