import { writeFile } from 'node:fs/promises'
import { fileURLToPath } from 'node:url'
import prettier from 'prettier'
import { genericMaterials } from '../solvers/materials/generic.ts'
import { derivedOf, uncertaintyOf } from '../solvers/materials/material.ts'
import { dimensions } from '../solvers/units/units.ts'

/* Pages of docs/ that are made from what the program reads. Run: npx tsx scripts/reference-pages.ts */

const row = (...cells: (string | number)[]) => `| ${cells.join(' | ')} |`
const made = '<!-- Made by scripts/reference-pages.ts. -->'
const code = (text: string) => `\`${text}\``

function unitsPage(): string {
  const rows = Object.entries(dimensions).map(([si, { name, units }]) =>
    row(
      name.replace(/(?<=[a-z])[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`),
      code(si),
      Object.keys(units)
        .filter((unit) => unit !== si)
        .map(code)
        .join(', '),
    ),
  )
  return `${made}

# Units

A plain number is in SI, a temperature in degrees Celsius, a difference of temperatures in kelvin. In place of any number of a quantity stands
\`{"value": 12, "unit": "cm"}\` with a UCUM code of this table; in lists each element may have a unit of its own. Converted values are exact: the
decimal that was sent is multiplied as a fraction and rounded once. What is not in the table is refused (\`unit-not-accepted\`).

\`Cel\` and \`[degF]\` are scales with a zero of their own. They stand alone and never in a product: write \`W/(m.K)\`, and \`[degR]\` in imperial products.
A difference (amplitude, rate, rise) takes \`K\` or \`[degR]\`.

| quantity | a plain number is in | also accepted |
| --- | --- | --- |
${rows.join('\n')}
`
}

function materialsPage(): string {
  const percent = (share: number) => `${Math.round(100 * share)} %`
  const sure = Object.entries(uncertaintyOf).map(([confidence, { conductivity, volumetricHeatCapacity }]) =>
    row(confidence, percent(conductivity), percent(volumetricHeatCapacity)),
  )
  const rows = genericMaterials.map((m) =>
    row(
      code(m.id),
      m.name,
      m.group,
      m.conductivity,
      m.density,
      m.specificHeat,
      derivedOf(m).diffusivity.toExponential(2),
      m.state,
      m.confidence,
      m.source,
    ),
  )
  return `${made}

# Materials

A solid is stated by its properties or by \`material\`, the id of one entry of this catalogue or of one of the account (\`mat_…\`), never by both. The answer
repeats the properties used with id, name, state, source and confidence, and warns where the figures are rough (\`material-confidence-low\`), where
moisture is not stated (\`moisture-state-unspecified\`), and where a temperature lies beyond the freezing point of a wet or frozen material
(\`phase-change-crossed\`).

Every figure is generic, none is of a product, and all are recalled from the tables named: compare them with the current edition, or keep your own.
\`state\` says what the figures hold for: \`design\` is a design table at the moisture usual in use.

An account keeps materials of its own under \`/v1/materials\`: they are seen by its members and keys alone. A change states by \`If-Match\` which version it is of.
\`npm run solve\` knows the catalogue only. \`POST /v1/materials/import\` takes CSV with the columns \`name\`, \`conductivity\`, \`density\`, \`specificHeat\`,
\`state\`, \`source\`, \`confidence\` and, where wanted, \`group\`, in any order and in SI, and reports on every row.

Relative standard uncertainties to start from:

| confidence | conductivity | heat capacity |
| --- | --- | --- |
${sure.join('\n')}

| id | name | group | W/(m.K) | kg/m3 | J/(kg.K) | m2/s | state | confidence | source |
| --- | --- | --- | --- | --- | --- | --- | --- | --- | --- |
${rows.join('\n')}
`
}

/** Each page by its path, as the formatter of the project leaves it. */
export async function referencePages(): Promise<[path: string, text: string][]> {
  const pages = { 'docs/units.md': unitsPage(), 'docs/materials.md': materialsPage() }
  return Promise.all(
    Object.entries(pages).map(async ([path, text]): Promise<[string, string]> => {
      const config = await prettier.resolveConfig(fileURLToPath(new URL(`../${path}`, import.meta.url)))
      return [path, await prettier.format(text, { ...config, parser: 'markdown' })]
    }),
  )
}

if (process.argv[1] === fileURLToPath(import.meta.url))
  for (const [path, text] of await referencePages()) await writeFile(new URL(`../${path}`, import.meta.url), text)
