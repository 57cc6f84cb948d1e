import express, { type RequestHandler, type Router } from 'express'
import type { Deps } from '../deps.ts'
import { type Operation, usesSession } from '../operation.ts'
import { Problem } from '../problems.ts'
import { answerPreflight } from './cors.ts'
import { createLimiter } from './limits.ts'
import { refuseCrossSite } from './origin.ts'
import { run } from './run.ts'

type Sessions = Record<'portal' | 'support', RequestHandler>

/** Routes of a list of operations. A path answers its methods, OPTIONS, and 405 for the rest. */
export function mount(operations: readonly Operation[], deps: Deps, sessions: Sessions): Router {
  const router = express.Router({ caseSensitive: true, strict: true })
  for (const path of new Set(operations.map((o) => o.path))) {
    const own = operations.filter((o) => o.path === path)
    const route = router.route(path.replace(/\{(\w+)\}/g, ':$1'))
    for (const o of own) route[o.method](...stepsOf(o, deps, sessions), run(o, deps))
    route.all(otherMethods(own))
  }
  return router
}

/* The origin comes before the limiter, so that no other site uses up the calls of who visits it. */
function stepsOf(o: Operation, deps: Deps, sessions: Sessions): RequestHandler[] {
  const changes = usesSession(o) && o.method !== 'get'
  const origin = changes ? [ownPagesOnly(deps)] : []
  const limiter = o.limiter ? [createLimiter(deps.pool, o.limiter, deps.limits)] : []
  const session = usesSession(o) && o.document !== 'openapi' ? [sessions[o.document]] : []
  return [...origin, ...limiter, ...session]
}

function ownPagesOnly({ config }: Deps): RequestHandler {
  return (req, _res, next) => {
    refuseCrossSite(req, config.origins)
    next()
  }
}

function otherMethods(own: readonly Operation[]): RequestHandler {
  const allow = own.flatMap((o) => (o.method === 'get' ? ['GET', 'HEAD'] : [o.method.toUpperCase()]))
  const Allow = [...allow, 'OPTIONS'].join(', ')
  return (req, res) => {
    if (req.method !== 'OPTIONS')
      throw new Problem('method-not-allowed', `${req.method.slice(0, 20)} is not among: ${Allow}.`, {
        headers: { Allow },
      })
    answerPreflight(req, res, Allow)
    res.set('Allow', Allow).status(204).end()
  }
}
