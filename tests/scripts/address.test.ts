import { createServer } from 'node:net'
import { expect, test } from 'vitest'
import { addressOf, refuseBusyPort } from '../../scripts/address.mjs'

test.each([
  [{}, { host: '127.0.0.1', port: 4600, local: 'http://127.0.0.1:4600', publicUrl: 'http://127.0.0.1:4600' }],
  [
    { HOST: '0.0.0.0', PORT: '80' },
    { host: '0.0.0.0', port: 80, local: 'http://127.0.0.1:80' },
  ],
  [{ HOST: '::1' }, { local: 'http://[::1]:4600' }],
  [{ PUBLIC_URL: 'https://api.example.org' }, { local: 'http://127.0.0.1:4600', publicUrl: 'https://api.example.org' }],
])('%j', (env, address) => {
  expect(addressOf(env)).toMatchObject(address)
})

test.each(['0', '65536', '46x', '4.5', '-1'])('PORT %s is refused by name', (PORT) => {
  expect(() => addressOf({ PORT })).toThrow(`PORT is "${PORT}": set it to a whole number from 1 to 65535.`)
})

test('a port in use is named, with another to try', async () => {
  const server = createServer().listen(0, '127.0.0.1')
  await new Promise((resolve) => server.once('listening', resolve))
  const { port } = server.address() as { port: number }
  const address = addressOf({ PORT: String(port) })
  await expect(refuseBusyPort(address)).rejects.toThrow(`Port ${port} of 127.0.0.1 is in use`)
  await new Promise((resolve) => server.close(resolve))
  await expect(refuseBusyPort(address)).resolves.toBeUndefined()
})

test('an address of another machine is refused', async () => {
  await expect(refuseBusyPort(addressOf({ HOST: '192.0.2.1' }))).rejects.toThrow(
    'set HOST to an address of this machine',
  )
})
