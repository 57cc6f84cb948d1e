/** One call answers at most so many priced points. */
export const MAX_POINTS = 200_000
/** Without a key, one call answers at most so many numbers. */
export const MAX_TRY_VALUES = 10_000
/** An HTTP call costs at least so many points. */
export const FLOOR = 10
