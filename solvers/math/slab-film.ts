import { type Estimate, EPS } from './rounding.ts'
import type { FilmedBody, Moment, Share, UnitBody } from './unit-body.ts'
import { completedByImages, fluxByImages, heatByImages, remainingByImages, steepestFlux } from './slab-images.ts'
import { SlabSeries, termsAt } from './slab-series.ts'

/* Below SERIES_FROM only the images, above IMAGES_TO only the series; between, whichever errs less. */
const SERIES_FROM = 0.004
const IMAGES_TO = 0.06
/** For a temperature either will do between; the images up to here, where they still err by less than e^(−33). */
const SHARE_BY_IMAGES_TO = 0.03

/** A slab after a unit step of the fluid at its exposed face, over the whole domain of Bi, Fo and depth. */
export class SlabFilm implements UnitBody {
  readonly series: SlabSeries
  private readonly body: FilmedBody

  constructor(body: FilmedBody) {
    this.body = body
    this.series = new SlabSeries(body)
  }

  share(j: number, m: Moment): Share {
    const early = m.fourier < SHARE_BY_IMAGES_TO
    const { value, error, method } = early ? completedByImages(this.body, j, m) : this.series.remaining(j, m)
    const shift = EPS * this.body.shifts[j]!
    const moved = shift === 0 ? 0 : shift * this.steepest(j, m)
    return { value, error: Math.min(1, error + moved), method, of: early ? 'completed' : 'remaining' }
  }

  /** θ at place j, 1 at the start. */
  remaining(j: number, m: Moment): Estimate {
    const found = choose(
      m,
      () => remainingByImages(this.body, j, m),
      () => this.series.remaining(j, m),
    )
    return this.shifted(found, j, m)
  }

  /** 1 − θ at place j, without cancellation. */
  completed(j: number, m: Moment): Estimate {
    const found = choose(
      m,
      () => completedByImages(this.body, j, m),
      () => this.series.completed(j, m),
    )
    return this.shifted(found, j, m)
  }

  /** q/(h·ΔT) at place j, positive away from the face. */
  flux(j: number, m: Moment): Estimate {
    return choose(
      m,
      () => fluxByImages(this.body, j, m),
      () => this.series.flux(j, m),
    )
  }

  /** Share of the heat that the body takes up in all. */
  heatFraction(m: Moment): Estimate {
    return choose(
      m,
      () => heatByImages(this.body, m),
      () => this.series.heatFraction(m),
    )
  }

  /** Mean of θ; 1 − heatFraction without its cancellation at late times. */
  meanRemaining(m: Moment): Estimate {
    if (m.fourier >= IMAGES_TO) return this.series.meanRemaining(m)
    const heat = this.heatFraction(m)
    return { ...heat, value: 1 - heat.value, error: heat.error + EPS }
  }

  /** Adds what the rounding of the depth itself moves: |∂θ/∂δ| is Bi times the flux, which falls with the depth. */
  private shifted(found: Estimate, j: number, m: Moment): Estimate {
    const shift = EPS * this.body.shifts[j]!
    if (shift === 0) return found
    const flux = m.fourier < SERIES_FROM ? steepestFlux(this.body, j, m) : Math.abs(this.flux(j, m).value) * 1.01
    return { ...found, error: Math.min(1, found.error + shift * this.body.biot * flux) }
  }

  /** No less than |∂θ/∂δ|: a half space is at least as steep, nowhere more than at its face, and there less than behind a held one. */
  private steepest(j: number, m: Moment): number {
    const { biot } = this.body
    return m.fourier < SERIES_FROM ? biot * steepestFlux(this.body, j, m) : Math.min(biot, 0.6 / m.root)
  }

  /** Terms of the series at this time; 0 where only the images are asked. */
  terms(m: Moment): number {
    return m.fourier < SERIES_FROM ? 0 : termsAt(m.fourier)
  }
}

function choose(m: Moment, images: () => Estimate, series: () => Estimate): Estimate {
  if (m.fourier < SERIES_FROM) return images()
  if (m.fourier > IMAGES_TO) return series()
  const a = images()
  const b = series()
  return a.error <= b.error ? a : b
}
