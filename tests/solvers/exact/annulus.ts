import { add, D, divide, exactBessel, type ExactComplex, exp, grow, multiply, negative, real, root } from './bessel.ts'

/*
 * Responses of a hollow cylinder and of the medium around one, in decimal arithmetic: the transform solved as two equations in the unscaled
 * amplitudes, inverted on Talbot's contour. The solvers share neither the contour nor the form of the transform, and late times none of it.
 */

/** Nodes of the contour: about 0.6 digits each. */
const NODES = 36
const PI = D.acos(-1)

/** f(t) from F(s), several at once. */
function invert<K extends string>(time: D, transform: (s: ExactComplex) => Record<K, ExactComplex>): Record<K, D> {
  const sums = {} as Record<K, D>
  const r = new D(2 * NODES).div(time.mul(5))
  for (let k = 0; k < NODES; k++) {
    const angle = PI.mul(k).div(NODES)
    const cot = k === 0 ? new D(0) : angle.cos().div(angle.sin())
    const s = k === 0 ? { re: r, im: new D(0) } : { re: r.mul(angle).mul(cot), im: r.mul(angle) }
    const turn = k === 0 ? real('0.5') : { re: new D(1), im: angle.plus(angle.mul(cot).minus(1).mul(cot)) }
    const weight = grow(r.div(NODES), multiply(exp(grow(time, s)), turn))
    const at = transform(s)
    for (const name of Object.keys(at) as K[]) {
      const one = multiply(at[name], weight).re
      sums[name] = sums[name] ? sums[name].plus(one) : one
    }
  }
  return sums
}

/** −slope·θ′ + level·θ = drive at a face, θ′ taken into the body, in units where k = a = 1. */
export interface ExactFace {
  slope: 0 | 1
  level: D
  drive: D
}

export type ExactRadial = Record<'temperature' | 'flux' | 'inner' | 'outer' | 'content', D>

const minus = (a: ExactComplex, b: ExactComplex) => add(a, negative(b))

/** Hollow cylinder r₁ < r < r₂ that starts at zero; flux outward at r, into the body at the faces; content ∫θr dr. */
export function exactAnnulus(
  r1: D,
  r2: D,
  r: D,
  time: D,
  [inner, outer]: readonly [ExactFace, ExactFace],
): ExactRadial {
  return invert(time, (s) => {
    const q = root(s)
    const [A, B, P] = [r1, r2, r].map((radius) => exactBessel(grow(radius, q)))
    // θ = x·K₀(qr)·e^(q·r₁) + y·I₀(qr)·e^(−q·r₂)
    const across = exp(grow(r1.minus(r2), q))
    const condition = (face: ExactFace, level: ExactComplex, slope: ExactComplex) =>
      add(grow(face.level, level), grow(new D(face.slope), multiply(q, slope)))
    const a1 = condition(inner, A!.k0, A!.k1)
    const a2 = multiply(across, condition(inner, A!.i0, negative(A!.i1)))
    const b1 = multiply(across, condition(outer, B!.k0, negative(B!.k1)))
    const b2 = condition(outer, B!.i0, B!.i1)
    const determinant = minus(multiply(a1, b2), multiply(a2, b1))
    const g1 = divide(real(inner.drive), s)
    const g2 = divide(real(outer.drive), s)
    const x = divide(minus(multiply(g1, b2), multiply(a2, g2)), determinant)
    const y = divide(minus(multiply(a1, g2), multiply(g1, b1)), determinant)
    const down = exp(grow(r1.minus(r), q))
    const up = exp(grow(r.minus(r2), q))
    const flux = (K: ExactComplex, I: ExactComplex) => multiply(q, minus(multiply(x, K), multiply(y, I)))
    const into = flux(A!.k1, multiply(across, A!.i1))
    const out = flux(multiply(across, B!.k1), B!.i1)
    return {
      temperature: add(multiply(x, multiply(P!.k0, down)), multiply(y, multiply(P!.i0, up))),
      flux: flux(multiply(P!.k1, down), multiply(P!.i1, up)),
      inner: into,
      outer: negative(out),
      content: divide(minus(grow(r1, into), grow(r2, out)), s),
    }
  })
}

/** The medium outside r₁ that starts at zero; content per radian. */
export function exactMedium(r1: D, r: D, time: D, face: ExactFace): Omit<ExactRadial, 'outer'> {
  return invert(time, (s) => {
    const q = root(s)
    const [A, P] = [r1, r].map((radius) => exactBessel(grow(radius, q)))
    const condition = add(grow(face.level, A!.k0), grow(new D(face.slope), multiply(q, A!.k1)))
    const x = divide(divide(real(face.drive), s), condition)
    const down = exp(grow(r1.minus(r), q))
    const inner = multiply(x, multiply(q, A!.k1))
    return {
      temperature: multiply(x, multiply(P!.k0, down)),
      flux: multiply(x, multiply(q, multiply(P!.k1, down))),
      inner,
      content: divide(grow(r1, inner), s),
    }
  })
}
