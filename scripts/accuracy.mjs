import { runMain } from './refusal.mjs'
import { ensurePackages } from './setup.mjs'

/** Prints how far each case is from its reference values; with --write into docs/accuracy.md too. */
async function main() {
  await ensurePackages()
  const { register } = await import('tsx/esm/api')
  register()
  const { accuracyOf, tableOf, writePage } = await import('./accuracy.ts')
  const figures = accuracyOf((done, of) => process.stderr.isTTY && process.stderr.write(`\r${done} of ${of} values`))
  if (process.stderr.isTTY) process.stderr.write('\r')
  console.log(tableOf(figures))
  if (process.argv.includes('--write')) await writePage(figures)
}

await runMain(main)
