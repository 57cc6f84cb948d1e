import { exponentialLessOne } from './two-sided-waves.ts'

/** How a place follows a cycle: amplitude over that of the drive, and the angle by which it lags, whole turns included. */
export interface Follower {
  gain: number
  lag: number
}

/** (1 + e^(−w)) or (1 − e^(−w)) of w = 2(1 + i)z, by size and angle; neither comes near to 0 for z ≥ 0 but as w does. */
function mirrored(z: number, sign: 1 | -1): Follower {
  const w = { re: -2 * z, im: -2 * z }
  const less = exponentialLessOne(w)
  const re = sign === 1 ? 2 + less.re : -less.re
  const im = sign === 1 ? less.im : -less.im
  return { gain: Math.hypot(re, im), lag: -Math.atan2(im, re) }
}

/**
 * A slab of length φ (in damping depths) whose face follows a cycle, the far plane passing no heat: temperature at a depth x and
 * distance y to the far plane, over the face.
 *
 *   cosh((1 + i)y)/cosh((1 + i)φ) = e^(−(1 + i)x)·(1 + e^(−2(1 + i)y))/(1 + e^(−2(1 + i)φ)),   x + y = φ
 *
 * Shapes    one place.
 * Units     damping depths; radians.
 * Domain    x, y, φ ≥ 0, to 1e15.
 * Accuracy  gain relative (8 + 4x)ε; lag (8 + 2x)ε.
 * Errors    none.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §3.6.
 */
export function temperatureInCycle(x: number, y: number, phi: number): Follower {
  const place = mirrored(y, 1)
  const face = mirrored(phi, 1)
  return { gain: (Math.exp(-x) * place.gain) / face.gain, lag: x === 0 ? 0 : x + place.lag - face.lag }
}

/** Flux inward over the face's temperature, in units of k/δ: (1 + i)·sinh((1 + i)y)/cosh((1 + i)φ). It leads, so the lag is negative. */
export function fluxInCycle(x: number, y: number, phi: number): Follower {
  const place = mirrored(y, -1)
  const face = mirrored(phi, 1)
  if (y === 0) return { gain: 0, lag: 0 }
  return { gain: (Math.SQRT2 * Math.exp(-x) * place.gain) / face.gain, lag: x + place.lag - face.lag - Math.PI / 4 }
}

/**
 * Through a film: what the face has of the fluid's cycle, 1/(1 + Y/h), and the flux into it, 1/(1/h + 1/Y), with Y the flux by
 * the face's own temperature. Both parts of Y are positive, so that nothing cancels.
 */
export function throughFilm(flux: Follower, film: number): { face: Follower; flux: Follower } {
  if (film === Infinity) return { face: { gain: 1, lag: 0 }, flux }
  const re = flux.gain * Math.cos(flux.lag)
  const im = -flux.gain * Math.sin(flux.lag)
  const size = Math.hypot(film + re, im)
  const lag = Math.atan2(im, film + re)
  const gain = size === 0 ? 0 : film / size
  return { face: { gain, lag }, flux: { gain: gain * flux.gain, lag: flux.lag + lag } }
}
