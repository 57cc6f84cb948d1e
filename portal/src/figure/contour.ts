import type { Point } from './points.ts'

/* Lines of equal value over a grid, by marching squares: cells are cut edge to edge, the cuts joined to lines. */

type Rows = readonly (readonly number[])[]
type Edge = string

/** The lines where the value is at the level, in the coordinates of xs (along a row) and ys (down the rows). */
export function contour(xs: readonly number[], ys: readonly number[], values: Rows, level: number): Point[][] {
  const places = new Map<Edge, Point>()
  const joined = new Map<Edge, Edge[]>()
  const at = (row: number, column: number) => values[row]![column]! - level
  const cross = (r1: number, c1: number, r2: number, c2: number): Edge => {
    const edge = `${r1},${c1},${r2},${c2}`
    const a = at(r1, c1)
    const part = a / (a - at(r2, c2))
    const x = xs[c1]! + part * (xs[c2]! - xs[c1]!)
    const y = ys[r1]! + part * (ys[r2]! - ys[r1]!)
    places.set(edge, [x, y])
    return edge
  }
  const join = (a: Edge, b: Edge) => {
    joined.set(a, [...(joined.get(a) ?? []), b])
    joined.set(b, [...(joined.get(b) ?? []), a])
  }
  for (let r = 0; r + 1 < ys.length; r++) {
    for (let c = 0; c + 1 < xs.length; c++) {
      const inside = [at(r, c), at(r, c + 1), at(r + 1, c + 1), at(r + 1, c)].map((v) => v >= 0)
      const cuts: Edge[] = []
      if (inside[0] !== inside[1]) cuts.push(cross(r, c, r, c + 1))
      if (inside[1] !== inside[2]) cuts.push(cross(r, c + 1, r + 1, c + 1))
      if (inside[2] !== inside[3]) cuts.push(cross(r + 1, c, r + 1, c + 1))
      if (inside[3] !== inside[0]) cuts.push(cross(r, c, r + 1, c))
      for (let i = 0; i + 1 < cuts.length; i += 2) join(cuts[i]!, cuts[i + 1]!)
    }
  }
  return lines(joined).map((edges) => edges.map((edge) => places.get(edge)!))
}

/** The closed outlines of the region at or above a level: the grid is framed by values below it. */
export function region(xs: readonly number[], ys: readonly number[], values: Rows, level: number): Point[][] {
  const below = level - 1e9
  const framed = <V>(list: readonly V[], first: V, last: V) => [first, ...list, last]
  const edgeRow = Array.from({ length: xs.length + 2 }, () => below)
  return contour(
    framed(xs, xs[0]!, xs.at(-1)!),
    framed(ys, ys[0]!, ys.at(-1)!),
    framed(
      values.map((row) => framed(row, below, below)),
      edgeRow,
      edgeRow,
    ),
    level,
  )
}

function lines(joined: Map<Edge, Edge[]>): Edge[][] {
  const done = new Set<Edge>()
  const walk = (start: Edge): Edge[] => {
    const line = [start]
    done.add(start)
    for (let next = joined.get(start)?.[0]; next !== undefined && !done.has(next);) {
      line.push(next)
      done.add(next)
      next = joined.get(next)?.find((edge) => !done.has(edge))
    }
    return line
  }
  const ends = [...joined.keys()].filter((edge) => joined.get(edge)?.length === 1)
  const open = ends.filter((edge) => !done.has(edge)).flatMap((edge) => (done.has(edge) ? [] : [walk(edge)]))
  const closed = [...joined.keys()].flatMap((edge) => {
    if (done.has(edge)) return []
    const loop = walk(edge)
    return [[...loop, loop[0]!]]
  })
  return [...open, ...closed].filter((line) => line.length > 1)
}
