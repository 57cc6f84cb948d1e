/* Gauss-Legendre rule of 12 points on [−1, 1], positive half (Abramowitz & Stegun, table 25.4). */
const NODES = [
  0.1252334085114689, 0.3678314989981802, 0.5873179542866175, 0.7699026741943047, 0.9041172563704749,
  0.9815606342467192,
]
const WEIGHTS = [
  0.2491470458134028, 0.2334925365383548, 0.2031674267230659, 0.1600783285433462, 0.1069393259953184,
  0.0471753363865118,
]

/**
 * ∫ f from start to start + width, by one panel of 12 points: for an f that is smooth over a few widths. The width is
 * given apart, since it may be far smaller than the start.
 */
export function gauss(f: (s: number) => number, start: number, width: number): number {
  const half = width / 2
  let sum = 0
  for (let i = 0; i < NODES.length; i++) {
    const step = half * NODES[i]!
    sum += WEIGHTS[i]! * (f(start + half - step) + f(start + half + step))
  }
  return half * sum
}
