import path from 'node:path'
import { addressOf, refuseBusyPort } from './address.mjs'
import { migrate, seedDemo } from './demo.mjs'
import { startPortalServer } from './dev-portal.mjs'
import { dataFolder } from './folders.mjs'
import { greet } from './greeting.mjs'
import { freePort } from './ports.mjs'
import { buildPortal } from './portal.mjs'
import { startCluster } from './postgres.mjs'
import { step } from './progress.mjs'
import { runMain } from './refusal.mjs'
import { serviceSecrets } from './secrets.mjs'
import { startProgram, waitReady } from './service.mjs'
import { ensurePackages } from './setup.mjs'
import { checkStopping, listenForSignals, stopping } from './stopping.mjs'

const developing = process.argv.includes('--dev')

/** What was started, ended last first. */
/** @type {(() => Promise<void>)[]} */
const started = []

async function serve() {
  const address = addressOf(process.env)
  await refuseBusyPort(address)
  await ensurePackages()
  checkStopping()
  const env = await serviceEnvironment(address)
  checkStopping()
  await step('Bringing the database up to date', () => migrate(env))
  const demo = await step('Laying out the demo', () => seedDemo(env))
  checkStopping()
  const service = developing ? await startDevelopment(address, env) : await startBuilt(address, env)
  await greet(address, demo)
  console.log(`\nPress Ctrl-C to end it.`)
  await Promise.race([service.ended, new Promise((resolve) => stopping.addEventListener('abort', resolve))])
  if (stopping.aborted) return 0
  console.error('The service ended by itself; its log says why.')
  return 1
}

/** @param {ReturnType<typeof addressOf>} address */
async function serviceEnvironment({ host, port, publicUrl }) {
  const dir = dataFolder()
  const secrets = serviceSecrets(dir, process.env)
  /** @type {NodeJS.ProcessEnv} */
  const env = { NODE_ENV: developing ? 'development' : 'production', ...process.env, ...secrets }
  Object.assign(env, { HOST: host, PORT: String(port), PUBLIC_URL: publicUrl, SOAKSTONE_DATA: dir })
  if (env['DATABASE_URL']) return env
  const cluster = await startCluster({ dir })
  started.push(cluster.stop)
  return { ...env, DATABASE_URL: cluster.url }
}

/**
 * @param {ReturnType<typeof addressOf>} address
 * @param {NodeJS.ProcessEnv} env
 */
async function startBuilt(address, env) {
  await buildPortal()
  checkStopping()
  const log = path.join(dataFolder(), 'service.log')
  const service = startProgram(['--import', 'tsx', 'api/server.ts'], { env, log })
  started.push(service.stop)
  await step(`Starting the service (log: ${log})`, () => waitReady(address.local, service, log))
  return service
}

/**
 * The portal's development server takes the address and passes calls on to the API, which reloads on a port of its own.
 * @param {ReturnType<typeof addressOf>} address
 * @param {NodeJS.ProcessEnv} env
 */
async function startDevelopment(address, env) {
  const port = await freePort()
  const api = `http://127.0.0.1:${port}`
  const apiEnv = { ...env, HOST: '127.0.0.1', PORT: String(port) }
  const service = startProgram(['node_modules/tsx/dist/cli.mjs', 'watch', 'api/server.ts'], { env: apiEnv })
  started.push(service.stop)
  await step('Starting the service', () => waitReady(api, service))
  started.push(await startPortalServer(address, api))
  return service
}

async function main() {
  listenForSignals()
  try {
    return await serve()
  } catch (error) {
    if (!stopping.aborted) throw error
    return 0
  } finally {
    for (const stop of started.reverse()) await stop()
  }
}

await runMain(main)
