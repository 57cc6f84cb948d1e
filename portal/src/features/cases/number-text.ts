import type { Body } from '../../solving/body.ts'
import type { Field } from './fields.ts'

/* Numbers as they are typed: a list with commas or spaces between, rows with semicolons or lines between. */

export function numberOf(text: string): number | string {
  const value = Number(text.replaceAll('\u2212', '-'))
  return Number.isFinite(value) ? value : text
}

export function listOf(text: string): unknown[] {
  return text
    .split(/[\s,;]+/)
    .filter(Boolean)
    .map(numberOf)
}

/** "0.1, 0.2; 0.3, 0.4". Where a column may be left out, each number stands after the name of its column. */
export function rowsText(columns: readonly Field[], rows: readonly Body[]): string {
  const named = columns.some(({ required }) => !required)
  const cell = (row: Body, name: string) => (named ? `${name} ${String(row[name])}` : String(row[name]))
  const text = (row: Body) =>
    columns
      .filter(({ name }) => name in row)
      .map(({ name }) => cell(row, name))
      .join(', ')
  return rows.map(text).join('; ')
}

/** Numbers by the names before them, or by their order; one too many keeps a name that the service refuses. */
export function rowsOf(columns: readonly Field[], text: string): Record<string, unknown>[] {
  const names = columns.map(({ name }) => name)
  const rows = text.split(/[;\n]+/).map((row) => row.split(/[\s,=]+/).filter(Boolean))
  return rows.filter((row) => row.length > 0).map((row) => rowOf(names, row))
}

function rowOf(names: readonly string[], words: readonly string[]): Record<string, unknown> {
  const row: Record<string, unknown> = {}
  let named: string | undefined
  for (const word of words) {
    if (names.includes(word)) {
      named = word
      continue
    }
    const next = names.find((name) => !(name in row)) ?? `value ${Object.keys(row).length + 1}`
    row[named ?? next] = numberOf(word)
    named = undefined
  }
  return row
}
