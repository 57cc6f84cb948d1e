import { fieldOutputs, grid, history, profile } from '../../bodies/field-outputs.ts'
import type { Annulus, Face } from '../../math/annulus-modes.ts'
import { type AnnulusMoment, AnnulusResponse } from '../../math/annulus-response.ts'
import type { FaceDrive } from '../../math/annulus-start.ts'
import { EPS, type Estimate } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import { filmOf, fluxOf, passesNoHeat, type Side, temperatureOf } from '../../statement/side.ts'
import type { Solution } from '../../solution.ts'
import { exactly, scaled } from '../../bodies/step-response.ts'
import { latestOf } from '../../math/latest.ts'

export interface HollowInput {
  conductivity: number
  diffusivity: number
  volumetricHeatCapacity: number
  innerRadius: number
  outerRadius: number
  inner: Side
  outer: Side
  initialTemperature: number
  radii: readonly number[]
  times: readonly number[]
  outputs: readonly OutputName[]
}

/** Thickness of the wall: the unit of length. */
export const wallOf = ({ innerRadius, outerRadius }: Pick<HollowInput, 'innerRadius' | 'outerRadius'>) =>
  outerRadius - innerRadius

/** Fourier number of the wall, and its root as √a·√t, since a·t can vanish. */
export function momentOf(
  input: Pick<HollowInput, 'diffusivity' | 'innerRadius' | 'outerRadius'>,
  time: number,
): AnnulusMoment {
  const length = wallOf(input)
  const root = (Math.sqrt(input.diffusivity) * Math.sqrt(time)) / length
  return { root, fourier: root * root }
}

/**
 * Long hollow cylinder at one temperature, each face of which is held, meets a fluid, takes a flux, or is insulated from time 0 on.
 *
 *   T = T∞(r) + Σ cₙφₙ(r)·e^(−zₙ²Fo),   φ″ + φ′/r + z²φ/L² = 0,   Fo = at/L²,   L = r₂ − r₁
 *   below Fo 0.15 the Laplace transform in K₀(r√(s/a)), I₀(r√(s/a)), inverted
 *
 * Shapes    radii: n;  times: m;  grids have m rows of n.
 * Units     SI, temperatures in °C; local flux positive outward, those of the faces into the body, each per m2 of its own face; heat per m.
 * Domain    k, ρc, a > 0;  r₂/r₁ from 1.00001 to 1e4;  h ≥ 0;  r₁ ≤ r ≤ r₂;  t ≥ 0.
 * Accuracy  temperatures 1e-12 of what the sides cause, beside the rounding of inputs and result; fluxes and heats 1e-12 relative to what
 *           each side alone causes. Beyond these the rounding of r₁ and r₂ counts, times r/L. Each output carries its bound.
 * Errors    none: the input is resolved. Never NaN or Infinity.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §7.10, §13.4 (from memory).
 */
export function solve(input: HollowInput): Solution {
  const { conductivity: k, volumetricHeatCapacity: capacity, inner, outer, radii, times, outputs } = input
  const { initialTemperature: initial } = input
  const length = wallOf(input)
  const response = responseOf(input)
  const moments = times.map((time) => momentOf(input, time))
  const unit = k / length
  const started = (i: number) => times[i]! > 0
  const rounding = roundingOf(input)
  const celsius = ({ value, error, method }: Estimate): Estimate => ({
    value: initial + value,
    error: error + rounding,
    method,
  })

  const faceFlux = (i: number, face: 0 | 1): Estimate => {
    const side = face === 0 ? inner : outer
    if (passesNoHeat(side)) return exactly(fluxOf(side))
    if (!started(i)) return firstFlux(side, initial)
    const [near, far] = response.faceFlux(moments[i]!, face)
    return scaled(unit, { value: near.value + far.value, error: near.error + far.error, method: near.method })
  }
  const localFlux = (i: number, j: number): Estimate => {
    const face = radii[j] === input.innerRadius ? 0 : radii[j] === input.outerRadius ? 1 : undefined
    if (face === undefined) return started(i) ? scaled(unit, response.flux(moments[i]!, j)) : exactly(0)
    const into = faceFlux(i, face)
    return face === 0 ? into : { ...into, value: -into.value }
  }
  const content = (i: number): Estimate => {
    if (!started(i)) return exactly(0)
    const [a, b] = [response.content(moments[i]!, 0), response.content(moments[i]!, 1)]
    return { value: a.value + b.value, error: a.error + b.error, method: a.method }
  }
  const perMetre = 2 * Math.PI * capacity * length * length
  const area = input.innerRadius / length + 0.5
  const mean = (i: number): Estimate => {
    const { value, error, method } = scaled(1 / area, content(i))
    // The heat is spread over a wall as thick as two rounded radii say.
    return { value, error: error + 4 * EPS * area * Math.abs(value), method }
  }
  const alone = drivesOf(input) <= 1
  // What comes through from the other face keeps its digits only where the own drive is not there to be told from it.
  const told = (own: Side) => (alone && (passesNoHeat(own) || drivenBy(own, initial)) ? 'relative' : 'absolute')
  const fields = {
    temperature: grid((i, j) => {
      const held = heldAt(input, radii[j]!)
      if (!started(i) || held !== undefined) return exactly(started(i) ? held! : initial)
      return celsius(response.temperature(moments[i]!, j))
    }),
    heatFlux: grid(localFlux),
    innerHeatFlux: history((i) => faceFlux(i, 0), told(inner)),
    outerHeatFlux: history((i) => faceFlux(i, 1), told(outer)),
    heatGained: history((i) => scaled(perMetre, content(i)), alone ? 'relative' : 'absolute'),
    meanTemperature: history((i) => (started(i) ? celsius(mean(i)) : exactly(initial))),
    steadyTemperature: profile((j) => {
      const held = heldAt(input, radii[j]!)
      return held === undefined ? celsius(response.steady(j)) : exactly(held)
    }),
  }
  const solution = fieldOutputs({ times, places: radii.length, outputs }, fields)
  return { ...solution, terms: response.terms, scale: scaleOf(input) }
}

/** The temperature of a face that is held. */
function heldAt({ inner, outer, innerRadius, outerRadius }: HollowInput, r: number): number | undefined {
  const side = r === innerRadius ? inner : r === outerRadius ? outer : undefined
  return side?.kind === 'temperature' ? side.surfaceTemperature : undefined
}

export function annulusOf(input: HollowInput): Annulus {
  return {
    innerRadius: input.innerRadius / wallOf(input),
    inner: faceOf(input.inner, input),
    outer: faceOf(input.outer, input),
  }
}

function responseOf(input: HollowInput): AnnulusResponse {
  const { innerRadius, outerRadius, inner, outer, radii, times, outputs } = input
  const length = wallOf(input)
  const annulus = annulusOf(input)
  const places = radii.map((r) => ({ fromInner: (r - innerRadius) / length, fromOuter: (outerRadius - r) / length }))
  const latest = latestOf(times)
  const reach = outputs.includes('steadyTemperature') ? Infinity : momentOf(input, latest).fourier
  return new AnnulusResponse(annulus, [driveOf(inner, input), driveOf(outer, input)], places, reach)
}

function faceOf(side: Side, input: HollowInput): Face {
  return side.kind === 'temperature'
    ? { held: true }
    : { held: false, film: (filmOf(side) * wallOf(input)) / input.conductivity }
}

export function driveOf(side: Side, input: HollowInput): FaceDrive {
  const { initialTemperature: initial, conductivity } = input
  if (side.kind === 'temperature') {
    const given = Math.abs(side.surfaceTemperature) + Math.abs(initial)
    return { value: side.surfaceTemperature - initial, slack: EPS * given }
  }
  const unit = wallOf(input) / conductivity
  const { value, error } = firstFlux(side, initial)
  return { value: unit * value, slack: unit * (error + 8 * EPS * Math.abs(value)) }
}

/** Flux into the body at a face that is still at its first temperature. */
function firstFlux(side: Side, initial: number): Estimate {
  const flux = fluxOf(side)
  if (side.kind !== 'convection') return exactly(side.kind === 'flux' ? flux : 0)
  const { filmCoefficient: h, ambientTemperature: ambient } = side
  const brought = h * (ambient - initial)
  const given = h * (Math.abs(ambient) + Math.abs(initial))
  return {
    value: brought + flux,
    error: EPS * (given + 4 * Math.abs(brought) + 4 * Math.abs(flux)),
    method: 'closed-form',
  }
}

const drivenBy = (side: Side, initial: number) => fluxOf(side) !== 0 || (temperatureOf(side) ?? initial) !== initial

/** How many temperatures and fluxes move the body. */
function drivesOf({ inner, outer, initialTemperature: initial }: HollowInput): number {
  const one = (side: Side) => Number((temperatureOf(side) ?? initial) !== initial) + Number(fluxOf(side) !== 0)
  return one(inner) + one(outer)
}

/** What the rounding of the initial temperature may move any other by; that of the sides is part of what they drive. */
const roundingOf = ({ initialTemperature }: HollowInput) => 2 * EPS * Math.abs(initialTemperature)

/** Spread of all temperatures, and the largest rise by each flux. */
export function scaleOf(input: HollowInput): number {
  const { inner, outer, initialTemperature, innerRadius, outerRadius } = input
  const given = [
    initialTemperature,
    temperatureOf(inner) ?? initialTemperature,
    temperatureOf(outer) ?? initialTemperature,
  ]
  const spread = Math.max(...given) - Math.min(...given)
  return (
    spread +
    riseBy(input, inner, outer, innerRadius, outerRadius) +
    riseBy(input, outer, inner, outerRadius, innerRadius)
  )
}

function riseBy(input: HollowInput, side: Side, other: Side, radius: number, otherRadius: number): number {
  const flux = Math.abs(fluxOf(side))
  if (flux === 0) return 0
  const { conductivity: k, diffusivity: a, volumetricHeatCapacity: capacity, innerRadius, outerRadius, times } = input
  const latest = latestOf(times)
  const near = (Math.sqrt(4 / Math.PI) * Math.sqrt(a) * Math.sqrt(latest)) / k
  const drift = ((2 * radius) / (innerRadius + outerRadius) / wallOf(input)) * (latest / capacity)
  if (passesNoHeat(other)) return flux * (near + drift)
  const across = (radius / k) * Math.log1p(wallOf(input) / innerRadius) + radius / otherRadius / filmOf(other)
  return flux * Math.min(near + drift, across)
}
