import { fileURLToPath } from 'node:url'
import express, { type Express } from 'express'
import type { Deps } from './deps.ts'
import { allowPages } from './http/cors.ts'
import { errorHandler } from './http/errors.ts'
import { mount } from './http/mount.ts'
import { portalFiles } from './http/portal-files.ts'
import { refuseOdd } from './http/refuse-odd.ts'
import { recordCalls } from './http/record.ts'
import { secureAnswers } from './http/security.ts'
import { sessionsOf } from './http/session.ts'
import { operations } from './operations.ts'
import { Problem } from './problems.ts'

const builtPortal = fileURLToPath(new URL('../dist/portal', import.meta.url))

export interface App {
  app: Express
  /** Ends the timers of the session stores. */
  close(): void
}

/** The service as an Express application; knows nothing of ports, signals and the environment. */
export function createApp(deps: Deps, portalFolder = builtPortal): App {
  const members = sessionsOf('member', deps)
  const staff = sessionsOf('staff', deps)
  const sessions = { portal: members.handler, support: staff.handler }
  const app = express()
  app.set('trust proxy', deps.config.proxies)
  app.set('x-powered-by', false)
  app.set('etag', false)
  app.set('query parser', false)
  app.use(recordCalls(deps), secureAnswers(deps.config), allowPages, refuseOdd)
  for (const document of ['openapi', 'portal', 'support'] as const)
    app.use(
      mount(
        operations.filter((o) => o.document === document),
        deps,
        sessions,
      ),
    )
  app.use(portalFiles(portalFolder))
  app.use(() => {
    throw new Problem('not-found', 'No operation has this path.')
  })
  app.use(errorHandler(deps))
  return {
    app,
    close() {
      members.close()
      staff.close()
    },
  }
}
