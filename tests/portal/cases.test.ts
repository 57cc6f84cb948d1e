import { execFile } from 'node:child_process'
import { mkdtemp, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { promisify } from 'node:util'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { cases } from '../../solvers/cases/index.ts'
import { type Browser, openBrowser } from './harness/browser.ts'
import { type Portal, startPortal } from './harness/portal.ts'
import { watch } from './harness/watch.ts'

const run = promisify(execFile)

let portal: Portal
let browser: Browser
let folder: string
let key: string
beforeAll(async () => {
  portal = await startPortal({ demo: true })
  browser = await openBrowser({ width: 1440 })
  folder = await mkdtemp(path.join(tmpdir(), 'soakstone-snippet-'))
  key = portal.demo?.key ?? ''
})
afterAll(async () => {
  await browser.close()
  await portal.close()
  await rm(folder, { recursive: true, force: true })
})

interface Described {
  fields: {
    name: string
    schema: Record<string, unknown>
    fields?: { name: string }[]
    kinds?: { fields: { name: string }[] }[]
  }[]
  example: Record<string, unknown>
  weight: number
  setUp: number
  leastCharge: number
  formula: string[]
}

test('the catalogue lists every case, and narrows by words and marks that stand in the address', async () => {
  const page = await browser.context.newPage()
  const shown = () => page.locator('.case-group a').evaluateAll((list) => list.map((e) => e.getAttribute('href')))
  await page.goto(`${portal.url}/cases`)
  await expect.poll(async () => (await shown()).sort()).toEqual(cases.map(({ id }) => `/cases/${id}`).sort())
  await page.getByRole('group', { name: 'Body' }).getByLabel(/^Slab/).check()
  await page
    .getByRole('group', { name: 'Boundary' })
    .getByLabel(/^Convection/)
    .check()
  await expect.poll(() => page.url()).toContain('/cases?body=slab&boundary=convection')
  await expect.poll(shown).toContain('/cases/slab-convection')
  expect(await shown()).not.toContain('/cases/slab-surface-temperature')
  expect(await page.getByRole('search').getByRole('status').innerText()).toBe(
    `${(await shown()).length} of ${cases.length} cases`,
  )
  const marked = await shown()
  await page.reload()
  await expect.poll(shown).toEqual(marked)
  await page.getByLabel('Find by word').fill('nothing of the kind')
  await page.getByText('No case has all of that').waitFor()
  await page.getByRole('button', { name: 'Clear all' }).last().click()
  await expect.poll(async () => (await shown()).length).toBe(cases.length)
  expect(page.url()).toBe(`${portal.url}/cases`)
  await page.close()
})

let sheet: Page
let faults: string[]
beforeAll(async () => {
  sheet = await browser.context.newPage()
  faults = watch(sheet)
})

test.each(cases.map(({ id }) => id))(
  'the page of %s offers every field, solves, draws, and shows a call that answers the same',
  async (id) => {
    const described = (await (await fetch(`${portal.url}/v1/cases/${id}`)).json()) as Described
    const page = sheet
    await page.goto(`${portal.url}/cases/${id}`)
    await page.getByRole('region', { name: 'Answer as JSON' }).waitFor()
    await expectTable(page)

    expect((await fieldsOffered(page)).sort()).toEqual(pathsOf(described).sort())
    await page.getByRole('button', { name: 'Back to the example' }).click()
    await page.getByRole('button', { name: 'Solve', exact: true }).click()

    await expect.poll(() => page.locator('.formula').count()).toBe(described.formula.length)
    // Each part of each formula is set.
    await expect.poll(() => page.locator('.formula > div:not(:has(math))').count()).toBe(0)
    const answer = await answerShown(page)
    expect(answer['points']).toBe(described.weight * countNumbers(answer['result']) + described.setUp)
    const charged = Number(await page.locator('[data-charged]').innerText())
    expect(charged).toBe(Math.max(described.leastCharge, answer['points'] as number))

    const direct = await fetch(`${portal.url}/v1/cases/${id}/solve`, {
      method: 'POST',
      headers: { authorization: `Bearer ${key}`, 'content-type': 'application/json' },
      body: JSON.stringify(described.example),
    })
    expect(Number(direct.headers.get('points-charged'))).toBe(charged)
    expect(await direct.json()).toEqual(answer)

    await page.waitForSelector('.code code .line, .code code span[style]')
    const curl = await snippet(page, 'curl')
    expect(JSON.parse((await runWithKey('bash', ['-c', curl])).stdout)).toEqual(answer)

    await page.getByRole('tab', { name: 'TypeScript' }).click()
    // It has no types of its own, so that Node runs it as it is.
    const file = path.join(folder, `${id}.mjs`)
    await writeFile(file, await snippet(page, 'TypeScript'))
    expect(JSON.parse((await runWithKey(process.execPath, [file])).stdout)).toEqual(answer['result'])
    expect(faults.splice(0)).toEqual([])
  },
)

test('another question is asked on the page with the numbers of the reader, and answers as with a key', async () => {
  const page = sheet
  await page.goto(`${portal.url}/cases/slab-convection`)
  await page.getByRole('region', { name: 'Answer as JSON' }).waitFor()
  await page.locator('[data-operation=time-to-reach] summary').click()
  const form = page.locator('[data-operation=time-to-reach] form')
  await form.locator('[data-own=target] input').fill('1')
  await form.getByRole('button', { name: 'Ask' }).click()
  const shown = JSON.parse(await form.getByRole('region', { name: /answer$/ }).innerText()) as Record<string, unknown>
  const curl = await form.getByRole('region', { name: /curl snippet$/ }).innerText()
  expect(curl).toContain('"target": 1')
  expect(JSON.parse((await runWithKey('bash', ['-c', curl])).stdout)).toEqual(shown)
  await form.locator('[data-own=target] input').fill('warm')
  await form.getByRole('button', { name: 'Ask' }).click()
  await form.getByRole('alert').waitFor()
  expect(await form.getByRole('alert').innerText()).toContain('target')
  faults.length = 0
})

/** Every field that any choice of the form shows, by its place in the body. */
async function fieldsOffered(page: Page): Promise<string[]> {
  await page.getByText('Other ways to give it').click()
  const names = new Set<string>()
  const look = async () => {
    const shown = await page
      .locator('[data-field]')
      .evaluateAll((list) => list.map((e) => e.getAttribute('data-field')))
    for (const name of shown) if (name) names.add(name)
  }
  await look()
  // Each way of every solid and each kind of every side, by their place: those of a kind come and go with it.
  const choices = page.locator('[data-choice] input')
  for (let i = 0; i < (await choices.count()); i++) {
    await choices.nth(i).evaluate((input) => (input as unknown as { click(): void }).click())
    await look()
  }
  return [...names]
}

function pathsOf({ fields }: Described): string[] {
  const paths = fields.flatMap(({ name, schema, fields: inside = [], kinds = [] }) => {
    const rows = 'items' in schema
    const more = [...inside, ...kinds.flatMap((kind) => kind.fields)]
    return [name, ...(rows ? [] : more.map((one) => `${name}/${one.name}`))]
  })
  return [...new Set(paths)]
}

/** The table of the curve holds the first number of the answer. */
async function expectTable(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Table' }).click()
  const table = page.getByRole('region', { name: /^Temperature by time and / })
  await table.waitFor()
  const answer = await answerShown(page)
  const [first] = [(answer['result'] as { temperature: unknown[] }).temperature].flat(3) as number[]
  const decimals = /\.(\d+)/
  const cells = (await table.locator('td').allInnerTexts()).map((text) => text.replace('\u2212', '-'))
  expect(cells.some((cell) => cell === first?.toFixed(decimals.exec(cell)?.[1]?.length ?? 0))).toBe(true)
}

async function answerShown(page: Page): Promise<Record<string, unknown>> {
  return JSON.parse(await page.getByRole('region', { name: 'Answer as JSON' }).innerText()) as Record<string, unknown>
}

function snippet(page: Page, name: string): Promise<string> {
  return page.getByRole('region', { name: `${name} snippet` }).innerText()
}

function countNumbers(result: unknown): number {
  return Object.values(result as Record<string, unknown>).flatMap((values) => [values].flat(2)).length
}

function runWithKey(program: string, args: string[]) {
  return run(program, args, { env: { ...process.env, SOAK_KEY: key }, cwd: folder, timeout: 30_000 })
}
