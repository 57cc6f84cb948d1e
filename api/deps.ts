import type pg from 'pg'
import type { Logger } from 'pino'
import type { Compute } from './compute/compute.ts'
import type { Config } from './config.ts'
import type { Database } from './database.ts'
import type { Limits } from './http/limits.ts'
import type { Crowd } from './http/crowd.ts'
import type { FindKey } from './keys/authenticate.ts'
import type { Meter } from './metering/meter.ts'
import type { RequestLog } from './requests/log.ts'

/** What handlers are given. Tests give the same, on a database of their own. */
export interface Deps {
  config: Config
  log: Logger
  pool: pg.Pool
  db: Database
  findKey: FindKey
  crowd: Crowd
  compute: Compute
  meter: Meter
  requestLog: RequestLog
  limits: Limits
}
