import { mkdir } from 'node:fs/promises'
import path from 'node:path'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { cases } from '../../solvers/cases/index.ts'
import { seriousFaults, seriousRules } from './harness/axe.ts'
import { type Browser, openBrowser } from './harness/browser.ts'
import { type Portal, startPortal } from './harness/portal.ts'
import { featuresOf, sampleOfCases } from './harness/sample.ts'
import { signInAs } from './harness/sign-in.ts'
import { watch } from './harness/watch.ts'
import { proof, seed } from '../solvers/counts.ts'

/** A page's address, and what shows that it has all it waits for. */
interface Sheet {
  path: string
  ready: string
  /** Drawn by somebody else's program, whose own faults are listed apart. */
  foreign?: string
}

/** A case without temperatures over time has no curve to wait for. */
const sheetOf = ({ id, outputs }: (typeof cases)[number]): Sheet => ({
  path: `/cases/${id}`,
  ready: 'temperature' in outputs ? '[data-drawn]' : '[aria-label="Answer as JSON"]',
})
const sample = sampleOfCases()

const strangers: Sheet[] = [
  { path: '/', ready: '.drawing text.t-clay' },
  { path: '/cases', ready: '.case-group' },
  { path: '/cases?body=slab&question=how-hot', ready: '.case-group' },
  { path: '/cases?q=nothing+of+the+kind', ready: '.state' },
  ...cases.filter(({ id }) => sample.includes(id)).map(sheetOf),
  { path: '/docs', ready: '.entries' },
  { path: '/docs?q=nothing+of+the+kind', ready: '.state' },
  { path: '/docs/quick-start', ready: '.code' },
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
  { path: '/materials', ready: 'td' },
  { path: '/materials/concrete-dense-2400', ready: 'td' },
]
const staff: Sheet[] = [{ path: '/staff', ready: 'form' }]

const shots = process.env['SOAKSTONE_SHOTS']

let portal: Portal
let browser: Browser
let page: Page
let faults: string[]
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
  browser = await openBrowser({ width: 1440 })
  page = await browser.context.newPage()
  faults = watch(page)
})
afterAll(async () => {
  await browser.close()
  await portal.close()
})

interface Look {
  width: number
  theme: 'light' | 'dark'
}

const looks: Look[] = [390, 1440].flatMap((width) => [
  { width, theme: 'light' as const },
  { width, theme: 'dark' as const },
])
const betweenAndBeyond = [320, 700, 1180, 3840]

/** One visit of a page: each look at it, and its breaks. */
async function look({ path: address, ready, foreign }: Sheet, wanted: readonly Look[] = looks) {
  await page.setViewportSize({ width: wanted[0]!.width, height: 900 })
  await page.goto(portal.url + address)
  await page
    .locator(ready)
    .first()
    .waitFor()
    .catch((error: unknown) => {
      throw new Error([...faults.splice(0), String(error)].join('\n'))
    })
  await page.evaluate('document.fonts.ready.then(() => undefined)')
  expect(await page.title()).toContain('Soakstone')
  expect(await page.getByRole('heading', { level: 1 }).count(), 'one title').toBe(1)
  for (const { width, theme } of wanted) {
    await page.setViewportSize({ width, height: 900 })
    // Without motion, so that no colour is looked at half-way.
    await page.emulateMedia({ colorScheme: theme, reducedMotion: 'reduce' })
    await fits(width)
    if (shots) await page.screenshot({ path: path.join(shots, nameOf(address, width, theme)), fullPage: true })
    expect(await seriousFaults(page, foreign), `${width} px, ${theme}`).toEqual([])
  }
  for (const width of betweenAndBeyond) {
    await page.setViewportSize({ width, height: 900 })
    await fits(width)
  }
  expect(faults.splice(0)).toEqual([])
}

/** No sideways scroll, once the drawings have been redrawn for the width. */
async function fits(width: number) {
  await expect
    .poll(() => overflow(page), { message: `sideways scroll at ${width} px`, interval: 20 })
    .toBeLessThanOrEqual(0)
}

test('the sample has every body, boundary, kind of place and control that any case has', () => {
  const every = new Set(cases.flatMap(({ id }) => featuresOf(id)))
  expect(new Set(sample.flatMap(featuresOf))).toEqual(every)
  expect(every.size).toBeGreaterThan(10)
})

test.each(strangers)('$path in two widths and themes, and at its breaks', (sheet) => look(sheet), 120_000)

/* All in a proof run; else a third, which the seed of the run turns. */
const others = cases.filter(({ id }) => !sample.includes(id)).filter((_, i) => proof || (i + seed) % 3 === 0)

test.each(others.map((c, i) => ({ ...sheetOf(c), one: looks[i % looks.length]! })))(
  '$path in one width and theme, and at its breaks',
  ({ one, ...sheet }) => look(sheet, [one]),
  120_000,
)

test('the sheets of an account', async () => {
  await signInAs(page, portal, 'owner')
  for (const sheet of [...owners, ...calls.map((call) => ({ path: call, ready: '.drawing' }))]) await look(sheet)
}, 240_000)

test('the sheets of staff', async () => {
  await signInAs(page, portal, 'support')
  for (const sheet of [...staff, { path: `/staff${calls[1]}`, ready: 'form' }]) await look(sheet)
}, 240_000)

test('the faults of the foreign explorer are the known ones, opened and closed', async () => {
  const broken = new Set<string>()
  await page.setViewportSize({ width: 1440, height: 900 })
  await page.goto(`${portal.url}/reference`)
  await page.locator('.explorer .opblock').first().waitFor()
  for (const theme of ['light', 'dark'] as const) {
    await page.emulateMedia({ colorScheme: theme, reducedMotion: 'reduce' })
    for (const rule of await seriousRules(page, '.explorer')) broken.add(rule)
  }
  await page.locator('.explorer .opblock-post').filter({ hasText: '/solve' }).locator('button').first().click()
  await page.locator('.explorer .opblock-body').first().waitFor()
  for (const rule of await seriousRules(page, '.explorer')) broken.add(rule)
  expect([...broken].sort()).toEqual(['scrollable-region-focusable'])
}, 120_000)

const overflow = (page: Page) => page.evaluate<number>('document.documentElement.scrollWidth - innerWidth')

function nameOf(address: string, width: number, theme: string): string {
  const name =
    address
      .replace(/req_[0-9a-f]+/, 'request')
      .replace(/\W+/g, '-')
      .replace(/^-|-$/g, '') || 'home'
  return `${name}-${width}-${theme}.png`
}
