import type { Method } from './math/rounding.ts'
import type { OutputName } from './outputs.ts'

/** What each value of an output errs by at most: absolute + relative · |value|. */
export interface Bound {
  absolute: number
  relative: number
}

/** What one value may be off. */
export const errorOf = ({ absolute, relative }: Bound, value: number): number => absolute + relative * Math.abs(value)

export type { Method }

export interface Output {
  values: number | number[] | number[][]
  bound: Bound
}

/** What a case's solve.ts gives back: numbers, and how far each may be off. */
export interface Solution {
  outputs: Partial<Record<OutputName, Output>>
  methods: Method[]
  /** Largest number of series terms used; 0 where there is no series. */
  terms: number
  /** The case's temperature scale D, the largest over the times. */
  scale: number
}
