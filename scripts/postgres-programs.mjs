import { existsSync, readdirSync } from 'node:fs'
import path from 'node:path'
import { installPackage } from './apt.mjs'
import { Refusal } from './refusal.mjs'

const LIBRARY = '/usr/lib/postgresql'
const OLDEST = 14

/**
 * The folder of PostgreSQL's programs, newest first or of the version that made a cluster; installs Debian's package if there is none.
 * @param {string} [version] major version that is needed
 */
export async function postgresPrograms(version) {
  const found = find(version)
  if (found) return found
  // Debian's package would make and start a cluster of its own; this product keeps to its private one.
  await installPackage(version ? `postgresql-${version}` : 'postgresql', {
    before: ['/etc/postgresql-common/createcluster.conf', 'create_main_cluster = false\n'],
  })
  const installed = find(version)
  if (installed) return installed
  throw new Refusal(
    `PostgreSQL ${version ?? `${OLDEST} or later`} is not under ${LIBRARY} even after installing it: set DATABASE_URL to a server of yours instead.`,
  )
}

/** @param {string} [version] */
function find(version) {
  const versions = existsSync(LIBRARY) ? readdirSync(LIBRARY) : []
  return versions
    .filter((name) => (version ? name === version : Number(name) >= OLDEST))
    .sort((a, b) => Number(b) - Number(a))
    .map((name) => path.join(LIBRARY, name, 'bin'))
    .find((folder) => existsSync(path.join(folder, 'initdb')) && existsSync(path.join(folder, 'postgres')))
}
