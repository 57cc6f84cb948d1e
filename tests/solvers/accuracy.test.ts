import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { pageOf, tableOf } from '../../scripts/accuracy.ts'
import { cases } from '../../solvers/cases/index.ts'
import { questions } from './reference-rows.ts'

/* The page of accuracy is made by a command that takes a minute; here it is held to the cases and values that there are. */

const page = readFileSync(new URL('../../docs/accuracy.md', import.meta.url), 'utf8')
const rowsOf = (text: string) =>
  text
    .split('\n')
    .filter((line) => line.startsWith('| '))
    .slice(2)
    .map((line) =>
      line
        .split('|')
        .slice(1, -1)
        .map((cell) => cell.trim()),
    )

describe('the page of accuracy', () => {
  it('has a line for every case, in their order', () => {
    expect(rowsOf(page).map(([id]) => id)).toEqual(cases.map(({ id }) => id))
  })

  it('tells of every reference value, and of no error above its promise', () => {
    for (const [id, values, worst, row] of rowsOf(page)) {
      expect(Number(values), id).toBe(questions.filter(({ caseId }) => caseId === id).length)
      if (Number(values) === 0) continue
      expect(Number(worst), id).toBeLessThanOrEqual(1)
      expect(questions.map(({ row: one, output }) => `${one} ${output}`)).toContain(row)
    }
  })

  it('is made as the command makes it', () => {
    const figures = [
      {
        caseId: 'slab-convection',
        values: 3,
        worst: { share: 0.25, row: 'B2-001', output: 'temperature' },
        slack: 41.7,
      },
      { caseId: 'hollow-cylinder-convection', values: 0 },
    ]
    expect(rowsOf(tableOf(figures))).toEqual([
      ['slab-convection', '3', '0.25', 'B2-001 temperature', '41.7'],
      ['hollow-cylinder-convection', '0', '–', '–', '–'],
    ])
    const heading = (text: string) => text.slice(0, text.indexOf('\n\n', text.indexOf('# Accuracy')))
    expect(heading(pageOf(figures))).toBe(heading(page))
  })
})
