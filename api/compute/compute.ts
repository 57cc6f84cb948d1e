import { Piscina } from 'piscina'
import type { Call } from '../../solvers/operations/index.ts'
import { type Rendered, render } from '../http/render.ts'
import type { OwnMaterials } from '../operation.ts'
import type { AnsweredLines, Counts, LineTask } from '../batches/lines.ts'
import { Problem } from '../problems.ts'
import type { Prepared } from './solve-worker.ts'

/** Calls that write more numbers go to a thread: below it, the way there costs more than the solve. */
export const INLINE_SIZE = 2000
/** Bodies of more bytes are read in a thread. */
export const INLINE_BYTES = 16 * 1024
/** Milliseconds of a solve in a thread, and calls that may wait for one. */
const usual = { limit: 10_000, waiting: 64 }

/** What validating and pricing a call gave. */
export type Priced = Omit<Call, 'run'>

export interface SolveTask {
  case: string
  operation: string
  call: Call
  /** The body as a value or, where a thread has read it, as bytes. */
  raw: unknown
  own: OwnMaterials
}

export interface Compute {
  /** Reads, validates and prices a long body. Throws the refusal. */
  prepare(task: { case: string; operation: string; bytes: Uint8Array; own: OwnMaterials }): Promise<Priced>
  solve(task: SolveTask): Promise<Rendered>
  /** Reads and prices lines of a batch, and answers them. */
  priceLines(task: LineTask): Promise<Counts>
  answerLines(task: LineTask): Promise<AnsweredLines>
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
    if (call.size <= INLINE_SIZE && !(raw instanceof Uint8Array)) return render(call.run())
    return solves.run({ ...names, raw }, { signal: AbortSignal.timeout(limit) }).catch(rethrow)
  }

  async function prepare(task: Parameters<Compute['prepare']>[0]): Promise<Priced> {
    const options = { name: 'prepare', signal: AbortSignal.timeout(limit) }
    const prepared: Prepared = await solves.run(task, options).catch(rethrow)
    if ('refusal' in prepared) throw new Problem(...prepared.refusal)
    return prepared.call
  }

  const inThread =
    <R>(name: string) =>
    (task: LineTask): Promise<R> =>
      solves.run(task, { name, signal: AbortSignal.timeout(limit) }).catch(rethrow)

  return {
    prepare,
    solve,
    priceLines: inThread<Counts>('priceLines'),
    answerLines: inThread<AnsweredLines>('answerLines'),
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
