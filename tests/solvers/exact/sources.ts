import { D, erfc, PI } from './functions.ts'

/* Exact temperatures around sources, in decimal arithmetic. */

/** Euler's constant, to 60 digits. */
const EULER = new D('0.577215664901532860606512090082402431042159335939923598805767')

/** E₁: the power series up to 8, beyond it the continued fraction whose terms are all positive. */
export function exactE1(u: D): D {
  if (u.gt(2e4)) return new D(0)
  if (u.gte(8)) {
    let tail = new D(0)
    for (let k = Math.ceil(60 + 2600 / u.toNumber()); k >= 1; k--)
      tail = new D(k).div(new D(1).plus(new D(k).div(u.plus(tail))))
    return u.neg().exp().div(u.plus(tail))
  }
  let power = new D(-1)
  let sum = EULER.neg().minus(u.ln())
  for (let n = 1; n < 200; n++) {
    power = power.mul(u).div(-n)
    sum = sum.plus(power.div(n))
    if (power.abs().lt('1e-66')) break
  }
  return sum
}

interface Around {
  rise: D
  flux: D
}

/** Per W/m of a line that has released heat since time 0. */
export function exactLine(r: D, t: D, k: D, a: D): Around {
  const u = r.mul(r).div(a.mul(t).mul(4))
  return {
    rise: exactE1(u).div(PI.mul(k).mul(4)),
    flux: u.neg().exp().div(PI.mul(r).mul(2)),
  }
}

/** Per W of a point that has released heat since time 0. */
export function exactPoint(r: D, t: D, k: D, a: D): Around {
  const eta = r.div(a.mul(t).sqrt().mul(2))
  const far = eta.gt(200)
  const tail = far ? new D(0) : erfc(eta)
  const decay = far ? new D(0) : eta.mul(eta).neg().exp()
  return {
    rise: tail.div(PI.mul(k).mul(r).mul(4)),
    flux: tail.plus(eta.mul(2).div(PI.sqrt()).mul(decay)).div(PI.mul(r).mul(r).mul(4)),
  }
}

/** Per J that a point has released at time 0. */
export function exactDose(r: D, t: D, k: D, a: D): Around {
  const four = a.mul(t).mul(4)
  const u = r.mul(r).div(four)
  const rise = u.gt(4e4) ? new D(0) : u.neg().exp().div(k.div(a)).div(PI.mul(four).pow('1.5'))
  return { rise, flux: rise.mul(k).mul(r).div(a.mul(t).mul(2)) }
}
