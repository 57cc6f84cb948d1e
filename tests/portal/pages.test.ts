import { mkdir } from 'node:fs/promises'
import path from 'node:path'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { cases } from '../../solvers/cases/index.ts'
import { seriousFaults, seriousRules } from './harness/axe.ts'
import { type Browser, openBrowser } from './harness/browser.ts'
import { type Portal, startPortal } from './harness/portal.ts'
import { signInAs } from './harness/sign-in.ts'
import { watch } from './harness/watch.ts'

/** A page's address, and what shows that it has all it waits for. */
interface Sheet {
  path: string
  ready: string
  /** Drawn by somebody else's program, whose own faults are listed apart. */
  foreign?: string
}

const strangers: Sheet[] = [
  { path: '/', ready: '.drawing text.t-clay' },
  { path: '/cases', ready: '.case-group' },
  ...cases.map(({ id }) => ({ path: `/cases/${id}`, ready: '.cuts' })),
  { path: '/reference', ready: '.explorer .opblock', foreign: '.explorer' },
  { path: '/problems', ready: 'td' },
  { path: '/problems/depth-outside-body', ready: '.lead' },
  { path: '/sign-up', ready: 'form' },
  { path: '/sign-in', ready: 'form' },
  { path: '/staff/sign-in', ready: 'form' },
  { path: '/no/such/sheet', ready: '.state' },
]
const owners: Sheet[] = [
  { path: '/keys', ready: 'td' },
  { path: '/usage', ready: '.series' },
  { path: '/requests', ready: 'td' },
  { path: '/requests?status=refused', ready: 'td' },
]
const staff: Sheet[] = [{ path: '/staff', ready: 'form' }]

const shots = process.env['SOAKSTONE_SHOTS']

let portal: Portal
/** Addresses of an answered and a refused call. */
let calls: string[]
beforeAll(async () => {
  portal = await startPortal({ demo: true })
  const pick = async (where: string) =>
    (
      await portal.service.service.deps.pool.query<{ id: string }>(
        `SELECT id FROM log WHERE ${where} ORDER BY id DESC LIMIT 1`,
      )
    ).rows[0]?.id
  calls = [await pick('status = 200'), await pick('status = 422')].map((id) => `/requests/${id}`)
  if (shots) await mkdir(shots, { recursive: true })
})
afterAll(() => portal.close())

const themes = ['light', 'dark'] as const
const betweenAndBeyond = [320, 700, 1180, 3840]

describe.each([390, 1440])('at %d px, light and dark', (width) => {
  let browser: Browser
  let page: Page
  let faults: string[]
  beforeAll(async () => {
    browser = await openBrowser({ width })
    page = await browser.context.newPage()
    faults = watch(page)
  })
  afterAll(() => browser.close())

  async function look({ path: address, ready, foreign }: Sheet) {
    await page.goto(portal.url + address)
    await page.locator(ready).first().waitFor()
    await page.evaluate('document.fonts.ready.then(() => undefined)')
    expect(await page.title()).toContain('Soakstone')
    expect(await page.getByRole('heading', { level: 1 }).count(), 'one title').toBe(1)
    for (const theme of themes) {
      // Without motion, so that no colour is looked at half-way.
      await page.emulateMedia({ colorScheme: theme, reducedMotion: 'reduce' })
      if (shots) await page.screenshot({ path: path.join(shots, nameOf(address, width, theme)), fullPage: true })
      expect(await overflow(page), 'sideways scroll').toBeLessThanOrEqual(0)
      expect(await seriousFaults(page, foreign), theme).toEqual([])
    }
    expect(faults.splice(0)).toEqual([])
  }

  test.each(strangers)('$path', look, 120_000)

  test('the sheets of an account', async () => {
    await signInAs(page, portal, 'owner')
    for (const sheet of [...owners, ...calls.map((call) => ({ path: call, ready: '.drawing' }))]) await look(sheet)
  }, 240_000)

  test('the sheets of staff', async () => {
    await signInAs(page, portal, 'support')
    for (const sheet of [...staff, { path: `/staff${calls[1]}`, ready: 'form' }]) await look(sheet)
  }, 240_000)
})

test('the faults of the foreign explorer are the known ones, opened and closed', async () => {
  const browser = await openBrowser({ width: 1440 })
  const page = await browser.context.newPage()
  const broken = new Set<string>()
  await page.goto(`${portal.url}/reference`)
  await page.locator('.explorer .opblock').first().waitFor()
  for (const theme of themes) {
    await page.emulateMedia({ colorScheme: theme, reducedMotion: 'reduce' })
    for (const rule of await seriousRules(page, '.explorer')) broken.add(rule)
  }
  await page.locator('.explorer .opblock-post button').first().click()
  await page.locator('.explorer .opblock-body').first().waitFor()
  for (const rule of await seriousRules(page, '.explorer')) broken.add(rule)
  expect([...broken].sort()).toEqual(['scrollable-region-focusable'])
  await browser.close()
}, 120_000)

test('no page scrolls sideways at 320 px, at the breaks, and on a very wide screen', async () => {
  const browser = await openBrowser({ width: 320 })
  const page = await browser.context.newPage()
  await signInAs(page, portal, 'owner')
  for (const { path: address, ready } of [
    ...strangers,
    ...owners,
    ...calls.map((call) => ({ path: call, ready: '.drawing' })),
  ]) {
    await page.setViewportSize({ width: 320, height: 900 })
    await page.goto(portal.url + address)
    await page.locator(ready).first().waitFor()
    for (const width of betweenAndBeyond) {
      await page.setViewportSize({ width, height: 900 })
      await expect.poll(() => overflow(page), { message: `${address} at ${width} px` }).toBeLessThanOrEqual(0)
    }
  }
  await browser.close()
}, 240_000)

const overflow = (page: Page) => page.evaluate<number>('document.documentElement.scrollWidth - innerWidth')

function nameOf(address: string, width: number, theme: string): string {
  const name =
    address
      .replace(/req_[0-9a-f]+/, 'request')
      .replace(/\W+/g, '-')
      .replace(/^-|-$/g, '') || 'home'
  return `${name}-${width}-${theme}.png`
}
