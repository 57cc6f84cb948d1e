import { createHash } from 'node:crypto'
import { and, eq } from 'drizzle-orm'
import type { Request } from 'express'
import { idempotency } from '../../drizzle/schema.ts'
import type { Database } from '../database.ts'
import type { Deps } from '../deps.ts'
import { render } from '../http/render.ts'
import { type Caller, type CallRecord, type Operation, type Reply, takesIdempotencyKey } from '../operation.ts'
import { type Attempt, type KeptAnswer, claimKey, releaseKey } from './claim.ts'
import { idempotencyKeyOf } from './idempotency-key.ts'

/** Does the work of a call, with what the call is given to do it. */
export type Work = (deps: Deps) => Promise<Reply>

const REPLAYED = { 'Idempotency-Replayed': 'true' }

interface Call {
  o: Operation
  req: Request
  caller: Caller
  call: CallRecord
  /** The body as it came. */
  bytes: Buffer | undefined
}

/**
 * Does the work of a call once for its Idempotency-Key. What is computed and charged is known by its charge and computed
 * again; what else is done is kept with its answer in one transaction. A call that fails gives its key back.
 */
export async function once({ o, req, caller, call, bytes }: Call, deps: Deps, work: Work): Promise<Reply> {
  const header = takesIdempotencyKey(o) ? req.headersDistinct['idempotency-key']?.join(', ') : undefined
  if (header === undefined || caller.kind !== 'key') return work(deps)
  const key = idempotencyKeyOf(header)
  const { requestId } = call
  const attempt = { accountId: caller.accountId, key, fingerprint: fingerprintOf(req, bytes), requestId }
  const claim = await claimKey(deps.pool, attempt)
  if (claim === 'computed before') {
    call.replayed = true
    return withHeaders(await work(deps), REPLAYED)
  }
  if (claim !== 'first') return replyOf(claim)
  const release = () => releaseKey(deps.pool, attempt)
  try {
    if (!o.metered) return await keepingAnswer(o, attempt, deps, work)
    const reply = await work(deps)
    /* What cost nothing left no charge to be known by, and costs nothing again. */
    if (!call.points) await release()
    return reply.lines ? { ...reply, lines: releasing(reply.lines, release) } : reply
  } catch (error) {
    await release()
    throw error
  }
}

async function* releasing(lines: AsyncIterable<string>, release: () => Promise<void>): AsyncGenerator<string> {
  try {
    yield* lines
  } catch (error) {
    await release()
    throw error
  }
}

const withHeaders = (reply: Reply, headers: Record<string, string>): Reply => ({
  ...reply,
  headers: { ...reply.headers, ...headers },
})

const replyOf = ({ text, etag, headers }: KeptAnswer): Reply => ({
  ...(text === null ? {} : { text }),
  ...(etag === null ? {} : { etag }),
  headers: { ...headers, ...REPLAYED },
})

/* Where the key was taken over meanwhile, what this call did is undone: the other has done it. */
async function keepingAnswer(o: Operation, attempt: Attempt, deps: Deps, work: Work): Promise<Reply> {
  return deps.db.transaction(async (tx) => {
    const reply = await work({ ...deps, db: tx as unknown as Database })
    const rendered = reply.text === undefined && o.answer ? render(reply.body) : reply
    const answer: KeptAnswer = {
      text: rendered.text ?? null,
      etag: rendered.etag ?? null,
      headers: reply.headers ?? {},
    }
    const { accountId, key, requestId } = attempt
    const own = and(
      eq(idempotency.accountId, accountId),
      eq(idempotency.key, key),
      eq(idempotency.requestId, requestId),
    )
    const kept = await tx.update(idempotency).set({ answer }).where(own).returning({ key: idempotency.key })
    if (kept.length === 0) throw new Error('an idempotency key was taken over while its call was under way')
    return { ...(rendered.text === undefined ? {} : rendered), ...(reply.headers ? { headers: reply.headers } : {}) }
  })
}

function fingerprintOf(req: Request, bytes: Buffer | undefined): Buffer {
  const hash = createHash('sha256').update(`${req.method} ${req.originalUrl}\n`)
  return (bytes ? hash.update(bytes) : hash).digest()
}
