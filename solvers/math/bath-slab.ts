import { type Bath, type BathModes, bathModes } from './bath-roots.ts'
import { complex, type Complex, exponential, over, plus, scale, times } from './complex.ts'
import { contourAt } from './contour.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'
import type { Moment } from './two-sided-body.ts'
import { exponentialLessOne, sizeOf } from './two-sided-waves.ts'

const { nodes, exponent } = contourAt(1)
/** What one node is off by in units of EPS, with what the rule leaves. */
const AMPLIFIED = 64 + 16 * exponent
const DECAY = 50

interface Node {
  weight: Complex
  /** √p, its tanh, and √p·tanh √p. */
  root: Complex
  tanh: Complex
  flow: Complex
  /** Transforms of the bath and of the face, per time. */
  bath: Complex
  face: Complex
  /** 1 + e^(−2√p). */
  whole: Complex
}

/**
 * A slab of length 1 with an insulated far plane, at 0, and a stirred bath of γ times its capacity at 1, which come to γ/(1 + γ):
 *
 *   bath = γ(1 + f/Bi)/D,   face = γ/D,   flux f·γ/D,   D = γp(1 + f/Bi) + f,   f = √p·tanh √p   (transforms)
 *   bath = γ/(1 + γ) + Σ (2γ/E)·e^(−q²Fo),   flux Σ (2γ²q²/E)·e^(−q²Fo),   E = γ + γ²q²/Bi + (1 − γq²/Bi)² + γ²q²
 *
 * Until the slowest mode has fallen to 1/e the transforms are inverted, in which nothing cancels however weak the film; from then on
 * the series.
 *
 * Shapes    one moment; one place at a time, by depth and by distance to the far plane.
 * Units     none.
 * Domain    Fo > 0; γ, Bi > 0, Bi infinite too.
 * Accuracy  temperatures about 1e-14, flux at the face and heat relative 1e-13; the estimates say what.
 * Errors    none.
 * Source    J. Crank, The Mathematics of Diffusion, 2nd ed. 1975, §4.3.5, with a film added.
 */
export class BathSlab {
  readonly modes: BathModes
  private readonly own: Bath
  constructor(own: Bath) {
    this.own = own
    this.modes = bathModes(own, 12)
  }

  at(m: Moment): BathValues {
    const slowest = this.modes.roots[0]! ** 2 * m.fourier
    return slowest >= 1 ? lateValues(this.own, this.modes, m.fourier) : earlyValues(this.own, m)
  }

  /** Terms of the series at this time; 0 where it is not asked. */
  terms(m: Moment): number {
    return this.modes.roots[0]! ** 2 * m.fourier >= 1 ? countAt(this.modes, m.fourier) : 0
  }
}

export interface BathValues {
  temperature(depth: number, far: number): Estimate
  flux(depth: number, far: number): Estimate
  bath(): Estimate
  surfaceFlux(): Estimate
  /** Of the mean temperature. */
  gain(): Estimate
}

function countAt({ roots }: BathModes, fourier: number): number {
  const slowest = roots[0]! ** 2
  const found = roots.findIndex((q) => (q * q - slowest) * fourier > DECAY)
  return found < 0 ? roots.length : found
}

function lateValues({ gamma }: Bath, modes: BathModes, fourier: number): BathValues {
  const end = gamma / (1 + gamma)
  const count = countAt(modes, fourier)
  const sum = (
    start: number,
    of: (n: number, q: number) => number,
    most: (n: number, q: number) => number,
  ): Estimate => {
    let value = start
    let error = 4 * Math.abs(start)
    for (let n = 0; n < count; n++) {
      const q = modes.roots[n]!
      const decay = q * q * fourier
      const left = Math.exp(-decay) / modes.divisors[n]!
      const size = most(n, q) * left
      value += of(n, q) * left
      error += size * (24 + 16 * decay)
      if (n === count - 1) error += size * 4
    }
    return { value, error: EPS * error + TINY, method: 'eigen-series' }
  }
  // The n-th from 1 on: negative for odd ones.
  const sized = (n: number) => (n % 2 === 0 ? -2 : 2) * gamma * modes.sizes[n]!
  // Where the film holds back most of the heat 1 − γq²/Bi is a small difference, and its rounding that of 1.
  const most = (n: number) => Math.abs(sized(n)) + gamma * (1 + Math.abs(1 - modes.lags[n]!))
  const bath = () => 2 * gamma
  const stored = () => -2 * gamma * gamma
  const flowing = (_: number, q: number) => 2 * (gamma * q) ** 2
  const surfaceFlux = () => sum(0, flowing, flowing)
  return {
    temperature: (_, far) =>
      sum(
        end,
        (n, q) => sized(n) * Math.cos(q * far),
        (n, q) => most(n) * (1 + q),
      ),
    flux: (depth, far) => {
      if (depth === 0) return surfaceFlux()
      return sum(
        0,
        (n, q) => -sized(n) * q * Math.sin(q * far),
        (n, q) => most(n) * q * (1 + q),
      )
    },
    bath: () => sum(end, bath, bath),
    surfaceFlux,
    gain: () => sum(end, stored, () => 2 * gamma * gamma),
  }
}

function earlyValues(own: Bath, m: Moment): BathValues {
  const all = nodes.map(({ root, weight }) => nodeAt(own, m, root, weight))
  const sum = (of: (node: Node) => Complex): Estimate => {
    let value = 0
    let size = 0
    for (const node of all) {
      const each = times(node.weight, of(node))
      value += each.re
      size += sizeOf(each)
    }
    return { value, error: EPS * AMPLIFIED * size + TINY, method: 'contour' }
  }
  // Once the bath has given off most of its heat, its flux is told from what it has left, and not from what it gave.
  const spent = Math.abs(sum(({ bath }) => bath).value) < 0.5
  const surfaceFlux = (): Estimate =>
    spent
      ? sum((node) => scale(-own.gamma, times(times(node.root, node.root), node.bath)))
      : sum((node) => times(node.flow, node.face))
  /** What the rule leaves where the wave has faded: a few roundings of what it was at the face. */
  const left = {
    temperature: (3 / AMPLIFIED) * sum(({ face }) => face).error,
    flux: (3 / AMPLIFIED) * sum((node) => times(node.root, node.face)).error,
  }
  const faded = (node: Node, depth: number, far: number, signed: 1 | -1): Complex => {
    const mirrored = exponentialLessOne(scale(-2 * far, node.root))
    const pair = signed === 1 ? plus(complex(2), mirrored) : scale(-1, mirrored)
    return over(times(exponential(scale(-depth, node.root)), pair), node.whole)
  }
  return {
    temperature: (depth, far) => {
      const found = sum((node) => times(node.face, faded(node, depth, far, 1)))
      return { ...found, error: found.error + left.temperature }
    },
    flux: (depth, far) => {
      if (depth === 0) return surfaceFlux()
      const found = sum((node) => times(times(node.root, node.face), faded(node, depth, far, -1)))
      return { ...found, error: found.error + left.flux }
    },
    bath: () => sum(({ bath }) => bath),
    surfaceFlux,
    gain: () => sum((node) => times(over(node.tanh, node.root), node.face)),
  }
}

/** The transforms at one node; the time's share of the weight is in them as p·Fo = root². */
function nodeAt({ gamma, biot }: Bath, m: Moment, scaled: Complex, weight: Complex): Node {
  const root = scale(1 / m.root, scaled)
  const twice = exponentialLessOne(scale(-2, root))
  const whole = plus(complex(2), twice)
  const tanh = over(scale(-1, twice), whole)
  const flow = times(root, tanh)
  const film = plus(complex(1), scale(1 / biot, flow))
  // p·Fo and f·Fo, so that neither overflows where Fo is small.
  const square = times(scaled, scaled)
  const flowFo = times(scale(m.root, scaled), tanh)
  const divisor = plus(scale(gamma, times(square, film)), flowFo)
  const bath = over(scale(gamma, film), divisor)
  return { weight, root, tanh, flow, bath, face: over(complex(gamma), divisor), whole }
}
