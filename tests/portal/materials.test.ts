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

async function openMaterials(role: string): Promise<Page> {
  const page = await browser.context.newPage()
  await page.context().clearCookies()
  await signInAs(page, portal, role)
  await page.getByRole('link', { name: 'Materials' }).click()
  await page.getByRole('heading', { level: 1, name: 'Materials' }).waitFor()
  await page.getByRole('link', { name: 'Concrete, high density 2400' }).waitFor()
  return page
}

async function keep(page: Page, name: string): Promise<void> {
  await page.getByRole('button', { name: 'Keep a material' }).click()
  await page.getByLabel('Name').fill(name)
  await page.getByLabel('Conductivity').fill('0.72')
  await page.getByLabel('Density').fill('1650')
  await page.getByLabel('Specific heat').fill('950')
  await page.getByLabel('State').selectOption('dry')
  await page.getByLabel('Source').fill('Own report 12')
  await page.getByLabel('Confidence').selectOption('medium')
  await page.getByRole('button', { name: 'Keep it' }).click()
  await page.getByRole('heading', { level: 1, name }).waitFor()
}

const own = (page: Page) => page.getByRole('region', { name: 'Own materials' })

async function solveWith(material: string): Promise<Response> {
  return fetch(`${portal.url}/v1/cases/slab-convection/solve`, {
    method: 'POST',
    headers: { authorization: `Bearer ${portal.demo?.key}`, 'content-type': 'application/json' },
    body: JSON.stringify({
      material,
      thickness: 0.2,
      exposedFaces: 2,
      filmCoefficient: 10,
      initialTemperature: 20,
      ambientTemperature: -5,
      depths: [0.1],
      times: [3600],
    }),
  })
}

test('an integrator keeps a material, a key solves with it, and it is changed and deleted', async () => {
  const page = await openMaterials('integrator')
  const faults = watch(page)
  await keep(page, 'North render')
  const id = page.url().split('/').at(-1) ?? ''
  expect(id).toMatch(/^mat_/)
  const main = page.getByRole('main')
  expect(await main.innerText()).toMatch(/State dry/)
  expect(await main.innerText()).toMatch(/Confidence medium: typical within a range/)
  const solved = await solveWith(id)
  expect(solved.status).toBe(200)
  expect(((await solved.json()) as { input: { material: object } }).input.material).toMatchObject({
    id,
    source: 'Own report 12',
  })

  await page.getByRole('button', { name: 'Change it' }).click()
  await page.getByLabel('Conductivity').fill('0.8')
  await page.getByRole('button', { name: 'Change it' }).last().click()
  await page.getByRole('dialog').waitFor({ state: 'detached' })
  await page.getByRole('row', { name: /Conductivity, k 0\.8 / }).waitFor()

  await page.getByRole('button', { name: 'Delete it' }).click()
  await page.getByText(`A call that names ${id} is refused from then on.`).waitFor()
  await page.getByRole('button', { name: 'Delete the material' }).click()
  await page.getByRole('heading', { level: 1, name: 'Materials' }).waitFor()
  await page.getByText('No own materials yet').waitFor()
  expect((await solveWith(id)).status).toBe(422)
  expect(faults).toEqual([])
  await page.close()
}, 60_000)

test('what is refused stands beside its field; whoever was overtaken is told what differs, and keeps the typing', async () => {
  const page = await openMaterials('owner')
  await page.getByRole('button', { name: 'Keep a material' }).click()
  await page.getByLabel('Name').fill('Half of one')
  await page.getByLabel('Density').fill('heavy')
  await page.getByRole('button', { name: 'Keep it' }).click()
  const refused = page.getByRole('dialog').locator('.field.bad')
  await refused.first().waitFor()
  expect(await refused.locator('label').allInnerTexts()).toEqual([
    'Conductivity',
    'Density',
    'Specific heat',
    'State',
    'Source',
    'Confidence',
  ])
  expect(await page.getByLabel('Density').inputValue()).toBe('heavy')
  expect(await page.getByRole('dialog').innerText()).not.toContain('specificHeat')
  await page.getByRole('button', { name: 'Cancel' }).click()

  await keep(page, 'Contested plaster')
  const address = page.url()
  await page.getByRole('button', { name: 'Change it' }).click()
  await page.getByLabel('Source').fill('Own report 13')

  const other = await browser.context.newPage()
  await other.goto(address)
  await other.getByRole('button', { name: 'Change it' }).click()
  await other.getByLabel('Conductivity').fill('0.9')
  await other.getByRole('button', { name: 'Change it' }).last().click()
  await other.getByRole('row', { name: /Conductivity, k 0\.9 / }).waitFor()
  await other.close()

  await page.getByRole('button', { name: 'Change it' }).last().click()
  await page.getByText('It was changed since you read it.').waitFor()
  await page.getByRole('button', { name: 'Read it again' }).click()
  await page.getByText('Conductivity: 0.9, was 0.72').waitFor()
  expect(await page.getByLabel('Source').inputValue()).toBe('Own report 13')
  await page.getByLabel('Conductivity').fill('0.9')
  await page.getByRole('button', { name: 'Change it' }).last().click()
  await page.getByText('Source: Own report 13.').waitFor()
  await page.getByRole('row', { name: /Conductivity, k 0\.9 / }).waitFor()
  await page.close()
}, 60_000)

test('what was typed of a material outlasts the session', async () => {
  const page = await openMaterials('owner')
  await page.getByRole('button', { name: 'Keep a material' }).click()
  await page.getByLabel('Name').fill('Typed before the end')
  await page.context().clearCookies()
  await page.getByRole('button', { name: 'Keep it' }).click()
  await page.waitForURL('**/sign-in?next=%2Fmaterials')
  const owner = portal.demo?.signIns.find(({ role }) => role === 'owner')
  await page.getByLabel('Mail address').fill(owner?.mail ?? '')
  await page.getByLabel('Password').fill(owner?.password ?? '')
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL('**/materials')
  await page.getByRole('button', { name: 'Keep a material' }).click()
  expect(await page.getByLabel('Name').inputValue()).toBe('Typed before the end')
  await page.getByRole('button', { name: 'Cancel' }).click()
  await page.getByRole('button', { name: 'Keep a material' }).click()
  expect(await page.getByLabel('Name').inputValue(), 'a form that was left is empty').toBe('')
  await page.close()
}, 60_000)

test('a file is examined row by row before anything is kept; the good rows are kept', async () => {
  const page = await openMaterials('integrator')
  const text = [
    'name,conductivity,density,specificHeat,state,source,confidence',
    '"Board, grey",0.25,900,1000,dry,Data sheet,high',
    'Board without figures,,900,1000,dry,Data sheet,high',
    'Board of lead,0.25,-3,1000,dry,Data sheet,high',
  ].join('\n')
  await page.getByRole('button', { name: 'Import CSV' }).click()
  await page.getByLabel('File', { exact: true }).setInputFiles({
    name: 'boards.csv',
    mimeType: 'text/csv',
    buffer: Buffer.from(text),
  })
  const report = page.getByRole('region', { name: 'Report of each row' })
  await report.getByText('1 row will do, 2 refused').waitFor()
  const rows = await report.getByRole('row').allInnerTexts()
  expect(rows[1]).toMatch(/^2\s.*conductivity/s)
  expect(rows[2]).toMatch(/^3\s.*\u22123.*column density/s)
  expect(rows[3]).toMatch(/^1\s+will do/)
  expect(await own(page).getByText('Board, grey').count()).toBe(0)
  await page.getByRole('button', { name: 'Keep 1 row' }).click()
  await page.getByText('1 material kept').waitFor()
  await page.getByRole('button', { name: 'Done' }).click()
  await own(page).getByRole('link', { name: 'Board, grey' }).waitFor()

  await page.getByRole('button', { name: 'Import CSV' }).click()
  await page.getByLabel('File', { exact: true }).setInputFiles({
    name: 'no.csv',
    mimeType: 'text/csv',
    buffer: Buffer.from('name,colour\na,grey\n'),
  })
  await page.getByRole('alert').getByText('There is no column "colour"').waitFor()
  expect(await page.getByRole('button', { name: 'Keep the rows' }).isDisabled()).toBe(true)
  await page.close()
}, 60_000)

test('a reader sees catalogue and own materials, narrows them, and is offered no change', async () => {
  const page = await openMaterials('reader')
  await own(page).getByRole('link', { name: 'Contested plaster' }).click()
  await page.getByRole('heading', { level: 1, name: 'Contested plaster' }).waitFor()
  await page.getByRole('row', { name: /Density, ρ 1650/ }).waitFor()
  expect(await page.getByRole('button', { name: /Change|Delete|Keep|Import/ }).count()).toBe(0)
  await page.getByRole('link', { name: 'All materials' }).click()
  await page.getByText('your role reads them').waitFor()
  expect(await page.getByRole('button', { name: /Change|Delete|Keep|Import/ }).count()).toBe(0)

  // Words and group stand in the address and narrow both lists.
  await page.getByLabel('Find by word').fill('nothing of the kind')
  await page.getByText('Nothing in the catalogue fits').waitFor()
  await page.getByLabel('Find by word').fill('density 2400')
  await page.getByRole('link', { name: 'Concrete, high density 2400' }).waitFor()
  await page.getByText('No own material fits').waitFor()
  await page.getByLabel('Find by word').fill('')
  await page.getByLabel('Group').selectOption('concrete')
  await expect.poll(() => page.url()).toBe(`${portal.url}/materials?group=concrete`)
  const catalogue = page.getByRole('region', { name: 'Catalogue' })
  await expect
    .poll(async () => new Set(await catalogue.locator('td[data-label=Group]').allInnerTexts()))
    .toEqual(new Set(['concrete']))
  await page.reload()
  await catalogue.getByRole('link', { name: 'Concrete, high density 2400' }).waitFor()
  expect(await page.getByLabel('Group').inputValue()).toBe('concrete')
  await page.close()
}, 60_000)
