import { randomBytes } from 'node:crypto'
import { chownSync, existsSync, mkdtempSync, readFileSync, renameSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { boot, endWithMe, halt, initialise, runningPort, setPassword, urlOf } from './cluster.mjs'
import { dataFolder, ensureFolder, sharedFolder } from './folders.mjs'
import { canWrite, clusterIdentity } from './identity.mjs'
import { readJson, writeSecret } from './kept.mjs'
import { tryLock } from './lock.mjs'
import { postgresPrograms } from './postgres-programs.mjs'
import { step } from './progress.mjs'
import { Refusal } from './refusal.mjs'

/**
 * @typedef {object} Running
 * @property {string} url
 * @property {() => Promise<void>} stop ends it; a throwaway one is removed too
 * @property {() => Promise<void>} crash ends it at once, as a power cut would
 * @property {() => Promise<void>} restart starts it again on the same port
 */

/**
 * Starts a private PostgreSQL: the one kept in a data folder, or a throwaway one that ends with this process.
 * @param {{dir?: string, ephemeral?: boolean, durable?: boolean}} [options] durable: a throwaway one that really writes to disk
 * @returns {Promise<Running>}
 */
export function startCluster({ dir = dataFolder(), ephemeral = false, durable = false } = {}) {
  return ephemeral ? startThrowaway(durable) : startKept(dir)
}

/**
 * The kept cluster for a short errand: the running one if there is one, else started and stopped again.
 * @param {{dir?: string}} [options]
 * @returns {Promise<Pick<Running, 'url' | 'stop'>>}
 */
export async function borrowCluster({ dir = dataFolder() } = {}) {
  for (let n = 0; n < 120; n++) {
    const lock = existsSync(dir) ? tryLock(lockFile(dir)) : null
    if (!lock || lock.held) {
      if (lock) lock.release()
      return startKept(dir)
    }
    const state = stateOf(dir)
    const cluster = existingCluster(dir)
    if (cluster && state.password) {
      const port = await runningPort({ folder: cluster, programs: await postgresPrograms(versionOf(cluster)), identity: clusterIdentity(cluster) })
      if (port) return { url: urlOf(port, state.password), stop: async () => undefined }
    }
    await sleep(500)
  }
  throw new Refusal(`A start of the service has been under way for a minute without its database: end it, then try again.`)
}

/** @param {string} dir */
async function startKept(dir) {
  ensureFolder(dir)
  const lock = await takeLock(dir)
  try {
    const folder = existingCluster(dir) ?? (await step('Preparing the database', () => makeCluster(dir)))
    const cluster = { folder, programs: await postgresPrograms(versionOf(folder)), identity: clusterIdentity(folder) }
    if (!canWrite(folder, cluster.identity))
      throw new Refusal(`The database in ${folder} cannot be entered by the user that owns it: open the folders above it to that user, or set SOAKSTONE_DATA to another place.`)
    const state = stateOf(dir)
    const password = state.password ?? newPassword()
    // Left behind by a start that was killed: it is whole and answers, so it is taken over.
    const running = state.password ? await runningPort(cluster) : (await halt(cluster), null)
    if (!state.password) await setPassword(cluster, password)
    const port = running ?? (await step('Starting the database', () => boot(cluster, state.port)))
    writeSecret(stateFile(dir), { port, password })
    const end = async () => {
      await halt(cluster)
      lock.release()
    }
    return { url: urlOf(port, password), ...controls(cluster, port), stop: end }
  } catch (error) {
    lock.release()
    throw error
  }
}

/** @param {boolean} durable */
async function startThrowaway(durable) {
  const programs = await postgresPrograms()
  const { folder, identity } = throwawayFolder()
  const cluster = { folder, programs, identity }
  const password = newPassword()
  const settings = ['max_connections = 200', ...(durable ? [] : ['fsync = off', 'full_page_writes = off'])]
  const stop = endWithMe(cluster)
  try {
    await initialise(cluster, { password, settings, sync: false })
    const port = await boot(cluster)
    return { url: urlOf(port, password), ...controls(cluster, port), stop }
  } catch (error) {
    await stop()
    throw error
  }
}

/**
 * @param {import('./cluster.mjs').Cluster} cluster
 * @param {number} port
 */
function controls(cluster, port) {
  return {
    crash: () => halt(cluster, 'immediate'),
    restart: async () => {
      const got = await boot(cluster, port)
      if (got !== port) throw new Error(`the port ${port} was taken meanwhile`)
    },
  }
}

function throwawayFolder() {
  const identity = clusterIdentity('')
  for (const parent of [tmpdir(), '/tmp', '/var/tmp']) {
    if (!existsSync(parent)) continue
    const folder = mkdtempSync(path.join(parent, 'soakstone-'))
    if (identity.uid !== undefined && identity.gid !== undefined) chownSync(folder, identity.uid, identity.gid)
    if (canWrite(folder, identity)) return { folder, identity }
    rmSync(folder, { recursive: true })
  }
  throw new Refusal('Neither TMPDIR nor /tmp can be written by the user that runs the database: set TMPDIR to a folder that can.')
}

/**
 * Made beside its final place and renamed when whole, so that a start cut short leaves nothing that looks like a cluster.
 * @param {string} dir
 */
async function makeCluster(dir) {
  const programs = await postgresPrograms()
  const identity = clusterIdentity('')
  const parent = reachableParent(dir, identity)
  const folder = path.join(parent, 'postgres')
  const draft = `${folder}.new`
  rmSync(draft, { recursive: true, force: true })
  const password = newPassword()
  await initialise({ folder: draft, programs, identity }, { password })
  writeSecret(stateFile(dir), { password })
  renameSync(draft, folder)
  return folder
}

/**
 * @param {string} dir
 * @param {import('./identity.mjs').Identity} identity
 */
function reachableParent(dir, identity) {
  if (identity.uid === undefined || identity.gid === undefined) return dir
  const probe = path.join(dir, 'postgres.new')
  ensureFolder(probe)
  chownSync(probe, identity.uid, identity.gid)
  if (canWrite(probe, identity)) return dir
  rmSync(probe, { recursive: true })
  if (process.env['SOAKSTONE_DATA'])
    throw new Refusal(`The user that runs the database cannot enter ${dir}: open the folders above it to others (chmod o+x), or set SOAKSTONE_DATA to another place.`)
  const shared = sharedFolder(dir)
  ensureFolder(path.dirname(shared))
  ensureFolder(shared)
  console.error(`The database is kept in ${shared}, because the user that runs it cannot enter ${dir}.`)
  return shared
}

/** @param {string} dir */
function existingCluster(dir) {
  for (const parent of [dir, sharedFolder(dir)]) {
    const folder = path.join(parent, 'postgres')
    if (!existsSync(folder)) continue
    versionOf(folder)
    return folder
  }
  return null
}

/** @param {string} folder */
function versionOf(folder) {
  try {
    return readFileSync(path.join(folder, 'PG_VERSION'), 'utf8').trim()
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EACCES') clusterIdentity(folder)
    throw new Refusal(`The folder ${folder} is not a whole database (PG_VERSION cannot be read): move it away, then start again for a new one.`)
  }
}

/** @param {string} dir */
async function takeLock(dir) {
  for (let n = 0; ; n++) {
    const lock = tryLock(lockFile(dir))
    if (lock.held) return lock
    if (n === 20) throw new Refusal(`Another start uses ${dir} (process ${lock.by}): stop it first, or set SOAKSTONE_DATA to another folder.`)
    await sleep(500)
  }
}

/** @param {string} dir */
const lockFile = (dir) => path.join(dir, 'start.lock')
/** @param {string} dir */
const stateFile = (dir) => path.join(dir, 'database.json')
/**
 * @param {string} dir
 * @returns {{port?: number, password?: string}}
 */
const stateOf = (dir) => readJson(stateFile(dir)) ?? {}
const newPassword = () => randomBytes(24).toString('hex')
