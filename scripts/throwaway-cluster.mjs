import { chownSync, existsSync, mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { boot, controls, endWithMe, initialise, newPassword, urlOf } from './cluster.mjs'
import { canWrite, clusterIdentity } from './identity.mjs'
import { postgresPrograms } from './postgres-programs.mjs'
import { Refusal } from './refusal.mjs'

/** @param {boolean} durable */
export async function startThrowaway(durable) {
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

function throwawayFolder() {
  const identity = clusterIdentity('')
  for (const parent of [tmpdir(), '/tmp', '/var/tmp']) {
    if (!existsSync(parent)) continue
    const folder = mkdtempSync(path.join(parent, 'soakstone-'))
    if (identity.uid !== undefined && identity.gid !== undefined) chownSync(folder, identity.uid, identity.gid)
    if (canWrite(folder, identity)) return { folder, identity }
    rmSync(folder, { recursive: true })
  }
  throw new Refusal(
    'Neither TMPDIR nor /tmp can be written by the user that runs the database: set TMPDIR to a folder that can.',
  )
}
