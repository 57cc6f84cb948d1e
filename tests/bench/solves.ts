import { performance } from 'node:perf_hooks'
import type { Case } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { solve } from '../../solvers/operations/solve.ts'
import { type Report, median, rounded } from './figure.ts'

const ROUNDS = 5
const ROUND_MS = 400

/** How often one thread answers each case's own example, from the parsed body to the answer as text. */
export function benchSolves(report: Report): void {
  for (const c of cases) {
    round(c)
    const rates = Array.from({ length: ROUNDS }, () => round(c))
    report({ name: `solve ${c.id}`, value: rounded(median(rates)), unit: 'solves/s', ratioTo: null })
  }
}

function round(c: Case): number {
  const begun = performance.now()
  let count = 0
  let elapsed = 0
  do {
    for (let n = 0; n < 20; n++) JSON.stringify(solve.prepare(c, c.example, 'full').run())
    count += 20
    elapsed = performance.now() - begun
  } while (elapsed < ROUND_MS)
  return (count / elapsed) * 1000
}
