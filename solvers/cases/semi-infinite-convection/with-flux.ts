import { fieldOutputs, grid, history } from '../../bodies/field-outputs.ts'
import {
  completed,
  completedError,
  completedPerFilm,
  ENERGY_ERROR,
  energyFraction,
  fluxError,
  fluxFraction,
} from '../../math/convective-half-space.ts'
import { EPS, type Estimate, TINY } from '../../math/rounding.ts'
import type { Solution } from '../../solution.ts'
import { exactly, type StepResponse } from '../../bodies/step-response.ts'
import type { HalfSpaceInput } from './solve.ts'

/** Film and absorbed flux together: the fractions are the film's, the rest is the sum of what the two do. */
export function solveWithFlux(input: HalfSpaceInput, q0: number, film: StepResponse): Solution {
  const { initialTemperature: initial, diffusivity: a, times, depths, outputs } = input
  const roots = times.map((t) => Math.sqrt(a) * Math.sqrt(t)) // √a·√t, since a·t can vanish
  const eta = (i: number, j: number) => depths[j]! / (2 * roots[i]!)
  const fields = {
    temperature: grid((i, j) => {
      const { value, error, method } = times[i] === 0 ? exactly(0) : riseAt(input, q0, eta(i, j), roots[i]!)
      return { value: initial + value, error: error + EPS * Math.abs(initial), method }
    }),
    heatFlux: grid((i, j) =>
      times[i] === 0 ? atStart(input, q0, depths[j] === 0) : fluxAt(input, q0, eta(i, j), roots[i]!),
    ),
    surfaceHeatFlux: history((i) => (times[i] === 0 ? atStart(input, q0, true) : fluxAt(input, q0, 0, roots[i]!))),
    heatGained: history((i) => heatAt(input, q0, times[i]!, roots[i]!)),
    completedFraction: grid((i, j) => film.completed(i, j), 'relative'),
    remainingFraction: grid((i, j) => film.remaining(i, j), 'relative'),
  }
  const scale = scaleOf(input, q0, roots)
  return { ...fieldOutputs({ times, places: depths.length, outputs }, fields), terms: 0, scale }
}

const betaAt = ({ filmCoefficient: h, conductivity: k }: HalfSpaceInput, root: number) => (h / k) * root
const differenceOf = (input: HalfSpaceInput) => input.ambientTemperature - input.initialTemperature
const sizeOf = (input: HalfSpaceInput) => Math.abs(input.initialTemperature) + Math.abs(input.ambientTemperature)

function riseAt(input: HalfSpaceInput, q0: number, eta: number, root: number): Estimate {
  const relative = completedError(eta)
  const share = completed(eta, betaAt(input, root))
  const absorbed = (q0 / input.conductivity) * root * completedPerFilm(eta, betaAt(input, root))
  const step = differenceOf(input)
  const own = Math.abs(step) * share * relative + Math.abs(absorbed) * (relative + 8 * EPS)
  const error = own + EPS * sizeOf(input) * share + TINY
  return { value: step * share + absorbed, error, method: 'closed-form' }
}

/** A share of h(Tₐ − Tᵢ) + q₀, off by what either of the two alone may be. */
function driven(input: HalfSpaceInput, q0: number, share: number, error: number): Estimate {
  const { filmCoefficient: h } = input
  const step = differenceOf(input)
  const own = (h * Math.abs(step) + Math.abs(q0)) * (error + 10 * EPS * share)
  return { value: (h * step + q0) * share, error: own + EPS * h * sizeOf(input) * share, method: 'closed-form' }
}

/** The limit from above: the whole flux at the face, none inside. */
const atStart = (input: HalfSpaceInput, q0: number, isFace: boolean) => driven(input, q0, isFace ? 1 : 0, 0)

function fluxAt(input: HalfSpaceInput, q0: number, eta: number, root: number): Estimate {
  const share = fluxFraction(eta, betaAt(input, root))
  return driven(input, q0, share, fluxError(eta) * share + TINY)
}

function heatAt(input: HalfSpaceInput, q0: number, time: number, root: number): Estimate {
  const share = time * energyFraction(betaAt(input, root))
  return driven(input, q0, share, share * (ENERGY_ERROR + 6 * EPS))
}

function scaleOf(input: HalfSpaceInput, q0: number, roots: readonly number[]): number {
  const { filmCoefficient: h, conductivity: k } = input
  const rise = roots.reduce((most, root) => Math.max(most, (1.1283791670955126 * root) / k), 0)
  return Math.abs(differenceOf(input)) + Math.abs(q0) * Math.min(h === 0 ? rise : 1 / h, rise)
}
