import { afterAll, beforeAll, expect, test } from 'vitest'
import { type Browser, openBrowser } from './harness/browser.ts'
import { type Portal, startPortal } from './harness/portal.ts'
import { signInAs } from './harness/sign-in.ts'
import { watch } from './harness/watch.ts'

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

const wall = {
  conductivity: 2,
  density: 2400,
  specificHeat: 1000,
  thickness: 0.2,
  exposedFaces: 2,
  filmCoefficient: 10,
  initialTemperature: 20,
  ambientTemperature: -5,
  depths: [0, 0.1],
  times: [3600, 36000],
}

test('a person signs up, makes a key, calls with it and finds the call; support finds it too', async () => {
  const page = await browser.context.newPage()
  const faults = watch(page)
  await page.goto(portal.url)
  await page.getByRole('link', { name: 'Get a key' }).first().click()
  await page.getByLabel('Your name').fill('Jo Tester')
  await page.getByLabel('Account name').fill('Test House')
  await page.getByLabel('Mail address').fill('jo.tester@example.org')
  await page.getByLabel('Password').fill('quiet lime plaster 47')
  await page.getByRole('button', { name: 'Sign up' }).click()
  await page.waitForURL('**/keys')
  await expect.poll(() => page.getByText('No keys yet').isVisible()).toBe(true)

  await page.getByRole('button', { name: 'Create a key' }).click()
  await page.getByLabel('Name').fill('first tool')
  await page.getByLabel('Own quota').fill('5 000')
  await page.getByRole('button', { name: 'Create and show once' }).click()
  const done = page.getByRole('button', { name: 'Done' })
  await done.waitFor()
  expect(await done.isDisabled()).toBe(true)
  await page.keyboard.press('Escape')
  expect(await done.isVisible(), 'the secret stays until it is stored').toBe(true)
  await page.getByRole('button', { name: 'Copy the key' }).click()
  const secret = await page.evaluate<string>('navigator.clipboard.readText()')
  expect(secret).toMatch(/^soak_trial_[0-9A-Za-z]{38}$/)
  await page.getByLabel('I have stored it').check()
  await done.click()
  await page.getByRole('row', { name: /first tool/ }).waitFor()
  expect(await page.content(), 'nobody can read it again').not.toContain(secret)

  const answer = await fetch(`${portal.url}/v1/cases/slab-convection/solve`, {
    method: 'POST',
    headers: { authorization: `Bearer ${secret}`, 'content-type': 'application/json' },
    body: JSON.stringify(wall),
  })
  expect(answer.status).toBe(200)
  const requestId = answer.headers.get('request-id') ?? ''
  await answer.arrayBuffer()
  await portal.service.service.deps.requestLog.flush()

  await page.getByRole('link', { name: 'Usage' }).click()
  // The sheet of the keys, which also has such a row, stands until the next one is loaded.
  await page.getByRole('heading', { level: 1, name: 'Usage' }).waitFor()
  const row = page.getByRole('row', { name: /first tool/ })
  await row.waitFor()
  expect(await row.innerText()).toMatch(/slab-convection\s+1\s+0\s+10\s+100\.0/)

  await page.getByRole('link', { name: 'Requests' }).click()
  await page.locator(`a[href="/requests/${requestId}"]`).click()
  await page.getByText('was answered with 200').waitFor()
  expect(await page.getByRole('row', { name: /charge/ }).innerText()).toMatch(/10$/)
  expect(await page.getByRole('main').innerText()).toContain(requestId)

  await signInAs(page, portal, 'support')
  await page.getByLabel('Request id or key prefix').fill(requestId)
  await page.getByLabel('Reason').fill('The customer asks what the call cost.')
  await page.getByRole('button', { name: 'Find' }).click()
  const found = page.getByRole('row', { name: /Test House/ })
  await found.waitFor()
  await found.getByRole('link').click()
  await page.getByText('On record.').waitFor()
  const seen = await page.getByRole('main').innerText()
  expect(seen).toContain('The customer asks what the call cost.')
  expect(seen).toContain(requestId)
  expect(seen, 'never a secret').not.toContain(secret)
  expect(seen, 'never a mail address').not.toContain('jo.tester@example.org')
  expect(faults).toEqual([])
  await page.close()
}, 120_000)

test('a revoked key is refused, and the dialog says so before', async () => {
  const page = await browser.context.newPage()
  await signInAs(page, portal, 'owner')
  await page.getByRole('button', { name: 'Create a key' }).click()
  await page.getByLabel('Name').fill('short-lived')
  await page.getByRole('button', { name: 'Create and show once' }).click()
  const secret = await page.locator('[data-secret]').innerText()
  await page.getByLabel('I have stored it').check()
  await page.getByRole('button', { name: 'Done' }).click()
  await page.getByRole('button', { name: 'Revoke short-lived' }).click()
  await page.getByText('answered 401 within a second').waitFor()
  await page.getByRole('button', { name: 'Revoke the key' }).click()
  await page.getByText(/^Revoked /).waitFor()
  const answer = await fetch(`${portal.url}/v1/usage`, { headers: { authorization: `Bearer ${secret.trim()}` } })
  expect(answer.status).toBe(401)
  await page.close()
})

test('what the service refuses lands on its field', async () => {
  const page = await browser.context.newPage()
  await page.goto(`${portal.url}/cases/slab-convection`)
  const depths = page.getByRole('textbox', { name: 'Depths' })
  await depths.fill('0, 0.4')
  await page.getByRole('button', { name: 'Solve', exact: true }).click()
  const refusal = page.locator('[data-field=depths] .err')
  await refusal.waitFor()
  expect(await refusal.innerText()).toContain('The body ends at 0.2 m')
  expect(await depths.getAttribute('aria-invalid')).toBe('true')
  expect(await page.getByText('older than your last change').isVisible(), 'the numbers shown are said to be old').toBe(
    true,
  )

  await depths.fill('0, 0.04')
  await page.getByRole('button', { name: 'Solve', exact: true }).click()
  await refusal.waitFor({ state: 'detached' })
  await page.getByRole('region', { name: 'Answer as JSON' }).getByText('0.04').first().waitFor()
  await page.close()
})

test('a reader sees usage and is told who may see keys', async () => {
  const page = await browser.context.newPage()
  await page.context().clearCookies()
  await signInAs(page, portal, 'reader')
  await page.getByText('Not in your role').waitFor()
  await page.getByRole('link', { name: 'Usage' }).click()
  await page.getByText('Quota today').waitFor()
  await page.close()
})

test('signing out ends the session, and a deep link comes back after signing in', async () => {
  const page = await browser.context.newPage()
  await signInAs(page, portal, 'owner')
  await page.getByRole('button', { name: 'Sign out' }).click()
  await page.waitForURL(`${portal.url}/`)
  await page.goto(`${portal.url}/requests?status=refused`)
  await page.waitForURL('**/sign-in?next=**')
  const owner = portal.demo?.signIns.find(({ role }) => role === 'owner')
  await page.getByLabel('Mail address').fill(owner?.mail ?? '')
  await page.getByLabel('Password').fill(owner?.password ?? '')
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL('**/requests?status=refused')
  await page
    .getByRole('row', { name: /invalid-input/ })
    .first()
    .waitFor()
  expect(await page.getByRole('row', { name: / 200 / }).count()).toBe(0)
  await page.close()
})
