import { type Complex, modulus, times } from './complex.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'

/** Where a transform is to be known, and what its value there counts. */
export interface ContourNode {
  /** √s, in the right half plane. */
  root: Complex
  /** Weight of the transform without its factor e^(−reach·√s): f(t) = Σ Re(weight·F(s)·e^(reach·√s)). */
  weight: Complex
}

export interface Contour {
  nodes: readonly ContourNode[]
  /** c²t: the exponent that roundings are amplified by. */
  exponent: number
}

/* Nearer to the transform's pole at s = 0 the step would have to be smaller; farther, the factor e^(c²t) would cost digits. */
const LEAST_EXPONENT = 4.19
/** The integrand is left out where it has fallen to e^(−DEPTH) of its size on the real axis. */
const DEPTH = 38

/**
 * Nodes for the inversion of a Laplace transform at one time, on the parabola √s = c(1 + iy).
 *
 *   f(t) = (1/2πi)·∫ F(s)·e^(st) ds = (2c²/π)·Re ∫₀^∞ F·e^(st)·(1 + iy) dy,   by the trapezoidal rule in y
 *
 * with c = reach/(2t), the saddle point of e^(st − reach·√s), and at least √(4.19/t). So an answer as small as
 * e^(−reach²/4t) keeps its relative accuracy. The factor e^(−reach·√s) is part of the weights: apart, the two would
 * overflow and vanish.
 *
 * Shapes    20 nodes, fewer where the reach is long.
 * Units     time s; reach √s (a distance over the root of the diffusivity).
 * Domain    t > 0; reach ≥ 0. F analytic right of the negative real axis, and there at most of the size of e^(−reach·√s)
 *           times a power of s. 1/√s or 1/s at the origin is allowed.
 * Accuracy  of the rule e^(−33) of the sum of |weight·F|; `invert` gives the error of the sum.
 * Errors    none.
 * Source    J. A. C. Weideman, L. N. Trefethen, Parabolic and hyperbolic contours for computing the Bromwich integral,
 *           Mathematics of Computation 76 (2007), §3 (from memory).
 */
export function contourAt(time: number, reach = 0): Contour {
  const saddle = reach / (2 * Math.sqrt(time))
  const exponent = Math.max(LEAST_EXPONENT, saddle * saddle)
  const width = Math.sqrt(exponent)
  const c = width / Math.sqrt(time)
  // The pole at y = i leaves e^(−2π/step), to be seen against an answer of e^(−saddle²); the bell needs the second.
  const step = Math.min((2 * Math.PI) / (36 + exponent), Math.PI / Math.sqrt(34 * exponent))
  const count = Math.ceil(Math.sqrt(DEPTH / exponent) / step)
  const size = ((2 * exponent) / (Math.PI * time)) * step
  const nodes = Array.from({ length: count + 1 }, (_, k): ContourNode => {
    const y = k * step
    const decay = (k === 0 ? 0.5 : 1) * size * Math.exp(exponent * (1 - y * y) - 2 * saddle * width)
    const angle = 2 * (exponent - saddle * width) * y
    const turn = { re: decay * Math.cos(angle), im: decay * Math.sin(angle) }
    return { root: { re: c, im: c * y }, weight: times(turn, { re: 1, im: y }) }
  })
  return { nodes, exponent }
}

/**
 * f(t) from its transform, without the factor e^(−reach·√s), at the nodes of a contour. The error counts what the rounding of about eight
 * inputs and operations moves in each node, amplified by the exponent.
 */
export function invert({ nodes, exponent }: Contour, at: (node: ContourNode, k: number) => Complex): Estimate {
  let value = 0
  let size = 0
  for (let k = 0; k < nodes.length; k++) {
    const { weight } = nodes[k]!
    const F = at(nodes[k]!, k)
    value += weight.re * F.re - weight.im * F.im
    size += modulus(weight) * modulus(F)
  }
  return { value, error: EPS * (24 + 16 * exponent) * size + TINY, method: 'contour' }
}
