import type { Server } from 'node:http'
import type { Duplex } from 'node:stream'
import { STATUS_CODES } from 'node:http'
import { newId } from '../ids.ts'
import { Problem, problemDetails } from '../problems.ts'

const faults: Record<string, Problem> = {
  HPE_HEADER_OVERFLOW: new Problem('header-too-large'),
  ERR_HTTP_REQUEST_TIMEOUT: new Problem('request-timeout'),
}

/** What is no HTTP reaches no route; it is answered as a problem too, on the bare connection. */
export function refuseRaw(server: Server, publicUrl: string): void {
  server.on('clientError', (error: Error & { code?: string }, socket: Duplex) => {
    if (error.code === 'ECONNRESET' || !socket.writable) return void socket.destroy()
    const problem = faults[error.code ?? ''] ?? new Problem('malformed-request')
    const requestId = newId('req')
    const body = JSON.stringify(problemDetails(problem, publicUrl, requestId))
    socket.end(
      [
        `HTTP/1.1 ${problem.status} ${STATUS_CODES[problem.status]}`,
        'Content-Type: application/problem+json; charset=utf-8',
        `Content-Length: ${Buffer.byteLength(body)}`,
        `Request-Id: ${requestId}`,
        'Cache-Control: no-store',
        'Connection: close',
        '',
        body,
      ].join('\r\n'),
    )
  })
}
