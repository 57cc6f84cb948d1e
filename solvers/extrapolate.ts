/** A derivative, and what it may be off. */
export interface Slope {
  value: number
  error: number
}

/**
 * The derivative that difference quotients tend to as their step vanishes, each step half of the one before.
 *
 *   D ← D + (D(H/2) − D(H))/(bᵐ − 1)
 *
 * Of the table the entry is taken whose distance to its neighbours and the roundings together are least; both are the error.
 *
 * Shapes    n quotients; one slope. A lone quotient tells nothing, and its error says so.
 * Units     those of the quotients.
 * Domain    b = 4 for quotients of two sides, whose error has even powers of the step alone; b = 2 for those of one side.
 * Accuracy  the slope says its error.
 * Errors    none.
 * Source    L. F. Richardson, The approximate arithmetical solution by finite differences, Phil. Trans. A 210 (1911).
 */
export function extrapolated(quotients: readonly Slope[], b: 2 | 4): Slope {
  let best: Slope = { value: quotients[0]!.value, error: Number.MAX_VALUE }
  let above: Slope[] = []
  for (const quotient of quotients) {
    const row: Slope[] = [quotient]
    for (let m = 1; m <= above.length; m++) {
      const [fine, coarse] = [row[m - 1]!, above[m - 1]!]
      const factor = b ** m
      const value = fine.value + (fine.value - coarse.value) / (factor - 1)
      const rounding = (factor * fine.error + coarse.error) / (factor - 1)
      row.push({ value, error: rounding })
      const distance = Math.max(Math.abs(value - fine.value), Math.abs(value - (above[m]?.value ?? coarse.value)))
      if (distance + rounding < best.error) best = { value, error: distance + rounding }
    }
    above = row
  }
  return best
}
