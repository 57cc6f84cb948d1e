import { completed, energyFraction, fluxFraction, remaining } from './convective-half-space.ts'
import { CylinderContour } from './cylinder-contour.ts'
import { cylinderMode } from './cylinder-modes.ts'
import { cylinderDeficit } from './round-deficits.ts'
import { RoundSeries, roundTermsAt } from './round-series.ts'
import { type Estimate, EPS, TINY } from './rounding.ts'
import type { FilmedBody, Moment, Share, UnitBody } from './unit-body.ts'

/** Only the contour below. */
const SERIES_FROM = 0.02
/** For a temperature the series does from here on, with 104 terms: it errs by 1e-13 of the step, too much only for small fractions. */
const SHARE_BY_SERIES_FROM = 0.0005
/** Up to here also where the series errs by more than this share of its value. */
const CONTOUR_TO = 0.2
const LOOSE = 1e-12
/** Below, the body is a half space to the last digit; far below, its transform would overflow. */
const PLANE = 1e-36

/** A cylinder of radius 1 after a unit step: of the fluid behind a film, or where Bi is Infinity of its face itself. */
export class UnitCylinder implements UnitBody {
  readonly series: RoundSeries
  readonly contour: CylinderContour
  private readonly body: FilmedBody

  constructor(body: FilmedBody) {
    this.body = body
    this.series = new RoundSeries(
      (n) => cylinderMode(body, body.biot, n),
      (first) => cylinderDeficit(body, first),
    )
    this.contour = new CylinderContour(body)
  }

  share(j: number, m: Moment): Share {
    return m.fourier < SHARE_BY_SERIES_FROM
      ? { ...this.completed(j, m), of: 'completed' }
      : { ...this.series.remaining(j, m), of: 'remaining' }
  }

  remaining(j: number, m: Moment): Estimate {
    if (m.fourier < PLANE) return closed(Math.min(1, remaining(...this.arguments(j, m))), this.contour.moved(j, m))
    return choose(
      m,
      () => this.contour.remaining(j, m),
      () => this.series.remaining(j, m),
    )
  }

  completed(j: number, m: Moment): Estimate {
    if (m.fourier < PLANE) return closed(completed(...this.arguments(j, m)), this.contour.moved(j, m))
    return choose(
      m,
      () => this.contour.completed(j, m),
      () => this.series.completed(j, m),
    )
  }

  flux(j: number, m: Moment): Estimate {
    if (m.fourier < PLANE) return closed(this.planeFlux(j, m), this.contour.fluxMoved(j, m))
    return m.fourier < SERIES_FROM ? this.contour.flux(j, m) : this.series.flux(j, m)
  }

  heatFraction(m: Moment): Estimate {
    if (m.fourier < PLANE) return closed(this.planeHeat(m))
    return choose(
      m,
      () => this.contour.heatFraction(m),
      () => this.series.heatFraction(m),
    )
  }

  /** 1 − heatFraction without its cancellation at late times. */
  meanRemaining(m: Moment): Estimate {
    if (m.fourier >= SERIES_FROM) return this.series.meanRemaining(m)
    const heat = this.heatFraction(m)
    return { ...heat, value: 1 - heat.value, error: heat.error + EPS }
  }

  terms(m: Moment): number {
    return m.fourier < SHARE_BY_SERIES_FROM ? 0 : roundTermsAt(m.fourier)
  }

  private arguments(j: number, m: Moment): [number, number] {
    return [this.body.deltas[j]! / (2 * m.root), this.body.biot * m.root]
  }

  private planeFlux(j: number, m: Moment): number {
    const [eta, beta] = this.arguments(j, m)
    return this.body.biot === Infinity ? Math.exp(-eta * eta) / (Math.sqrt(Math.PI) * m.root) : fluxFraction(eta, beta)
  }

  private planeHeat(m: Moment): number {
    const { biot } = this.body
    return biot === Infinity
      ? (4 * m.root) / Math.sqrt(Math.PI)
      : 2 * biot * m.root * m.root * energyFraction(biot * m.root)
  }
}

/** Of a half space; `moved` is what the rounding of its place makes. */
function closed(value: number, moved = 0): Estimate {
  return { value, error: 200 * EPS * value + moved + TINY, method: 'closed-form' }
}

function choose(m: Moment, contour: () => Estimate, series: () => Estimate): Estimate {
  if (m.fourier < SERIES_FROM) return contour()
  const a = series()
  if (m.fourier > CONTOUR_TO || a.error < LOOSE * a.value) return a
  const b = contour()
  return a.error <= b.error ? a : b
}
