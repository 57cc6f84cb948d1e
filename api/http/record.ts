import type { RequestHandler, Response } from 'express'
import type { Deps } from '../deps.ts'
import { instantOf, newId } from '../ids.ts'
import type { CallRecord } from '../operation.ts'
import { readableText } from './readable.ts'

/** The client was gone before the answer was. */
const HUNG_UP = 499

export interface RecordedCall extends CallRecord {
  /** The client has hung up. */
  gone?: boolean
}

/**
 * Names each call, and puts it on record once its response has closed and its handler has ended: in the log file, and
 * of the API in the database.
 */
export function recordCalls({ log, requestLog }: Deps): RequestHandler {
  return (req, res, next) => {
    const call: RecordedCall = { requestId: newId('req') }
    res.locals.call = call
    res.set('Request-Id', call.requestId)
    const started = performance.now()
    /* The path by which the call is routed, also where the request line names a whole address. */
    const routed = req.path
    const write = () => {
      const status = call.gone ? HUNG_UP : res.statusCode
      const milliseconds = Math.round((performance.now() - started) * 1000) / 1000
      const path = readableText(routed).slice(0, 300)
      const line = { requestId: call.requestId, method: req.method, path, status, milliseconds }
      log.info({ ...line, keyId: call.keyId, traceId: call.traceId }, 'call')
      if (!routed.startsWith('/v1/')) return
      const { requestId: id, points = 0, ...rest } = call
      const at = instantOf(id) as Date
      requestLog.add({
        ...rest,
        ...line,
        id,
        at,
        points,
        bytesIn: bytesOf(req.headers['content-length']),
        bytesOut: call.bytesOut ?? sentBytes(res),
      })
    }
    res.once('close', () => {
      call.gone = !res.writableFinished
      if (call.streaming) requestLog.hold(call.streaming.then(write, write))
      else if (res.headersSent || !call.operation) write()
      else requestLog.hold(endOf(res).then(write))
    })
    next()
  }
}

/* A client may hang up while its handler still works, and spends: what the call cost is known when the handler ends. */
function endOf(res: Response): Promise<void> {
  const end = res.end.bind(res) as (...args: unknown[]) => Response
  return new Promise((resolve) => {
    res.end = ((...args: unknown[]) => {
      resolve()
      return end(...args)
    }) as Response['end']
  })
}

const bytesOf = (length: unknown) => Math.min(Number(length ?? 0) || 0, 2 ** 31 - 1)

function sentBytes(res: { req: { method: string }; getHeader(name: string): unknown }): number {
  return res.req.method === 'HEAD' ? 0 : bytesOf(res.getHeader('content-length'))
}
