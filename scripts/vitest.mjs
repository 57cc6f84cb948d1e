import { spawn } from 'node:child_process'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { root } from './folders.mjs'
import { readJson } from './kept.mjs'
import { tallyOf } from './tally.mjs'

/**
 * Runs tests and counts them.
 * @param {readonly string[]} files all when empty
 * @param {NodeJS.ProcessEnv} env
 */
export async function runVitest(files, env) {
  const folder = mkdtempSync(path.join(tmpdir(), 'soakstone-report-'))
  const file = path.join(folder, 'report.json')
  const flags = [
    'run',
    '--config',
    'tests/vitest.config.ts',
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${file}`,
  ]
  const args = ['node_modules/vitest/vitest.mjs', ...flags, ...files]
  const child = spawn(process.execPath, args, {
    cwd: root,
    stdio: ['ignore', 'inherit', 'inherit'],
    env: { ...process.env, ...env },
  })
  /** @type {number} */
  const code = await new Promise((resolve) => child.once('exit', (ended) => resolve(ended ?? 1)))
  const report = readJson(file)
  rmSync(folder, { recursive: true })
  return report ? tallyOf(report, code) : { passed: 0, failed: 1 }
}

/** The seed of a run's random inputs: SOAKSTONE_SEED repeats an earlier run. */
export function chooseSeed() {
  return process.env['SOAKSTONE_SEED'] || String(Math.floor(Math.random() * 2 ** 31))
}
