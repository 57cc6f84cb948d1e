import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { type BrowserContext, chromium } from 'playwright-core'

export interface Look {
  width: number
  height?: number
  theme?: 'light' | 'dark'
}

const flags = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
]

export interface Browser {
  context: BrowserContext
  close(): Promise<void>
}

/** Debian's Chromium with a profile of its own, which is removed again. */
export async function openBrowser({ width, height = 900, theme = 'light' }: Look): Promise<Browser> {
  const profile = await mkdtemp(path.join(tmpdir(), 'soakstone-browser-'))
  const context = await chromium.launchPersistentContext(profile, {
    executablePath: process.env['CHROMIUM'] ?? '/usr/bin/chromium',
    headless: true,
    args: flags,
    viewport: { width, height },
    colorScheme: theme,
    permissions: ['clipboard-read', 'clipboard-write'],
  })
  context.setDefaultTimeout(15_000)
  return {
    context,
    async close() {
      await context.close()
      await rm(profile, { recursive: true, force: true })
    },
  }
}
