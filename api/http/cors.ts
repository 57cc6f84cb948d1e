import type { Request, RequestHandler, Response } from 'express'
import type { Config } from '../config.ts'
import { Problem } from '../problems.ts'

/** Browsers hide from pages every header that is not named here. */
const exposed = [
  'Request-Id',
  'Points-Charged',
  'Points-Remaining',
  'RateLimit',
  'RateLimit-Policy',
  'Retry-After',
  'Idempotency-Replayed',
  'Deprecation',
  'Sunset',
  'ETag',
  'Location',
  'Link',
  'Allow',
  'WWW-Authenticate',
].join(', ')

const accepted = [
  ...['Authorization', 'Content-Type', 'Accept', 'If-Match', 'If-None-Match'],
  ...['Idempotency-Key', 'Client-Reference', 'traceparent', 'tracestate'],
].join(', ')
const PREFLIGHT_SECONDS = 7200

const isApi = (req: Request) => req.path.startsWith('/v1/')

/**
 * Pages may read every answer of the API, refusals too, or they could not tell what was refused. It knows no cookies,
 * and which pages may use a key is decided when the key is there.
 */
export const allowPages: RequestHandler = (req, res, next) => {
  if (isApi(req)) res.set({ 'Access-Control-Allow-Origin': '*', 'Access-Control-Expose-Headers': exposed })
  next()
}

/** Answers the question that a browser asks before a call, where it is one. No key comes with it. */
export function answerPreflight(req: Request, res: Response, methods: string): void {
  if (!isApi(req) || req.headers['access-control-request-method'] === undefined) return
  res.vary('Access-Control-Request-Method').set({
    'Access-Control-Allow-Methods': methods,
    'Access-Control-Allow-Headers': accepted,
    'Access-Control-Max-Age': String(PREFLIGHT_SECONDS),
  })
}

/** Refuses pages that the key does not name; those of the service itself may use any. */
export function refuseOtherPages(req: Request, res: Response, origins: readonly string[], config: Config): void {
  res.vary('Origin')
  const { origin } = req.headers
  if (origin === undefined) return
  res.set('Access-Control-Allow-Origin', origin)
  if (!config.origins.includes(origin) && !origins.includes(origin)) throw new Problem('origin-refused')
}
