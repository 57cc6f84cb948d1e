import { exponential, minus, over, plus, complex, scale, times } from './complex.ts'
import { contourAt, invert } from './contour.ts'
import { type Estimate, TINY } from './rounding.ts'
import type { Drive, Face, Moment } from './two-sided-body.ts'

/** Beyond this the answer is below 1e-290. */
const LARGEST_EXPONENT = 660

/** What the rule itself leaves, with the poles of all modes beside the one at the origin: measured at 3e-14. */
const RULE = 1.5e-13

/**
 * Flux into a slab at one face when only the other is driven: at short times as small as e^(−1/4Fo), and with all its digits.
 *
 *   q = −L⁻¹{(D/p)·2β₂√p·e^(−√p)/[(α√p + β)(α₂√p + β₂) − (α√p − β)(α₂√p − β₂)·e^(−2√p)]}
 *
 * Shapes    one number.
 * Units     none.
 * Domain    0 < Fo < about 0.2.
 * Accuracy  relative, about 2e-13; the estimate says what.
 * Errors    none.
 * Source    as for the contour.
 */
export function crossingFlux(driven: Face, drive: Drive, other: Face, m: Moment): Estimate {
  const reach = 1 / m.root
  if (reach * reach > 4 * LARGEST_EXPONENT) return { value: 0, error: TINY, method: 'contour' }
  const contour = contourAt(1, reach)
  const own = driven.alpha + driven.beta * m.root
  const far = other.alpha + other.beta * m.root
  const found = invert(contour, ({ root }) => {
    const law = (face: Face, whole: number, sign: 1 | -1) =>
      plus(scale(face.alpha / whole, root), complex((sign * face.beta * m.root) / whole))
    const twice = exponential(scale(-2 * reach, root))
    const thrown = times(times(law(driven, own, -1), law(other, far, -1)), twice)
    const divisor = minus(times(law(driven, own, 1), law(other, far, 1)), thrown)
    return over(complex((-2 * other.beta * drive.value * m.root) / (own * far)), times(root, divisor))
  })
  const slack = drive.value === 0 ? 0 : drive.slack / Math.abs(drive.value)
  return { ...found, error: found.error * (1 + slack / 24) + RULE * Math.abs(found.value) }
}
