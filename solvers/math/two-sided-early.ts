import { type Complex, complex, exponential, minus, over, plus, scale, times } from './complex.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'
import { type Face, type Load, meanDecay, type Moment, type Place, type TwoSidedBody } from './two-sided-body.ts'
import { REAL, sinhShare, timeOneNodes as nodes, timeOneExponent, turned, turnedFlux } from './two-sided-turning.ts'
import { exponentialLessOne, type Node, sizeOf, type Waves, wavesAt } from './two-sided-waves.ts'

/** What one wave is off by in units of EPS: as `invert` counts it, and the turning from node to node. */
const AMPLIFIED = 64 + 16 * timeOneExponent
/**
 * What the rule itself leaves of a wave that has faded, as a share of what it is off by unfaded: about e^(−40) of the wave,
 * measured at up to 6e-17 and taken as a few roundings.
 */
const LEFT = 3 / AMPLIFIED
/** In the same measure, all of a wave. */
const ONE = EPS * AMPLIFIED

/** Waves between two neighbouring rises, over all nodes. */
interface Piece {
  slope: number
  /** What the rounding of the two temperatures may move the slope by, in units of EPS. */
  slopeSlack: number
  width: number
  /** Too narrow for its waves to be told apart: they are taken together. */
  narrow: boolean
  /** Real and imaginary parts by turns, the piece's own slope included unless it is narrow. */
  forward: Float64Array
  backward: Float64Array
  forwardSize: number
  backwardSize: number
  forwardFluxSize: number
  backwardFluxSize: number
}

/**
 * Temperatures, fluxes and heat of a slab between two faces at one short time, by its Laplace transform. From the faces and
 * from every rise of the initial profile waves go both ways as e^(−√p·distance) and the faces throw them back; nothing in it grows. In
 * the piece of the profile that holds the place,
 *
 *   θ = f(X) + heat released + L⁻¹{A·e^(−√p·x) + B·e^(−√p·x′) + (m/2p√p)·(e^(−√p·x) − e^(−√p·x′))},
 *
 * x and x′ the distances to the ends of the piece, m its slope. A jump is a piece without width, so nothing rings.
 *
 * Shapes    one moment; one place at a time.
 * Units     none: lengths in thicknesses, times as Fourier numbers.
 * Domain    Fo > 0 up to about 0.2, where a wave has faded by e^(−4) when it has crossed.
 * Accuracy  temperatures to about 1e-14 of the largest that a drive does, fluxes of the largest at a face; the estimates say what.
 * Errors    none.
 * Source    H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, §12.5 (transform of a slab).
 */
export class EarlyValues {
  private readonly pieces: Piece[]
  private readonly waves: Waves[]
  private readonly body: TwoSidedBody
  private readonly load: Load
  private readonly m: Moment
  private readonly roots: readonly Complex[]

  /** With `pulse`, what a drive has done that acted for a time of `pulse`·Fo until Fo ago. */
  constructor(body: TwoSidedBody, load: Load, m: Moment, pulse?: number) {
    this.body = body
    this.load = load
    this.m = m
    this.roots = nodes.map(({ root }) => scale(1 / m.root, root))
    const own = nodes.map(({ root, weight }): Node => {
      if (pulse === undefined) return { root, weight }
      return { root, weight: times(weight, exponentialLessOne(scale(pulse, times(root, root)))) }
    })
    this.waves = own.map((node) => wavesAt(body, load, m, node, AMPLIFIED * (1 + (pulse ?? 0))))
    const count = Math.max(1, load.rises.length)
    this.pieces = Array.from({ length: count }, (_, k) => this.pieceAt(k))
  }

  /** Above the reference. */
  temperature(place: Place): Estimate {
    const piece = this.pieces[place.piece]!
    const { source } = this.load
    const base = place.initial + source.size * this.m.fourier * meanDecay(source.rate * this.m.fourier)
    const wave = piece.narrow ? this.narrowWave(place, piece) : this.wave(place, piece, 1)
    const { first, second } = this.fading(place)
    const rise = this.load.rises[place.piece]
    const given = Math.abs(base) + (rise ? Math.abs(rise.start) + Math.abs(rise.rise.value) : 0)
    const error = EPS * (piece.forwardSize * first + piece.backwardSize * second + 4 * given) + TINY
    return { value: base + wave, error, method: 'contour' }
  }

  /** −∂θ/∂X. */
  flux(place: Place): Estimate {
    const piece = this.pieces[place.piece]!
    const { first, second } = this.fading(place)
    const value = piece.narrow ? this.narrowFlux(place, piece) : this.fluxWave(place, piece) - piece.slope
    const own = piece.forwardFluxSize * first + piece.backwardFluxSize * second
    const straight = piece.narrow ? 0 : 8 * Math.abs(piece.slope) + piece.slopeSlack
    return { value, error: EPS * (own + straight) + TINY, method: 'contour' }
  }

  leftFlux(): Estimate {
    return this.faceSum(this.body.left, (waves) => waves.left)
  }

  rightFlux(): Estimate {
    return this.faceSum(this.body.right, (waves) => waves.right)
  }

  /** Of the mean temperature, since the start. */
  gain(): Estimate {
    const { source } = this.load
    const { fourier } = this.m
    const heated = source.size * fourier * meanDecay(source.rate * fourier)
    let value = heated
    let error = 12 * EPS * Math.abs(heated)
    this.waves.forEach(({ left, right }, k) => {
      const { root } = nodes[k]!
      const each = over(complex(fourier), times(root, root))
      value += times(each, plus(left.value, right.value)).re
      error += EPS * sizeOf(each) * (left.size + right.size)
    })
    return { value, error: error + TINY, method: 'contour' }
  }

  private faceSum(face: Face, of: (waves: Waves) => { value: Complex; size: number }): Estimate {
    let value = 0
    let size = 0
    for (const waves of this.waves) {
      const face = of(waves)
      value += face.value.re
      size += face.size
    }
    const taken = face.beta === 0 ? 0 : (2 * face.beta) / (face.beta + (face.alpha * REAL) / this.m.root)
    return { value, error: EPS * (size + LEFT * taken * this.unfaded()) + TINY, method: 'contour' }
  }

  /** Flux of all waves where they start, in units of EPS. */
  private unfaded(): number {
    return this.waves.reduce((sum, { forwardSizes, backwardSizes }, n) => {
      const sent = [...forwardSizes, ...backwardSizes].reduce((all, { given }) => all + given, 0)
      return sum + sizeOf(this.roots[n]!) * sent
    }, 0)
  }

  private pieceAt(k: number): Piece {
    const { load, m, waves, roots } = this
    const rise = load.rises[k]
    const width = rise ? rise.width : 1
    const slope = rise && width > 0 ? rise.rise.value / width : 0
    const slopeSlack = rise && width > 0 ? rise.rise.slack / width : 0
    const narrow = slope !== 0 && REAL * width < m.root
    const forward = new Float64Array(2 * waves.length)
    const backward = new Float64Array(2 * waves.length)
    const piece = { slope, slopeSlack, width, narrow, forward, backward }
    const sizes = { forwardSize: 0, backwardSize: 0, forwardFluxSize: 0, backwardFluxSize: 0 }
    waves.forEach((w, n) => {
      const root = roots[n]!
      const own = slope === 0 || narrow ? complex(0) : over(scale(slope / 2, w.unit), root)
      const a = plus(w.forward[k]!, own)
      const b = minus(w.backward[k]!, own)
      forward.set([a.re, a.im], 2 * n)
      backward.set([b.re, b.im], 2 * n)
      const share = AMPLIFIED * (narrow ? sizeOf(w.unit) * Math.abs(rise!.rise.value) : sizeOf(own))
      const told = slope === 0 ? 0 : Math.min(1, 1 / (sizeOf(root) * width))
      const given = share + 0.75 * told * sizeOf(w.unit) * (rise?.rise.slack ?? 0)
      sizes.forwardSize += w.forwardSizes[k]!.own + share
      sizes.backwardSize += w.backwardSizes[k]!.own + share
      sizes.forwardFluxSize += sizeOf(root) * (w.forwardSizes[k]!.given + given)
      sizes.backwardFluxSize += sizeOf(root) * (w.backwardSizes[k]!.given + given)
    })
    return { ...piece, ...sizes }
  }

  /** e^(−√p·x) and e^(−√p·x′) in size, with what the rounding of the place adds and what the rule leaves. */
  private fading({ fromStart, toEnd, shift }: Place): { first: number; second: number } {
    const perLength = REAL / this.m.root
    const faded = (distance: number, shifted: number) => {
      const x = perLength * distance
      // A place that is on the spot where a wave starts is there whatever the rounding.
      const slip = distance === 0 ? 0 : EPS * shifted * perLength
      // No wave is moved by more than it is at the nearest that the place may be, and none that has died away leaves anything.
      const moved = Math.exp(-Math.max(0, x - slip)) * Math.min(1, slip)
      const faded = Math.exp(-x)
      return faded * (1 + 0.2 * x) + moved / ONE + Math.min(LEFT, (4 * faded) / ONE)
    }
    return { first: faded(fromStart, shift), second: faded(toEnd, 4 + shift) }
  }

  /** Σ Re(A·e^(−√p·x) + sign·B·e^(−√p·x′)): the exponentials turn by the same angle from node to node. */
  private wave({ fromStart, toEnd }: Place, { forward, backward }: Piece, sign: 1 | -1): number {
    return turned(forward, fromStart / this.m.root) + sign * turned(backward, toEnd / this.m.root)
  }

  private fluxWave({ fromStart, toEnd }: Place, { forward, backward }: Piece): number {
    const first = turnedFlux(forward, fromStart / this.m.root)
    const second = turnedFlux(backward, toEnd / this.m.root)
    return (first - second) / this.m.root
  }

  /** In a narrow piece e^(−√p·x) − e^(−√p·x′) is small, and taken as 2·e^(−√p·width/2)·sinh(√p·(x′ − x)/2). */
  private narrowWave({ fromStart, toEnd }: Place, piece: Piece): number {
    const half = (toEnd - fromStart) / 2
    const own = this.waves.reduce((sum, { unit }, n) => {
      const root = this.roots[n]!
      const middle = exponential(scale(-piece.width / 2, root))
      return sum + times(times(unit, middle), sinhShare(scale(half, root))).re
    }, 0)
    return (
      piece.slope * half * own +
      turned(piece.forward, fromStart / this.m.root) +
      turned(piece.backward, toEnd / this.m.root)
    )
  }

  private narrowFlux({ fromStart, toEnd }: Place, piece: Piece): number {
    const own = this.waves.reduce((sum, { unit }, n) => {
      const root = this.roots[n]!
      const lost = plus(exponentialLessOne(scale(-fromStart, root)), exponentialLessOne(scale(-toEnd, root)))
      return sum + times(unit, lost).re
    }, 0)
    return (piece.slope / 2) * own + this.fluxWave({ fromStart, toEnd } as Place, piece)
  }
}
