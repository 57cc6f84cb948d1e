import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs'
import { Refusal } from './refusal.mjs'

/**
 * Writes what only the owner may read, whole or not at all.
 * @param {string} file
 * @param {unknown} value
 */
export function writeSecret(file, value) {
  writeFileSync(`${file}.new`, JSON.stringify(value, null, 2) + '\n', { mode: 0o600 })
  renameSync(`${file}.new`, file)
}

/** @param {string} file */
export function readJson(file) {
  if (!existsSync(file)) return null
  try {
    return JSON.parse(readFileSync(file, 'utf8'))
  } catch (error) {
    throw new Refusal(
      `${file} cannot be read (${/** @type {Error} */ (error).message}): mend or delete it, then start again.`,
    )
  }
}
