import { sphereDeficit } from './round-deficits.ts'
import { RoundSeries, roundTermsAt } from './round-series.ts'
import { type Estimate, EPS } from './rounding.ts'
import { filmFace, heldFace } from './sphere-faces.ts'
import { SphereImages } from './sphere-images.ts'
import { sphereModes } from './sphere-modes.ts'
import type { FilmedBody, Moment, UnitBody } from './unit-body.ts'

/* Below SERIES_FROM only the images, above IMAGES_TO only the series; between, whichever errs less. */
const SERIES_FROM = 0.004
const IMAGES_TO = 0.06

/** A sphere of radius 1 after a unit step: of the fluid behind a film, or where Bi is Infinity of its face itself. */
export class UnitSphere implements UnitBody {
  readonly series: RoundSeries
  private readonly images: SphereImages

  /** `shortest` is the smallest Fourier number that will be asked for. */
  constructor(body: FilmedBody, shortest: number) {
    const modes = sphereModes(body, body.biot, Math.max(shortest, SERIES_FROM))
    this.series = new RoundSeries(modes, sphereDeficit(body, modes))
    this.images = new SphereImages(body.biot === Infinity ? heldFace : filmFace(body.biot), body)
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
