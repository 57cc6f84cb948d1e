import { root } from './folders.mjs'
import { run } from './run.mjs'

/** @typedef {{signIns: {role: string, mail: string, password: string}[], key: string}} Demo */

/**
 * Runs a program of the service to its end.
 * @param {string} file
 * @param {NodeJS.ProcessEnv} env
 * @param {string} refusal
 */
const runService = (file, env, refusal) => run(process.execPath, ['--import', 'tsx', file], { cwd: root, env, refusal })

/** @param {NodeJS.ProcessEnv} env */
export const migrate = (env) =>
  runService(
    'api/migrate.ts',
    env,
    process.env['DATABASE_URL']
      ? 'The database that DATABASE_URL names could not be brought up to date, as shown above: mend the address or the server, then start again.'
      : 'The database could not be brought up to date: mend what is named above, then start again.',
  )

/**
 * Seeds the demo where it is not there yet.
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<Demo>}
 */
export async function seedDemo(env) {
  const said = await runService(
    'api/demo/seed.ts',
    env,
    'The demo could not be laid out: mend what is named above, then start again.',
  )
  return JSON.parse(said)
}

/** @param {NodeJS.ProcessEnv} env */
export async function freshKey(env) {
  return (
    await runService('api/demo/key.ts', env, 'No key could be made: mend what is named above, then try again.')
  ).trim()
}
