import type { Request, Response } from 'express'
import type { Operation, Reply } from '../operation.ts'
import { type Problem, problemDetails } from '../problems.ts'
import { readable } from './readable.ts'
import { render } from './render.ts'

/** Sends what a handler gave back; an equal answer that a GET already has is not sent again. */
export function sendReply(o: Operation, res: Response, reply: Reply): void {
  begin(o, res, reply)
  if (!o.answer) {
    res.end()
    return
  }
  const { text, etag } = reply.text === undefined ? render(reply.body) : { text: reply.text, etag: reply.etag }
  if (etag) res.set('ETag', etag)
  res.type('application/json; charset=utf-8').send(text)
}

export const LINES = 'application/x-ndjson'

/** Sends the lines of an answer as they come, no faster than they are taken, and no more once nobody does. */
export async function sendLines(
  o: Operation,
  res: Response,
  reply: Reply,
  lines: AsyncIterable<string>,
): Promise<void> {
  const { call } = res.locals
  begin(o, res, reply)
  res.type(`${LINES}; charset=utf-8`)
  call.bytesOut = 0
  for await (const text of lines) {
    if (call.gone) break
    call.bytesOut += Buffer.byteLength(text)
    if (!res.write(text)) await taken(res)
  }
  res.end()
}

function begin(o: Operation, res: Response, { headers }: Reply): void {
  res.status(o.status)
  if (o.access !== 'public' || o.session) res.set('Cache-Control', 'no-store')
  res.set({ ...res.locals.call.limits, ...headers })
}

/** Until what was written is taken, or nobody is there to take it. */
function taken(res: Response): Promise<void> {
  return new Promise((resolve) => {
    const done = () => {
      res.off('drain', done).off('close', done)
      resolve()
    }
    res.on('drain', done).on('close', done)
  })
}

/** Sends a problem as RFC 9457 says. */
export function sendProblem(req: Request, res: Response, problem: Problem, publicUrl: string): object {
  const details = readable(problemDetails(problem, publicUrl, res.locals.call.requestId))
  res.set('Cache-Control', 'no-store')
  res.set({ ...res.locals.call.limits, ...problem.extras.headers })
  if (problem.status === 503 && !res.get('Retry-After')) res.set('Retry-After', '2')
  if (req.headers['content-length'] !== undefined && !req.complete) res.set('Connection', 'close')
  res.status(problem.status).type('application/problem+json; charset=utf-8').send(JSON.stringify(details))
  return details
}
