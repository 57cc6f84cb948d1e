import { Decimal } from 'decimal.js'

/*
 * Error functions in decimal arithmetic of any precision: the exact side of every accuracy test. They share nothing
 * with the solvers: power series by terms of one sign, and a continued fraction where the series would be long.
 */
export const D = Decimal.clone({ precision: 60, toExpNeg: -9e15, toExpPos: 9e15, maxE: 9e15, minE: -9e15 })
export type D = Decimal

const pi = D.acos(-1)
export const PI = pi
const sqrtPi = pi.sqrt()

/** e^(x²) erfc(x) for x ≥ 0. */
export function erfcx(x: D): D {
  if (x.lt(5)) return x.mul(x).exp().minus(erfSeries(x))
  if (x.gt('1e40')) return new D(1).div(sqrtPi.mul(x))
  // Lentz is not needed: all partial denominators are positive, so the tail may start anywhere deep enough.
  const depth = x.lt(10) ? 900 : x.lt(40) ? 250 : x.lt(1e4) ? 60 : 14
  let tail = new D(0)
  for (let k = depth; k >= 1; k--) tail = new D(k).div(2).div(x.plus(tail))
  return new D(1).div(sqrtPi.mul(x.plus(tail)))
}

/** e^(x²) erf(x) = (2x/√π) Σ (2x²)ⁿ/(2n+1)!!, all terms positive. */
function erfSeries(x: D): D {
  const square = x.mul(x).mul(2)
  let term = new D(1)
  let sum = new D(1)
  for (let n = 1; n < 4000; n++) {
    term = term.mul(square).div(2 * n + 1)
    sum = sum.plus(term)
    if (term.lt(sum.mul('1e-62'))) break
  }
  return sum.mul(2).mul(x).div(sqrtPi)
}

export function erfc(x: D): D {
  return x.mul(x).neg().exp().mul(erfcx(x))
}

export function erf(x: D): D {
  return x.lt(5) ? x.mul(x).neg().exp().mul(erfSeries(x)) : new D(1).minus(erfc(x))
}

/** erfcx(b) − 1 + 2b/√π, the energy function of a half space behind a film. */
export function energyFunction(b: D): D {
  if (b.gt('0.5')) return erfcx(b).minus(1).plus(b.mul(2).div(sqrtPi))
  // Σ_{n≥2} (−b)ⁿ/Γ(n/2 + 1), by two recurrences of the gamma function.
  let even = new D(1)
  let odd = sqrtPi.div(2)
  let sum = new D(0)
  for (let n = 2; n < 400; n++) {
    if (n % 2 === 0) even = even.mul(n / 2)
    else odd = odd.mul(new D(n).div(2))
    const term = b
      .neg()
      .pow(n)
      .div(n % 2 === 0 ? even : odd)
    sum = sum.plus(term)
    if (term.abs().lt(sum.abs().mul('1e-62'))) break
  }
  return sum
}
