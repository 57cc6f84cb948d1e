import { createHash } from 'node:crypto'
import { existsSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { root } from './folders.mjs'
import { step } from './progress.mjs'
import { run } from './run.mjs'
import { stopping } from './stopping.mjs'

const SOURCES = ['portal', 'openapi', 'vite.config.ts', 'package-lock.json']
const built = path.join(root, 'dist', 'portal', 'index.html')
// Beside the folder, which Vite empties.
const stamp = path.join(root, 'dist', 'portal.stamp')

/** Builds the portal, unless it was built from the very same sources. */
export async function buildPortal() {
  const digest = digestOf(SOURCES)
  if (existsSync(built) && existsSync(stamp) && readFileSync(stamp, 'utf8') === digest) return
  await step('Building the portal', () =>
    run(process.execPath, ['node_modules/vite/bin/vite.js', 'build'], {
      cwd: root,
      signal: stopping,
      refusal: 'The portal could not be built: mend what is named above, then start again.',
    }),
  )
  writeFileSync(stamp, digest)
}

/** @param {readonly string[]} names */
function digestOf(names) {
  const hash = createHash('sha256')
  for (const file of names.flatMap(filesUnder))
    hash
      .update(file)
      .update('\0')
      .update(readFileSync(path.join(root, file)))
      .update('\0')
  return hash.digest('hex')
}

/** @param {string} name */
function filesUnder(name) {
  const whole = path.join(root, name)
  if (!statSync(whole).isDirectory()) return [name]
  const entries = readdirSync(whole, { recursive: true, withFileTypes: true }).filter((entry) => entry.isFile())
  return entries.map((entry) => path.relative(root, path.join(entry.parentPath, entry.name))).sort()
}
