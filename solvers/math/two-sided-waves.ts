import { type Complex, complex, exponential, minus, modulus, over, plus, scale, times } from './complex.ts'
import { endOf, type Face, type Load, type Moment, type TwoSidedBody } from './two-sided-body.ts'

/** One node of the contour: √p·√Fo, and its weight. */
export interface Node {
  root: Complex
  weight: Complex
}

/** Waves of one node, each with the node's weight in it, and the sizes that rounding is told by. */
export interface Waves {
  /** Right-going at the left end of each piece, left-going at its right end. */
  forward: Complex[]
  backward: Complex[]
  forwardSizes: Sizes[]
  backwardSizes: Sizes[]
  left: FaceFlux
  right: FaceFlux
  /** weight/p, what a step of 1 is. */
  unit: Complex
}

/** By rounding of operations alone, and with the rounding of the temperatures that were given; in units of EPS. */
interface Sizes {
  own: number
  given: number
}

interface FaceFlux {
  value: Complex
  size: number
}

/** What leaves a face into the body for what comes to it: (direct + mirror·incoming)/own. */
interface Law {
  own: Complex
  mirror: Complex
  /** √Fo/(α + β√Fo), by which a drive counts. */
  gain: number
  direct: Complex
  directSize: Sizes
}

/**
 * The waves that a slab's faces and the rises of its initial profile send out, at one node of the contour.
 *
 *   a·(α√p + β) = D₁ + (α√p − β)·(what comes to the face);   a rise of height R over a width w sends ∓(R/2p)·(1 − e^(−√p·w))/(√p·w)
 *
 * `amplified` is what one wave is off by in units of EPS.
 */
export function wavesAt(body: TwoSidedBody, load: Load, m: Moment, node: Node, amplified: number): Waves {
  const { root, weight } = node
  const unit = over(weight, times(root, root))
  const steps = load.rises.map(({ width, rise }) => {
    const x = scale(width / m.root, root)
    const sent = scale(-rise.value / 2, times(unit, meanDecayOf(x)))
    const size = sizeOf(unit) * Math.min(1, 2 / sizeOf(x) || 1)
    const sizes = {
      own: 0.5 * amplified * size * Math.abs(rise.value),
      given: 0.5 * size * (amplified * Math.abs(rise.value) + 1.5 * rise.slack),
    }
    return { fade: exponential(scale(-1, x)), sent, sizes }
  })
  let toRight: Sent = nothing
  let toLeft: Sent = nothing
  for (const { fade, sent, sizes } of steps) toRight = added(faded(toRight, fade), sent, sizes)
  for (const { fade, sent, sizes } of steps.toReversed()) toLeft = added(faded(toLeft, fade), scale(-1, sent), sizes)
  const left = lawOf(body.left, load.left, 0, load, m, node, unit, amplified)
  const right = lawOf(body.right, load.right, endOf(load), load, m, node, unit, amplified)
  const across = exponential(scale(-1 / m.root, root))
  const [a, b] = emitted(left, right, toLeft, toRight, across)
  const forward = [a]
  const backward = [b]
  for (const { fade, sent, sizes } of steps.slice(0, -1)) forward.push(added(faded(forward.at(-1)!, fade), sent, sizes))
  for (const { fade, sent, sizes } of steps.slice(1).reverse())
    backward.unshift(added(faded(backward[0]!, fade), scale(-1, sent), sizes))
  const intoLeft = added(toLeft, times(b.value, across), sizesTimes(b.sizes, sizeOf(across)))
  const intoRight = added(toRight, times(a.value, across), sizesTimes(a.sizes, sizeOf(across)))
  return {
    forward: forward.map(({ value }) => value),
    backward: backward.map(({ value }) => value),
    forwardSizes: forward.map(({ sizes }) => sizes),
    backwardSizes: backward.map(({ sizes }) => sizes),
    left: faceFlux(body.left, left, intoLeft, m, root),
    right: faceFlux(body.right, right, intoRight, m, root),
    unit,
  }
}

interface Sent {
  value: Complex
  sizes: Sizes
}
const nothing: Sent = { value: complex(0), sizes: { own: 0, given: 0 } }
const sizesTimes = (s: Sizes, factor: number): Sizes => ({ own: s.own * factor, given: s.given * factor })
const faded = ({ value, sizes }: Sent, fade: Complex): Sent => ({
  value: times(value, fade),
  sizes: sizesTimes(sizes, sizeOf(fade)),
})
const added = (sent: Sent, value: Complex, sizes: Sizes): Sent => ({
  value: plus(sent.value, value),
  sizes: { own: sent.sizes.own + sizes.own, given: sent.sizes.given + sizes.given },
})

function lawOf(
  face: Face,
  drive: { value: number; slack: number },
  initial: number,
  load: Load,
  m: Moment,
  { root }: Node,
  unit: Complex,
  amplified: number,
): Law {
  const { alpha, beta } = face
  const whole = alpha + beta * m.root
  const passed = scale(alpha / whole, root)
  const held = complex((beta * m.root) / whole)
  const { size, rate } = load.source
  const sent = scale(drive.value - beta * initial, unit)
  // What is released raises the body alike everywhere; the face answers to the difference.
  const heated = size === 0 ? nothing.value : releasedAt(size, rate, m.fourier, root, unit)
  const unitSize = sizeOf(unit)
  const own = amplified * (unitSize * (Math.abs(drive.value) + Math.abs(beta * initial)) + beta * sizeOf(heated))
  return {
    own: plus(passed, held),
    mirror: minus(passed, held),
    gain: m.root / whole,
    direct: size === 0 ? sent : minus(sent, scale(beta, heated)),
    directSize: { own, given: own + 1.5 * unitSize * drive.slack },
  }
}

function releasedAt(size: number, rate: number, fourier: number, root: Complex, unit: Complex): Complex {
  return over(scale(size * fourier, unit), plus(times(root, root), complex(rate * fourier)))
}

/** What the two faces send, each thrown back by the other any number of times. */
function emitted(left: Law, right: Law, toLeft: Sent, toRight: Sent, across: Complex): [Sent, Sent] {
  const twice = times(across, across)
  const divisor = minus(times(left.own, right.own), times(times(left.mirror, right.mirror), twice))
  const first = answered(left, toLeft)
  const second = answered(right, toRight)
  const one = (own: Law, other: Law, near: Sent, far: Sent): Sent => {
    const echo = times(times(own.mirror, across), far.value)
    const size = sizeOf(divisor)
    const direct = sizeOf(other.own) / size
    const thrown = (sizeOf(own.mirror) * sizeOf(across)) / size
    return {
      value: over(plus(times(other.own, near.value), echo), divisor),
      sizes: {
        own: direct * near.sizes.own + thrown * far.sizes.own,
        given: direct * near.sizes.given + thrown * far.sizes.given,
      },
    }
  }
  return [one(left, right, first, second), one(right, left, second, first)]
}

/** Drive and mirrored wave of a face. */
function answered(law: Law, incoming: Sent): Sent {
  const mirror = sizeOf(law.mirror)
  return {
    value: plus(scale(law.gain, law.direct), times(law.mirror, incoming.value)),
    sizes: {
      own: law.gain * law.directSize.own + mirror * incoming.sizes.own,
      given: law.gain * law.directSize.given + mirror * incoming.sizes.given,
    },
  }
}

/** Into the body: √p·(a − incoming), which is √p·(D − 2β·incoming)/(α√p + β). */
function faceFlux(face: Face, law: Law, incoming: Sent, m: Moment, root: Complex): FaceFlux {
  const factor = over(scale(1 / (face.alpha + face.beta * m.root), root), law.own)
  const value = times(factor, minus(law.direct, scale(2 * face.beta, incoming.value)))
  return { value, size: sizeOf(factor) * (law.directSize.given + 2 * face.beta * incoming.sizes.given) }
}

/** As `modulus`, at a third of its cost where nothing can overflow on the way. */
export function sizeOf(a: Complex): number {
  const square = a.re * a.re + a.im * a.im
  return square > 1e-280 && square < 1e280 ? Math.sqrt(square) : modulus(a)
}

/** (1 − e^(−x))/x in the right half plane. */
export function meanDecayOf(x: Complex): Complex {
  if (sizeOf(x) === 0) return complex(1)
  return over(scale(-1, exponentialLessOne(scale(-1, x))), x)
}

/** e^x − 1, without cancellation. */
export function exponentialLessOne({ re, im }: Complex): Complex {
  const half = Math.sin(im / 2)
  return { re: Math.expm1(re) * Math.cos(im) - 2 * half * half, im: Math.exp(re) * Math.sin(im) }
}
