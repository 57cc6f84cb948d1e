import type { ErrorRequestHandler } from 'express'
import { DomainError } from '../../solvers/errors.ts'
import { databaseIsAway } from '../database.ts'
import type { Deps } from '../deps.ts'
import { UnknownOutcome } from '../metering/transaction.ts'
import { Problem, type ProblemCode, invalidInput } from '../problems.ts'
import { sendProblem } from './answer.ts'
import { readableText } from './readable.ts'

/** Refusals of the body parser and the router, by their `type` or, failing that, their status. */
const ofParser: Record<string, ProblemCode> = {
  'encoding.unsupported': 'unsupported-media-type',
  'request.size.invalid': 'malformed-request',
  'request.aborted': 'malformed-request',
}

export function problemOf(error: unknown): Problem {
  if (error instanceof Problem) return error
  if (error instanceof DomainError) return invalidInput(error.issues)
  if (error instanceof UnknownOutcome || databaseIsAway(error)) return new Problem('unavailable')
  const { type, status } = (error ?? {}) as { type?: unknown; status?: unknown }
  const code = typeof type === 'string' ? ofParser[type] : undefined
  if (code) return new Problem(code)
  return new Problem(typeof status === 'number' && status >= 400 && status < 500 ? 'malformed-request' : 'internal')
}

/** The one place where errors become answers. What is no refusal is a fault: logged whole, answered without detail. */
export function errorHandler({ log, config }: Deps): ErrorRequestHandler {
  return (error: unknown, req, res, _next) => {
    const problem = problemOf(error)
    const { call } = res.locals
    if (problem.status >= 500)
      log.error({ requestId: call.requestId, code: problem.code, error: told(error) }, 'a call failed')
    if (res.headersSent) {
      res.destroy()
      return
    }
    call.problem = sendProblem(req, res, problem, config.publicUrl)
  }
}

/* Database libraries put values of the query into the message, so only the innermost error is told. */
function told(error: unknown): { name: string; message: string; stack?: string | undefined } {
  let at = error
  while (at instanceof Error && at.cause instanceof Error) at = at.cause
  if (!(at instanceof Error)) return { name: 'unknown', message: readableText(String(at).slice(0, 300)) }
  const stack = at.stack?.slice(0, 3000).split('\n').map(readableText).join('\n')
  return { name: at.name, message: readableText(at.message.slice(0, 300)), stack }
}
