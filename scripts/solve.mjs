import { once } from 'node:events'
import { addressOf } from './address.mjs'
import { runMain } from './refusal.mjs'
import { ensurePackages } from './setup.mjs'

/** NDJSON lines from stdin, answers to stdout, in the format of a batch; no server, no database. */
async function main() {
  await ensurePackages()
  const { register } = await import('tsx/esm/api')
  register()
  const { solveLines } = await import('./solve-lines.ts')
  // A reader that has seen enough, such as head, closes the pipe.
  process.stdout.on('error', () => process.exit(0))
  for await (const line of solveLines(process.stdin, addressOf(process.env).publicUrl))
    if (!process.stdout.write(line + '\n')) await once(process.stdout, 'drain')
}

await runMain(main)
