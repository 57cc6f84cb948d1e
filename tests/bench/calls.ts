import { randomBytes } from 'node:crypto'
import autocannon from 'autocannon'
import pg from 'pg'
import { migrate } from '../../scripts/demo.mjs'
import { freePort } from '../../scripts/ports.mjs'
import { startCluster } from '../../scripts/postgres.mjs'
import { startProgram, waitReady } from '../../scripts/service.mjs'
import slab from '../../solvers/cases/slab-convection/case.ts'
import { type Report, median, rounded } from './figure.ts'

const ROUNDS = 5
const SECONDS = 4
const CONNECTIONS = 64

interface Target {
  url: string
  headers: Record<string, string>
}

/** Metered solves against a bare echo of the same body, in turns, so that what else the machine does meets both alike. */
export async function benchCalls(report: Report): Promise<void> {
  const ending: (() => Promise<void>)[] = []
  try {
    const cluster = await startCluster({ ephemeral: true, durable: true })
    ending.push(cluster.stop)
    const echo = { url: `${await serve('tests/bench/echo-server.ts', {}, ending)}/echo`, headers: {} }
    const metered = await meteredTarget(cluster.url, ending)
    const rounds = { echo: [] as autocannon.Result[], metered: [] as autocannon.Result[] }
    await load(echo, 1)
    await load(metered, 1)
    for (let n = 0; n < ROUNDS; n++) {
      rounds.echo.push(await load(echo, SECONDS))
      rounds.metered.push(await load(metered, SECONDS))
    }
    publish(rounds, report)
  } finally {
    for (const end of ending.reverse()) await end()
  }
}

function publish(rounds: Record<'echo' | 'metered', autocannon.Result[]>, report: Report): void {
  const of = (name: 'echo' | 'metered', pick: (result: autocannon.Result) => number) => median(rounds[name].map(pick))
  const rate = { echo: of('echo', (r) => r.requests.average), metered: of('metered', (r) => r.requests.average) }
  report({ name: 'echo', value: rounded(rate.echo), unit: 'requests/s', ratioTo: null })
  report({ name: 'metered solve', value: rounded(rate.metered), unit: 'requests/s', ratioTo: null })
  report({ name: 'metered solve rate', value: rounded(rate.metered / rate.echo), unit: '1', ratioTo: 'echo' })
  for (const name of ['echo', 'metered'] as const)
    for (const percentile of ['p50', 'p99'] as const)
      report({
        name: `${name === 'echo' ? 'echo' : 'metered solve'} ${percentile}`,
        value: of(name, (r) => r.latency[percentile]),
        unit: 'ms',
        ratioTo: null,
      })
}

async function load({ url, headers }: Target, duration: number): Promise<autocannon.Result> {
  const body = JSON.stringify(slab.example)
  const all = { 'content-type': 'application/json', ...headers }
  const result = await autocannon({ url, method: 'POST', headers: all, body, connections: CONNECTIONS, duration })
  if (result.non2xx || result.errors)
    throw new Error(`${url} refused ${result.non2xx} calls and lost ${result.errors}: the figures would mean nothing`)
  return result
}

async function serve(file: string, env: NodeJS.ProcessEnv, ending: (() => Promise<void>)[]): Promise<string> {
  const port = await freePort()
  const program = startProgram(['--import', 'tsx', file], { env: { ...process.env, ...env, PORT: String(port) } })
  ending.push(program.stop)
  await waitReady(`http://127.0.0.1:${port}`, program)
  return `http://127.0.0.1:${port}`
}

/** An account of the bench's own, with a limit that it cannot reach. */
async function meteredTarget(databaseUrl: string, ending: (() => Promise<void>)[]): Promise<Target> {
  const env = {
    DATABASE_URL: databaseUrl,
    SESSION_SECRET: randomBytes(32).toString('hex'),
    HOST: '127.0.0.1',
    LOG_LEVEL: 'warn',
    PUBLIC_URL: '',
  }
  await migrate({ ...process.env, ...env })
  const service = await serve('api/server.ts', env, ending)
  const key = await makeKey(service)
  const client = new pg.Client(databaseUrl)
  await client.connect()
  await client.query('UPDATE accounts SET trial_limit = 1000000000000, rate = 2000000000')
  await client.end()
  return { url: `${service}/v1/cases/${slab.id}/solve`, headers: { authorization: `Bearer ${key}` } }
}

async function makeKey(service: string): Promise<string> {
  const post = async (path: string, body: object, cookie = '') => {
    const headers = { 'content-type': 'application/json', origin: service, cookie }
    const response = await fetch(`${service}/portal/v1/${path}`, {
      method: 'POST',
      headers,
      body: JSON.stringify(body),
    })
    if (!response.ok) throw new Error(`${path} answered ${response.status}: ${await response.text()}`)
    return response
  }
  const person = {
    mail: 'bench@example.org',
    password: randomBytes(16).toString('hex'),
    name: 'Bench',
    accountName: 'Bench',
  }
  const cookie = (await post('sign-up', person)).headers
    .getSetCookie()
    .map((each) => each.split(';')[0])
    .join('; ')
  return ((await (await post('keys', { name: 'bench' }, cookie)).json()) as { secret: string }).secret
}
