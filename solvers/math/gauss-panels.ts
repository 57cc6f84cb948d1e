import { gauss } from './gauss.ts'

/** ∫₀¹ f by panels of 12 points: for an f with a few waves in a panel at most. */
export function gaussOver(f: (s: number) => number, panels: number, from = 0, width = 1): number {
  let sum = 0
  for (let k = 0; k < panels; k++) sum += gauss(f, from + (width * k) / panels, width / panels)
  return sum
}
