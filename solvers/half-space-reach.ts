/** Depth at which 1 % of a step at the surface has arrived after a time: erfc(1.8214) = 0.01. */
export function penetrationDepth(diffusivity: number, times: readonly number[]): number {
  const longest = times.reduce((most, t) => Math.max(most, t), 0)
  return 3.642772 * Math.sqrt(diffusivity) * Math.sqrt(longest)
}
