import { startCluster } from '../scripts/postgres.mjs'

/** One throwaway PostgreSQL for all tests, unless a server is given. Each test file makes its own databases in it. */
export default async function setup(): Promise<() => Promise<void>> {
  const given = process.env['TEST_DATABASE_URL'] ?? process.env['DATABASE_URL']
  if (given) {
    process.env['TEST_DATABASE_URL'] = given
    return async () => undefined
  }
  const cluster = await startCluster({ ephemeral: true })
  process.env['TEST_DATABASE_URL'] = cluster.url
  return cluster.stop
}
