import { besselJ01 } from './bessel-j.ts'
import { cylinderEigenvalue } from './cylinder-eigenvalues.ts'
import type { Mode, Part } from './round-series.ts'
import type { UnitPlaces } from './unit-body.ts'

/*
 * Eigenfunctions J₀(zρ) of a cylinder of radius 1, with a film or with its face stepped in temperature (Bi infinite).
 *
 *   Cₙ = (2/z)·J₁/(J₀² + J₁²),   zJ₁(z) = Bi·J₀(z)
 *
 * With the amplitude A = √(J₀² + J₁²) at the root, J₀ and J₁ there are ±A·(z, Bi)/√(z² + Bi²): both keep their digits
 * however large Bi is. Close to the face J₀(z(1 − δ)) follows from them by Taylor's series in δ.
 *
 * Source   H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §7.6 and §7.7.
 */

/** Up to this depth by Taylor's series. */
const SKIN = 0.01

interface Coefficients {
  z: number
  /** C. */
  size: number
  /** CJ₀(z) and CJ₁(z). */
  atFace: { j0: number; j1: number }
  mean: number
}

/** The mode number m, counted from 0. Fluxes are in units of Bi, or of 1 where the face is held. */
export function cylinderMode(places: UnitPlaces, biot: number, m: number): Mode {
  const unit = biot === Infinity ? 1 : biot
  const { root: z, amplitude } = cylinderEigenvalue(biot, m)
  const c = coefficients(z, amplitude, biot, m)
  const parts: Part[] = []
  const fluxes: Part[] = []
  for (let j = 0; j < places.deltas.length; j++) {
    const { part, slope } = places.deltas[j]! < SKIN ? byTaylor(c, places, j) : asItStands(c, places, j)
    parts.push(part)
    fluxes.push({
      value: (z / unit) * slope.value,
      slack: (z / unit) * slope.slack,
      most: (z / unit) * slope.most,
    })
  }
  return { root: z, parts, fluxes, mean: c.mean }
}

function coefficients(z: number, amplitude: number, biot: number, m: number): Coefficients {
  const share = biot === Infinity ? 1 : biot / Math.hypot(z, biot)
  const rest = biot === Infinity ? 0 : z / Math.hypot(z, biot)
  const size = ((m % 2 === 0 ? 2 : -2) * share) / (z * amplitude)
  const atFace = { j0: (2 / z) * share * rest, j1: (2 / z) * share * share }
  return { z, size, atFace, mean: ((2 * share) / z) ** 2 }
}

/** CJ₀ and CJ₁ at zρ. */
interface Pair {
  part: Part
  slope: Part
}

function asItStands({ z, size }: Coefficients, { inner, deltas, shifts }: UnitPlaces, j: number): Pair {
  const x = z * inner[j]!
  const { j0, j1 } = besselJ01(x)
  const C = Math.abs(size)
  const envelope = Math.min(1, 1 / Math.sqrt(x))
  // The argument carries the rounding of root and place, and besselJ01 as much again.
  const moved = 8 * x + z * (6 * deltas[j]! + shifts[j]! + 3)
  return {
    part: {
      value: size * j0,
      slack: C * (30 * Math.abs(j0) + 8 * envelope + moved * Math.abs(j1)),
      most: C * envelope,
    },
    slope: {
      value: size * j1,
      slack:
        C *
        (30 * Math.abs(j1) + (inner[j] === 0 ? 0 : Math.min(8, 8 * x) * envelope + moved * Math.min(0.6, envelope))),
      most: C * Math.min(1, x) * envelope,
    },
  }
}

/**
 * Y(δ) = J₀(z(1 − δ)) from Y(0) and Y′(0) = zJ₁(z) by Bessel's equation: with Y = Σ a_k δ^k,
 * (k + 2)(k + 1)·a_(k+2) = (k + 1)²·a_(k+1) − z²(a_k − a_(k−1)).
 */
function byTaylor({ z, atFace }: Coefficients, { deltas, shifts }: UnitPlaces, j: number): Pair {
  const delta = deltas[j]!
  let before = 0
  let here = atFace.j0
  let next = z * atFace.j1 * delta
  let value = here
  let slope = z * atFace.j1
  for (let k = 0; k < 60; k++) {
    value += next
    const after =
      ((k + 1) * (k + 1) * next * delta - z * z * (here - before * delta) * delta * delta) / ((k + 2) * (k + 1))
    before = here
    here = next
    next = after
    if (delta > 0) slope += ((k + 2) * next) / delta
    if (Math.abs(next) + Math.abs(here) < 1e-18 * Math.abs(value)) break
  }
  const turn = Math.min(1, z * delta)
  const size = atFace.j0 + atFace.j1 * turn
  const slopeSize = atFace.j1 + atFace.j0 * turn
  const moved = z * (6 * delta + shifts[j]!)
  return {
    part: { value, slack: 34 * size + 2 * moved * slopeSize, most: 2 * size },
    slope: { value: slope / z, slack: 34 * slopeSize + 2 * moved * size, most: 2 * slopeSize },
  }
}
