import type { RequestHandler } from 'express'
import type { Deps } from '../deps.ts'
import { instantOf, newId } from '../ids.ts'
import type { CallRecord } from '../operation.ts'
import { readableText } from './readable.ts'

/** The client was gone before the answer was. */
const HUNG_UP = 499

/** Names each call, and puts it on record once its response has closed: in the log file, and of the API in the database. */
export function recordCalls({ log, requestLog }: Deps): RequestHandler {
  return (req, res, next) => {
    const call: CallRecord = { requestId: newId('req') }
    res.locals.call = call
    res.set('Request-Id', call.requestId)
    const started = performance.now()
    res.once('close', () => {
      const status = res.writableFinished ? res.statusCode : HUNG_UP
      const milliseconds = Math.round((performance.now() - started) * 1000) / 1000
      const path = readableText(req.originalUrl.split('?')[0] ?? '').slice(0, 300)
      const line = { requestId: call.requestId, method: req.method, path, status, milliseconds }
      log.info({ ...line, ...(call.keyId ? { keyId: call.keyId } : {}) }, 'call')
      if (!path.startsWith('/v1/')) return
      const { requestId: id, points = 0, ...rest } = call
      const at = instantOf(id) as Date
      requestLog.add({
        ...rest,
        ...line,
        id,
        at,
        points,
        bytesIn: bytesOf(req.headers['content-length']),
        bytesOut: sentBytes(res),
      })
    })
    next()
  }
}

const bytesOf = (length: unknown) => Math.min(Number(length ?? 0) || 0, 2 ** 31 - 1)

function sentBytes(res: { req: { method: string }; getHeader(name: string): unknown }): number {
  return res.req.method === 'HEAD' ? 0 : bytesOf(res.getHeader('content-length'))
}
