/** One call answers at most so many priced points. */
export const MAX_POINTS = 200_000
/** Without a key, one call answers at most so many numbers. */
export const MAX_TRY_VALUES = 10_000
/** Bytes of a body, after decompression: room for every time and place that one call may ask for. */
export const BODY_LIMIT = 4 * 1024 * 1024
export const TRY_BODY_LIMIT = 512 * 1024
/** An HTTP call costs at least so many points. */
export const FLOOR = 10
