import { freshKey, migrate } from './demo.mjs'
import { dataFolder } from './folders.mjs'
import { borrowCluster } from './kept-cluster.mjs'
import { runMain } from './refusal.mjs'
import { serviceSecrets } from './secrets.mjs'
import { ensurePackages } from './setup.mjs'

/** Prints a fresh trial key of the demo account and nothing else, whether or not the service runs. */
async function main() {
  await ensurePackages()
  const dir = dataFolder()
  const env = { ...process.env, ...serviceSecrets(dir, process.env), SOAKSTONE_DATA: dir }
  const cluster = process.env['DATABASE_URL'] ? null : await borrowCluster({ dir })
  try {
    const reached = cluster ? { ...env, DATABASE_URL: cluster.url } : env
    await migrate(reached)
    console.log(await freshKey(reached))
  } finally {
    await cluster?.stop()
  }
}

await runMain(main)
