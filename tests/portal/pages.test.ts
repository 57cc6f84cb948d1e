import { mkdir } from 'node:fs/promises'
import path from 'node:path'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { cases } from '../../solvers/cases/index.ts'
import { seriousFaults } from './harness/axe.ts'
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

const looks = [
  { width: 390, theme: 'light' },
  { width: 390, theme: 'dark' },
  { width: 1440, theme: 'light' },
  { width: 1440, theme: 'dark' },
] as const

describe.each(looks)('at $width px, $theme', ({ width, theme }) => {
  let browser: Browser
  beforeAll(async () => {
    browser = await openBrowser({ width, theme })
  })
  afterAll(() => browser.close())

  async function look(sheet: Sheet) {
    const page = await browser.context.newPage()
    const faults = watch(page)
    await page.goto(portal.url + sheet.path)
    await page.locator(sheet.ready).first().waitFor()
    await page.waitForLoadState('networkidle')
    await page.evaluate('document.fonts.ready.then(() => undefined)')
    if (shots) await page.screenshot({ path: path.join(shots, nameOf(sheet.path, width, theme)), fullPage: true })
    const [title, overflow] = await page.evaluate<[string, number]>(
      '[document.title, document.documentElement.scrollWidth - innerWidth]',
    )
    expect(title).toContain('Soakstone')
    expect(overflow, 'sideways scroll').toBeLessThanOrEqual(0)
    expect(await page.locator('h1').count(), 'one title').toBe(1)
    expect(faults).toEqual([])
    expect(await seriousFaults(page, sheet.foreign)).toEqual([])
    await page.close()
  }

  test.each(strangers)('$path', look)

  test('the sheets of an account', async () => {
    const page = await browser.context.newPage()
    await signInAs(page, portal, 'owner')
    await page.close()
    for (const sheet of [...owners, ...calls.map((call) => ({ path: call, ready: '.drawing' }))]) await look(sheet)
  })

  test('the sheets of staff', async () => {
    const page = await browser.context.newPage()
    await signInAs(page, portal, 'support')
    await page.close()
    for (const sheet of [...staff, { path: `/staff${calls[1]}`, ready: 'form' }]) await look(sheet)
  })
})

test('no page scrolls sideways at 320 px, and none fails at 3840', async () => {
  for (const width of [320, 700, 1180, 3840]) {
    const browser = await openBrowser({ width })
    const page = await browser.context.newPage()
    await signInAs(page, portal, 'owner')
    for (const { path: address, ready } of [
      ...strangers,
      ...owners,
      ...calls.map((call) => ({ path: call, ready: '.drawing' })),
    ]) {
      await page.goto(portal.url + address)
      await page.locator(ready).first().waitFor()
      const overflow = await page.evaluate<number>('document.documentElement.scrollWidth - innerWidth')
      expect(overflow, `${address} at ${width} px`).toBeLessThanOrEqual(0)
    }
    await browser.close()
  }
})

function nameOf(address: string, width: number, theme: string): string {
  const name =
    address
      .replace(/req_[0-9a-f]+/, 'request')
      .replace(/\W+/g, '-')
      .replace(/^-|-$/g, '') || 'home'
  return `${name}-${width}-${theme}.png`
}
