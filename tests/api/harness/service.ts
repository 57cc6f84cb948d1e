import { parseConfig } from '../../../api/config.ts'
import { type Limits, defaultLimits } from '../../../api/http/limits.ts'
import { createLog } from '../../../api/log.ts'
import { type Service, startService } from '../../../api/service.ts'
import { createTestDatabase } from './database.ts'

export const PUBLIC_URL = 'http://soakstone.example'
export const SESSION_SECRET = 'a secret of the tests, long enough for all'

export interface TestService {
  url: string
  databaseUrl: string
  service: Service
  /** Lines of the log so far. */
  lines: string[]
  close(): Promise<void>
}

const generous = Object.fromEntries(
  Object.keys(defaultLimits).map((name) => [name, { windowSeconds: 60, limit: 100_000 }]),
) as Limits

interface Options {
  limits?: Limits
  env?: Record<string, string>
  databaseUrl?: string
}

/** The service as it runs, on a free port and a database of its own unless one is given. */
export async function startTestService({
  limits = generous,
  env = {},
  databaseUrl,
}: Options = {}): Promise<TestService> {
  const database = databaseUrl ? { url: databaseUrl, drop: async () => undefined } : await createTestDatabase()
  const config = parseConfig({
    PORT: '0',
    DATABASE_URL: database.url,
    PUBLIC_URL,
    SESSION_SECRET,
    NODE_ENV: 'test',
    ...env,
  })
  const lines: string[] = []
  const log = createLog('trace', { write: (line: string) => void lines.push(line) })
  const service = await startService(config, log, limits)
  return {
    url: `http://127.0.0.1:${service.port}`,
    databaseUrl: database.url,
    service,
    lines,
    async close() {
      await service.close()
      await database.drop()
    },
  }
}
