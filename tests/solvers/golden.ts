import { createHash } from 'node:crypto'
import { fileURLToPath } from 'node:url'
import { readFileSync, writeFileSync } from 'node:fs'
import { type Case, outputNamesOf } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { DomainError } from '../../solvers/errors.ts'
import { solve } from '../../solvers/operations/solve.ts'
import { SOLVER_VERSION } from '../../solvers/version.ts'

/*
 * Answers as they were when the solver's version was set: their numbers may not change under one version.
 * Run this file to record them anew, after raising the version.
 */

const file = new URL('../reference/golden.json', import.meta.url)

export interface Golden {
  solver: string
  /** SHA-256 of result and bound of each case's example with all its outputs, over a grid of times. */
  digests: Record<string, string>
}

type Asked = Record<string, unknown> & { outputs: string[] }

/** The answer with every output that the example can have: some are refused by what it states. */
function answerOf(c: Case, body: Asked): { result: unknown; accuracy: unknown } {
  try {
    return solve.prepare(c, body, 'compact').run() as { result: unknown; accuracy: unknown }
  } catch (error) {
    const refused = error instanceof DomainError ? error.issues : []
    const left = body.outputs.filter((_, i) => !refused.some(({ pointer }) => pointer === `#/outputs/${i}`))
    if (left.length === body.outputs.length) throw error
    return answerOf(c, { ...body, outputs: left })
  }
}

export function compute(): Golden {
  const times = Array.from({ length: 41 }, (_, i) => 10 ** (i / 5))
  const digests = cases.map((c) => {
    // Sensitivities are made of temperatures alone, and of very many.
    const outputs = outputNamesOf(c).filter((name) => name !== 'sensitivities')
    const body = { ...c.example, times, outputs }
    const { result, accuracy } = answerOf(c, body)
    return [
      c.id,
      createHash('sha256')
        .update(JSON.stringify([result, accuracy]))
        .digest('hex'),
    ] as const
  })
  return { solver: SOLVER_VERSION, digests: Object.fromEntries(digests) }
}

export function recorded(): Golden {
  return JSON.parse(readFileSync(file, 'utf8')) as Golden
}

if (process.argv[1] === fileURLToPath(import.meta.url)) writeFileSync(file, JSON.stringify(compute(), null, 2) + '\n')
