import type { Request, RequestHandler, Response } from 'express'
import { z } from 'zod'
import { DomainError } from '../../solvers/errors.ts'
import { parse } from '../../solvers/validate.ts'
import type { Deps } from '../deps.ts'
import { type Caller, type CallRecord, type Context, type Operation, usesSession } from '../operation.ts'
import { Problem, invalidInput, invalidParameter } from '../problems.ts'
import { sendReply } from './answer.ts'
import { authenticate } from './authenticate.ts'
import { readJson } from './body.ts'
import { refuseCrossSite } from './origin.ts'
import { handleOf } from './session.ts'

/** One operation as a handler: authenticate, authorise, validate, do, answer. Whatever is refused is thrown. */
export function run(o: Operation, deps: Deps): RequestHandler {
  return async (req, res) => {
    const call: CallRecord = res.locals.call
    if (o.caseId) call.caseId = o.caseId
    call.operation = o.caseOperation ?? o.id
    if (!req.accepts('application/json')) throw new Problem('not-acceptable')
    if (usesSession(o) && o.method !== 'get') refuseCrossSite(req, deps.config.origins)
    const caller = await authenticate(o, req, deps)
    note(call, caller)
    const input = await inputOf(o, req, res)
    const session = handleOf(req)
    sendReply(o, res, await o.handle({ ...input, caller, call, session, deps }))
  }
}

function note(call: CallRecord, caller: Caller): void {
  if (caller.kind !== 'key') return
  call.accountId = caller.accountId
  call.keyId = caller.keyId
}

type Input = Pick<Context<unknown, unknown, unknown, 'public'>, 'params' | 'query' | 'body'>

async function inputOf(o: Operation, req: Request, res: Response): Promise<Input> {
  const query = readQuery(o, req)
  if (!o.body) return { params: req.params, query, body: undefined }
  const raw = await readJson(req, res)
  try {
    return { params: req.params, query, body: o.body.parse(raw) }
  } catch (error) {
    throw error instanceof DomainError ? invalidInput(error.issues) : error
  }
}

const noParameters = z.strictObject({})

/* A parameter given twice reaches the schema as a list, which no parameter is. */
function readQuery(o: Operation, req: Request): unknown {
  const given = new URLSearchParams(req.url.split('?')[1] ?? '')
  const names = [...new Set(given.keys())]
  const query = Object.fromEntries(
    names.map((name) => [name, given.getAll(name).length > 1 ? given.getAll(name) : given.get(name)]),
  )
  try {
    return parse(o.query ?? noParameters, query)
  } catch (error) {
    throw error instanceof DomainError ? invalidParameter(error.issues) : error
  }
}
