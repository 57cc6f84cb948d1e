import { runChecks } from './checks.mjs'
import { buildPortal } from './portal.mjs'
import { postgresPrograms } from './postgres-programs.mjs'
import { explain, runMain } from './refusal.mjs'
import { ensureChromium, ensurePackages } from './setup.mjs'
import { closingLine } from './tally.mjs'
import { chooseSeed, runVitest } from './vitest.mjs'

/** Every test, at full counts with --proof. A set-up that cannot be finished counts as one failure. */
async function main() {
  try {
    return await testAll()
  } catch (error) {
    explain(error)
    const { line, code } = closingLine([{ passed: 0, failed: 1 }])
    console.log(line)
    return code
  }
}

async function testAll() {
  if (!process.env['TEST_DATABASE_URL'] && !process.env['DATABASE_URL']) await postgresPrograms()
  await ensureChromium()
  await ensurePackages()
  const seed = chooseSeed()
  const proof = process.argv.includes('--proof')
  const note = proof ? 'full counts' : 'reduced counts; npm run proof runs them all'
  console.log(`Seed ${seed} (${note}). SOAKSTONE_SEED=${seed} repeats this run.`)
  const checked = await runChecks()
  await buildPortal()
  const tested = await runVitest([], { SOAKSTONE_SEED: seed, ...(proof ? { SOAKSTONE_PROOF: '1' } : {}) })
  const { line, code } = closingLine([checked, tested])
  console.log(line)
  return code
}

await runMain(main)
