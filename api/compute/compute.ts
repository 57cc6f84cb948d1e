import { Piscina } from 'piscina'
import type { Call } from '../../solvers/operations/index.ts'
import { type Rendered, render } from '../http/render.ts'
import { Problem } from '../problems.ts'

/** Calls of more numbers go to a thread: below it, the way there costs more than the solve. */
export const INLINE_VALUES = 2000
/** Milliseconds of a solve in a thread, and calls that may wait for one. */
const usual = { limit: 10_000, waiting: 64 }

export interface SolveTask {
  case: string
  operation: string
  call: Call
  raw: unknown
}

export interface Compute {
  solve(task: SolveTask): Promise<Rendered>
  hashPassword(password: string): Promise<string>
  /** Takes as long for an absent hash as for a wrong password. */
  checkPassword(password: string, hash: string | undefined): Promise<boolean>
  close(): Promise<void>
}

const isSource = import.meta.url.endsWith('.ts')

function createPool(name: string, threads: number, maxQueue: number): Piscina {
  return new Piscina({
    filename: new URL(`./${name}.${isSource ? 'ts' : 'js'}`, import.meta.url).href,
    ...(isSource ? { execArgv: ['--import', 'tsx'] } : {}),
    minThreads: 1,
    maxThreads: threads,
    maxQueue,
    idleTimeout: 60_000,
  })
}

/** Threads for what would hold up the event loop: large solves, and passwords on threads of their own. */
export function createCompute(threads: number, { limit, waiting } = usual): Compute {
  const solves = createPool('solve-worker', threads, waiting)
  const passwords = createPool('password-worker', 1, waiting)

  async function solve({ call, raw, ...names }: SolveTask): Promise<Rendered> {
    if (call.values <= INLINE_VALUES) return render(call.run())
    try {
      return await solves.run({ ...names, raw }, { signal: AbortSignal.timeout(limit) })
    } catch (error) {
      throw translated(error)
    }
  }

  return {
    solve,
    hashPassword: (password) => passwords.run({ password }).catch(rethrow),
    checkPassword: (password, hash) => passwords.run({ password, hash: hash ?? null }).catch(rethrow),
    async close() {
      await Promise.all([solves.destroy(), passwords.destroy()])
    },
  }
}

const rethrow = (error: unknown): never => {
  throw translated(error)
}

function translated(error: unknown): unknown {
  const { name, message } = error as Error
  if (name === 'AbortError') return new Problem('solve-too-slow')
  if (/queue is at limit/i.test(message)) return new Problem('unavailable', 'Too much is waiting to be computed.')
  return error
}
