import { chownSync, existsSync, readFileSync, rmSync } from 'node:fs'
import path from 'node:path'
import { ensureFolder, sharedFolder } from './folders.mjs'
import { canWrite, clusterIdentity } from './identity.mjs'
import { Refusal } from './refusal.mjs'

/**
 * @param {string} dir
 * @param {import('./identity.mjs').Identity} identity
 */
export function reachableParent(dir, identity) {
  if (identity.uid === undefined || identity.gid === undefined) return dir
  const probe = path.join(dir, 'postgres.new')
  ensureFolder(probe)
  chownSync(probe, identity.uid, identity.gid)
  if (canWrite(probe, identity)) return dir
  rmSync(probe, { recursive: true })
  if (process.env['SOAKSTONE_DATA'])
    throw new Refusal(
      `The user that runs the database cannot enter ${dir}: open the folders above it to others (chmod o+x), or set SOAKSTONE_DATA to another place.`,
    )
  const shared = sharedFolder(dir)
  ensureFolder(path.dirname(shared))
  ensureFolder(shared)
  console.error(`The database is kept in ${shared}, because the user that runs it cannot enter ${dir}.`)
  return shared
}

/** @param {string} dir */
export function existingCluster(dir) {
  for (const parent of [dir, sharedFolder(dir)]) {
    const folder = path.join(parent, 'postgres')
    if (!existsSync(folder)) continue
    versionOf(folder)
    return folder
  }
  return null
}

/** @param {string} folder */
export function versionOf(folder) {
  try {
    return readFileSync(path.join(folder, 'PG_VERSION'), 'utf8').trim()
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EACCES') clusterIdentity(folder)
    throw new Refusal(
      `The folder ${folder} is not a whole database (PG_VERSION cannot be read): move it away, then start again for a new one.`,
    )
  }
}
