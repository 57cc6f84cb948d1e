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

/* Every element that takes part in the tab order; of radio buttons with one name a single one does. */
const reachable = `[...document.querySelectorAll('a[href], button:not([disabled]), input:not([disabled]), select, textarea, summary, [tabindex="0"]')]
  .filter((e) => e.tabIndex >= 0 && e.checkVisibility({ visibilityProperty: true }) && !(e.type === 'radio' && !e.checked))`

test.each([
  '/',
  '/cases',
  '/cases/slab-convection',
  '/cases/lumped-convection',
  '/problems',
  '/sign-up',
  '/keys',
  '/usage',
  '/requests',
  '/requests?status=refused',
  '/materials?group=concrete',
])('tab reaches everything on %s in reading order', async (address) => {
  const page = await browser.context.newPage()
  await signInAs(page, portal, 'owner')
  await page.goto(portal.url + address)
  await page.waitForLoadState('networkidle')
  await page.evaluate(`${reachable}.forEach((e, i) => e.setAttribute('data-stop', i))`)
  const stops = await page.evaluate<number>(`${reachable}.length`)
  const order: number[] = []
  for (let i = 0; i < stops + 3; i++) {
    await page.keyboard.press('Tab')
    const stop = await page.evaluate<string | null>(`document.activeElement?.getAttribute('data-stop') ?? null`)
    if (stop !== null && !order.includes(Number(stop))) order.push(Number(stop))
  }
  expect(order).toEqual([...order].sort((a, b) => a - b))
  expect(order.length, 'every stop is reached').toBe(stops)
  await page.close()
})

test('sliders move both cuts from the keyboard, and say value and unit', async () => {
  const page = await browser.context.newPage()
  await page.goto(`${portal.url}/cases/slab-convection`)
  const time = page.getByRole('slider', { name: 'Cut A–A at time' })
  await time.focus()
  const before = await time.getAttribute('aria-valuetext')
  await page.keyboard.press('ArrowRight')
  const after = await time.getAttribute('aria-valuetext')
  expect(after).not.toBe(before)
  expect(after).toMatch(/ h$/)
  expect(await page.getByRole('img', { name: new RegExp(`and ${after}:`) }).count()).toBe(1)
  const depth = page.getByRole('slider', { name: 'Cut B–B at depth' })
  await depth.focus()
  await page.keyboard.press('Home')
  expect(await depth.getAttribute('aria-valuetext')).toBe('0 mm')
  await page.close()
})

test('the theme is switched and remembered', async () => {
  const page = await browser.context.newPage()
  await page.goto(portal.url)
  await page.getByRole('button', { name: 'Switch to dark' }).click()
  await page.reload()
  await page.getByRole('button', { name: 'Switch to light' }).waitFor()
  expect(await page.evaluate('getComputedStyle(document.body).backgroundColor')).toBe('rgb(23, 28, 27)')
  await page.getByRole('button', { name: 'Switch to light' }).click()
  await page.close()
})

test('a dialog keeps the focus and gives it back', async () => {
  const page = await browser.context.newPage()
  await signInAs(page, portal, 'owner')
  const open = page.getByRole('button', { name: 'Create a key' })
  await open.click()
  for (let i = 0; i < 12; i++) {
    await page.keyboard.press('Tab')
    const outside = await page.evaluate(
      `document.activeElement !== document.body && !document.querySelector('dialog').contains(document.activeElement)`,
    )
    expect(outside).toBe(false)
  }
  await page.keyboard.press('Escape')
  await page.getByRole('dialog').waitFor({ state: 'detached' })
  expect(await open.evaluate((e) => e === e.ownerDocument.activeElement)).toBe(true)
  await page.close()
})
