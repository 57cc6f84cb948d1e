import { parse as parseCsv } from 'csv-parse/sync'
import { DomainError, type Issue } from '../../solvers/errors.ts'
import { parse } from '../../solvers/statement/validate.ts'
import { Problem, invalidInput } from '../problems.ts'
import { type NewMaterial, newMaterialSchema } from './schemas.ts'

/** Rows of one import, few enough to be examined in some tens of milliseconds. */
const MOST_ROWS = 1000
/** More columns than these are no columns: something else is in the first line. */
const MOST_COLUMNS = 50

/** The columns are the fields of a material; numbers are in SI. */
const columns = Object.keys(newMaterialSchema.shape)
const optional = columns.filter(
  (name) => newMaterialSchema.shape[name as keyof NewMaterial].safeParse(undefined).success,
)
const numeric: readonly string[] = ['conductivity', 'density', 'specificHeat'] satisfies (keyof NewMaterial)[]

export type ImportedRow = { row: number } & ({ material: NewMaterial } | { issues: readonly Issue[] })

/** Reads CSV whose first line names the columns. Throws where the file as a whole will not do. */
export function readMaterials(text: string): ImportedRow[] {
  const [names = [], ...records] = recordsIn(text)
  refuseColumns(names)
  if (records.length === 0) throw new Problem('malformed-csv', 'There is no row below the names of the columns.')
  if (records.length > MOST_ROWS)
    throw new Problem('malformed-csv', `There are more than ${MOST_ROWS} rows; one import takes no more.`)
  return records.map((record, i) => ({ row: i + 1, ...readRow(names, record) }))
}

function recordsIn(text: string): string[][] {
  try {
    return parseCsv(text, {
      bom: true,
      trim: true,
      skip_empty_lines: true,
      max_record_size: 8192,
      relax_column_count: true,
      /* The names, and one row more than there may be: the rest is not looked at. */
      to: MOST_ROWS + 2,
    })
  } catch (error) {
    const { lines } = error as { lines?: unknown }
    const place = typeof lines === 'number' ? ` near line ${lines}` : ''
    throw new Problem('malformed-csv', `The body is not CSV${place}: a quote is out of place, or a line is too long.`)
  }
}

function refuseColumns(names: readonly string[]): void {
  if (names.length > MOST_COLUMNS)
    throw new Problem('malformed-csv', `The first line has ${names.length} cells; it names the columns.`)
  const accepted = columns.join(', ')
  const quoted = (name: string) => name.slice(0, 60)
  const issues: Issue[] = [
    ...names
      .filter((name, i) => !columns.includes(name) || names.indexOf(name) !== i)
      .map((name): Issue => {
        const twice = columns.includes(name)
        const detail = twice ? `The column ${name} stands twice.` : `There is no column "${quoted(name)}".`
        return {
          pointer: pointerTo(quoted(name)),
          code: twice ? 'conflicting-fields' : 'unknown-field',
          detail,
          accepted,
        }
      }),
    ...columns
      .filter((name) => !names.includes(name) && !optional.includes(name))
      .map((name): Issue => {
        return { pointer: pointerTo(name), code: 'missing-field', detail: `The column ${name} is missing.`, accepted }
      }),
  ]
  if (issues.length > 0) throw invalidInput(issues.slice(0, 50))
}

const pointerTo = (name: string) => `#/${name.replaceAll('~', '~0').replaceAll('/', '~1')}`

function readRow(
  names: readonly string[],
  cells: readonly string[],
): { material: NewMaterial } | { issues: readonly Issue[] } {
  if (cells.length !== names.length) {
    const detail = `The row has ${cells.length} cells; the first line names ${names.length} columns.`
    return { issues: [{ pointer: '#', code: 'wrong-length', detail, accepted: `${names.length} cells` }] }
  }
  /* An empty cell is a field that was not given. */
  const given = names.flatMap((name, i) => (cells[i] === '' ? [] : [[name, valueOf(name, cells[i] ?? '')]]))
  try {
    return { material: parse(newMaterialSchema, Object.fromEntries(given)) }
  } catch (error) {
    if (!(error instanceof DomainError)) throw error
    return { issues: error.issues }
  }
}

/** A decimal with a point; what is none stays a text, and is refused as one. */
function valueOf(name: string, cell: string): string | number {
  return numeric.includes(name) && /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(cell) ? Number(cell) : cell
}
