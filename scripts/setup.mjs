import { accessSync, constants, existsSync } from 'node:fs'
import { setTimeout as sleep } from 'node:timers/promises'
import path from 'node:path'
import { installPackage } from './apt.mjs'
import { ensureFolder, root } from './folders.mjs'
import { me } from './identity.mjs'
import { readJson } from './kept.mjs'
import { tryLock } from './lock.mjs'
import { step } from './progress.mjs'
import { Refusal } from './refusal.mjs'
import { run } from './run.mjs'
import { stopping } from './stopping.mjs'

/** A Node that is too old fails later and obscurely; here it fails with a sentence. */
export function checkNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number)
  if (major < 20 || (major === 20 && minor < 15))
    throw new Refusal(`Node ${process.versions.node} is too old: install Node 20.15 or later, then start again.`)
}

/** Installs the packages of package-lock.json, unless exactly these are in node_modules. */
export async function ensurePackages() {
  checkNode()
  if (packagesFit()) return
  try {
    accessSync(root, constants.W_OK)
  } catch {
    throw new Refusal(
      `The folder ${root} cannot be written by ${me()}: make it writable, or clone into a folder of your own.`,
    )
  }
  const release = await turn(path.join(root, '.data'), 'packages.lock')
  try {
    if (!packagesFit()) await step('Installing packages', installPackages)
  } finally {
    release()
  }
}

function installPackages() {
  return run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'], {
    cwd: root,
    signal: stopping,
    refusal:
      'npm ci failed as shown above: mend what it names (most often the network or the registry npm uses), then start again.',
  })
}

/** npm writes what it installed into node_modules at the very end, so that an install cut short never fits. */
function packagesFit() {
  const file = path.join(root, 'node_modules', '.package-lock.json')
  return existsSync(file) && sameLock(readJson(path.join(root, 'package-lock.json')), readJson(file))
}

/**
 * @typedef {{packages: Record<string, {version?: string, integrity?: string, optional?: boolean}>}} Lock
 */

/**
 * Whether the packages installed are the packages wanted; those for other machines may be absent.
 * @param {Lock} wanted
 * @param {Lock} installed
 */
export function sameLock(wanted, installed) {
  const { '': _, ...packages } = wanted.packages
  const fits = Object.entries(packages).every(([name, { version, integrity, optional }]) => {
    const found = installed.packages[name]
    return found ? found.version === version && found.integrity === integrity : Boolean(optional)
  })
  return fits && Object.keys(installed.packages).every((name) => name in packages)
}

/**
 * Waits until no other process does the same set-up.
 * @param {string} folder
 * @param {string} name
 */
async function turn(folder, name) {
  ensureFolder(folder)
  for (;;) {
    const lock = tryLock(path.join(folder, name))
    if (lock.held) return lock.release
    await sleep(500)
  }
}

/** Debian's Chromium, for tests in a real browser. */
export async function ensureChromium() {
  if (!existsSync('/usr/bin/chromium')) await installPackage('chromium')
}
