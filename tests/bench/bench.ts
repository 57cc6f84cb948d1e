import type { Report } from './figure.ts'
import { benchCalls } from './calls.ts'
import { benchGrids } from './grids.ts'
import { benchSolves } from './solves.ts'

export async function bench(report: Report): Promise<void> {
  benchSolves(report)
  benchGrids(report)
  await benchCalls(report)
}
