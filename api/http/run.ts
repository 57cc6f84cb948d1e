import type { Request, RequestHandler, Response } from 'express'
import { z } from 'zod'
import { DomainError } from '../../solvers/errors.ts'
import { parse } from '../../solvers/validate.ts'
import type { Deps } from '../deps.ts'
import { INLINE_BYTES } from '../compute/compute.ts'
import type { Body, Caller, CallRecord, Context, Operation } from '../operation.ts'
import { Problem, invalidInput, invalidParameter } from '../problems.ts'
import { sendReply } from './answer.ts'
import { authenticate } from './authenticate.ts'
import { readBody } from './body.ts'
import { parseJson } from './json.ts'
import { handleOf } from './session.ts'

/** One operation as a handler: authenticate, authorise, validate, do, answer. Whatever is refused is thrown. */
export function run(o: Operation, deps: Deps): RequestHandler {
  return async (req, res) => {
    const call: CallRecord = res.locals.call
    if (o.caseId) call.caseId = o.caseId
    call.operation = o.caseOperation ?? o.id
    if (!req.accepts('application/json')) throw new Problem('not-acceptable')
    const caller = await authenticate(o, req, deps)
    note(call, caller)
    const input = await inputOf(o, req, res, deps)
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

async function inputOf(o: Operation, req: Request, res: Response, deps: Deps): Promise<Input> {
  const params = readParams(o, req)
  const query = readQuery(o, req)
  if (!o.body) return { params, query, body: undefined }
  const bytes = await readBody(req, res, o.body.limit)
  return { params, query, body: await parseBody(o.body, bytes, deps) }
}

async function parseBody(body: Body<unknown>, bytes: Buffer, deps: Deps): Promise<unknown> {
  if (body.parseLong && bytes.length > INLINE_BYTES) return body.parseLong(bytes, deps)
  const raw = parseJson(bytes)
  try {
    return body.parse(raw)
  } catch (error) {
    throw error instanceof DomainError ? invalidInput(error.issues) : error
  }
}

/* What no id looks like names nothing. */
function readParams(o: Operation, req: Request): unknown {
  if (!o.params) return {}
  const parsed = o.params.safeParse(req.params)
  if (!parsed.success) throw new Problem('not-found', 'The path names something that cannot exist.')
  return parsed.data
}

const noParameters = z.strictObject({})

/* A parameter given twice reaches the schema as a list, which no parameter is. */
function readQuery(o: Operation, req: Request): unknown {
  const given = new URLSearchParams(/\?.*$/.exec(req.url)?.[0])
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
