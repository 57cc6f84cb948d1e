import { mkdtemp, rm } from 'node:fs/promises'
import { createServer } from 'node:net'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { type Demo, seedDemo } from '../../../api/demo/seed-demo.ts'
import { type TestService, startTestService } from '../../api/harness/service.ts'
import { built } from './built.ts'

export interface Portal {
  url: string
  service: TestService
  /** Sign-ins of the demo, where it was asked for. */
  demo: Demo | undefined
  close(): Promise<void>
}

/** The service with the built portal, under an address that a browser can reach. */
export async function startPortal({ demo = false } = {}): Promise<Portal> {
  await built()
  const port = await freePort()
  const url = `http://127.0.0.1:${port}`
  const service = await startTestService({ env: { PORT: String(port), PUBLIC_URL: url } })
  const folder = await mkdtemp(path.join(tmpdir(), 'soakstone-demo-'))
  return {
    url,
    service,
    demo: demo ? await seedDemo({ pool: service.service.deps.pool, folder, publicUrl: url }) : undefined,
    async close() {
      await service.close()
      await rm(folder, { recursive: true, force: true })
    },
  }
}

async function freePort(): Promise<number> {
  const server = createServer()
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const { port } = server.address() as AddressInfo
  await new Promise((resolve) => server.close(resolve))
  return port
}
