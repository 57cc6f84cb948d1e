import { D, PI } from './functions.ts'

/* A slab of length 1 between two faces by its eigenfunctions in decimal arithmetic, each coefficient by its plain integral. */

export interface ExactFace {
  /** Infinite where the face is held. */
  biot: D | undefined
  /** Temperature of the fluid or face, and flux absorbed, as slope. */
  temperature: D
  flux: D
}

export interface ExactSlab {
  left: ExactFace
  right: ExactFace
  /** Heat released, as temperature per Fourier number. */
  source: D
}

const zero = new D(0)

/** Steady profile c₀ + c₁X − sX²/2. */
function steadyOf({ left, right, source }: ExactSlab): { c0: D; c1: D } {
  // −g·c₁ + b·c₀ = r at the left, g(c₁ − s) + b(c₀ + c₁ − s/2) = r at the right; g = 0 where held.
  const law = ({ biot, temperature, flux }: ExactFace) =>
    biot ? { g: new D(1), b: biot, r: biot.mul(temperature).plus(flux) } : { g: zero, b: new D(1), r: temperature }
  const l = law(left)
  const r = law(right)
  const second = r.r.plus(source.mul(r.g)).plus(source.mul(r.b).div(2))
  const divisor = l.b.mul(r.g.plus(r.b)).plus(l.g.mul(r.b))
  const c0 = l.r.mul(r.g.plus(r.b)).plus(l.g.mul(second)).div(divisor)
  const c1 = l.b.mul(second).minus(r.b.mul(l.r)).div(divisor)
  return { c0, c1 }
}

function rootOf(left: D | undefined, right: D | undefined, n: number): D {
  const half = PI.div(2)
  const phase = (biot: D | undefined, z: D) => (biot ? D.atan(biot.div(z)) : half)
  const slope = (biot: D | undefined, z: D) => (biot ? biot.div(biot.mul(biot).plus(z.mul(z))) : zero)
  let z = PI.mul(n).plus(n === 0 ? 1 : 0.7)
  for (let step = 0; step < 60; step++) {
    const value = z.minus(PI.mul(n)).minus(phase(left, z)).minus(phase(right, z))
    const next = z.minus(value.div(slope(left, z).plus(slope(right, z)).plus(1)))
    if (next.minus(z).abs().lt('1e-50')) return next
    z = next
  }
  return z
}

export interface ExactValues {
  temperature: D
  left: D
  right: D
  mean: D
}

/** From temperature 0 everywhere, at a Fourier number not below about 0.004. Either face must hold or pass heat. */
export function exactTwoSided(slab: ExactSlab, fourier: D, X: D): ExactValues {
  const { c0, c1 } = steadyOf(slab)
  const s = slab.source
  let temperature = c0.plus(c1.mul(X)).minus(s.mul(X).mul(X).div(2))
  let left = c1.neg()
  let right = c1.minus(s)
  let mean = c0.plus(c1.div(2)).minus(s.div(6))
  for (let n = 0; n < 120; n++) {
    const z = rootOf(slab.left.biot, slab.right.biot, n)
    const decay = z.mul(z).mul(fourier).neg().exp()
    if (decay.lt('1e-56')) break
    // φ = a cos zX + b sin zX.
    const a = slab.left.biot ? new D(1) : zero
    const b = slab.left.biot ? slab.left.biot.div(z) : new D(1)
    const [cos, sin] = [z.cos(), z.sin()]
    const ones = a
      .mul(sin)
      .plus(b.mul(new D(1).minus(cos)))
      .div(z)
    const xs = a.mul(sin.div(z).plus(cos.minus(1).div(z.mul(z)))).plus(b.mul(sin.div(z.mul(z)).minus(cos.div(z))))
    // ∫X²cos zX and ∫X²sin zX.
    const cc = sin
      .div(z)
      .plus(cos.mul(2).div(z.pow(2)))
      .minus(sin.mul(2).div(z.pow(3)))
    const ss = cos
      .neg()
      .div(z)
      .plus(sin.mul(2).div(z.pow(2)))
      .plus(cos.minus(1).mul(2).div(z.pow(3)))
    const squares = a.mul(cc).plus(b.mul(ss))
    const twice = sin.mul(cos).div(z.mul(2))
    const norm = a
      .mul(a)
      .mul(new D('0.5').plus(twice))
      .plus(b.mul(b).mul(new D('0.5').minus(twice)))
      .plus(a.mul(b).mul(sin.mul(sin)).div(z))
    const amount = c0.mul(ones).plus(c1.mul(xs)).minus(s.mul(squares).div(2)).div(norm).neg().mul(decay)
    temperature = temperature.plus(amount.mul(a.mul(z.mul(X).cos()).plus(b.mul(z.mul(X).sin()))))
    left = left.minus(amount.mul(b.mul(z)))
    right = right.plus(amount.mul(z).mul(b.mul(cos).minus(a.mul(sin))))
    mean = mean.plus(amount.mul(ones))
  }
  return { temperature, left, right, mean }
}
