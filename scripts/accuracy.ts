import { writeFile } from 'node:fs/promises'
import { fileURLToPath } from 'node:url'
import { Decimal } from 'decimal.js'
import prettier from 'prettier'
import { cases } from '../solvers/cases/index.ts'
import { askSingle, contract, sensitivity, temperaturesOf } from '../tests/solvers/ask.ts'
import { type Question, questions } from '../tests/solvers/reference-rows.ts'

/* How far each case is from its reference values, as a share of what it promises, and how far its bounds are above its errors. */

export interface Figures {
  caseId: string
  values: number
  /** Largest error over the promise, and whose it is; undefined where no value is kept. */
  worst?: { share: number; row: string; output: string }
  /** Median of the bound over the error, values that are right to the last digit left out. */
  slack?: number
}

interface Measured {
  share: number
  slack: number | undefined
  question: Question
}

function measure(question: Question): Measured {
  const { caseId, body, output, expected, absoluteOnly } = question
  const { value, bound, scale } = askSingle(caseId, body, output)
  const error = new Decimal(value).minus(expected).abs().toNumber()
  const { K, largest } = sensitivity(caseId, body, output)
  const promised = contract(output, Number(expected), K, {
    scale,
    temperatures: temperaturesOf(body),
    surface: largest,
  })
  const share = error / (absoluteOnly ? Math.max(promised, 1e-30) : promised)
  return { share, slack: error > 0 && !absoluteOnly ? bound / error : undefined, question }
}

/** Every case of the product in its order; `told` hears how far it has come. */
export function accuracyOf(told: (done: number, of: number) => unknown = () => undefined): Figures[] {
  let done = 0
  return cases.map(({ id }) => {
    const measured = questions
      .filter(({ caseId }) => caseId === id)
      .map((question) => {
        told(++done, questions.length)
        return measure(question)
      })
    if (measured.length === 0) return { caseId: id, values: 0 }
    const worst = measured.reduce((most, one) => (one.share > most.share ? one : most))
    const slacks = measured.flatMap(({ slack }) => slack ?? []).sort((a, b) => a - b)
    const slack = slacks[Math.floor(slacks.length / 2)]
    return {
      caseId: id,
      values: measured.length,
      worst: { share: worst.share, row: worst.question.row, output: worst.question.output },
      ...(slack === undefined ? {} : { slack }),
    }
  })
}

export function tableOf(figures: readonly Figures[]): string {
  const rows = figures.map(({ caseId, values, worst, slack }) => [
    caseId,
    String(values),
    worst === undefined ? '–' : worst.share.toPrecision(2),
    worst === undefined ? '–' : `${worst.row} ${worst.output}`,
    slack === undefined ? '–' : slack.toPrecision(3),
  ])
  const head = ['case', 'values', 'worst error / promise', 'in row', 'median bound / error']
  const lines = [head, head.map(() => '---'), ...rows]
  return lines.map((cells) => `| ${cells.join(' | ')} |`).join('\n')
}

export function pageOf(figures: readonly Figures[]): string {
  const values = figures.reduce((sum, one) => sum + one.values, 0)
  return `<!-- Made by npm run accuracy -- --write. -->

# Accuracy

${values} reference values of 20 digits, computed by two unrelated routes ([tests/reference](../tests/reference/README.md)), asked of the service one by
one. The first figure is the largest error of a case as a share of the error that it promises: 1 would be all of it. The last says how far
the bounds that are answered lie above the true errors, in the median. Cases without a value here are held to exact answers over random
questions, and to other routes, by their tests in \`tests/solvers/\`.

${tableOf(figures)}
`
}

export async function writePage(figures: readonly Figures[]): Promise<void> {
  const file = fileURLToPath(new URL('../docs/accuracy.md', import.meta.url))
  const options = await prettier.resolveConfig(file)
  await writeFile(file, await prettier.format(pageOf(figures), { ...options, filepath: file }))
}
