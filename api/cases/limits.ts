export { FLOOR, MAX_POINTS } from '../../solvers/operations/price.ts'

/** Without a key, one call answers at most so many numbers. */
export const MAX_TRY_VALUES = 10_000
/** Bytes of a body, after decompression: room for every time and place that one call may ask for. */
export const BODY_LIMIT = 4 * 1024 * 1024
export const TRY_BODY_LIMIT = 512 * 1024
