import type { Request, RequestHandler, Response } from 'express'
import { z } from 'zod'
import { DomainError } from '../../solvers/errors.ts'
import { parse } from '../../solvers/statement/validate.ts'
import type { Deps } from '../deps.ts'
import { INLINE_BYTES } from '../compute/compute.ts'
import {
  type Body,
  type Caller,
  type CallRecord,
  type Context,
  malformed,
  type Operation,
  type OwnMaterials,
  type Upload,
} from '../operation.ts'
import { Problem, invalidInput, invalidParameter } from '../problems.ts'
import { LINES, sendLines, sendReply } from './answer.ts'
import { authenticateKey } from '../keys/authenticate.ts'
import { authenticate, authorizeKey } from './authenticate.ts'
import { problemOf } from './errors.ts'
import { ownMaterialsIn } from '../materials/own-materials.ts'
import { once } from '../idempotency/once.ts'
import { readBody } from './body.ts'
import { decode, parseJson } from './json.ts'
import { deprecationHeaders } from './deprecation.ts'
import { handleOf } from './session.ts'
import { tagsOf } from './tags.ts'

/** One operation as a handler: authenticate, authorise, validate, do, answer. Whatever is refused is thrown. */
export function run(o: Operation, deps: Deps): RequestHandler {
  const answer = o.access === 'key' ? answerKey : answerOther
  return async (req, res) => {
    const call: CallRecord = res.locals.call
    if (o.caseId) call.caseId = o.caseId
    call.operation = o.caseOperation ?? o.id
    if (o.deprecated) res.set(deprecationHeaders(o.deprecated, deps.config.publicUrl))
    if (!req.accepts(o.answersLines ? LINES : 'application/json')) throw new Problem('not-acceptable')
    await answer(o, req, res, deps)
  }
}

async function answerOther(o: Operation, req: Request, res: Response, deps: Deps): Promise<void> {
  const caller = await authenticate(o as Parameters<typeof authenticate>[0], req, deps)
  await answerCaller(o, caller, req, res, deps)
}

/** Every call of a key counts against its limits, once: with its charge, or alone where it costs or gets nothing. */
async function answerKey(o: Operation, req: Request, res: Response, deps: Deps): Promise<void> {
  const call: CallRecord = res.locals.call
  const found = await authenticateKey(deps.findKey, req)
  const { accountId, keyId, secretId } = found
  Object.assign(call, { accountId, keyId, secretId })
  const leave = deps.crowd.enter(keyId)
  const count = async () => {
    call.limits = (await deps.meter.spend({ requestId: call.requestId, accountId, keyId, points: 0 })).headers
  }
  try {
    const caller = authorizeKey(o, found, req, res, deps)
    Object.assign(call, tagsOf(req))
    await answerCaller(o, caller, req, res, deps, o.metered ? undefined : count)
  } catch (error) {
    if (!call.limits && isRefusal(error)) await count()
    throw error
  } finally {
    leave()
  }
}

/* What the meter refused consumes nothing. */
function isRefusal(error: unknown): boolean {
  const { status, code } = problemOf(error)
  return status < 500 && code !== 'rate-limited' && code !== 'quota-exceeded'
}

async function answerCaller(
  o: Operation,
  caller: Caller,
  req: Request,
  res: Response,
  deps: Deps,
  count?: () => Promise<void>,
): Promise<void> {
  const { call } = res.locals
  const ifMatch = ifMatchOf(o, req)
  const { bytes, ...input } = await inputOf(o, req, res, deps, caller)
  await count?.()
  const context = { ...input, ...ifMatch, caller, call, session: handleOf(req) }
  const work = async (given: Deps) => o.handle({ ...context, deps: given })
  const reply = await once({ o, req, caller, call, bytes }, deps, work)
  if (!reply.lines) return sendReply(o, res, reply)
  call.streaming = sendLines(o, res, reply, reply.lines)
  await call.streaming
}

type Input = Pick<Context<unknown, unknown, unknown, 'public'>, 'params' | 'query' | 'body'> & { bytes?: Buffer }

/* The version is asked for before the body is read, since a change that names none is refused whatever it holds. */
function ifMatchOf(o: Operation, req: Request): { ifMatch?: string } {
  if (!o.conditional) return {}
  const ifMatch = req.headers['if-match']
  if (ifMatch === undefined) throw new Problem('precondition-required')
  return { ifMatch }
}

async function inputOf(o: Operation, req: Request, res: Response, deps: Deps, caller: Caller): Promise<Input> {
  const params = readParams(o, req)
  const query = readQuery(o, req)
  const asked = o.upload ?? o.body
  if (!asked) return { params, query, body: undefined }
  const bytes = await readBody(req, res, asked.limit, o.upload?.kind)
  const own = asked.materials ? await ownMaterialsIn(bytes, caller, deps.db) : none
  const body = 'kind' in asked ? parseText(asked, bytes, own) : await parseBody(asked, bytes, deps, own)
  return { params, query, body, bytes }
}

const none: OwnMaterials = new Map()

function parseText({ kind, parse }: Upload<unknown>, bytes: Buffer, own: OwnMaterials): unknown {
  const text = decode(bytes)
  if (text === undefined) throw new Problem(malformed[kind], 'The body is not UTF-8.')
  return refusing(() => parse(text, own))
}

async function parseBody(body: Body<unknown>, bytes: Buffer, deps: Deps, own: OwnMaterials): Promise<unknown> {
  if (body.parseLong && bytes.length > INLINE_BYTES) return body.parseLong(bytes, deps, own)
  const raw = parseJson(bytes)
  return refusing(() => body.parse(raw, own))
}

function refusing<T>(parse: () => T): T {
  try {
    return parse()
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
