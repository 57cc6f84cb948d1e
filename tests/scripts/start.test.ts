import { type ChildProcess, execFile, spawn } from 'node:child_process'
import { once } from 'node:events'
import { chmodSync, existsSync, mkdtempSync, readFileSync, rmSync, statSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { promisify } from 'node:util'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { sharedFolder } from '../../scripts/folders.mjs'
import { freePort } from '../../scripts/ports.mjs'
import { root } from '../imports.ts'

const run = promisify(execFile)

let dir = ''
let env: NodeJS.ProcessEnv = {}

beforeAll(async () => {
  dir = mkdtempSync(path.join(tmpdir(), 'soakstone-start-'))
  chmodSync(dir, 0o711)
  const { DATABASE_URL: _, PUBLIC_URL: __, ...rest } = process.env
  env = { ...rest, NODE_ENV: 'production', SOAKSTONE_DATA: dir, PORT: String(await freePort()) }
})
afterAll(() => {
  rmSync(dir, { recursive: true, force: true })
  rmSync(sharedFolder(dir), { recursive: true, force: true })
})

interface Start {
  npm: ChildProcess
  /** What it printed until it was ready. */
  greeting: string
  database: number
}

async function start(): Promise<Start> {
  const npm = spawn('npm', ['start', '--silent'], { cwd: root, env, stdio: ['ignore', 'pipe', 'pipe'] })
  const said = { out: '', err: '' }
  npm.stdout.on('data', (text: Buffer) => (said.out += text.toString()))
  npm.stderr.on('data', (text: Buffer) => (said.err += text.toString()))
  while (!said.out.includes('Press Ctrl-C')) {
    if (npm.exitCode !== null) throw new Error(`npm start ended with ${npm.exitCode}: ${said.err}${said.out}`)
    await new Promise((resolve) => setTimeout(resolve, 100))
  }
  const [pid = ''] = readFileSync(path.join(dir, 'postgres/postmaster.pid'), 'utf8').split('\n')
  expect(commandOf(Number(pid))).toContain('postgres')
  return { npm, greeting: said.out, database: Number(pid) }
}

async function end({ npm, database }: Start, signal: NodeJS.Signals): Promise<void> {
  npm.kill(signal)
  const [code] = (await once(npm, 'exit')) as [number | null]
  expect(code).toBe(0)
  expect(commandOf(database)).toBe('')
  await expect(fetch(`http://127.0.0.1:${env['PORT']}/healthz`)).rejects.toThrow()
}

/** Empty for a process that has ended, also where nobody has collected it yet. */
function commandOf(pid: number): string {
  const file = `/proc/${pid}/cmdline`
  return existsSync(file) ? readFileSync(file, 'utf8') : ''
}

const keyIn = (greeting: string) => /soak_trial_[0-9A-Za-z]{38}/.exec(greeting)?.[0]

test(
  'one command serves, its printed call answers as printed, and a signal ends all of it',
  { timeout: 400_000 },
  async () => {
    const first = await start()
    const [, call = '', printed = ''] =
      /(curl [^]*?)\n\nIt answers \(200, 10 points charged\):\n\n(.*)\n/.exec(first.greeting) ?? []
    const pasted = await run('bash', ['-c', call])
    expect(pasted.stdout).toBe(printed)
    const { result } = JSON.parse(printed) as { result: { temperature: [[number, number], [number, number]] } }
    const expected = [13.7751886477336, 18.4537678393556, 0.905112123363939, 2.4362336338823]
    result.temperature.flat().forEach((value, n) => expect(Math.abs(value - expected[n]!)).toBeLessThan(2.5e-10))
    for (const file of ['database.json', 'secrets.json', 'demo.json', 'service.log'])
      expect([file, statSync(path.join(dir, file)).mode & 0o777]).toEqual([file, 0o600])

    const key = await run('npm', ['run', '--silent', 'key'], { cwd: root, env })
    expect(key.stdout).toMatch(/^soak_trial_[0-9A-Za-z]{38}\n$/)
    const usage = await fetch(`http://127.0.0.1:${env['PORT']}/v1/usage`, {
      headers: { authorization: `Bearer ${key.stdout.trim()}` },
    })
    expect(usage.status).toBe(200)
    await end(first, 'SIGINT')

    const second = await start()
    expect(keyIn(second.greeting)).toBe(keyIn(first.greeting))
    await end(second, 'SIGTERM')
  },
)

test('a key is made while the service is down, and nothing else is printed', { timeout: 120_000 }, async () => {
  const { stdout } = await run('npm', ['run', '--silent', 'key'], { cwd: root, env })
  expect(stdout).toMatch(/^soak_trial_[0-9A-Za-z]{38}\n$/)
  expect(existsSync(path.join(dir, 'postgres/postmaster.pid'))).toBe(false)
})
