import { spawn } from 'node:child_process'
import { closeSync, openSync, readFileSync } from 'node:fs'
import { setTimeout as sleep } from 'node:timers/promises'
import { root } from './folders.mjs'
import { Refusal } from './refusal.mjs'
import { stopping } from './stopping.mjs'

/**
 * Starts a long-lived program in a session of its own, so that Ctrl-C reaches this process alone and the order of ending is kept.
 * @param {readonly string[]} args of node
 * @param {{env: NodeJS.ProcessEnv, log?: string}} options log: the file it writes to instead of stderr
 */
export function startProgram(args, { env, log }) {
  const out = log === undefined ? 2 : openSync(log, 'w', 0o600)
  const child = spawn(process.execPath, args, { cwd: root, env, detached: true, stdio: ['ignore', out, out] })
  if (out !== 2) closeSync(out)
  /** @type {Promise<void>} */
  const ended = new Promise((resolve) => {
    child.once('exit', () => resolve())
    child.once('error', () => resolve())
  })
  const stop = async () => {
    child.kill('SIGTERM')
    await ended
  }
  return { ended, stop, hasEnded: () => child.exitCode !== null || child.signalCode !== null }
}

/**
 * Waits until the service says it is ready.
 * @param {string} address
 * @param {{hasEnded(): boolean}} program
 * @param {string} [log]
 */
export async function waitReady(address, program, log) {
  const said = () => (log ? readFileSync(log, 'utf8').slice(-3000) : '')
  for (let n = 0; n < 600; n++) {
    if (program.hasEnded()) throw new Refusal('The service ended while it started; its last words are above.', said())
    if (await isReady(address)) return
    await sleep(100, undefined, { signal: stopping })
  }
  throw new Refusal(`The service is not ready after a minute: look at ${log ?? 'its log'}.`, said())
}

/** @param {string} address */
async function isReady(address) {
  try {
    return (await fetch(`${address}/readyz`)).ok
  } catch {
    return false
  }
}
