import { type Server, createServer } from 'node:http'
import { type AddressInfo, Server as NetServer } from 'node:net'
import { setTimeout as sleep } from 'node:timers/promises'
import type { Logger } from 'pino'
import { createApp } from './app.ts'
import { createCompute } from './compute/compute.ts'
import type { Config } from './config.ts'
import { createDatabase, createPool } from './database.ts'
import type { Deps } from './deps.ts'
import { createCrowd } from './http/crowd.ts'
import { type Limits, defaultLimits } from './http/limits.ts'
import { refuseRaw } from './http/refuse-raw.ts'
import { createFindKey } from './keys/authenticate.ts'
import { createMeter } from './metering/meter.ts'
import { createRequestLog } from './requests/log.ts'
import { keepHouse } from './housekeeping.ts'

/** Calls of one key that may be under way in a process. */
const AT_ONCE = 256
/** Calls under way at the end of the service have so long. */
const LAST_CALLS = 20_000
/** Clients with an open connection have so long to be told that it will close. */
const LAST_WORDS = 2000

export interface Service {
  port: number
  deps: Deps
  /** Stops accepting, finishes what is under way, then closes what was opened, the last first. */
  close(): Promise<void>
}

export function createDeps(config: Config, log: Logger, limits: Limits = defaultLimits): Deps {
  const pool = createPool(config.databaseUrl, config.poolSize, log)
  return {
    config,
    log,
    pool,
    db: createDatabase(pool),
    findKey: createFindKey(pool),
    crowd: createCrowd(AT_ONCE),
    compute: createCompute(config.solveThreads),
    meter: createMeter(pool, log),
    requestLog: createRequestLog(pool, log),
    limits,
  }
}

export async function startService(config: Config, log: Logger, limits?: Limits): Promise<Service> {
  const deps = createDeps(config, log, limits)
  const { app, close: closeSessions } = createApp(deps)
  const server = createServer(
    {
      maxHeaderSize: 16_384,
      headersTimeout: 10_000,
      requestTimeout: 60_000,
      keepAliveTimeout: 65_000,
      connectionsCheckingInterval: 5000,
      requireHostHeader: false,
    },
    app,
  )
  server.on('checkExpectation', app)
  refuseRaw(server, config.publicUrl)
  const stopHousekeeping = keepHouse(deps)
  await listen(server, config)
  return {
    port: (server.address() as AddressInfo).port,
    deps,
    async close() {
      await finish(server)
      await stopHousekeeping()
      await deps.requestLog.flush()
      closeSessions()
      await deps.compute.close()
      await deps.pool.end()
    },
  }
}

function listen(server: Server, { host, port }: Config): Promise<void> {
  return new Promise((resolve, reject) => server.once('error', reject).listen(port, host, () => resolve()))
}

/*
 * Idle connections are closed only after a while in which each answer asks for it: a client may be about to use one,
 * and would find its call cut off. The close of http would drop them at once.
 */
async function finish(server: Server): Promise<void> {
  server.prependListener('request', (_req, res) => res.setHeader('Connection', 'close'))
  const closed = new Promise<void>((resolve) => NetServer.prototype.close.call(server, () => resolve()))
  await Promise.race([closed, sleep(LAST_WORDS)])
  server.closeIdleConnections()
  const late = setTimeout(() => server.closeAllConnections(), LAST_CALLS)
  const idle = setInterval(() => server.closeIdleConnections(), LAST_WORDS)
  await closed
  clearInterval(idle)
  clearTimeout(late)
}
