import type { Annulus } from './annulus-modes.ts'
import { besselI, besselIK, besselIK01, besselK } from './complex-bessel.ts'
import { type Complex, exponential, modulus, over, plus, scale, times } from './complex.ts'
import { type Contour, contourAt } from './contour.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'

/** Beyond this many diffusion lengths nothing arrives that could be told from zero. */
const FARTHEST = 60
/** e^(−NOTHING) of what a drive does at its face is below the roundings of the rest. */
const NOTHING = 45
/** Roundings of the Bessel functions and of the quotient they stand in, beside those of the contour. */
const OWN_ROUNDING = 40
/**
 * What the rule leaves out is e^(−36) of the pole at s = 0, and more of a pole of higher order, as the drift of an insulated wall has. It is
 * told as a share of what the drive does at its face; the flux through the wall, told to its own digits, has it among its roundings.
 */
const LEFT_OUT = 1e-14
const FAR_ROUNDING = 440

/** Both faces of an annulus at one node of a contour, in units of the diffusion length. Brackets without their e^(q·thickness). */
interface FaceNode {
  root: Complex
  /** |q| */
  length: number
  /** Weight over s and over the bracket of both faces. */
  front: Complex
  /** q·(K₁I₁ − I₁K₁) and the like, as they stand over the bracket in the flux of a face by its own drive. */
  near: readonly [Complex, Complex]
  /** e^(−q·thickness) */
  across: Complex
  /** Amplitudes of the solutions that fall from the inner face and from the outer, by a unit drive at either face. */
  fromInner: readonly [Complex, Complex]
  fromOuter: readonly [Complex, Complex]
}

interface Scaled {
  a: number
  b: number
  thickness: number
  /** Part of the slope and of the temperature in the condition at each face. */
  slope: readonly [number, number]
  level: readonly [number, number]
}

/** The annulus in units of the diffusion length √(at), itself given in units of the wall's thickness. */
function scaled({ innerRadius, inner, outer }: Annulus, root: number): Scaled {
  return {
    a: innerRadius / root,
    b: (innerRadius + 1) / root,
    thickness: 1 / root,
    slope: [inner.held ? 0 : 1, outer.held ? 0 : 1],
    level: [inner.held ? 1 : inner.film * root, outer.held ? 1 : outer.film * root],
  }
}

function faceNode({ a, b, thickness, slope, level }: Scaled, { root: q, weight }: Contour['nodes'][number]): FaceNode {
  const A = besselIK01(scale(a, q))
  const B = besselIK01(scale(b, q))
  const across = exponential(scale(-thickness, q))
  const twice = times(across, across)
  const back = (x: Complex, y: Complex, sign: number) => scale(sign, times(twice, times(x, y)))
  const c00 = plus(times(A.k0, B.i0), back(A.i0, B.k0, -1))
  const c10 = plus(times(A.k1, B.i0), back(A.i1, B.k0, 1))
  const c01 = plus(times(A.k0, B.i1), back(A.i0, B.k1, 1))
  const c11 = plus(times(A.k1, B.i1), back(A.i1, B.k1, -1))
  const mix = (s: number, x: Complex, l: number, y: Complex) => plus(scale(s, times(q, x)), scale(l, y))
  const nearInner = mix(slope[1], c11, level[1], c10)
  const nearOuter = mix(slope[0], c11, level[0], c01)
  const bracket = plus(scale(slope[0], times(q, nearInner)), scale(level[0], mix(slope[1], c01, level[1], c00)))
  return {
    root: q,
    length: modulus(q),
    front: over(over(weight, times(q, q)), bracket),
    near: [times(q, nearInner), times(q, nearOuter)],
    across,
    fromInner: [mix(slope[1], B.i1, level[1], B.i0), times(across, mix(slope[0], A.i1, -level[0], A.i0))],
    fromOuter: [times(across, mix(slope[1], B.k1, -level[1], B.k0)), mix(slope[0], A.k1, level[0], A.k0)],
  }
}

/** What drives a face, and by how much the rounding of its parts may have moved it. */
export interface FaceDrive {
  value: number
  slack: number
}

/** A place of the wall by its distances from both faces, in units of the thickness. */
export interface WallPlace {
  fromInner: number
  fromOuter: number
}

/**
 * A hollow cylinder at one early time, from the Laplace transform of the response to drives at its faces.
 *
 *   θ̂ = A·K₀(qr) + B·I₀(qr),  q = √s,  A and B from the two conditions −αθ′ + ηθ = g at r₁ and αθ′ + ηθ = g at r₂
 *
 * with every K and I scaled by its own exponential, so that only falling ones are left.
 *
 * Shapes    one time; places one by one.
 * Units     the wall's thickness, and its square over the diffusivity; drives as in `AnnulusResponse`.
 * Domain    √Fo from 1e-170 to 0.5.
 * Accuracy  relative to what the drives cause at their own faces 1e-13; the flux at the other face keeps its own digits. Beyond these the
 *           rounding of the radii counts where they are long beside the diffusion length.
 * Errors    none.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §13.4 (from memory).
 */
export class AnnulusStart {
  private readonly body: Scaled
  private readonly drives: readonly [FaceDrive, FaceDrive]
  private readonly nodes: FaceNode[]
  private readonly rounding: number
  private readonly root: number

  /** The drives: kelvins where the face is held, kelvins a thickness where it is not. */
  constructor(annulus: Annulus, drives: readonly [FaceDrive, FaceDrive], root: number) {
    const own = (held: boolean, { value, slack }: FaceDrive) =>
      held ? { value, slack } : { value: value * root, slack: slack * root }
    this.body = scaled(annulus, root)
    this.drives = [own(annulus.inner.held, drives[0]), own(annulus.outer.held, drives[1])]
    const contour = contourAt(1)
    this.nodes = contour.nodes.map((node) => faceNode(this.body, node))
    this.rounding = roundingOf(contour)
    this.root = root
  }

  /** Kelvins. */
  temperature(place: WallPlace): Estimate {
    return this.at(place, 0)
  }

  /** Outward, in kelvins a thickness. */
  flux(place: WallPlace): Estimate {
    const { value, error, method } = this.at(place, 1)
    return { value: value / this.root, error: error / this.root, method }
  }

  /** Order 0 the temperature, order 1 its slope turned: K falls as K₁, I rises as I₁. */
  private at(place: WallPlace, order: 0 | 1): Estimate {
    const x = place.fromInner / this.root
    const y = place.fromOuter / this.root
    const radius = this.body.a + x
    const sums = [new Sum(), new Sum()] as const
    for (const { root: q, front, length, fromInner, fromOuter } of this.nodes) {
      const factor = order === 0 ? front : times(front, q)
      const falls = q.re * x < NOTHING
      const rises = q.re * y < NOTHING
      const z = scale(radius, q)
      const both = falls && rises ? besselIK(z, order) : undefined
      if (falls) {
        const bessel = both?.k ?? besselK(z, order)
        const inward = times(factor, times(exponential(scale(-x, q)), bessel))
        sums[0].add(times(fromInner[0], inward), x === 0 ? 0 : length)
        sums[1].add(times(fromInner[1], inward), x === 0 ? 0 : length)
      }
      if (rises) {
        const bessel = both?.i ?? besselI(z, order)
        const outward = scale(order === 0 ? 1 : -1, times(factor, times(exponential(scale(-y, q)), bessel)))
        sums[0].add(times(fromOuter[0], outward), y === 0 ? 0 : length)
        sums[1].add(times(fromOuter[1], outward), y === 0 ? 0 : length)
      }
    }
    const [inner, outer] = [0, 1].map((d) => {
      const { size, moved, value } = sums[d]!
      const atFace = 1 / (this.body.slope[d]! + this.body.level[d]!)
      // Each of the two radii that a distance is made of is rounded.
      const error = EPS * (this.rounding * size + 2 * radius * moved) + LEFT_OUT * atFace
      return driven(this.drives[d]!, 1, { value, error, method: 'contour' })
    })
    return { value: inner!.value + outer!.value, error: inner!.error + outer!.error + TINY, method: 'contour' }
  }

  /** Flux into the body at a face by the drive there, in kelvins a thickness. */
  nearFlux(face: 0 | 1): Estimate {
    const unit = sumOf(this.nodes, this.rounding, (node) => times(node.front, node.near[face]))
    return driven(this.drives[face], 1 / this.root, unit)
  }

  /** Flux into the body at a face by the drive at the other, in kelvins a thickness: never of that drive's sign. */
  farFlux(face: 0 | 1): Estimate {
    const { thickness, level, a, b } = this.body
    if (level[face] === 0 || thickness > FARTHEST) return { value: 0, error: TINY, method: 'contour' }
    const contour = contourAt(1, thickness)
    const nodes = contour.nodes.map((node) => faceNode(this.body, node))
    const { value, error, method } = sumOf(nodes, FAR_ROUNDING + roundingOf(contour), (node) => node.front)
    const factor = -level[face] / ((face === 0 ? a : b) * this.root)
    const moved = 4 * EPS * a * thickness * Math.abs(value)
    return driven(this.drives[face === 0 ? 1 : 0], factor, { value, error: error + moved, method })
  }

  /** ∫θρ dρ by the drive at a face, in kelvins times the square of the thickness. */
  content(face: 0 | 1): Estimate {
    const { a, b, level } = this.body
    const radius = face === 0 ? a : b
    const other = level[face === 0 ? 1 : 0]
    const unit = sumOf(this.nodes, this.rounding, (node) => {
      const { root: q, front, near, across } = node
      const flow = plus(scale(radius, near[face]), scale(-other, across))
      return over(times(front, flow), times(q, q))
    })
    return driven(this.drives[face], this.root * this.root, unit)
  }
}

/** A sum over the nodes of a contour, with the sizes that its error is told by. */
class Sum {
  value = 0
  size = 0
  moved = 0

  add(one: Complex, length: number): void {
    const share = Math.abs(one.re) + Math.abs(one.im)
    this.value += one.re
    this.size += share
    this.moved += share * length
  }
}

function sumOf(nodes: readonly FaceNode[], rounding: number, at: (node: FaceNode) => Complex): Estimate {
  const sum = new Sum()
  for (const node of nodes) sum.add(at(node), 0)
  return { value: sum.value, error: EPS * rounding * sum.size, method: 'contour' }
}

/** A response to a unit drive, times a factor and the drive. */
function driven(drive: FaceDrive, factor: number, { value, error, method }: Estimate): Estimate {
  const own = Math.abs(drive.value) * error + drive.slack * (Math.abs(value) + error)
  return { value: drive.value * factor * value, error: Math.abs(factor) * own + TINY, method }
}

const roundingOf = ({ exponent }: Contour) => OWN_ROUNDING + 24 + 16 * exponent
