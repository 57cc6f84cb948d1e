import { randomBytes } from 'node:crypto'
import path from 'node:path'
import { ensureFolder } from './folders.mjs'
import { readJson, writeSecret } from './kept.mjs'

/**
 * Secrets of the service, made at the first start and kept; the environment overrides them.
 * @param {string} dir
 * @param {NodeJS.ProcessEnv} env
 */
export function serviceSecrets(dir, env) {
  ensureFolder(dir)
  const file = path.join(dir, 'secrets.json')
  const kept = readJson(file) ?? { SESSION_SECRET: randomBytes(32).toString('hex') }
  writeSecret(file, kept)
  return { SESSION_SECRET: env['SESSION_SECRET'] || kept.SESSION_SECRET }
}
