import { isIP } from 'node:net'
import { tryPort } from './ports.mjs'
import { Refusal } from './refusal.mjs'

/**
 * Where the service listens and how it is reached, from HOST, PORT and PUBLIC_URL.
 * @param {NodeJS.ProcessEnv} env
 */
export function addressOf(env) {
  const host = env['HOST'] || '127.0.0.1'
  const port = Number(env['PORT'] || 4600)
  if (!Number.isInteger(port) || port < 1 || port > 65535)
    throw new Refusal(`PORT is "${env['PORT']}": set it to a whole number from 1 to 65535.`)
  const everywhere = host === '0.0.0.0' || host === '::'
  const name = everywhere ? '127.0.0.1' : isIP(host) === 6 ? `[${host}]` : host
  const local = `http://${name}:${port}`
  return { host, port, local, publicUrl: env['PUBLIC_URL'] || local }
}

/** @param {{host: string, port: number}} address */
export async function refuseBusyPort({ host, port }) {
  const tried = await tryPort(port, host)
  if (!('error' in tried)) return
  const { code, message } = tried.error
  if (code === 'EADDRINUSE')
    throw new Refusal(
      `Port ${port} of ${host} is in use: end what uses it, or choose another, for instance PORT=${port + 1} npm start.`,
    )
  if (code === 'EACCES')
    throw new Refusal(`Port ${port} is reserved for root: choose one above 1023, for instance PORT=4600 npm start.`)
  throw new Refusal(`HOST ${host} cannot be listened on (${message}): set HOST to an address of this machine.`)
}
