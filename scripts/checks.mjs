import { root } from './folders.mjs'
import { step } from './progress.mjs'
import { attempt } from './run.mjs'

/** What is checked without running the product: each is one test of the whole. Arguments of node. */
const checks = {
  types: ['node_modules/typescript/bin/tsc', '-p', 'tsconfig.json', '--noEmit'],
  'types of the portal': ['node_modules/typescript/bin/tsc', '-p', 'portal/tsconfig.json', '--noEmit'],
  lint: ['node_modules/eslint/bin/eslint.js', '--max-warnings', '0', '.'],
  format: ['node_modules/prettier/bin/prettier.cjs', '--log-level', 'warn', '--check', '.'],
  contract: ['--import', 'tsx', 'openapi/generate.ts', '--check'],
}

/** @returns {Promise<import('./tally.mjs').Tally>} */
export async function runChecks() {
  const tally = { passed: 0, failed: 0 }
  for (const [name, args] of Object.entries(checks)) {
    const { code, output } = await step(`Checking ${name}`, () => attempt(process.execPath, args, { cwd: root }))
    if (code === 0) {
      tally.passed++
      continue
    }
    tally.failed++
    console.error(`${output.trim()}\nThe check of ${name} failed.\n`)
  }
  return tally
}
