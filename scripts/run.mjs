import { spawn } from 'node:child_process'
import { Refusal } from './refusal.mjs'

/**
 * @typedef {object} Options
 * @property {string} [cwd]
 * @property {NodeJS.ProcessEnv} [env]
 * @property {number} [uid]
 * @property {number} [gid]
 * @property {boolean} [detached] a Ctrl-C in the terminal does not reach it
 * @property {AbortSignal} [signal] ends it
 * @property {string} [input] written to its stdin
 * @property {string} [refusal] the sentence thrown when it fails
 */

/**
 * Runs a program to its end and gives back its code and what it wrote.
 * @param {string} command
 * @param {readonly string[]} args
 * @param {Options} [options]
 * @returns {Promise<{code: number, stdout: string, output: string}>}
 */
export function attempt(command, args, { input, refusal: _, ...options } = {}) {
  return new Promise((resolve) => {
    const child = spawn(command, args, { ...options, stdio: [input === undefined ? 'ignore' : 'pipe', 'pipe', 'pipe'] })
    let stdout = ''
    let output = ''
    child.stdout?.setEncoding('utf8').on('data', (text) => {
      stdout += text
      output += text
    })
    child.stderr?.setEncoding('utf8').on('data', (text) => (output += text))
    child.once('error', (error) => resolve({ code: 127, stdout, output: output + error.message }))
    child.once('close', (code) => resolve({ code: code ?? 1, stdout, output }))
    // A program may end without reading what it is sent; its exit code tells.
    child.stdin?.on('error', () => undefined).end(input)
  })
}

/**
 * The same, but refuses with the end of its output when it fails.
 * @param {string} command
 * @param {readonly string[]} args
 * @param {Options} [options]
 * @returns {Promise<string>} its stdout
 */
export async function run(command, args, options = {}) {
  const { code, stdout, output } = await attempt(command, args, options)
  if (code === 0) return stdout
  const tail = output.trim().split('\n').slice(-40).join('\n')
  throw new Refusal(
    options.refusal ?? `${command} ${args[0] ?? ''} failed with code ${code}; its last words are above.`,
    tail,
  )
}
