import type { Point } from './points.ts'
import type { Layout } from './layout.ts'

interface Drawn {
  level: number
  parts: readonly (readonly Point[])[]
}

/** A place for each level's figure: on its line, apart from the others, clear of both cuts and of the edges. */
export function placeLabels(
  drawn: readonly Drawn[],
  layout: Layout,
  [cutX, cutY]: Point,
): { level: number; at: Point }[] {
  const { left, right, planTop, planHeight } = layout
  const wanted = planTop + planHeight * 0.78
  const used: Point[] = []
  return drawn.flatMap(({ level, parts }) => {
    let best: Point | undefined
    for (const at of parts.flat()) {
      const [x, y] = at
      if (x < left + 22 || x > right - 22 || y < planTop + 16 || y > planTop + planHeight - 12) continue
      if (Math.abs(y - cutY) < 14 || Math.abs(x - cutX) < 26) continue
      if (used.some(([ux, uy]) => Math.hypot(ux - x, (uy - y) * 2) < 44)) continue
      if (!best || Math.abs(y - wanted) < Math.abs(best[1] - wanted)) best = at
    }
    if (!best) return []
    used.push(best)
    return [{ level, at: best }]
  })
}
