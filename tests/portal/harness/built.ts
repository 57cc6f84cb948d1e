import { mkdir, rm, stat } from 'node:fs/promises'
import path from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { fileURLToPath } from 'node:url'
import { buildPortal } from '../../../scripts/portal.mjs'

export const root = fileURLToPath(new URL('../../..', import.meta.url))
const lock = path.join(root, 'dist', 'portal.lock')
/** A build takes seconds; a lock older than this was left by a run that was killed. */
const LEFT_BEHIND = 180_000

/** Builds the portal unless that is done; of several test files one does it and the others wait. */
export async function built(): Promise<void> {
  await mkdir(path.dirname(lock), { recursive: true })
  while (!(await taken())) await sleep(200)
  try {
    await buildPortal()
  } finally {
    await rm(lock, { recursive: true, force: true })
  }
}

async function taken(): Promise<boolean> {
  try {
    await mkdir(lock)
    return true
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error
    const made = await stat(lock).catch(() => undefined)
    if (made && Date.now() - made.mtimeMs > LEFT_BEHIND) await rm(lock, { recursive: true, force: true })
    return false
  }
}
