import { besselI, besselI01 } from './complex-bessel.ts'
import { type Complex, complex, exponential, minus, modulus, over, plus, scale, times } from './complex.ts'
import { type Contour, contourAt, invert } from './contour.ts'
import { fluxFraction } from './convective-half-space.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'
import type { FilmedBody, Moment } from './unit-body.ts'

/*
 * A cylinder of radius 1 at short times, from its Laplace transform in Fo with p = √s:
 *
 *   1 − θ   (1/s)·Bi·I₀(pρ)/(p·I₁(p) + Bi·I₀(p)),   held face (1/s)·I₀(pρ)/I₀(p)
 *   ∂(1 − θ)/∂ρ has p·I₁(pρ) in place of I₀(pρ), its mean 2·I₁(p)/p
 *
 * I₀ and I₁ are scaled by e^(−p); the factor e^(−pδ) that is left belongs to the contour, whose reach is the depth.
 *
 * Source   H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §13.3.
 */

/** e^(−δ²/(4Fo)) and all that it multiplies count as zero beyond. */
const VANISHED = 680
/** Before it a place is the face itself or deep, and its rounding changes nothing. */
const AT_ONCE = 1e-200

export class CylinderContour {
  private readonly body: FilmedBody
  private readonly unit: number
  private known: { moment: Moment; exponent: number; drives: readonly Complex[] } | undefined

  constructor(body: FilmedBody) {
    this.body = body
    this.unit = body.biot === Infinity ? 1 : body.biot
  }

  completed(j: number, m: Moment): Estimate {
    const found = this.at(j, m, 0)
    const value = Math.min(1, Math.max(0, found.value))
    return { ...found, value, error: Math.min(1, found.error + this.rule(j, m) + this.moved(j, m)) }
  }

  /** In units of Bi, or of 1 where the face is held. */
  flux(j: number, m: Moment): Estimate {
    const found = this.at(j, m, 1)
    const value = this.body.inner[j] === 0 ? 0 : found.value / this.unit
    return { ...found, value, error: found.error / this.unit + this.fluxMoved(j, m) }
  }

  /** What the rounding of a depth moves the flux by: it falls by its own size over the depth reached. */
  fluxMoved(j: number, m: Moment): number {
    const { deltas, shifts } = this.body
    if (shifts[j] === 0 || m.fourier < AT_ONCE) return 0
    const bend = (2 * (deltas[j]! / (2 * m.root) + 1)) / m.root
    return (this.steepest(j, m) * Math.min(1, EPS * shifts[j]! * bend)) / this.unit
  }

  /** 1 − completed while that is small; from there on the transform of θ itself, which keeps its digits at the face. */
  remaining(j: number, m: Moment): Estimate {
    const done = this.completed(j, m)
    if (done.value < 0.5) return { ...done, value: 1 - done.value, error: done.error + EPS }
    const contour = contourAt(m.fourier)
    const found = invert(contour, ({ root: p }) => {
      const face = besselI01(p)
      const drop = dropTo(face, p, this.body.deltas[j]!, this.body.inner[j]!)
      const film = this.body.biot === Infinity ? drop : plus(drop, scale(1 / this.body.biot, times(p, face.i1)))
      return times(this.drive(face, p), film)
    })
    const error = widened(found, contour) + this.moved(j, m)
    return { value: Math.min(1, Math.max(0, found.value)), error: Math.min(1, error), method: 'contour' }
  }

  heatFraction(m: Moment): Estimate {
    const contour = contourAt(m.fourier)
    const found = invert(contour, ({ root: p }) => {
      const face = besselI01(p)
      return times(this.drive(face, p), scale(2, over(face.i1, p)))
    })
    return { ...found, value: Math.min(1, found.value), error: widened(found, contour) }
  }

  /** I₀ or p·I₁ at a place, driven from the face. */
  private at(j: number, m: Moment, order: 0 | 1): Estimate {
    const delta = this.body.deltas[j]!
    const depth = delta / (2 * m.root)
    if (depth * depth > VANISHED) return { value: 0, error: TINY, method: 'contour' }
    const contour = contourAt(m.fourier, delta)
    const drives = this.drivesAt(contour, m)
    const inner = this.body.inner[j]!
    const found = invert(contour, ({ root: p }, k) => {
      const there = besselI(scale(inner, p), order)
      return times(drives[k]!, order === 0 ? there : times(p, there))
    })
    return { ...found, error: widened(found, contour) }
  }

  /** The drive at the nodes of a contour. All places that are not deep have the same nodes, and share them. */
  private drivesAt({ nodes, exponent }: Contour, m: Moment): readonly Complex[] {
    if (this.known?.moment !== m || this.known.exponent !== exponent) {
      const drives = nodes.map(({ root }) => this.drive(besselI01(root), root))
      this.known = { moment: m, exponent, drives }
    }
    return this.known.drives
  }

  /** Bi/(s·(p·I₁ + Bi·I₀)). */
  private drive({ i0, i1 }: Pair, p: Complex): Complex {
    const face = this.body.biot === Infinity ? i0 : plus(i0, scale(1 / this.body.biot, times(p, i1)))
    return over(complex(1), times(times(p, p), face))
  }

  /**
   * What the poles at 0 and −z² leave in the trapezoidal rule: they lie at the same distance of it, and where Bi is small the
   * first two nearly cancel.
   */
  private rule(j: number, m: Moment): number {
    const saddle = this.body.deltas[j]! / (2 * m.root)
    const exponent = Math.max(4, saddle * saddle)
    const nearness = (0.5 * this.body.biot * m.fourier * (36 + exponent) ** 2) / exponent
    return 8 * Math.exp(-36 - exponent) * Math.min(1, nearness)
  }

  /** What the rounding of a depth that is reckoned from a radius moves the response by. */
  moved(j: number, m: Moment): number {
    const shift = EPS * this.body.shifts[j]!
    return shift === 0 || m.fourier < AT_ONCE ? 0 : Math.min(1, shift * this.steepest(j, m))
  }

  /** The most that the slope of the response is within that rounding: a half space is at least as steep. */
  private steepest(j: number, m: Moment): number {
    const { biot, deltas, inner, shifts } = this.body
    const near = Math.max(0, deltas[j]! - EPS * shifts[j]!) / (2 * m.root)
    if (near * near > VANISHED) return 0
    const slope =
      biot === Infinity ? Math.exp(-near * near) / (1.77 * m.root) : biot * fluxFraction(near, biot * m.root)
    return (1.5 * slope) / Math.sqrt(Math.max(inner[j]!, m.fourier))
  }
}

type Pair = ReturnType<typeof besselI01>

/** Σ|weight·F| carries the errors of three Bessel functions and of their arguments beside what `invert` counts. */
function widened(found: Estimate, contour: Contour): number {
  return found.error * (1 + 40 / (24 + 16 * contour.exponent)) + TINY
}

/**
 * I₀(p) − I₀(pρ), scaled by e^(−p). Where the two nearly cancel by Taylor's series in δ from Bessel's equation: with
 * I₀(p(1 − δ)) = Σ a_k δ^k, (k + 2)(k + 1)·a_(k+2) = (k + 1)²·a_(k+1) + p²(a_k − a_(k−1)).
 */
function dropTo({ i0, i1 }: Pair, p: Complex, delta: number, inner: number): Complex {
  if (delta === 0) return complex(0)
  if (delta > 0.3 || modulus(p) * delta > 0.5) {
    const there = times(exponential(scale(-delta, p)), besselI(scale(inner, p), 0))
    return minus(i0, there)
  }
  const square = scale(delta * delta, times(p, p))
  let before = complex(0)
  let here = i0
  let next = scale(-delta, times(p, i1))
  let sum = next
  for (let k = 0; k < 40; k++) {
    const source = times(square, minus(here, scale(delta, before)))
    const after = scale(1 / ((k + 2) * (k + 1)), plus(scale((k + 1) * (k + 1) * delta, next), source))
    before = here
    here = next
    next = after
    sum = plus(sum, next)
    if (modulus(next) < 1e-18 * modulus(sum)) break
  }
  return scale(-1, sum)
}
