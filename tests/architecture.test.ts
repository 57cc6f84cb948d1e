import { readFileSync } from 'node:fs'
import path from 'node:path'
import { expect, test } from 'vitest'
import { type Import, importsIn, importsOf, reachOf, root, sourcesUnder } from './imports.ts'

interface Rule {
  files: RegExp
  /** Paths of this project that such a file may import; it knows nothing of the rest. */
  knows: RegExp
  packages: RegExp
}

/** Who may know whom. The first rule that fits a file counts. */
const rules: readonly Rule[] = [
  {
    files: /^solvers\//,
    knows: /^solvers\//,
    packages: /^(zod|@stdlib\/.+|@lhncbc\/ucum-lhc|d3-(scale|shape)|node:crypto)$/,
  },
  { files: /^drizzle\//, knows: /^drizzle\//, packages: /^drizzle-orm/ },
  { files: /^api\//, knows: /^(api|solvers|drizzle)\//, packages: /^(?!react|vite|@tanstack)/ },
  { files: /^openapi\//, knows: /^(openapi|api)\//, packages: /^(?!pg$|drizzle-|node:(net|http|https|tls|dns)$)/ },
  {
    files: /^portal\/src\/(api|components|figure|look)\//,
    knows: /^(portal\/src\/(api|components|figure|look)|openapi)\//,
    packages: /^(?!node:|pg$|express|zod)/,
  },
  { files: /^portal\//, knows: /^(portal|openapi)\//, packages: /^(?!node:|pg$|express|zod)/ },
]

const folders = ['solvers', 'drizzle', 'api', 'openapi', 'portal']
const sources = folders.flatMap(sourcesUnder)
const featureOf = (file: string) => /^portal\/src\/features\/([^/]+)\//.exec(file)?.[1]

function refused(file: string, imports: readonly Import[]): string[] {
  const rule = rules.find(({ files }) => files.test(file))
  if (!rule) return [`${file} falls under no rule`]
  const known = ({ target }: Import) => {
    if (!/^(\.|(solvers|api|drizzle|openapi|portal|scripts|tests)\/)/.test(target)) return rule.packages.test(target)
    const features = [featureOf(file), featureOf(target)]
    return rule.knows.test(target) && (!features[0] || !features[1] || features[0] === features[1])
  }
  return imports.filter((one) => !known(one)).map(({ target }) => `${file} imports ${target}`)
}

test('every import keeps to what its folder may know', () => {
  expect(sources.length).toBeGreaterThan(20)
  expect(sources.flatMap((file) => refused(file, importsIn(file)))).toEqual([])
})

test.each([
  ['solvers/cases/slab-convection/case.ts', "import { Problem } from '../../../api/problems.ts'"],
  ['solvers/math/planted.ts', "import { readFileSync } from 'node:fs'"],
  ['drizzle/planted.ts', "export { cases } from '../solvers/cases/index.ts'"],
  ['api/planted.ts', "const page = await import('../portal/src/main.tsx')"],
  ['openapi/planted.ts', "import pg from 'pg'"],
  ['portal/src/features/keys/planted.tsx', "import type { Key } from '../../../../api/keys/operations.ts'"],
  ['portal/src/features/keys/planted.tsx', "import { Chart } from '../usage/chart.tsx'"],
  ['portal/src/components/planted.tsx', "import { KeysScreen } from '../features/keys/keys-screen.tsx'"],
])('an import planted in %s is found: %s', (file, text) => {
  expect(refused(file, importsOf(file, text))).toHaveLength(1)
})

test('commands need no package before they have installed them', () => {
  const early = sourcesUnder('scripts').filter((file) => file.endsWith('.mjs'))
  const imports = early.flatMap((file) => importsIn(file).map((one) => ({ file, ...one })))
  expect(imports.length).toBeGreaterThan(50)
  const needy = imports.filter(({ target, late }) => !late && !/^(node:|scripts\/[^/]+\.mjs$)/.test(target))
  expect(needy.map(({ file, target }) => `${file} imports ${target}`)).toEqual([])
})

test('a formula loads nothing but other formulas and special functions', () => {
  const formulas = sources.filter((file) => /^solvers\/(math\/|cases\/[^/]+\/solve\.ts$)/.test(file))
  expect(formulas.length).toBeGreaterThan(3)
  const loaded = formulas.flatMap((file) => [...reachOf(file)].map((target) => `${file} loads ${target}`))
  expect(loaded.filter((line) => !/ loads (solvers\/|@stdlib\/)/.test(line))).toEqual([])
})

test('numbers depend on their input alone: no clock, no chance, no surroundings in solvers', () => {
  const impure = /\b(Date|performance|process|console|fetch|setTimeout)\b[.(]|Math\.random|new Date/
  expect(impure.test('const t = Date.now()')).toBe(true)
  const found = sourcesUnder('solvers').filter((file) => impure.test(readFileSync(path.join(root, file), 'utf8')))
  expect(found).toEqual([])
})

test('the environment of the process is read where a program starts, and nowhere else', () => {
  const readers = ['solvers', 'api', 'drizzle']
    .flatMap(sourcesUnder)
    .filter((file) => readFileSync(path.join(root, file), 'utf8').includes('process.env'))
  expect(readers).toEqual(['api/demo/from-environment.ts', 'api/migrate.ts', 'api/server.ts'])
})
