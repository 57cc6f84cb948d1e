import { fieldOutputs, grid, history } from '../../bodies/field-outputs.ts'
import { type MediumFace, MediumResponse } from '../../math/medium-response.ts'
import { EPS, type Estimate, TINY } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import { fluxOf, type Side } from '../../statement/side.ts'
import type { Solution } from '../../solution.ts'
import { exactly, scaled } from '../../bodies/step-response.ts'
import { latestOf } from '../../math/latest.ts'

/** What happens at the cylinder: a side of the medium, or a power that enters along it. */
export type MediumBoundary = Side | { kind: 'line-power'; linePower: number }

export interface MediumInput {
  conductivity: number
  diffusivity: number
  volumetricHeatCapacity: number
  radius: number
  boundary: MediumBoundary
  initialTemperature: number
  radii: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

/** The boundary in one form: held at a difference, or a film with a difference of its fluid and a flux beside it. */
export interface MediumDrive {
  held: boolean
  film: number
  /** Of the face or the fluid to the start. */
  difference: number
  /** W/m2 beside what the film brings. */
  flux: number
  /** The temperature that the difference was made with. */
  temperature: number
}

export function mediumDrive({ boundary, radius, initialTemperature: initial }: MediumInput): MediumDrive {
  const none = { held: false, film: 0, difference: 0, temperature: initial }
  switch (boundary.kind) {
    case 'temperature': {
      const temperature = boundary.surfaceTemperature
      return { held: true, film: 0, difference: temperature - initial, flux: 0, temperature }
    }
    case 'line-power':
      return { ...none, flux: boundary.linePower / (2 * Math.PI * radius) }
    case 'convection': {
      const { filmCoefficient, ambientTemperature } = boundary
      if (filmCoefficient === 0) return { ...none, flux: fluxOf(boundary) }
      const difference = ambientTemperature - initial
      return { held: false, film: filmCoefficient, difference, flux: fluxOf(boundary), temperature: ambientTemperature }
    }
    default:
      return { ...none, flux: fluxOf(boundary) }
  }
}

/**
 * Endless medium at one temperature around a long cylinder whose surface is held, meets a fluid, or takes a flux or a power from time 0 on.
 *
 *   T̂ − Tᵢ/s = (1/s)·g·K₀(r√(s/a)) / (α·k√(s/a)·K₁(R√(s/a)) + η·K₀(R√(s/a))), inverted
 *   held α = 0, η = 1, g = Tₛ − Tᵢ;   film α = 1, η = h, g = h(Tₐ − Tᵢ) + q₀;   flux α = 1, η = 0, g = q₀ = P/(2πR)
 *
 * Shapes    radii: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; fluxes per m2 and positive outward, into the medium; heat per m of cylinder.
 * Domain    k, a, R > 0;  h ≥ 0;  r ≥ R;  t ≥ 0, at/R² from 1e-300 to 1e38.
 * Accuracy  1e-12 of the difference, or of the temperature that the flux causes, beside the rounding of inputs and result; fractions, fluxes and
 *           heats 1e-12 relative to what either drive alone causes. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §13.5 (from memory).
 */
export function solve(input: MediumInput): Solution {
  const { conductivity: k, diffusivity: a, volumetricHeatCapacity: capacity, radius, radii, times, outputs } = input
  const { initialTemperature: initial } = input
  const drive = mediumDrive(input)
  const { held, film, difference, flux } = drive
  const roots = times.map((t) => Math.sqrt(a) * Math.sqrt(t)) // √a·√t, since a·t can vanish
  const at = momentsOf(input, drive, roots)
  const distance = (i: number, j: number) => (radii[j]! - radius) / roots[i]!
  const level = (i: number) => (held ? 1 : (film * roots[i]!) / k)
  const known = !held && film === 0
  // A line power was divided by the circumference.
  const entering = scaled(1, exactly(flux))

  const rounded = Math.abs(initial) + Math.abs(drive.temperature)
  /** A response times a factor and the drive, which is rounded as its parts are. */
  const driven = (factor: number, { value, error, method }: Estimate): Estimate => {
    const [brought, beside] = held ? [difference, 0] : [film * difference, flux]
    const slack = EPS * ((held ? 1 : film) * rounded + 4 * Math.abs(beside))
    const size = Math.abs(factor) * ((Math.abs(brought) + Math.abs(beside)) * (error + 8 * EPS * value) + slack * value)
    return { value: factor * (brought + beside) * value, error: size + TINY, method }
  }
  const atFaceFirst = (j: number | undefined): Estimate =>
    held || (j !== undefined && radii[j] !== radius) ? exactly(0) : driven(1, exactly(1))
  const fluxAt = (i: number, distance: number) => driven(held ? k / roots[i]! : 1, at(i).flux(distance))
  const fraction = ({ value, error, method }: Estimate): Estimate => {
    return { value: Math.min(1, value), error: error + 4 * EPS * value, method }
  }
  const fields = {
    temperature: grid((i, j) => {
      if (times[i] === 0) return exactly(initial)
      if (held && radii[j] === radius) return exactly(drive.temperature)
      const { value, error, method } = driven(held ? 1 : roots[i]! / k, at(i).temperature(distance(i, j)))
      return { value: initial + value, error: error + EPS * Math.abs(initial), method }
    }),
    heatFlux: grid((i, j) => {
      if (known && radii[j] === radius) return entering
      return times[i] === 0 ? atFaceFirst(j) : fluxAt(i, distance(i, j))
    }),
    surfaceHeatFlux: history((i) => {
      if (known) return entering
      return times[i] === 0 ? atFaceFirst(undefined) : fluxAt(i, 0)
    }, 'relative'),
    heatGained: history((i) => {
      const around = 2 * Math.PI * radius
      if (known) return scaled(around * times[i]!, entering)
      if (times[i] === 0) return exactly(0)
      return driven(around * (held ? capacity * roots[i]! : times[i]!), at(i).heat())
    }, 'relative'),
    completedFraction: grid((i, j) => {
      if (times[i] === 0) return exactly(0)
      return fraction(scaled(level(i), at(i).temperature(distance(i, j))))
    }, 'relative'),
    remainingFraction: grid((i, j) => {
      if (times[i] === 0) return exactly(1)
      return fraction(at(i).remaining(distance(i, j)))
    }, 'relative'),
  }
  return { ...fieldOutputs({ times, places: radii.length, outputs }, fields), terms: 0, scale: scaleOf(input, drive) }
}

/** The responses of one time are kept while its places are asked for. */
function momentsOf({ conductivity, radius }: MediumInput, { held, film }: MediumDrive, roots: readonly number[]) {
  let last: { i: number; response: MediumResponse } | undefined
  return (i: number): MediumResponse => {
    if (last?.i !== i) {
      const face: MediumFace = held ? { slope: 0, level: 1 } : { slope: 1, level: (film * roots[i]!) / conductivity }
      last = { i, response: new MediumResponse(radius / roots[i]!, face) }
    }
    return last.response
  }
}

/** The difference, and beside it what the flux alone would cause: q·R/k, growing with the logarithm of time. */
function scaleOf({ conductivity: k, diffusivity, radius, times }: MediumInput, drive: MediumDrive): number {
  const latest = latestOf(times)
  const grown = Math.max(1, Math.log(4) + 2 * Math.log((Math.sqrt(diffusivity) * Math.sqrt(latest)) / radius))
  const alone = (radius / k) * grown
  const absorbed = Math.abs(drive.flux) * (drive.film === 0 ? alone : Math.min(1 / drive.film, alone))
  return Math.abs(drive.difference) + absorbed
}
