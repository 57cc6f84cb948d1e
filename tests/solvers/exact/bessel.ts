import { D as Sixty } from './functions.ts'

/*
 * Modified Bessel functions of complex argument in decimal arithmetic: power series up to |z| = 40 with digits enough for their
 * cancellation, beyond it the asymptotic series.
 */
export const D = Sixty.clone({ precision: 75 })
export type D = Sixty

export interface ExactComplex {
  re: D
  im: D
}

const EULER = new D(
  '0.5772156649015328606065120900824024310421593359399235988057672348848677267776646709369470632917467495146314472498070824809605',
)
const PI = D.acos(-1)
export const real = (x: number | string | D): ExactComplex => ({ re: new D(x), im: new D(0) })
export const exact = (re: number, im: number): ExactComplex => ({ re: new D(re), im: new D(im) })
export const add = (a: ExactComplex, b: ExactComplex): ExactComplex => ({ re: a.re.plus(b.re), im: a.im.plus(b.im) })
export const grow = (factor: D, a: ExactComplex): ExactComplex => ({ re: factor.mul(a.re), im: factor.mul(a.im) })
export const multiply = (a: ExactComplex, b: ExactComplex): ExactComplex => ({
  re: a.re.mul(b.re).minus(a.im.mul(b.im)),
  im: a.re.mul(b.im).plus(a.im.mul(b.re)),
})
const square = (a: ExactComplex) => a.re.mul(a.re).plus(a.im.mul(a.im))
export const divide = (a: ExactComplex, b: ExactComplex): ExactComplex =>
  grow(new D(1).div(square(b)), multiply(a, { re: b.re, im: b.im.neg() }))
export const size = (a: ExactComplex): D => square(a).sqrt()
export const exp = (a: ExactComplex): ExactComplex => grow(a.re.exp(), { re: a.im.cos(), im: a.im.sin() })
export const negative = (a: ExactComplex) => grow(new D(-1), a)
const angle = (a: ExactComplex) => D.atan2(a.im, a.re)
const log = (a: ExactComplex): ExactComplex => ({ re: size(a).ln(), im: angle(a) })
export const root = (a: ExactComplex) => {
  const half = angle(a).div(2)
  return grow(size(a).sqrt(), { re: half.cos(), im: half.sin() })
}

export interface ExactBessel {
  i0: ExactComplex
  i1: ExactComplex
  k0: ExactComplex
  k1: ExactComplex
}

/** I₀, I₁ times e^(−z) and K₀, K₁ times e^z, to 30 digits. */
export function exactBessel(z: ExactComplex): ExactBessel {
  return size(z).lt(40) ? bySeries(z) : byAsymptotics(z)
}

function bySeries(z: ExactComplex): ExactBessel {
  const half = grow(new D('0.5'), z)
  const quarter = multiply(half, half)
  const logarithm = add(log(half), real(EULER))
  let term = real(1)
  let harmonic = new D(0)
  let i0 = real(0)
  let i1 = real(0)
  let k0 = real(0)
  let k1 = real(0)
  for (let k = 0; k < 400; k++) {
    if (k > 0) {
      term = grow(new D(1).div(k * k), multiply(term, quarter))
      harmonic = harmonic.plus(new D(1).div(k))
    }
    const next = new D(1).div(k + 1)
    i0 = add(i0, term)
    i1 = add(i1, grow(next, term))
    k0 = add(k0, multiply(term, add(real(harmonic), negative(logarithm))))
    const bracket = add(logarithm, real(harmonic.plus(next.div(2)).neg()))
    k1 = add(k1, grow(next, multiply(term, bracket)))
    if (size(term).lt('1e-70')) break
  }
  const up = exp(z)
  const down = exp(negative(z))
  return {
    i0: multiply(down, i0),
    i1: multiply(down, multiply(half, i1)),
    k0: multiply(up, k0),
    k1: multiply(up, add(divide(real(1), z), multiply(half, k1))),
  }
}

function byAsymptotics(z: ExactComplex): ExactBessel {
  const inverse = divide(real(1), z)
  const other = exp(grow(new D(-2), z))
  const turned = multiply(other, { re: new D(0), im: new D(z.im.lt(0) ? -1 : 1) })
  const sums = [0, 1].map((order) => {
    let term = real(1)
    let plus = real(0)
    let minus = real(0)
    let least = size(term)
    for (let k = 0; k < 200; k++) {
      if (k > 0) term = grow(new D(4 * order - (2 * k - 1) ** 2).div(8 * k), multiply(term, inverse))
      if (size(term).gt(least)) break
      least = size(term)
      plus = add(plus, term)
      minus = k % 2 === 0 ? add(minus, term) : add(minus, negative(term))
      if (least.lt('1e-40')) break
    }
    return { plus, minus }
  })
  const [zero, one] = sums as [{ plus: ExactComplex; minus: ExactComplex }, { plus: ExactComplex; minus: ExactComplex }]
  const frontI = root(grow(new D(1).div(PI.mul(2)), inverse))
  const frontK = root(grow(PI.div(2), inverse))
  return {
    i0: multiply(frontI, add(zero.minus, multiply(turned, zero.plus))),
    i1: multiply(frontI, add(one.minus, negative(multiply(turned, one.plus)))),
    k0: multiply(frontK, zero.plus),
    k1: multiply(frontK, one.plus),
  }
}
