/** The latest of some times; 0 where there is none after it. */
export const latestOf = (times: readonly number[]): number => times.reduce((most, t) => Math.max(most, t), 0)
