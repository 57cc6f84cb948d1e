import { type Annulus, annulusModes, type Face, type Mode } from './annulus-modes.ts'
import { AnnulusStart, type FaceDrive, type WallPlace } from './annulus-start.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'

/** Fourier number of the wall's thickness from which the eigenfunctions are summed. */
const SERIES_FROM = 0.15
const ROOT_FROM = Math.sqrt(SERIES_FROM)

/** Fourier number of the wall's thickness, and its root, which stays above zero where the number does not. */
export interface AnnulusMoment {
  fourier: number
  root: number
}

/** What of a mode an output holds, and how fast that changes along the wall. */
interface Share {
  of(mode: Mode): number
  moved(mode: Mode): number
}
/** At a face no place can be moved. */
const still = () => 0

/** An output at one place, and where the late times start from. */
interface Local {
  anchor: Estimate
  share: Share
}

/** What the drives have put into each mode by one time, and what its roundings are. */
interface Grown {
  fourier: number
  /** By mode, for the drive at either face. */
  units: readonly (readonly [number, number])[]
  relative: readonly number[]
}

type Drives = readonly [FaceDrive, FaceDrive]
const IDLE: FaceDrive = { value: 0, slack: 0 }

/**
 * A hollow cylinder that starts at zero and is driven at both faces from time 0 on.
 *
 *   early   the Laplace transform, inverted
 *   late    θ = θ(t₁) + Σ g·Γφ/(wN)·(e^(−w·Fo₁) − e^(−w·Fo)), started from the transform's answer at the first late time: so no steady
 *           part has to cancel against slow modes, and a mean that drifts is a mode as any other (w = 0)
 *
 * Fluxes at late times are either that or flux(∞) + Σ …e^(−w·Fo), whichever errs less: the second keeps its digits where all heat ends.
 *
 * Shapes    times and places one by one.
 * Units     the wall's thickness, its square over the diffusivity, kelvins. A drive is a temperature where the face is held, otherwise a flux
 *           in kelvins a thickness: film·(ambient − start) plus what is imposed.
 * Domain    inner radius 1e-4..1e5; Biot numbers 0..1e18; √Fo 1e-170..1e160.
 * Accuracy  temperatures 1e-13 of what the drives cause, beside the rounding of the radii; fluxes and contents relative for each drive. Tests
 *           hold the stated errors to decimal values.
 * Errors    none.
 * Source    see `AnnulusStart`, `annulusModes`.
 */
export class AnnulusResponse {
  private readonly annulus: Annulus
  private readonly drives: Drives
  private readonly places: readonly WallPlace[]
  private readonly modes: Mode[]
  private readonly rounding: number
  /** What the rounding of a radius moves a place by. */
  private readonly shift: number
  private start: { root: number; body: AnnulusStart } | undefined
  private firstLate: AnnulusStart | undefined
  private readonly anchors = new Map<string, Estimate>()
  private readonly temperatures: Local[] = []
  private readonly fluxes: Local[] = []
  /** Kept for one time while its places are asked for. */
  private readonly kept: { risen?: Grown; faded?: Grown } = {}

  /** `latest` is the longest Fourier number asked for: without late times no eigenfunction is looked for. */
  constructor(annulus: Annulus, drives: Drives, places: readonly WallPlace[], latest: number) {
    this.annulus = annulus
    this.drives = drives
    this.places = places
    const distances = [...places.map(({ fromInner }) => fromInner), 0, 1]
    this.modes = latest < SERIES_FROM ? [] : annulusModes(annulus, distances, SERIES_FROM)
    // Beside the roundings of a mode, both radii are rounded, and their difference is the unit of length.
    this.rounding = EPS * (200 + 2 * (2 * annulus.innerRadius + 1))
    this.shift = 4 * EPS * (annulus.innerRadius + 1)
  }

  get terms(): number {
    return this.modes.length
  }

  temperature(moment: AnnulusMoment, j: number): Estimate {
    if (moment.fourier < SERIES_FROM) return this.early(moment).temperature(this.places[j]!)
    const { anchor, share } = this.temperatureAt(j)
    return this.risen(anchor, moment, this.drives, share)
  }

  private temperatureAt(j: number): Local {
    return (this.temperatures[j] ??= {
      anchor: this.first.temperature(this.places[j]!),
      share: { of: (mode) => mode.values[j]!, moved: (mode) => mode.slopes[j]! },
    })
  }

  private fluxAt(j: number): Local {
    return (this.fluxes[j] ??= {
      anchor: this.first.flux(this.places[j]!),
      share: { of: (mode) => mode.slopes[j]!, moved: (mode) => mode.w * mode.values[j]! },
    })
  }

  /** Outward, in kelvins a thickness. */
  flux(moment: AnnulusMoment, j: number): Estimate {
    const place = this.places[j]!
    if (moment.fourier < SERIES_FROM) return this.early(moment).flux(place)
    const { anchor, share } = this.fluxAt(j)
    const end = this.endFlux(place)
    return better(
      this.risen(anchor, moment, this.drives, share),
      this.faded(
        { value: end[0].value + end[1].value, error: end[0].error + end[1].error, method: 'eigen-series' },
        moment,
        this.drives,
        share,
      ),
    )
  }

  /** Flux into the body at a face, in kelvins a thickness: by the drive there, and by the other. */
  faceFlux(moment: AnnulusMoment, face: 0 | 1): [near: Estimate, far: Estimate] {
    const sign = face === 0 ? 1 : -1
    const other = face === 0 ? 1 : 0
    const parts = (body: AnnulusStart) => [body.nearFlux(face), body.farFlux(face)] as const
    if (moment.fourier < SERIES_FROM) return [...parts(this.early(moment))]
    const j = this.places.length + face
    const slope = { of: (mode: Mode) => sign * mode.slopes[j]!, moved: still }
    const end = this.endFlux({ fromInner: face, fromOuter: 1 - face })
    const [near, far] = ([face, other] as const).map((drive, k) => {
      const anchor = this.anchored(`f${face}${k}`, () => parts(this.first)[k]!)
      const alone = this.alone(drive)
      return better(
        this.risen(anchor, moment, alone, slope),
        this.faded({ ...end[drive], value: sign * end[drive].value }, moment, alone, slope),
      )
    })
    return [near!, far!]
  }

  /** ∫θρ dρ by the drive at one face. */
  content(moment: AnnulusMoment, face: 0 | 1): Estimate {
    if (moment.fourier < SERIES_FROM) return this.early(moment).content(face)
    const anchor = this.anchored(`Q${face}`, () => this.first.content(face))
    return this.risen(anchor, moment, this.alone(face), { of: (mode) => mode.content, moved: still })
  }

  private alone(face: 0 | 1): Drives {
    return face === 0 ? [this.drives[0], IDLE] : [IDLE, this.drives[1]]
  }

  private early({ root }: AnnulusMoment): AnnulusStart {
    if (this.start?.root !== root) this.start = { root, body: new AnnulusStart(this.annulus, this.drives, root) }
    return this.start.body
  }

  private get first(): AnnulusStart {
    return (this.firstLate ??= new AnnulusStart(this.annulus, this.drives, ROOT_FROM))
  }

  private anchored(key: string, find: () => Estimate): Estimate {
    const known = this.anchors.get(key)
    if (known) return known
    const found = find()
    this.anchors.set(key, found)
    return found
  }

  /** From the anchor on, each mode having grown since. */
  private risen(anchor: Estimate, { fourier }: AnnulusMoment, drives: Drives, share: Share): Estimate {
    if (this.kept.risen?.fourier !== fourier) {
      const later = fourier - SERIES_FROM
      const grown = ({ w }: Mode) => (w === 0 ? later : (Math.exp(-w * SERIES_FROM) * -Math.expm1(-w * later)) / w)
      this.kept.risen = { ...this.grownBy(SERIES_FROM, grown), fourier }
    }
    return this.summed(anchor, this.kept.risen, drives, share)
  }

  /** From the end back, each mode having faded so far. */
  private faded(end: Estimate, { fourier }: AnnulusMoment, drives: Drives, share: Share): Estimate {
    if (this.kept.faded?.fourier !== fourier) {
      const left = ({ w }: Mode) => (w === 0 ? 0 : -Math.exp(-w * fourier) / w)
      this.kept.faded = this.grownBy(fourier, left)
    }
    return this.summed(end, this.kept.faded, drives, share)
  }

  private grownBy(fourier: number, weight: (mode: Mode) => number): Grown {
    return {
      fourier,
      units: this.modes.map((mode) => {
        const factor = weight(mode) / mode.norm
        return [mode.gains[0] * factor, mode.gains[1] * factor] as const
      }),
      relative: this.modes.map((mode) => this.rounding * (1 + mode.w * fourier)),
    }
  }

  private summed(from: Estimate, grown: Grown, drives: Drives, { of, moved }: Share): Estimate {
    let { value, error } = from
    for (let n = 0; n < this.modes.length; n++) {
      const mode = this.modes[n]!
      const held = of(mode)
      const size = Math.abs(held)
      const rounded = grown.relative[n]! * size + this.shift * Math.abs(moved(mode))
      for (let d = 0; d < 2; d++) {
        const drive = drives[d]!
        const unit = grown.units[n]![d]!
        value += drive.value * unit * held
        error += (Math.abs(drive.value) * rounded + drive.slack * size) * Math.abs(unit)
      }
    }
    return { value, error: error + TINY, method: 'eigen-series' }
  }

  /** Outward flux at the end, by each drive: ρ·flux is the same at every radius, or falls evenly with the area where heat is kept. */
  private endFlux({ fromInner: x, fromOuter: y }: WallPlace): readonly [Estimate, Estimate] {
    const { innerRadius: a, inner, outer } = this.annulus
    const b = a + 1
    const radius = a + x
    const end = (d: 0 | 1, unit: number, slope = 0): Estimate => {
      const { value, slack } = this.drives[d]
      const moved = x === 0 || y === 0 ? 0 : this.shift * slope
      const error = Math.abs(value) * (this.rounding * Math.abs(unit) + moved) + slack * Math.abs(unit)
      return { value: value * unit, error, method: 'eigen-series' }
    }
    if (this.modes[0]?.w === 0) {
      const area = (2 * a + 1) * radius
      return [
        end(0, (a * y * (radius + b)) / area, (a * (radius + b + y)) / area),
        end(1, (-b * x * (radius + a)) / area, (b * (radius + a + x)) / area),
      ]
    }
    const [s0, l0] = partsOf(inner)
    const [s1, l1] = partsOf(outer)
    const across = (s0 * l1) / a + (s1 * l0) / b + l0 * l1 * Math.log1p(1 / a)
    return [end(0, l1 / across / radius), end(1, -l0 / across / radius)]
  }

  /** The temperature at the end; undefined where the mean goes on. Where the fluxes of both faces balance it is told from the modes. */
  steady(j: number): Estimate {
    const { fromInner: x, fromOuter: y } = this.places[j]!
    const { innerRadius: a, inner, outer } = this.annulus
    if (this.modes[0]?.w === 0) {
      const { anchor, share } = this.temperatureAt(j)
      const grown = ({ w }: Mode) => (w === 0 ? 0 : Math.exp(-w * SERIES_FROM) / w)
      return this.summed(anchor, this.grownBy(SERIES_FROM, grown), this.drives, share)
    }
    const [s0, l0] = partsOf(inner)
    const [s1, l1] = partsOf(outer)
    const across = (s0 * l1) / a + (s1 * l0) / (a + 1) + l0 * l1 * Math.log1p(1 / a)
    const units = [s1 / (a + 1) + l1 * Math.log1p(y / (a + x)), s0 / a + l0 * Math.log1p(x / a)]
    let value = 0
    let error = 0
    units.forEach((unit, d) => {
      const drive = this.drives[d]!
      value += (drive.value * unit) / across
      // The radii are rounded, and their difference is the unit of length.
      const relative = EPS * (24 + 4 * (2 * a + 1))
      error += ((Math.abs(drive.value) * relative + drive.slack) * unit) / across
    })
    return { value, error, method: 'closed-form' }
  }
}

/** Part of the slope and of the temperature in the condition at a face. */
const partsOf = (face: Face): readonly [number, number] => (face.held ? [0, 1] : [1, face.film])

const better = (one: Estimate, other: Estimate): Estimate => (one.error <= other.error ? one : other)
