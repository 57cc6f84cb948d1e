import type { Body } from '../../solving/body.ts'
import type { Case } from './described.ts'
import { listOf, numberOf, rowsOf, rowsText } from './number-text.ts'

export type Operation = Case['operations'][number]

/** Fields of a solve that another question has in its own way, or not at all. */
const asked = ['depths', 'radii', 'points', 'times', 'outputs', 'detail']

/** The names of what a question has of its own, as its example gives them. */
export function ownNames(c: Case, { example }: Operation): string[] {
  const shared = c.fields.map(({ name }) => name).filter((name) => !asked.includes(name))
  return Object.keys(example).filter((name) => name !== 'input' && !shared.includes(name))
}

const columnsOf = (c: Case) => c.fields.find(({ name }) => name === 'points')?.fields ?? []

const isRow = (value: unknown): value is Body => typeof value === 'object' && value !== null && !Array.isArray(value)

export function ownText(c: Case, value: unknown): string {
  if (isRow(value)) return rowsText(columnsOf(c), [value])
  if (!Array.isArray(value)) return String(value)
  return value.some(isRow) ? rowsText(columnsOf(c), value as Body[]) : value.join(', ')
}

/** What was typed, in the form that the example has; it is for the service to refuse. */
function ownValue(c: Case, example: unknown, text: string): unknown {
  if (isRow(example)) return rowsOf(columnsOf(c), text)[0] ?? {}
  if (Array.isArray(example)) return example.some(isRow) ? rowsOf(columnsOf(c), text) : listOf(text)
  return typeof example === 'number' ? numberOf(text) : text
}

/** The question with the reader's own body: what was last solved, and what was typed beside it. */
export function questionOf(
  c: Case,
  { example }: Operation,
  solved: Body,
  typed: Readonly<Record<string, string>>,
): Body {
  const own = Object.entries(typed).filter(([, text]) => text.trim() !== '')
  const values = Object.fromEntries(own.map(([name, text]) => [name, ownValue(c, example[name], text.trim())]))
  const within = (given: Body) =>
    Object.fromEntries(Object.entries(solved).filter(([name]) => !asked.includes(name) || name in given))
  return isRow(example['input']) ? { ...values, input: within(example['input']) } : { ...within({}), ...values }
}
