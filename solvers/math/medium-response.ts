import { besselK, besselK01 } from './complex-bessel.ts'
import { type Complex, complex, exponential, minus, modulus, over, plus, scale, times } from './complex.ts'
import { type Contour, contourAt, type ContourNode } from './contour.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'

/** Beyond this many diffusion lengths less than 1e-300 of a change arrives. */
const FARTHEST = 54
/** Roundings of the Bessel functions and their quotient, and what the rule leaves out, beside the roundings of the contour. */
const OWN_ROUNDING = 80

/** slope·(−θ′) + level·θ = 1 at the face: held 0 and 1, a film 1 and hℓ/k, a flux 1 and 0. */
export interface MediumFace {
  slope: 0 | 1
  level: number
}

/** Bessel functions at the face, at one node, and the condition there. */
interface Node extends ContourNode {
  k0: Complex
  k1: Complex
  condition: Complex
}

/**
 * The endless body outside a cylinder at one time, from the Laplace transform of the response to a unit drive at its face.
 *
 *   θ̂ = (1/s)·K₀(qr) / (α·q·K₁(qR) + η·K₀(qR)),   q = √s;   the flux has q·K₁(qr) in place of K₀(qr)
 *
 * Each place has its own contour, through the saddle of e^(st − q(r − R)), so that a change keeps its digits however little of it has arrived.
 *
 * Shapes    one time; places one by one, by their distance from the face.
 * Units     lengths in diffusion lengths √(at), temperatures by the drive.
 * Domain    radius/√(at) from 1e-20 to 1e175; level 0..1e18.
 * Accuracy  relative 3e-14 for changes, fluxes and the heat taken up; beyond this the rounding of r and R counts where they are long beside the
 *           diffusion length. Tests hold the stated errors to decimal values.
 * Errors    none.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §13.5 (from memory).
 */
export class MediumResponse {
  private readonly radius: number
  private readonly face: MediumFace
  private readonly contour: Contour
  private readonly nodes: Node[]

  constructor(radius: number, face: MediumFace) {
    this.radius = radius
    this.face = face
    this.contour = contourAt(1)
    this.nodes = this.contour.nodes.map((node) => this.node(node))
  }

  temperature(distance: number): Estimate {
    return this.at(distance, 'k0')
  }

  /** Outward, per diffusion length. */
  flux(distance: number): Estimate {
    return this.at(distance, 'k1')
  }

  /** What the temperature of a face with a level has yet to change, times that level. */
  remaining(distance: number): Estimate {
    const { slope, level } = this.face
    if (slope === 0 && distance === 0) return { value: 0, error: 0, method: 'closed-form' }
    const sum = new Sum()
    for (const { root: q, weight, k0, k1, condition } of this.nodes) {
      const front = over(over(weight, condition), times(q, q))
      const arrived = times(exponential(scale(-distance, q)), this.placed(q, distance, 'k0', k0))
      // At the face itself the two are one, and leave nothing.
      const left = distance === 0 ? complex(0) : scale(level, minus(k0, arrived))
      sum.add(times(front, plus(scale(slope, times(q, k1)), left)))
      if (distance > 0) sum.move(times(front, scale(level, arrived)), q)
    }
    return this.estimate(sum, distance, this.contour)
  }

  /** Heat taken up per unit of circumference. */
  heat(): Estimate {
    const sum = new Sum()
    for (const { root: q, weight, k1, condition } of this.nodes)
      sum.add(over(over(times(times(weight, q), k1), condition), times(times(q, q), times(q, q))))
    return this.estimate(sum, 0, this.contour)
  }

  private node(node: ContourNode): Node {
    const { slope, level } = this.face
    const { k0, k1 } = besselK01(scale(this.radius, node.root))
    const { root, weight } = node
    return { root, weight, k0, k1, condition: plus(scale(slope, times(node.root, k1)), scale(level, k0)) }
  }

  private placed(q: Complex, distance: number, name: 'k0' | 'k1', atFace: Complex): Complex {
    return distance === 0 ? atFace : besselK(scale(this.radius + distance, q), name === 'k0' ? 0 : 1)
  }

  private at(distance: number, name: 'k0' | 'k1'): Estimate {
    if (distance > FARTHEST) return { value: 0, error: TINY, method: 'contour' }
    const contour = distance === 0 ? this.contour : contourAt(1, distance)
    // As long as the saddle is left of the pole's own distance, the nodes are the same and only the weights differ.
    const same = contour.exponent === this.contour.exponent
    const nodes = contour.nodes.map((node, k): Node => {
      if (!same) return this.node(node)
      const { root, k0, k1, condition } = this.nodes[k]!
      return { root, weight: node.weight, k0, k1, condition }
    })
    const sum = new Sum()
    for (const node of nodes) {
      const { root: q, weight, condition } = node
      const factor = name === 'k0' ? weight : times(weight, q)
      const one = over(over(times(factor, this.placed(q, distance, name, node[name])), condition), times(q, q))
      sum.add(one)
      if (distance > 0) sum.move(one, q)
    }
    return this.estimate(sum, distance, contour)
  }

  /** Beside the roundings of the terms, those of both radii move what has come through the distance between them. */
  private estimate({ value, size, moved }: Sum, distance: number, { exponent }: Contour): Estimate {
    const error = EPS * ((OWN_ROUNDING + 24 + 16 * exponent) * size + (2 * this.radius + 3 * distance) * moved)
    return { value, error: error + TINY, method: 'contour' }
  }
}

/** A sum over the nodes of a contour, with the sizes that its error is told by. */
class Sum {
  value = 0
  size = 0
  moved = 0

  add(one: Complex): void {
    this.value += one.re
    this.size += modulus(one)
  }

  move(one: Complex, q: Complex): void {
    this.moved += modulus(one) * modulus(q)
  }
}
