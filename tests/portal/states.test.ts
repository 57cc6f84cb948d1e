import type { Page } from 'playwright-core'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { type Browser, openBrowser } from './harness/browser.ts'
import { type Portal, startPortal } from './harness/portal.ts'
import { signInAs } from './harness/sign-in.ts'

let portal: Portal
let browser: Browser
beforeAll(async () => {
  portal = await startPortal({ demo: true })
  browser = await openBrowser({ width: 1280 })
})
afterAll(async () => {
  await browser.close()
  await portal.close()
})

async function openCase(id: string): Promise<Page> {
  const page = await browser.context.newPage()
  await page.goto(`${portal.url}/cases/${id}`)
  await page.locator('.cuts').waitFor()
  return page
}

const staleParts = (page: Page) => page.locator('[data-stale]').count()
const solveButton = (page: Page) => page.locator('#case-form [type=submit]')

function refusal(code: string, status: number, retryable: boolean) {
  return JSON.stringify({ code, title: 'Too many calls in a short time', status, detail: 'Wait.', retryable })
}

test('without a connection a solve fails at once, says so, and is never sent later', async () => {
  const page = await openCase('slab-convection')
  const sent: string[] = []
  page.on('request', (request) => sent.push(request.url()))
  await page.context().setOffline(true)
  await page.getByRole('textbox', { name: 'Times' }).fill('3600, 7200')
  await solveButton(page).click()
  const offline = page.locator('#case-form .state')
  await offline.getByText('No connection since').waitFor()
  expect(await offline.innerText()).toMatch(/The numbers below were solved at \d\d:\d\d UTC/)
  expect(await solveButton(page).innerText()).toBe('Solve')
  expect(await staleParts(page), 'curve, answer and call').toBe(3)
  expect(await page.getByRole('textbox', { name: 'Times' }).inputValue(), 'typing is kept').toBe('3600, 7200')
  sent.length = 0
  await page.context().setOffline(false)
  await offline.waitFor({ state: 'detached' })
  await page.waitForTimeout(500)
  expect(sent.filter((url) => url.includes('/try/'))).toEqual([])
  await solveButton(page).click()
  await expect.poll(() => staleParts(page)).toBe(0)
  await page.close()
})

test('a slow solve can be left, and what is shown meanwhile is said to be old', async () => {
  const page = await openCase('slab-convection')
  let answer: (() => void) | undefined
  const held = new Promise<void>((resolve) => {
    answer = resolve
  })
  await page.route('**/try/**', async (route) => {
    await held
    await route.continue().catch(() => undefined)
  })
  await page.getByRole('textbox', { name: 'Times' }).fill('3600, 7200')
  await solveButton(page).click()
  await page.getByRole('button', { name: 'Cancel' }).waitFor()
  expect(await solveButton(page).innerText()).toBe('Solving')
  expect(await staleParts(page)).toBe(3)
  expect(await page.locator('[data-stale]').first().innerText()).toContain('These are the numbers of the last solve.')
  await page.getByRole('button', { name: 'Copy the answer of the last solve' }).waitFor()
  await page.getByRole('button', { name: 'Cancel' }).click()
  await expect.poll(() => solveButton(page).innerText()).toBe('Solve')
  expect(await staleParts(page)).toBe(3)
  answer?.()
  await page.unroute('**/try/**')
  await page.getByRole('button', { name: 'Solve again' }).first().click()
  await expect.poll(() => staleParts(page)).toBe(0)
  await page.close()
})

test('too many calls: the button counts the seconds and then sends', async () => {
  const page = await openCase('slab-convection')
  await page.route('**/try/**', (route) =>
    route.fulfill({
      status: 429,
      headers: { 'content-type': 'application/problem+json', 'retry-after': '2' },
      body: refusal('rate-limited', 429, true),
    }),
  )
  await page.getByRole('textbox', { name: 'Times' }).fill('3600, 7200')
  await solveButton(page).click()
  await expect.poll(() => solveButton(page).innerText()).toMatch(/^Try again in [12] s$/)
  expect(await solveButton(page).isDisabled()).toBe(true)
  expect(await page.locator('[data-stale]').first().innerText()).toContain(
    'These are the numbers of the last solve that was answered.',
  )
  expect(await page.getByText('Retry-After').count()).toBe(0)
  await page.unroute('**/try/**')
  await expect.poll(() => solveButton(page).innerText(), { timeout: 5000 }).toBe('Solve')
  await solveButton(page).click()
  await expect.poll(() => staleParts(page)).toBe(0)
  await page.close()
})

test('Send again stands only where the same call may succeed; a fact that cannot be read is a dash', async () => {
  const page = await browser.context.newPage()
  for (const [status, code, buttons] of [
    [422, 'invalid-input', 0],
    [500, 'internal', 2],
  ] as const) {
    await page.route('**/try/**', (route) =>
      route.fulfill({
        status,
        headers: { 'content-type': 'application/problem+json' },
        body: refusal(code, status, false),
      }),
    )
    await page.goto(portal.url)
    await page.locator('.state').nth(1).waitFor()
    expect(await page.getByRole('button', { name: 'Send again' }).count()).toBe(buttons)
    expect(await page.locator('.facts div', { hasText: 'Solver' }).innerText()).toMatch(/–$/)
    await page.unroute('**/try/**')
  }
  await page.close()
})

test.each(['slab-convection', 'semi-infinite-convection', 'lumped-convection'])(
  'a body that stays as warm as it was is drawn without a flaw: %s',
  async (id) => {
    const page = await openCase(id)
    await page.locator('[data-field=initialTemperature] input').fill('20')
    await page.locator('[data-field=ambientTemperature] input').fill('20')
    await solveButton(page).click()
    await page
      .getByRole('img', { name: /20\.00* °C/ })
      .first()
      .waitFor()
    expect(await page.locator('.drawing').evaluateAll((list) => list.map((e) => e.outerHTML).join())).not.toMatch(
      /NaN|Infinity/,
    )
    await page.close()
  },
)

test.each(['slab-convection', 'semi-infinite-convection'])(
  'the latest time of the contract has a curve: %s',
  async (id) => {
    const page = await openCase(id)
    await page.getByRole('textbox', { name: 'Times' }).fill('1e17')
    await solveButton(page).click()
    await page.getByRole('region', { name: 'Answer as JSON' }).getByText('100000000000000000').first().waitFor()
    // The curve of the example stands until the new one is solved.
    const cut = page.getByRole('slider', { name: 'Cut A–A at time' })
    await expect
      .poll(async () => {
        await cut.press('End')
        return cut.getAttribute('aria-valuetext')
      })
      .toMatch(/^3\.169 × 10⁹ a$/)
    expect(await page.locator('.state').count()).toBe(0)
    await page.close()
  },
)

test('the plan says what its hatching means, and nothing where there is none', async () => {
  const page = await openCase('slab-convection')
  await page.getByText(/^(Nowhere below 0 °C\. )?Hatched: below -?−?[\d.]+ °C\.$/).waitFor()
  await page.locator('[data-field=initialTemperature] input').fill('20')
  await page.locator('[data-field=ambientTemperature] input').fill('20')
  await solveButton(page).click()
  await page.getByText(/^.*Hatched: /).waitFor({ state: 'detached' })
  await page.close()
})

test('a session that has ended leads to the sign-in and back', async () => {
  const page = await browser.context.newPage()
  await signInAs(page, portal, 'owner')
  await page
    .getByRole('button', { name: /^Revoke / })
    .first()
    .waitFor()
  await page.context().clearCookies()
  await page.getByRole('link', { name: 'Usage' }).click()
  await page.waitForURL('**/sign-in?next=%2Fusage')
  const owner = portal.demo?.signIns.find(({ role }) => role === 'owner')
  await page.getByLabel('Mail address').fill(owner?.mail ?? '')
  await page.getByLabel('Password').fill(owner?.password ?? '')
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL('**/usage')
  await page.getByText('Quota today').waitFor()
  await page.close()
})

test('the dialog for a key starts in its first field, and Enter does not close it', async () => {
  const page = await browser.context.newPage()
  await signInAs(page, portal, 'owner')
  await page.getByRole('button', { name: 'Create a key' }).click()
  await expect.poll(() => page.getByLabel('Name').evaluate((e) => e === e.ownerDocument.activeElement)).toBe(true)
  await page.keyboard.press('Enter')
  await page.locator('dialog .err').first().waitFor()
  await page.close()
})

interface Box {
  left: number
  right: number
  top: number
  bottom: number
}

const meet = (a: Box, b: Box) => a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom

test('on a narrow sheet no figure covers another, and a drawing keeps to its column', async () => {
  const page = await browser.context.newPage()
  await page.setViewportSize({ width: 390, height: 800 })
  await signInAs(page, portal, 'owner')
  const account = { limit: 100_000, used: 90_399, resetsAt: '2031-01-02T00:00:00.000Z' }
  await page.route('**/portal/v1/usage?*', async (route) => {
    const whole = (await (await route.fetch()).json()) as Record<string, unknown>
    await route.fulfill({ json: { ...whole, asOf: '2031-01-01T06:00:00.000Z', account } })
  })
  await page.goto(`${portal.url}/usage`)
  const wall = page.getByRole('img', { name: /^Quota/ })
  await wall.getByText('spent 90').waitFor()
  await wall.getByText('expected').waitFor()
  const boxes = await wall.locator('text').evaluateAll((list) =>
    list.map((e) => {
      const { left, right, top, bottom } = (e as unknown as { getBoundingClientRect(): Box }).getBoundingClientRect()
      return { left, right, top, bottom }
    }),
  )
  const pairs = boxes.flatMap((a, i) => boxes.slice(i + 1).map((b) => meet(a, b)))
  expect(pairs).not.toContain(true)

  await page.goto(`${portal.url}/cases/no-such-case`)
  const state = page.locator('.state')
  await state.waitFor()
  const drawing = await state.locator('.drawing').boundingBox()
  const words = await state.getByRole('link').boundingBox()
  expect((drawing?.x ?? 0) + (drawing?.width ?? 0)).toBeLessThanOrEqual(words?.x ?? 0)

  await page.goto(`${portal.url}/cases/lumped-varying-ambient`)
  const formula = page.getByRole('region', { name: 'Formula' })
  await formula.locator('math').first().waitFor()
  await page.getByText('Wider than the sheet: it scrolls sideways.').waitFor()
  await formula.focus()
  await page.keyboard.press('ArrowRight')
  await expect
    .poll(() => formula.evaluate((e) => (e as unknown as { scrollLeft: number }).scrollLeft))
    .toBeGreaterThan(0)
  await page.close()
})
