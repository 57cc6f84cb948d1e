import { type ChildProcess, spawn } from 'node:child_process'
import { once } from 'node:events'
import { fileURLToPath } from 'node:url'
import { PUBLIC_URL, SESSION_SECRET } from './service.ts'

const root = fileURLToPath(new URL('../../..', import.meta.url))

export interface ApiProcess {
  url: string
  child: ChildProcess
  /** All that it has written. */
  output(): string
  /** Sends a signal, and gives the exit code once it has ended. */
  end(signal?: NodeJS.Signals): Promise<number | null>
}

/** The service as a process of its own, on a free port. */
export async function startProcess(databaseUrl: string, env: Record<string, string> = {}): Promise<ApiProcess> {
  const settings = {
    PORT: '0',
    DATABASE_URL: databaseUrl,
    PUBLIC_URL,
    SESSION_SECRET,
    NODE_ENV: 'test',
    LOG_LEVEL: 'warn',
    ...env,
  }
  const child = spawn(process.execPath, ['--import', 'tsx', 'api/server.ts'], {
    cwd: root,
    env: { ...process.env, ...settings },
    stdio: 'pipe',
  })
  let output = ''
  const url = await new Promise<string>((resolve, reject) => {
    const read = (chunk: Buffer) => {
      output += String(chunk)
      const match = /listens on (http:\S+)/.exec(output)
      if (match?.[1]) resolve(match[1])
    }
    child.stdout.on('data', read)
    child.stderr.on('data', read)
    child.once('exit', (code) => reject(new Error(`the service ended with ${code}: ${output}`)))
  })
  return {
    url,
    child,
    output: () => output,
    async end(signal = 'SIGTERM') {
      if (child.exitCode !== null || child.signalCode !== null) return child.exitCode
      const ended = once(child, 'exit')
      child.kill(signal)
      const [code] = (await ended) as [number | null]
      return code
    },
  }
}
