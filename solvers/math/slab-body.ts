/** A slab of length 1 from its exposed face to the plane where no heat flows, and the places asked for. */
export interface SlabBody {
  biot: number
  /** Depth over length, 0..1, of each place. */
  deltas: Float64Array
  /** Distance to the mid-plane or insulated face over length, computed apart: 1 − δ would lose its digits. */
  inner: Float64Array
  /**
   * What each δ may be off in units of EPS beyond its relative rounding: a depth behind the mid-plane is reckoned from
   * the far face, and the difference keeps the rounding of the whole thickness.
   */
  shifts: Float64Array
}

/** Everything at one time that does not depend on the place. */
export interface SlabMoment {
  fourier: number
  /** √Fo, computed without forming Fo, which can vanish. */
  root: number
}
