import type { Request, Response } from 'express'
import type { Operation, Reply } from '../operation.ts'
import { type Problem, problemDetails } from '../problems.ts'
import { readable } from './readable.ts'
import { render } from './render.ts'

/** Sends what a handler gave back; an equal answer that a GET already has is not sent again. */
export function sendReply(o: Operation, res: Response, reply: Reply): void {
  res.status(o.status)
  if (o.access !== 'public' || o.session) res.set('Cache-Control', 'no-store')
  res.set({ ...res.locals.call.limits, ...reply.headers })
  if (!o.answer) {
    res.end()
    return
  }
  const { text, etag } = reply.text === undefined ? render(reply.body) : { text: reply.text, etag: reply.etag }
  if (etag) res.set('ETag', etag)
  res.type('application/json; charset=utf-8').send(text)
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
