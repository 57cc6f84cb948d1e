import type { Estimate } from './rounding.ts'

/** An estimate of θ, or of 1 − θ. */
export interface Share extends Estimate {
  of: 'remaining' | 'completed'
}

/** Places of a body of size 1, from its exposed face to where no heat flows: mid-plane, insulated face, axis or centre. */
export interface UnitPlaces {
  /** Depth over size, 0..1, of each place. */
  deltas: Float64Array
  /** Distance to the mid-plane, insulated face, axis or centre over size, computed apart: 1 − δ would lose its digits. */
  inner: Float64Array
  /**
   * What each δ may be off in units of EPS beyond its relative rounding: a depth that is reckoned from the far face or
   * from a radius is a difference, which keeps the rounding of the whole size.
   */
  shifts: Float64Array
}

export interface FilmedBody extends UnitPlaces {
  biot: number
}

/** Everything at one time that does not depend on the place. */
export interface Moment {
  fourier: number
  /** √Fo, computed without forming Fo, which can vanish. */
  root: number
}

/** A body of size 1 after a unit step of its one drive. */
export interface UnitBody {
  /** θ or 1 − θ at place j, whichever is had at least cost, to an absolute error: a temperature needs no more. */
  share(j: number, m: Moment): Share
  /** θ at place j, 1 at the start. */
  remaining(j: number, m: Moment): Estimate
  /** 1 − θ at place j, without cancellation. */
  completed(j: number, m: Moment): Estimate
  /** Share of the unit of flux, positive away from the face. */
  flux(j: number, m: Moment): Estimate
  /** Share of the heat that the body takes up in all. */
  heatFraction(m: Moment): Estimate
  /** Mean of θ over the volume. */
  meanRemaining(m: Moment): Estimate
  /** Terms of the series at this time; 0 where there is none. */
  terms(m: Moment): number
}
