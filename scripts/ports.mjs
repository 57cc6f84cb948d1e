import { createServer } from 'node:net'

/**
 * Tries to listen, and lets go at once.
 * @param {number} port 0 for any
 * @param {string} [host]
 * @returns {Promise<{port: number} | {error: NodeJS.ErrnoException}>}
 */
export function tryPort(port, host = '127.0.0.1') {
  return new Promise((resolve) => {
    const server = createServer()
    server.once('error', (error) => resolve({ error }))
    server.listen({ port, host, exclusive: true }, () => {
      const address = server.address()
      server.close(() => resolve({ port: typeof address === 'object' && address ? address.port : port }))
    })
  })
}

/**
 * A free port of this machine: the one wished for when it is free.
 * @param {number} [wish]
 */
export async function freePort(wish = 0) {
  for (const port of [wish, 0]) {
    const tried = await tryPort(port)
    if ('port' in tried) return tried.port
  }
  throw new Error('no port is free')
}
