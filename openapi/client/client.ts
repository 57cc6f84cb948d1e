import createFetchClient, { type Client } from 'openapi-fetch'
import type { paths } from '../openapi.d.ts'
import {
  type BatchAnswer,
  type BatchLine,
  type BatchSummary,
  linesOf,
  type Problem,
  ProblemError,
  readBatch,
} from './batch.ts'
import { type Patience, patientFetch } from './retry.ts'

export interface Options extends Patience {
  /** Where the service is, without a path. */
  baseUrl: string
  /** A key, made in the portal. */
  key: string
}

export interface Soakstone extends Pick<Client<paths>, 'GET' | 'POST' | 'PUT' | 'DELETE'> {
  /** Sends many calls as one and gives their answers as they come. Throws a ProblemError or, where it was cut, a CutError. */
  batch(lines: Iterable<BatchLine>): AsyncGenerator<BatchAnswer, BatchSummary>
}

/** A client of the service: each path typed by the contract, calls made again where that is safe and may help. */
export function createClient({ baseUrl, key, ...patience }: Options): Soakstone {
  const send = patientFetch(patience)
  const headers = { Authorization: `Bearer ${key}` }
  const client = createFetchClient<paths>({ baseUrl, headers, fetch: send })
  client.use({
    onRequest({ request }) {
      if (request.method === 'POST') named(request.headers)
      return request
    },
  })
  const { GET, POST, PUT, DELETE } = client

  async function* batch(lines: Iterable<BatchLine>): AsyncGenerator<BatchAnswer, BatchSummary> {
    const kind = { 'Content-Type': 'application/x-ndjson', Accept: 'application/x-ndjson' }
    const body = linesOf(lines)
    const request = new Request(`${baseUrl}/v1/batches`, { method: 'POST', headers: { ...headers, ...kind }, body })
    named(request.headers)
    const response = await send(request)
    if (!response.ok) throw new ProblemError((await response.json()) as Problem)
    return yield* readBatch(response)
  }

  return { GET, POST, PUT, DELETE, batch }
}

/** A key of its own for each change, so that making it again makes nothing twice. */
function named(headers: Headers): void {
  if (!headers.has('Idempotency-Key')) headers.set('Idempotency-Key', crypto.randomUUID())
}

type Page = { next: string | null }

/** Every page of a list: `for await (const page of pages((cursor) => client.GET('/v1/materials', { params: { query: { cursor } } })))`. */
export async function* pages<P extends Page>(
  get: (cursor: string | undefined) => Promise<{ data?: P; error?: unknown }>,
): AsyncGenerator<P> {
  let cursor: string | undefined
  do {
    const { data, error } = await get(cursor)
    if (!data) throw new ProblemError(error as Problem)
    yield data
    cursor = data.next ?? undefined
  } while (cursor !== undefined)
}
