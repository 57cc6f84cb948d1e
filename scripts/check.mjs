import { runChecks } from './checks.mjs'
import { runMain } from './refusal.mjs'
import { ensurePackages } from './setup.mjs'
import { closingLine } from './tally.mjs'
import { chooseSeed, runVitest } from './vitest.mjs'

/** What to run before a commit: everything that needs neither the API nor a browser. */
async function main() {
  await ensurePackages()
  const seed = chooseSeed()
  console.log(`Seed ${seed}. SOAKSTONE_SEED=${seed} repeats this run.`)
  const checked = await runChecks()
  // A tenth of the random inputs of the whole test: this is to stay short.
  const tested = await runVitest(['tests/architecture.test.ts', 'tests/tree.test.ts', 'tests/solvers'], {
    SOAKSTONE_SEED: seed,
    SOAKSTONE_BRIEF: '1',
  })
  const { line, code } = closingLine([checked, tested])
  console.log(line)
  return code
}

await runMain(main)
