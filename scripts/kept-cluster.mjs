import { existsSync, renameSync, rmSync } from 'node:fs'
import path from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { existingCluster, reachableParent, versionOf } from './cluster-place.mjs'
import { boot, controls, halt, initialise, newPassword, runningPort, setPassword, urlOf } from './cluster.mjs'
import { dataFolder, ensureFolder } from './folders.mjs'
import { canWrite, clusterIdentity } from './identity.mjs'
import { readJson, writeSecret } from './kept.mjs'
import { tryLock } from './lock.mjs'
import { postgresPrograms } from './postgres-programs.mjs'
import { step } from './progress.mjs'
import { Refusal } from './refusal.mjs'

/** Seconds; an errand takes a few. */
export const PATIENCE = 10

/**
 * @param {string} dir
 * @param {number} patience seconds to wait for another start, or an errand, to end
 */
export async function startKept(dir, patience) {
  ensureFolder(dir)
  const lock = await takeLock(dir, patience)
  try {
    const kept = stateOf(dir)
    const existing = existingCluster(dir)
    const { folder, known } = existing
      ? { folder: existing, known: kept.password }
      : await step('Preparing the database', () => makeCluster(dir))
    const cluster = { folder, programs: await postgresPrograms(versionOf(folder)), identity: clusterIdentity(folder) }
    if (!canWrite(folder, cluster.identity))
      throw new Refusal(
        `The database in ${folder} cannot be entered by the user that runs it: open the folders above it to that user, or set SOAKSTONE_DATA to another place.`,
      )
    const password = known ?? newPassword()
    if (!known) {
      await halt(cluster)
      await setPassword(cluster, password)
    }
    // One that a killed start left behind is whole and answers: it is taken over.
    const port = (await runningPort(cluster)) ?? (await step('Starting the database', () => boot(cluster, kept.port)))
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

/**
 * The kept cluster for a short errand: the running one if there is one, else started and stopped again.
 * @param {{dir?: string}} [options]
 * @returns {Promise<Pick<import('./postgres.mjs').Running, 'url' | 'stop'>>}
 */
export async function borrowCluster({ dir = dataFolder() } = {}) {
  for (let n = 0; n < 120; n++) {
    const lock = existsSync(dir) ? tryLock(lockFile(dir)) : null
    if (!lock || lock.held) {
      if (lock) lock.release()
      return startKept(dir, PATIENCE)
    }
    const state = stateOf(dir)
    const cluster = existingCluster(dir)
    if (cluster && state.password) {
      const port = await runningPort({
        folder: cluster,
        programs: await postgresPrograms(versionOf(cluster)),
        identity: clusterIdentity(cluster),
      })
      if (port) return { url: urlOf(port, state.password), stop: async () => undefined }
    }
    await sleep(500)
  }
  throw new Refusal(
    `A start of the service has been under way for a minute without its database: end it, then try again.`,
  )
}

/**
 * Made beside its final place and renamed when whole, so that a start cut short leaves nothing that looks like a cluster.
 * @param {string} dir
 */
async function makeCluster(dir) {
  const programs = await postgresPrograms()
  const identity = clusterIdentity(path.join(dir, 'postgres.new'))
  const parent = reachableParent(dir, identity)
  const folder = path.join(parent, 'postgres')
  const draft = `${folder}.new`
  rmSync(draft, { recursive: true, force: true })
  const password = newPassword()
  await initialise({ folder: draft, programs, identity }, { password })
  writeSecret(stateFile(dir), { password })
  renameSync(draft, folder)
  return { folder, known: password }
}

/**
 * @param {string} dir
 * @param {number} patience
 */
async function takeLock(dir, patience) {
  for (let n = 0; ; n++) {
    const lock = tryLock(lockFile(dir))
    if (lock.held) return lock
    if (n >= patience * 2)
      throw new Refusal(
        `Another start uses ${dir} (process ${lock.by}): stop it first, or set SOAKSTONE_DATA to another folder.`,
      )
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
