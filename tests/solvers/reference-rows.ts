import { readFileSync } from 'node:fs'
import type { OutputName } from '../../solvers/outputs.ts'
import type { Kinds } from './rows/ask.ts'
import { closedForms } from './rows/closed-forms.ts'
import { products } from './rows/products.ts'
import { radial } from './rows/radial.ts'
import { slabs } from './rows/slabs.ts'
import { steps } from './rows/steps.ts'

export interface Row {
  id: string
  case: string
  inputs: Record<string, number>
  expected: Record<string, string>
  absolute_only?: string[]
}

/** One reference value as a question to the product. */
export interface Question {
  row: string
  caseId: string
  body: Record<string, unknown>
  output: OutputName
  /** 20 digits. */
  expected: string
  absoluteOnly: boolean
}

function read(name: string): Row[] {
  return JSON.parse(readFileSync(new URL(`../reference/values/${name}.json`, import.meta.url), 'utf8')) as Row[]
}

/* Each file of rows/ has a line here. */
export const kinds: Kinds = { ...steps, ...closedForms, ...radial, ...products, ...slabs }

export const questions: Question[] = Object.entries(kinds).flatMap(([kind, { file, ask, names }]) =>
  read(file)
    .filter((row) => row.case === kind)
    .flatMap((row) =>
      Object.entries(names).flatMap(([key, output]) => {
        const expected = row.expected[key]
        if (expected === undefined) return []
        return [
          {
            row: row.id,
            ...ask(row.inputs),
            output,
            expected,
            absoluteOnly: row.absolute_only?.includes(key) ?? false,
          },
        ]
      }),
    ),
)

/** The flux ratio of I-semi is q/(h·ΔT), asked as a flux. */
export const fluxRatios = read('I_extremes')
  .filter((row) => row.case === 'I-semi')
  .map((row) => ({
    row: row.id,
    ...kinds['I-semi']!.ask(row.inputs),
    film: row.inputs['film_number']!,
    expected: row.expected['flux_ratio']!,
  }))
