import { createHash } from 'node:crypto'
import { accessSync, constants, existsSync, mkdirSync } from 'node:fs'
import path from 'node:path'
import { fileURLToPath } from 'node:url'
import { me } from './identity.mjs'
import { Refusal } from './refusal.mjs'

/** The folder of the clone. */
export const root = path.dirname(path.dirname(fileURLToPath(import.meta.url)))

/** Where secrets and the private database are kept. */
export const dataFolder = () => path.resolve(process.env['SOAKSTONE_DATA'] || path.join(root, '.data'))

/** Where the database goes when the user that runs it cannot enter the clone: one folder for each clone. */
export const sharedFolder = (/** @type {string} */ dir) =>
  path.join('/var/lib/soakstone', createHash('sha256').update(dir).digest('hex').slice(0, 12))

/**
 * Makes a folder that can be written, or refuses.
 * @param {string} folder
 */
export function ensureFolder(folder) {
  try {
    makeFolder(folder)
    accessSync(folder, constants.W_OK | constants.X_OK)
  } catch {
    throw new Refusal(
      `The folder ${folder} cannot be written by ${me()}: make it writable, or set SOAKSTONE_DATA to a folder that is.`,
    )
  }
}

/**
 * One level after the other: Node's recursive form never returns where the system refuses as /proc does.
 * @param {string} folder
 */
function makeFolder(folder) {
  if (existsSync(folder)) return
  makeFolder(path.dirname(folder))
  // Others may pass through to reach the database; what is secret inside is a file of mode 600.
  mkdirSync(folder, { mode: 0o711 })
}
