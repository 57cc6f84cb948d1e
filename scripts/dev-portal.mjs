/**
 * Vite with reload for the portal, in front of the API. Imported late: before npm ci there is no Vite.
 * @param {{host: string, port: number}} address
 * @param {string} api where vite.config.ts sends what is not the portal's
 */
export async function startPortalServer({ host, port }, api) {
  process.env['API_URL'] = api
  const { createServer } = await import('vite')
  const server = await createServer({ server: { host, port, strictPort: true } })
  await server.listen()
  return () => server.close()
}
