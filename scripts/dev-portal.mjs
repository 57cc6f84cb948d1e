const PASSED_ON = ['/v1', '/portal/v1', '/support/v1', '/healthz', '/readyz']

/**
 * Vite with reload for the portal, in front of the API. Imported late: before npm ci there is no Vite.
 * @param {{host: string, port: number}} address
 * @param {string} api
 */
export async function startPortalServer({ host, port }, api) {
  const { createServer } = await import('vite')
  const proxy = Object.fromEntries(PASSED_ON.map((prefix) => [prefix, { target: api, xfwd: true }]))
  const server = await createServer({ server: { host, port, strictPort: true, proxy } })
  await server.listen()
  return () => server.close()
}
