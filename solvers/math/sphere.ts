import { sphereDeficit } from './round-deficits.ts'
import { RoundSeries, roundTermsAt } from './round-series.ts'
import { type Estimate, EPS } from './rounding.ts'
import { filmFace, heldFace } from './sphere-faces.ts'
import { SphereImages } from './sphere-images.ts'
import { sphereMode } from './sphere-modes.ts'
import type { FilmedBody, Moment, Share, UnitBody } from './unit-body.ts'

/* Below SERIES_FROM only the images, above IMAGES_TO only the series; between, whichever errs less. */
const SERIES_FROM = 0.004
const IMAGES_TO = 0.06

/** A sphere of radius 1 after a unit step: of the fluid behind a film, or where Bi is Infinity of its face itself. */
export class UnitSphere implements UnitBody {
  readonly series: RoundSeries
  private readonly images: SphereImages

  constructor(body: FilmedBody) {
    this.series = new RoundSeries(
      (n) => sphereMode(body, body.biot, n),
      (first) => sphereDeficit(body, first),
    )
    this.images = new SphereImages(body.biot === Infinity ? heldFace : filmFace(body.biot), body)
  }

  share(j: number, m: Moment): Share {
    return m.fourier < 0.03
      ? { ...this.completed(j, m), of: 'completed' }
      : { ...this.remaining(j, m), of: 'remaining' }
  }

  remaining(j: number, m: Moment): Estimate {
    return choose(
      m,
      () => this.images.remaining(j, m),
      () => this.series.remaining(j, m),
    )
  }

  completed(j: number, m: Moment): Estimate {
    return choose(
      m,
      () => this.images.completed(j, m),
      () => this.series.completed(j, m),
    )
  }

  flux(j: number, m: Moment): Estimate {
    return choose(
      m,
      () => this.images.flux(j, m),
      () => this.series.flux(j, m),
    )
  }

  heatFraction(m: Moment): Estimate {
    return choose(
      m,
      () => this.images.heatFraction(m),
      () => this.series.heatFraction(m),
    )
  }

  /** 1 − heatFraction without its cancellation at late times. */
  meanRemaining(m: Moment): Estimate {
    if (m.fourier >= IMAGES_TO) return this.series.meanRemaining(m)
    const heat = this.heatFraction(m)
    return { ...heat, value: 1 - heat.value, error: heat.error + EPS }
  }

  terms(m: Moment): number {
    return m.fourier < SERIES_FROM ? 0 : roundTermsAt(m.fourier)
  }
}

function choose(m: Moment, images: () => Estimate, series: () => Estimate): Estimate {
  if (m.fourier < SERIES_FROM) return images()
  if (m.fourier > IMAGES_TO) return series()
  const a = images()
  const b = series()
  return a.error <= b.error ? a : b
}
