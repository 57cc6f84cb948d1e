import { spawnSync } from 'node:child_process'
import { existsSync, statSync } from 'node:fs'
import { userInfo } from 'node:os'
import { Refusal } from './refusal.mjs'

/**
 * @typedef {object} Identity who a program runs as; without ids, whoever runs this
 * @property {number} [uid]
 * @property {number} [gid]
 */

/**
 * PostgreSQL refuses to run as root. Root lends it the owner of an existing cluster, or a user made for such things.
 * @param {string} cluster
 * @returns {Identity}
 */
export function clusterIdentity(cluster) {
  const owner = existsSync(cluster) ? statSync(cluster) : null
  if (process.getuid?.() !== 0) {
    if (owner && owner.uid !== process.getuid?.())
      throw new Refusal(
        `The database in ${cluster} belongs to another user: start as that user or root, or set SOAKSTONE_DATA to a folder of your own.`,
      )
    return {}
  }
  if (owner && owner.uid !== 0) return { uid: owner.uid, gid: owner.gid }
  for (const name of ['postgres', 'nobody']) {
    const [uid, gid] = ['-u', '-g'].map((flag) =>
      Number(spawnSync('id', [flag, name], { encoding: 'utf8' }).stdout || NaN),
    )
    if (uid && gid) return { uid, gid }
  }
  throw new Refusal(
    'PostgreSQL does not run as root, and there is neither a user postgres nor nobody: start as an ordinary user.',
  )
}

/**
 * Whether an identity can reach a folder and write in it.
 * @param {string} folder
 * @param {Identity} identity
 */
export function canWrite(folder, identity) {
  const { status } = spawnSync('sh', ['-c', 'test -w "$1" && test -x "$1"', 'sh', folder], {
    ...identity,
    cwd: '/',
    stdio: 'ignore',
  })
  return status === 0
}

export const me = () => userInfo().username
