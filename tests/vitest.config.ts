import { fileURLToPath } from 'node:url'
import { defineConfig } from 'vitest/config'

const seed = Number(process.env['SOAKSTONE_SEED'] || 1)

export default defineConfig({
  root: fileURLToPath(new URL('..', import.meta.url)),
  test: {
    include: ['tests/**/*.test.{ts,tsx}'],
    globalSetup: ['tests/global-setup.ts'],
    pool: 'forks',
    maxWorkers: 2,
    testTimeout: process.env['SOAKSTONE_PROOF'] === '1' ? 30 * 60_000 : 60_000,
    hookTimeout: 120_000,
    expect: { poll: { timeout: 20_000 } },
    teardownTimeout: 30_000,
    sequence: { seed },
    allowOnly: false,
    passWithNoTests: false,
    restoreMocks: true,
  },
})
