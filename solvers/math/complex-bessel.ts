import { type Complex, exponential, modulus, over, plus, scale, times } from './complex.ts'

/** Up to here the power series of I; beyond, its terms cancel where z is near the imaginary axis. */
const I_SERIES = 2
/**
 * The power series of K is taken for |z| < 1.4 + min(1, |Im z|/(2·Re z)): beyond, its logarithmic and regular parts cancel, and before, the
 * continued fraction is long.
 */
const K_SERIES = 1.4
/** From here the asymptotic series reach double precision before their terms grow. */
const ASYMPTOTIC = 25
/** Terms smaller than this share of the sum are left out. */
const NEGLIGIBLE = 1e-18
const EULER = 0.5772156649015329

/**
 * Modified Bessel functions of the first kind, orders 0 and 1, scaled: e^(−z)·I₀(z) and e^(−z)·I₁(z).
 *
 *   |z| < 2   I₀ = Σ (z²/4)^k / k!²,   I₁ = (z/2)·Σ (z²/4)^k / (k!·(k+1)!)
 *   to 25     backward recurrence I_(k−1) = I_(k+1) + (2k/z)·I_k, normalised by e^z = I₀ + 2·Σ I_k
 *   beyond    the asymptotic series, with its part in e^(−2z), which counts away from the real axis
 *
 * Shapes    one complex number in, two out.
 * Units     none.
 * Domain    Re z > 0, of any size.
 * Accuracy  relative 2e-15 for |arg z| ≤ 75°: worst measured 8e-16.
 * Errors    none.
 * Source    M. Abramowitz, I. A. Stegun, Handbook of Mathematical Functions (1964), 9.6.10, 9.6.26, 9.6.33, 9.7.1 (from memory).
 */
export function besselI01(z: Complex): { i0: Complex; i1: Complex } {
  const size = sizeOf(z)
  if (size < I_SERIES) return seriesI(z)
  return size < ASYMPTOTIC ? recurrenceI(z, size) : asymptoticI(z)
}

/**
 * Modified Bessel functions of the second kind, orders 0 and 1, scaled: e^z·K₀(z) and e^z·K₁(z).
 *
 *   |z| to 1.4 (on the real axis) and 2.4 (near the imaginary axis)
 *             K₀ = −(ln(z/2) + γ)·I₀ + Σ H_k·(z²/4)^k / k!², K₁ likewise
 *   to 25     the continued fraction of K₁/K₀, and I₀·K₁ + I₁·K₀ = 1/z
 *   beyond    the asymptotic series
 *
 * Shapes    one complex number in, two out.
 * Units     none.
 * Domain    Re z > 0, of any size.
 * Accuracy  relative 3e-15 for |arg z| ≤ 75°: worst measured 2e-15.
 * Errors    none.
 * Source    N. M. Temme, On the numerical evaluation of the modified Bessel function of the third kind, Journal of Computational
 *           Physics 19 (1975), for the fraction; Abramowitz and Stegun 9.6.11, 9.6.15, 9.7.2 (from memory).
 */
export function besselK01(z: Complex): { k0: Complex; k1: Complex } {
  const size = sizeOf(z)
  if (size < K_SERIES + turnOf(z)) return seriesK(z)
  return size < ASYMPTOTIC ? fractionK(z, size, besselI01(z)) : asymptoticK(z)
}

/** Both kinds, as `besselI01` and `besselK01` give them, in less time than the two. */
export function besselIK01(z: Complex): { i0: Complex; i1: Complex; k0: Complex; k1: Complex } {
  const size = sizeOf(z)
  const first = besselI01(z)
  const fraction = size >= K_SERIES + turnOf(z) && size < ASYMPTOTIC
  const { k0, k1 } = fraction ? fractionK(z, size, first) : besselK01(z)
  return { i0: first.i0, i1: first.i1, k0, k1 }
}

/** Both kinds of one order, the same digits in half the time where |z| is large. */
export function besselIK(z: Complex, order: 0 | 1): { i: Complex; k: Complex } {
  if (sizeOf(z) >= ASYMPTOTIC) {
    const inverse = over({ re: 1, im: 0 }, z)
    const sums = hankelSums(inverse, order)
    return { i: largeI(z, inverse, sums, order), k: largeK(inverse, sums) }
  }
  const { i0, i1, k0, k1 } = besselIK01(z)
  return order === 0 ? { i: i0, k: k0 } : { i: i1, k: k1 }
}

/** K of one order, likewise. */
export function besselK(z: Complex, order: 0 | 1): Complex {
  if (sizeOf(z) >= ASYMPTOTIC) {
    const inverse = over({ re: 1, im: 0 }, z)
    return largeK(inverse, hankelSums(inverse, order))
  }
  const { k0, k1 } = besselK01(z)
  return order === 0 ? k0 : k1
}

/** I of one order, likewise. */
export function besselI(z: Complex, order: 0 | 1): Complex {
  if (sizeOf(z) >= ASYMPTOTIC) {
    const inverse = over({ re: 1, im: 0 }, z)
    return largeI(z, inverse, hankelSums(inverse, order), order)
  }
  const { i0, i1 } = besselI01(z)
  return order === 0 ? i0 : i1
}

function seriesI(z: Complex) {
  const qr = (z.re * z.re - z.im * z.im) / 4
  const qi = (z.re * z.im) / 2
  let tr = 1
  let ti = 0
  let ar = 1
  let ai = 0
  let br = 1
  let bi = 0
  // |z²/4| < 1, so that the term k is below 1/k!²: below double precision from k = 11 on.
  for (let k = 1; k <= 12; k++) {
    const next = (tr * qr - ti * qi) / (k * k)
    ti = (tr * qi + ti * qr) / (k * k)
    tr = next
    ar += tr
    ai += ti
    br += tr / (k + 1)
    bi += ti / (k + 1)
  }
  const shrink = exponential({ re: -z.re, im: -z.im })
  return { i0: times(shrink, { re: ar, im: ai }), i1: times(shrink, times(scale(0.5, z), { re: br, im: bi })) }
}

function recurrenceI(z: Complex, size: number) {
  const { re: ur, im: ui } = over({ re: 2, im: 0 }, z)
  let hr = 0
  let hi = 0
  let lr = 1e-200
  let li = 0
  let sr = 0
  let si = 0
  // At this order I_k is below 1e-18 of e^z for every z of this size.
  for (let k = Math.ceil(24 + 1.5 * size); k >= 1; k--) {
    sr += lr
    si += li
    const nr = hr + k * (ur * lr - ui * li)
    const ni = hi + k * (ur * li + ui * lr)
    hr = lr
    hi = li
    lr = nr
    li = ni
  }
  const whole = { re: lr + 2 * sr, im: li + 2 * si }
  return { i0: over({ re: lr, im: li }, whole), i1: over({ re: hr, im: hi }, whole) }
}

interface Hankel {
  even: Complex
  odd: Complex
}

/** Σ a_k/z^k of one order: the sums of the even and of the odd terms. */
function hankelSums({ re: ur, im: ui }: Complex, order: 0 | 1): Hankel {
  let tr = 1
  let ti = 0
  let er = 1
  let ei = 0
  let or = 0
  let oi = 0
  for (let k = 1; k <= 40; k++) {
    const factor = (4 * order - (2 * k - 1) * (2 * k - 1)) / (8 * k)
    const next = factor * (tr * ur - ti * ui)
    ti = factor * (tr * ui + ti * ur)
    tr = next
    if ((k & 1) === 0) {
      er += tr
      ei += ti
    } else {
      or += tr
      oi += ti
    }
    if (Math.abs(tr) + Math.abs(ti) < NEGLIGIBLE) break
  }
  return { even: { re: er, im: ei }, odd: { re: or, im: oi } }
}

function asymptoticI(z: Complex) {
  const inverse = over({ re: 1, im: 0 }, z)
  return {
    i0: largeI(z, inverse, hankelSums(inverse, 0), 0),
    i1: largeI(z, inverse, hankelSums(inverse, 1), 1),
  }
}

function largeI(z: Complex, inverse: Complex, { even, odd }: Hankel, order: 0 | 1): Complex {
  const front = rootOf(scale(1 / (2 * Math.PI), inverse))
  // i·e^(−2z) above the real axis, −i·e^(−2z) below; on the axis it is nothing at these sizes. Beyond e^(−80) its angle means nothing.
  const other = z.re > 40 ? { re: 0, im: 0 } : exponential({ re: -2 * z.re, im: -2 * z.im })
  const turned = z.im >= 0 ? { re: -other.im, im: other.re } : { re: other.im, im: -other.re }
  const add = times(turned, { re: even.re + odd.re, im: even.im + odd.im })
  const sign = order === 0 ? 1 : -1
  return times(front, { re: even.re - odd.re + sign * add.re, im: even.im - odd.im + sign * add.im })
}

function asymptoticK(z: Complex) {
  const inverse = over({ re: 1, im: 0 }, z)
  return { k0: largeK(inverse, hankelSums(inverse, 0)), k1: largeK(inverse, hankelSums(inverse, 1)) }
}

function largeK(inverse: Complex, { even, odd }: Hankel): Complex {
  return times(rootOf(scale(Math.PI / 2, inverse)), plus(even, odd))
}

/** How far z is turned from the real axis: |sin arg z| near it, at most 1. */
const turnOf = (z: Complex) => Math.min(1, Math.abs(z.im) / z.re / 2)

/** |z|, as it is needed to choose by: below 1e-154 it is 0, above 1e154 infinite, in less time than the exact one takes. */
const sizeOf = (z: Complex) => Math.sqrt(z.re * z.re + z.im * z.im)

/** The root of a number in the right half plane. */
function rootOf(a: Complex): Complex {
  const re = Math.sqrt((modulus(a) + a.re) / 2)
  return { re, im: a.im / (2 * re) }
}

function seriesK(z: Complex) {
  const half = scale(0.5, z)
  const q = times(half, half)
  const log = { re: Math.log(modulus(half)) + EULER, im: Math.atan2(z.im, z.re) }
  let term = { re: 1, im: 0 }
  let harmonic = 0
  const k0 = { re: -log.re, im: -log.im }
  const rest = { re: log.re - 0.5, im: log.im }
  // K₁ = 1/z + (z/2)·Σ (z²/4)^k/(k!(k+1)!)·(ln(z/2) + γ − (H_k + H_(k+1))/2)
  for (let k = 1; k <= 14; k++) {
    term = scale(1 / (k * k), times(term, q))
    harmonic += 1 / k
    const a = times(term, { re: harmonic - log.re, im: -log.im })
    const b = times(term, { re: log.re - harmonic - 0.5 / (k + 1), im: log.im })
    k0.re += a.re
    k0.im += a.im
    rest.re += b.re / (k + 1)
    rest.im += b.im / (k + 1)
  }
  const grow = exponential(z)
  const inverse = over({ re: 1, im: 0 }, z)
  const add = times(half, rest)
  return { k0: times(grow, k0), k1: times(grow, { re: inverse.re + add.re, im: inverse.im + add.im }) }
}

/** K₁/K₀ by its continued fraction, then K₀ = 1/(z·(I₁ + I₀·K₁/K₀)) by the Wronskian. */
function fractionK(z: Complex, size: number, { i0, i1 }: { i0: Complex; i1: Complex }) {
  let tr = 0
  let ti = 0
  // The n-th step leaves e^(−4·√(2n|z|)·cos(arg z/2)) of its error to the first.
  for (let n = Math.ceil(6 + 90 / size); n >= 1; n--) {
    const br = 2 * (n + z.re) + tr
    const bi = 2 * z.im + ti
    const factor = -((n - 0.5) ** 2) / (br * br + bi * bi)
    tr = factor * br
    ti = -factor * bi
  }
  // The last step made a₁ = −1/4 of the tail: K₁/K₀ = (z + 1/2 + tail)/z.
  const ratio = over({ re: z.re + 0.5 + tr, im: z.im + ti }, z)
  const k0 = over({ re: 1, im: 0 }, times(z, plus(i1, times(i0, ratio))))
  return { k0, k1: times(k0, ratio) }
}
