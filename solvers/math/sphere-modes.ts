import type { Mode, Part } from './round-series.ts'
import { sphereEigenvalue } from './sphere-eigenvalues.ts'
import type { UnitPlaces } from './unit-body.ts'

/*
 * Eigenfunctions sin(zρ)/(zρ) of a sphere of radius 1, with a film or with its face stepped in temperature (Bi infinite).
 *
 *   Cₙ = 4(sin z − z cos z)/(2z − sin 2z),   1 − z cot z = Bi
 *
 * Nearer the face than the centre they are taken as g(δ)/ρ with g = α cos zδ + β sin zδ: the signs of sin z and cos z
 * multiplied out, so that nothing cancels at the face however large Bi is. With H = Bi − 1 and N = z² + Bi² − Bi,
 *
 *   α = 2Bi/N, β = 2BiH/(zN), C = ±2Bi·√(z² + H²)/N, mean 6Bi²/(z²N);   held face α = 0, β = 2/z, C = ±2, mean 6/z²
 *
 * Source   H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §9.3 and §9.4.
 */

interface Coefficients {
  z: number
  alpha: number
  beta: number
  /** C. */
  centre: number
  mean: number
}

/** The mode number m, counted from 0. */
export function sphereMode(places: UnitPlaces, biot: number, m: number): Mode {
  const c = biot === Infinity ? heldCoefficients(m) : filmCoefficients(biot, m)
  const parts: Part[] = []
  const fluxes: Part[] = []
  for (let j = 0; j < places.deltas.length; j++) {
    const inmost = places.inner[j]! < 0.5
    parts.push(inmost ? inside(c, places, j) : outside(c, places, j, biot))
    fluxes.push(inmost || c.z < 1 ? fluxInside(c, places, j, biot) : fluxOutside(c, places, j, biot))
  }
  return { root: c.z, parts, fluxes, mean: c.mean }
}

function heldCoefficients(m: number): Coefficients {
  const z = (m + 1) * Math.PI
  return { z, alpha: 0, beta: 2 / z, centre: m % 2 === 0 ? 2 : -2, mean: 6 / (z * z) }
}

function filmCoefficients(biot: number, m: number): Coefficients {
  const H = biot - 1
  const z = sphereEigenvalue(biot, m)
  const N = z * z + biot * H
  const alpha = (2 * biot) / N
  const centre = (m % 2 === 0 ? alpha : -alpha) * Math.hypot(z, H)
  return { z, alpha, beta: (alpha * H) / z, centre, mean: (3 * biot * alpha) / (z * z) }
}

/** Cφ as it stands: sin(x)/x of x = zρ. */
function inside({ z, centre }: Coefficients, { inner }: UnitPlaces, j: number): Part {
  const x = z * inner[j]!
  const sinc = x < 1e-8 ? 1 : Math.sin(x) / x
  const size = Math.abs(centre)
  return {
    value: centre * sinc,
    slack: size * (30 * Math.abs(sinc) + (8 * x + 4 * z) * Math.min(0.5, x / 3) + 2),
    most: size,
  }
}

function outside(
  { z, alpha, beta }: Coefficients,
  { deltas, inner, shifts }: UnitPlaces,
  j: number,
  biot: number,
): Part {
  const delta = deltas[j]!
  const rho = inner[j]!
  const cos = Math.cos(z * delta)
  const sin = Math.sin(z * delta)
  // H = Bi − 1 keeps the rounding of Bi.
  const H = biot === Infinity ? 0 : (alpha * (biot + 1)) / z
  const size = Math.max(Math.abs(beta), H)
  const moved = z * (6 * delta + shifts[j]!) * (alpha * Math.abs(sin) + Math.abs(beta * cos))
  return {
    value: (alpha * cos + beta * sin) / rho,
    slack: (30 * (alpha * Math.abs(cos) + size * Math.abs(sin)) + moved) / rho,
    most: (alpha + size * Math.min(1, z * delta)) / rho,
  }
}

/** C·z·j₁(zρ) with the spherical Bessel function j₁; exact at the centre, and for a first mode with a small root. */
function fluxInside({ z, centre }: Coefficients, { inner, deltas, shifts }: UnitPlaces, j: number, biot: number): Part {
  const unit = biot === Infinity ? 1 : biot
  const x = z * inner[j]!
  const { value, error } = sphericalBessel(x)
  const size = (Math.abs(centre) * z) / unit
  const moved = z * (6 * deltas[j]! + shifts[j]! + 4) * Math.min(1, 1 / (1 + x)) + 6 * x * Math.min(1, 1 / (1 + x))
  return {
    value: ((centre * z) / unit) * value,
    slack: size * (30 * Math.abs(value) + error + (inner[j] === 0 ? 0 : moved)),
    most: size * Math.min(1, x),
  }
}

function sphericalBessel(x: number): { value: number; error: number } {
  if (x > 1) return { value: (Math.sin(x) / x - Math.cos(x)) / x, error: 6 / x }
  const y = x * x
  let sum = 0
  for (let k = 9; k >= 1; k--) sum = (1 - sum) * (y / (2 * k * (2 * k + 3)))
  return { value: (x / 3) * (1 - sum), error: 0 }
}

function fluxOutside(c: Coefficients, { deltas, inner, shifts }: UnitPlaces, j: number, biot: number): Part {
  const { z, alpha, beta } = c
  const delta = deltas[j]!
  const rho = inner[j]!
  const held = biot === Infinity
  const unit = (held ? 1 : biot) * rho * rho
  const cos = Math.cos(z * delta)
  const sin = Math.sin(z * delta)
  // α + βzρ = α(1 + Hρ), and 1 + Hρ = Bi·ρ + δ.
  const even = held ? 2 * rho : alpha * (biot * rho + delta)
  const odd = beta - z * alpha * rho
  const size = (held ? Math.abs(beta) : (alpha * (biot + 1)) / z) + z * alpha * rho
  const moved = z * (6 * delta + shifts[j]!) * (even * Math.abs(sin) + size * Math.abs(cos))
  return {
    value: (even * cos + odd * sin) / unit,
    slack: (30 * (even * Math.abs(cos) + size * Math.abs(sin)) + moved) / unit,
    most: (even + size * Math.min(1, z * delta)) / unit,
  }
}
