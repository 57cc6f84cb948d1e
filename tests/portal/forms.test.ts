import { readFile } from 'node:fs/promises'
import type { Page } from 'playwright-core'
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

test('a sign-up that is refused names the fields as the form does', async () => {
  const page = await browser.context.newPage()
  await page.goto(`${portal.url}/sign-up`)
  await page.getByText('at least 15 characters').waitFor()
  await page.getByRole('button', { name: 'Sign up' }).click()
  await page.locator('.err').first().waitFor()
  const said = (await page.locator('form').innerText()).replace(/\s+/g, ' ')
  expect(said).toContain('Account name must have')
  expect(said).not.toMatch(/accountName/)
  await page.close()
})

test('a refused number is told with label and unit of the form', async () => {
  const page = await browser.context.newPage()
  await page.goto(`${portal.url}/cases/slab-convection`)
  await page.locator('[data-field=filmCoefficient] input').fill('-1')
  await page.getByRole('button', { name: 'Solve', exact: true }).click()
  const said = page.locator('[data-field=filmCoefficient] .err')
  await said.waitFor()
  expect(await said.innerText()).toMatch(/^Film coefficient is \u22121.*W\/\(m²·K\)/s)
  await page.close()
})

test('what stands in a form, with units and material, is in the address; whoever opens it sees the same answer', async () => {
  const page = await browser.context.newPage()
  await page.goto(`${portal.url}/cases/slab-convection`)
  await page.locator('.cuts').waitFor()
  expect(new URL(page.url()).search, 'the example needs no address').toBe('')
  await page.getByRole('radio', { name: 'material' }).check({ force: true })
  await page.locator('[data-field=material] input').fill('clay-brick-solid-1800')
  await page.locator('[data-field=thickness] input').fill('36')
  await page.getByLabel('Unit of Thickness').selectOption('cm')
  await page.getByRole('textbox', { name: 'Times' }).fill('1, 10')
  await page.getByLabel('Unit of Times').selectOption('h')
  await page.getByRole('button', { name: 'Solve', exact: true }).click()
  const answer = page.getByRole('region', { name: 'Answer as JSON' })
  await answer.getByText('"clay-brick-solid-1800"').first().waitFor()
  await answer.getByText('[3600, 36000]').first().waitFor()
  await expect.poll(() => new URL(page.url()).searchParams.get('thickness')).toBe('36 cm')
  await expect.poll(() => new URL(page.url()).searchParams.get('times')).toBe('1, 10 h')
  const shown = await answer.innerText()
  await page.getByRole('button', { name: 'Copy a link to it' }).click()
  const link = await page.evaluate<string>('navigator.clipboard.readText()')

  const other = await browser.context.newPage()
  await other.goto(link)
  await other.locator('.cuts').waitFor()
  const found = other.getByRole('region', { name: 'Answer as JSON' })
  // The answer, the curve and what is known of the material come one after another.
  await expect.poll(async () => JSON.parse(await found.innerText()) as unknown).toEqual(JSON.parse(shown))
  await expect.poll(() => other.getByLabel('Unit of Times').inputValue()).toBe('h')
  const material = other.locator('[data-field=material] .hint[role=status]')
  await expect.poll(() => material.innerText()).toMatch(/ρ 1800/)
  await other.getByRole('button', { name: 'Back to the example' }).click()
  await expect.poll(() => new URL(other.url()).search).toBe('')
  await other.goto(link.replace('36', '-36'))
  await other.locator('[data-field=thickness] .err').waitFor()
  await other.close()
  await page.close()
}, 60_000)

async function saved(page: Page, button: string): Promise<Buffer> {
  const download = page.waitForEvent('download')
  await page.getByRole('button', { name: button }).click()
  return readFile(await (await download).path())
}

test('a curve is saved as it is seen, and its numbers to their last digit', async () => {
  const page = await browser.context.newPage()
  const faults = watch(page)
  await page.goto(`${portal.url}/cases/slab-convection`)
  await page.locator('.cuts').waitFor()
  const svg = (await saved(page, 'Save as SVG')).toString()
  expect(svg).toMatch(/^<svg xmlns="http:\/\/www\.w3\.org\/2000\/svg"/)
  expect(svg).toMatch(/<pattern id="[^"]+"/)
  expect(svg, 'it stands without the sheet').not.toMatch(/class=|var\(|url\("| style=/)
  const png = await saved(page, 'Save as PNG')
  expect(png.subarray(1, 4).toString()).toBe('PNG')
  expect(png.readUInt32BE(16), 'two pixels for one').toBeGreaterThan(2000)
  const answer = JSON.parse(await page.getByRole('region', { name: 'Answer as JSON' }).innerText()) as {
    result: { temperature: number[][] }
  }
  await page.getByRole('button', { name: 'Table' }).click()
  expect(await page.getByRole('button', { name: /^Save as/ }).count()).toBe(0)
  const csv = (await saved(page, 'Save all numbers as CSV')).toString().split('\r\n')
  expect(csv[0]).toMatch(/^"time, s","temperature at depth 0 m, Cel",/)
  const row =
    csv
      .find((line) => line.startsWith('3600,'))
      ?.split(',')
      .map(Number) ?? []
  expect(row[1]).toBe(answer.result.temperature[0]?.[0])
  expect(faults).toEqual([])
  await page.close()
})

test.each(['1,000', '1 000', '1000'])('a quota may be written as %s', async (typed) => {
  const page = await browser.context.newPage()
  await signInAs(page, portal, 'owner')
  await page.getByRole('button', { name: 'Create a key' }).click()
  const name = `quota ${typed}`
  await page.getByLabel('Name').fill(name)
  await page.getByLabel('Own quota').fill(typed)
  await page.getByRole('button', { name: 'Create and show once' }).click()
  await page.getByLabel('I have stored it').check()
  await page.getByRole('button', { name: 'Done' }).click()
  const row = page.getByRole('row', { name: new RegExp(name) })
  await row.waitFor()
  expect(await row.innerText()).toContain('1\u202f000')
  await page.getByRole('button', { name: `Revoke ${name}` }).click()
  await page.getByText('It has never been used.').waitFor()
  await page.close()
})

test('a key pasted whole is cut to its prefix before anything is sent', async () => {
  const page = await browser.context.newPage()
  await signInAs(page, portal, 'support')
  const key = portal.demo?.key ?? ''
  const query = page.getByLabel('Request id or key prefix')
  await query.fill(key)
  await page.getByText('The key was cut to its prefix. Tell the customer to revoke it.').waitFor()
  expect(await query.inputValue()).toBe(key.slice(0, 'soak_trial_'.length + 6))
  await page.getByLabel('Reason').fill('The customer pasted a key.')
  const sent = page.waitForRequest('**/support/v1/find')
  await page.getByRole('button', { name: 'Find' }).click()
  expect((await sent).postData()).not.toContain(key)
  await page.locator('td code[title^=req_]').first().waitFor()
  await page.close()
})

test('the explorer asks for a key in words, once, and folds the samples of refusals', async () => {
  const page = await browser.context.newPage()
  await page.goto(`${portal.url}/reference`)
  await page.locator('.explorer .opblock').first().waitFor()
  expect(await page.getByText('Authorize', { exact: true }).count()).toBe(0)
  expect(await page.locator('.explorer .authorization__btn').count()).toBe(0)
  await page.locator('.explorer .opblock-post button').first().click()
  await page.locator('.explorer tr.response').first().waitFor()
  expect(await page.locator('.explorer tr.response[data-code="422"] .model-example').first().isVisible()).toBe(false)
  await page.getByRole('button', { name: 'Enter a key' }).click()
  await page.getByLabel('Key', { exact: true }).fill(portal.demo?.key ?? '')
  await page.keyboard.press('Enter')
  await page.getByRole('button', { name: 'Change the key' }).waitFor()
  await page.getByLabel('Questions of the case').selectOption('slab-convection')
  await page.locator('.explorer .opblock', { hasText: '/v1/cases/slab-convection/solve' }).first().waitFor()
  await page.getByRole('button', { name: 'Change the key' }).waitFor()
  const usage = page.locator('.explorer .opblock', { hasText: '/v1/usage' })
  await usage.locator('button').first().click()
  await usage.getByRole('button', { name: 'Try it out' }).click()
  const sent = page.waitForRequest('**/v1/usage*')
  await usage.getByRole('button', { name: 'Execute' }).click()
  expect((await (await sent).allHeaders())['authorization']).toBe(`Bearer ${portal.demo?.key}`)
  await page.close()
})
