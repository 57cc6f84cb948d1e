import erf from '@stdlib/math-base-special-erf'
import erfcx from '@stdlib/math-base-special-erfcx'
import { constant, fieldOutputs, grid, history } from '../../bodies/field-outputs.ts'
import {
  completed,
  completedError,
  ENERGY_ERROR,
  energyFraction,
  fluxError,
  fluxFraction,
  remaining,
  REMAINING_ERROR,
} from '../../math/convective-half-space.ts'
import { decayOf, leastError, responseError } from '../../math/half-space-pulse.ts'
import { EPS, type Estimate } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import type { Solution } from '../../solution.ts'
import { exactly } from '../../bodies/step-response.ts'

export interface ContactBody {
  diffusivity: number
  effusivity: number
  initialTemperature: number
}

export interface ContactInput extends ContactBody {
  other: ContactBody
  /** Absent where nothing resists between the faces. */
  contactConductance?: number
  /** Below 0 in the other body. */
  depths: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

const SQRT_PI = 1.772453850905516

/**
 * Two half spaces at their own temperatures that touch from time 0 on, with or without a resistance between the faces.
 *
 *   each body: T = Tᵢ + (Tₖ − Tᵢ)·u(η),   Tₖ = (e₁T₁ + e₂T₂)/(e₁ + e₂),   η = |x|/(2√(at)),   e = √(kρc)
 *   u = erfc(η), the face at Tₖ at once;   with a conductance h: u = e^(−η²)·[erfcx(η) − erfcx(η + γ)],
 *   γ = h√t·(1/e₁ + 1/e₂), alike in both bodies;   q = h(T₂ − T₁)·e^(−η²)·erfcx(η + γ)
 *
 * Shapes    depths: n;  times: m;  grids have m rows of n; surface temperatures have m numbers.
 * Units     SI, temperatures in °C; heat per m2; fluxes positive towards greater depths, from the other body to the own.
 * Domain    e, a > 0;  h > 0;  depth of any sign;  t ≥ 0, fluxes at the faces t > 0 unless a conductance is given.
 * Accuracy  temperatures 1e-12·|T₁ − T₂| beside the rounding of inputs and result; fractions, fluxes and heat relative
 *           (120 + 17η²)ε. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §2.15, in scaled functions.
 */
export function solve(input: ContactInput): Solution {
  const { other, depths, times, outputs, initialTemperature: T1 } = input
  const difference = other.initialTemperature - T1
  const response = input.contactConductance === undefined ? ideal(input) : resisted(input, input.contactConductance)
  const bodies = depths.map((depth) => (depth < 0 ? other : input))
  const roundings = EPS * (Math.abs(T1) + Math.abs(other.initialTemperature))
  /** A temperature of a body that has gone a share of its way to the contact temperature. */
  const on = (own: boolean, share: Estimate): Estimate => {
    const way = wayOf(input, own)
    const value = way.value * share.value
    const start = own ? T1 : other.initialTemperature
    const error = Math.abs(way.value) * share.error + way.error * share.value + EPS * Math.abs(start)
    return { ...share, value: start + value, error }
  }
  const perKelvin = (e: Estimate): Estimate => ({
    ...e,
    value: difference * e.value,
    error: Math.abs(difference) * (e.error + 12 * EPS * Math.abs(e.value)) + roundings * Math.abs(e.value),
  })
  const temperatureBy = (r: Response) =>
    grid((i, j) => on(bodies[j] === input, r.completed(i, Math.abs(depths[j]!), bodies[j]!)))
  const fields = {
    temperature: temperatureBy(response),
    idealTemperature: temperatureBy(ideal(input)),
    heatFlux: grid((i, j) => perKelvin(response.flux(i, Math.abs(depths[j]!), bodies[j]!))),
    surfaceHeatFlux: history((i) => perKelvin(response.flux(i, 0, input))),
    heatGained: history((i) => perKelvin(response.heat(i))),
    completedFraction: grid((i, j) => response.completed(i, Math.abs(depths[j]!), bodies[j]!), 'relative'),
    remainingFraction: grid((i, j) => response.remaining(i, Math.abs(depths[j]!), bodies[j]!), 'relative'),
    contactTemperature: constant(() => on(true, exactly(1))),
    surfaceTemperature: history((i) => on(true, response.completed(i, 0, input))),
    otherSurfaceTemperature: history((i) => on(false, response.completed(i, 0, other))),
  }
  const scale = Math.abs(difference)
  return { ...fieldOutputs({ times, places: depths.length, outputs }, fields), terms: 0, scale }
}

/** How far a body has to go to the contact temperature: the difference by the share of the other's effusivity. */
function wayOf(input: ContactInput, own: boolean): { value: number; error: number } {
  const { other, effusivity: e1, initialTemperature: T1 } = input
  const e2 = other.effusivity
  const difference = own ? other.initialTemperature - T1 : T1 - other.initialTemperature
  const share = (own ? e2 : e1) / (e1 + e2)
  const roundings = EPS * (Math.abs(T1) + Math.abs(other.initialTemperature))
  return { value: difference * share, error: share * (roundings + 14 * EPS * Math.abs(difference)) }
}

interface Response {
  /** Share of the way to the contact temperature, at a distance from the faces. */
  completed(i: number, distance: number, body: ContactBody): Estimate
  remaining(i: number, distance: number, body: ContactBody): Estimate
  /** Per kelvin of T₂ − T₁. */
  flux(i: number, distance: number, body: ContactBody): Estimate
  heat(i: number): Estimate
}

const closed = (value: number, relative: number, least = 0): Estimate => ({
  value,
  error: relative * value + least,
  method: 'closed-form',
})

const etaAt = (distance: number, time: number, { diffusivity }: ContactBody) =>
  distance / (2 * Math.sqrt(diffusivity) * Math.sqrt(time))

/** Both faces at the contact temperature at once. */
function ideal({ times, effusivity: e1, other: { effusivity: e2 } }: ContactInput): Response {
  const joint = e1 / (1 + e1 / e2)
  const eta = (i: number, distance: number, body: ContactBody) => Math.min(27.5, etaAt(distance, times[i]!, body))
  return {
    completed(i, distance, body) {
      if (times[i] === 0) return exactly(0)
      const n = eta(i, distance, body)
      return closed(decayOf(n) * erfcx(n), responseError(n), leastError(n))
    },
    remaining: (i, distance, body) => (times[i] === 0 ? exactly(1) : closed(erf(eta(i, distance, body)), 14 * EPS)),
    flux(i, distance, body) {
      if (times[i] === 0) return exactly(0)
      const n = eta(i, distance, body)
      const unit = joint / (SQRT_PI * Math.sqrt(times[i]!))
      return closed(unit * decayOf(n), responseError(n), unit * leastError(n))
    },
    heat: (i) => closed((2 * joint * Math.sqrt(times[i]!)) / SQRT_PI, 20 * EPS),
  }
}

/** Faces that a conductance holds apart: each body is behind a film, of the same γ. */
function resisted({ times, effusivity: e1, other: { effusivity: e2 } }: ContactInput, h: number): Response {
  const gamma = (i: number) => (h / e1 + h / e2) * Math.sqrt(times[i]!)
  const eta = (i: number, distance: number, body: ContactBody) => etaAt(distance, times[i]!, body)
  return {
    completed(i, distance, body) {
      if (times[i] === 0) return exactly(0)
      const n = eta(i, distance, body)
      return closed(completed(n, gamma(i)), completedError(n), leastError(n))
    },
    remaining: (i, distance, body) =>
      times[i] === 0 ? exactly(1) : closed(Math.min(1, remaining(eta(i, distance, body), gamma(i))), REMAINING_ERROR),
    // At time 0 the limit from above: all that the conductance lets through at the faces, none inside.
    flux(i, distance, body) {
      if (times[i] === 0) return exactly(distance === 0 ? h : 0)
      const n = eta(i, distance, body)
      return closed(h * fluxFraction(n, gamma(i)), fluxError(n), h * leastError(n))
    },
    heat: (i) => closed(h * times[i]! * energyFraction(gamma(i)), ENERGY_ERROR + 8 * EPS),
  }
}
