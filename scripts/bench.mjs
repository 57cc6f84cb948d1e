import { runMain } from './refusal.mjs'
import { ensurePackages } from './setup.mjs'

/** Prints one JSON line for each figure; chat goes to stderr. */
async function main() {
  await ensurePackages()
  const { register } = await import('tsx/esm/api')
  register()
  const { bench } = await import('../tests/bench/bench.ts')
  await bench((figure) => console.log(JSON.stringify(figure)))
}

await runMain(main)
