import { complex, type Complex, plus, scale, times } from './complex.ts'
import { contourAt } from './contour.ts'

/* The contour for time 1: on it √p·√Fo has one real part, and its imaginary parts are equally spaced, so that e^(−√p·x) turns by the
   same angle from node to node. */
const contour = contourAt(1)
export const timeOneNodes = contour.nodes
export const timeOneExponent = contour.exponent
export const REAL = contour.nodes[0]!.root.re
const STEP = contour.nodes[1]!.root.im

/** Σ Re(cₙ·e^(−√pₙ·x)), x in units of √Fo. */
export function turned(c: Float64Array, x: number): number {
  const size = Math.exp(-REAL * x)
  if (size === 0) return 0
  const stepRe = Math.cos(STEP * x)
  const stepIm = -Math.sin(STEP * x)
  let re = 1
  let im = 0
  let sum = 0
  for (let n = 0; n < c.length; n += 2) {
    sum += c[n]! * re - c[n + 1]! * im
    const next = re * stepRe - im * stepIm
    im = re * stepIm + im * stepRe
    re = next
  }
  return size * sum
}

/** Σ Re(√pₙ√Fo·cₙ·e^(−√pₙ·x)). */
export function turnedFlux(c: Float64Array, x: number): number {
  const size = Math.exp(-REAL * x)
  if (size === 0) return 0
  const stepRe = Math.cos(STEP * x)
  const stepIm = -Math.sin(STEP * x)
  let re = 1
  let im = 0
  let sum = 0
  for (let n = 0; n < c.length; n += 2) {
    const waveRe = c[n]! * re - c[n + 1]! * im
    const waveIm = c[n]! * im + c[n + 1]! * re
    sum += REAL * waveRe - (n / 2) * STEP * waveIm
    const next = re * stepRe - im * stepIm
    im = re * stepIm + im * stepRe
    re = next
  }
  return size * sum
}

/** sinh x/x. */
export function sinhShare(x: Complex): Complex {
  const square = times(x, x)
  let term = complex(1)
  let sum = complex(1)
  for (let k = 1; k <= 12; k++) {
    term = scale(1 / (2 * k * (2 * k + 1)), times(term, square))
    sum = plus(sum, term)
  }
  return sum
}
