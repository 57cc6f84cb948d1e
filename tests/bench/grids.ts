import { performance } from 'node:perf_hooks'
import type { Case, Point, Resolved } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import type { Solution } from '../../solvers/solution.ts'
import { type Report, median, rounded } from './figure.ts'

const PLACES = 200
const TIMES = 500
const SETS = 100_000
const ROUNDS = 3

type Input = Record<string, unknown>

/**
 * Points a second of each case: over a grid of 200 places and 500 times, and one point each for 100,000 sets of
 * parameters; and what the grid takes as a multiple of writing the same numbers as JSON.
 */
export function benchGrids(report: Report): void {
  for (const c of cases) {
    const grid = gridOf(c)
    const points = countOf(solved(c, grid))
    const rate = median(Array.from({ length: ROUNDS + 1 }, () => points / seconds(() => solved(c, grid))).slice(1))
    const values = solved(c, grid).outputs.temperature?.values ?? []
    const written = median(
      Array.from({ length: ROUNDS + 1 }, () => points / seconds(() => JSON.stringify(values))).slice(1),
    )
    const sets = Array.from({ length: SETS }, (_, n) => changed(c, n))
    const single = SETS / seconds(() => sets.forEach((input) => solved(c, input)))
    report({ name: `grid ${c.id}`, value: rounded(rate), unit: 'points/s', ratioTo: null })
    report({ name: `grid time ${c.id}`, value: rounded(written / rate), unit: '1', ratioTo: 'JSON.stringify' })
    report({ name: `parameter sets ${c.id}`, value: rounded(single), unit: 'points/s', ratioTo: null })
  }
}

const solved = (c: Case, input: Input): Solution => c.solve(c.resolve({ ...input }))

function seconds(work: () => unknown): number {
  const begun = performance.now()
  work()
  return (performance.now() - begun) / 1000
}

const countOf = ({ outputs }: Solution): number => [outputs.temperature?.values ?? []].flat(2).length

/** The example over 500 times, by decades around its own, and 200 places from its first to its last. */
function gridOf(c: Case): Input {
  const times = c.example['times'] as number[]
  const last = Math.max(...times, 1)
  const spread = Array.from({ length: TIMES }, (_, i) =>
    c.clock ? (last * i) / TIMES : last * 10 ** (4 * (i / TIMES - 0.75)),
  )
  return { ...c.example, ...placesOf(c), times: spread, outputs: ['temperature'] }
}

function placesOf(c: Case): Pick<Resolved, 'depths' | 'radii' | 'points'> {
  const along = (values: readonly number[]) => {
    const [from, to] = [Math.min(...values), Math.max(...values)]
    return Array.from({ length: PLACES }, (_, j) => from + ((to - from) * j) / (PLACES - 1))
  }
  const { depths, radii, points } = c.example as Partial<Resolved>
  if (depths) return { depths: along(depths) }
  if (radii) return { radii: along(radii) }
  if (!points) return {}
  // Only the axes that the body of the example has: a rod has no y, a bar no r.
  const axes = (c.pointAxes ?? [])
    .filter((axis) => points.every((point) => point[axis] !== undefined))
    .map((axis) => [axis, along(points.map((point) => point[axis]!))] as const)
  return {
    points: Array.from({ length: PLACES }, (_, j): Point =>
      Object.fromEntries(axes.map(([axis, at]) => [axis, at[j]!])),
    ),
  }
}

/** The example with its times a little later each time, and one place: a set of its own. */
function changed(c: Case, n: number): Input {
  const time = (c.example['times'] as number[]).at(-1)! * (1 + n / SETS)
  const { depths, radii, points } = c.example as Partial<Resolved>
  const place = depths
    ? { depths: depths.slice(-1) }
    : radii
      ? { radii: radii.slice(-1) }
      : points
        ? { points: points.slice(-1) }
        : {}
  const conductivity = c.example['conductivity']
  const solid = typeof conductivity === 'number' ? { conductivity: conductivity * (1 + n / SETS) } : {}
  return { ...c.example, ...solid, ...place, times: [time], outputs: ['temperature'] }
}
