import { afterAll, beforeAll, expect, test } from 'vitest'
import { caseEntries, found, guideEntries } from '../../portal/src/features/docs/finding.ts'
import { guides } from '../../portal/src/features/docs/guides.ts'
import { cases } from '../../solvers/cases/index.ts'
import { type Browser, openBrowser } from './harness/browser.ts'
import { type Portal, startPortal } from './harness/portal.ts'
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

test.each(guides.map((guide) => [guide.slug, guide] as const))(
  'every call of the guide %s is answered as it stands, and every link leads somewhere',
  async (_, { parts, links = [] }) => {
    for (const { call } of parts) {
      if (!call) continue
      const answer = await fetch(portal.url + call.path, {
        method: 'POST',
        headers: { authorization: `Bearer ${portal.demo?.key}`, 'content-type': 'application/json' },
        body: JSON.stringify(call.body),
      })
      expect(answer.status, await answer.text()).toBe(200)
    }
    const contract = (await (await fetch(`${portal.url}/v1/openapi.json`)).json()) as Record<string, object>
    const codes = ['x-problems', 'x-error-codes', 'x-warnings'].flatMap((table) => Object.keys(contract[table] ?? {}))
    const known = [
      ...cases.map(({ id }) => `/cases/${id}`),
      ...codes.map((code) => `/problems/${code}`),
      ...['/cases', '/problems', '/materials', '/usage', '/sign-up'],
    ]
    for (const { to } of links) expect(known).toContain(to)
  },
)

test('a search finds guides, cases and codes by all of the words, the named ones first', () => {
  const entries = [...guideEntries(guides), ...caseEntries(cases)]
  expect(found(entries, 'slab-convection')[0]?.to).toBe('/cases/slab-convection')
  expect(found(entries, 'MATERIAL unit').map(({ to }) => to)).toContain('/docs/units-and-materials')
  expect(found(entries, 'nothing of the kind')).toEqual([])
  expect(found(entries, '  ')).toEqual([])
})

test('the docs are read and searched; the words stand in the address', async () => {
  const page = await browser.context.newPage()
  const faults = watch(page)
  await page.goto(portal.url)
  await page.getByRole('navigation', { name: 'Public sheets' }).getByRole('link', { name: 'Docs' }).click()
  await page.getByRole('heading', { level: 1, name: 'Docs' }).waitFor()
  await page.getByRole('link', { name: 'Quick start' }).click()
  await page.getByRole('heading', { level: 1, name: 'Quick start' }).waitFor()
  await page.getByRole('tab', { name: 'Python' }).click()
  await page.getByRole('region', { name: 'Send the call, Python' }).getByText('import urllib.request').waitFor()
  await page.getByRole('link', { name: 'All guides' }).click()
  await page.getByLabel('Find in guides, cases and codes').fill('retry')
  const results = page.getByRole('region', { name: 'Found' })
  await results.getByRole('link', { name: 'Refusals, and what to send again' }).waitFor()
  await expect.poll(() => page.url()).toBe(`${portal.url}/docs?q=retry`)
  await page.getByLabel('Find in guides, cases and codes').fill('unit-not-accepted')
  await results.getByRole('link').first().waitFor()
  await expect.poll(() => results.getByRole('link').first().getAttribute('href')).toBe('/problems/unit-not-accepted')
  await page.getByLabel('Find in guides, cases and codes').fill('nothing of the kind')
  await page.getByText('Nothing has all of these words').waitFor()
  expect(faults).toEqual([])
  await page.close()
})
