/** Unit roundoff of double precision: the largest relative error of one rounded operation. */
export const EPS = 2 ** -53

/** Largest relative error of the library's erfcx, in units of EPS; tests hold it to this over all arguments used. */
export const ERFCX_ERROR = 10

/** Below this size a fraction may be answered as zero. */
export const TINY = 1e-290

/** Two units in the last place of a printed value. */
export function lastPlaces(value: number): number {
  return 4 * EPS * Math.abs(value)
}

export type Method = 'closed-form' | 'eigen-series' | 'two-image' | 'contour' | 'product' | 'duhamel' | 'root'

/** A number, the most that it may be off, and how it was found. */
export interface Estimate {
  value: number
  error: number
  method: Method
}
