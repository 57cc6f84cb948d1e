import { execFile } from 'node:child_process'
import { mkdtemp, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { promisify } from 'node:util'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { cases } from '../../solvers/cases/index.ts'
import { type Browser, openBrowser } from './harness/browser.ts'
import { root } from './harness/built.ts'
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
  fields: { name: string; required: boolean }[]
  example: Record<string, unknown>
  weight: number
  setUp: number
  leastCharge: number
  formula: string[]
}

test('the catalogue lists every case and finds one by a word', async () => {
  const page = await browser.context.newPage()
  await page.goto(`${portal.url}/cases`)
  for (const { id } of cases) await page.locator(`a[href="/cases/${id}"]`).waitFor()
  await page.getByLabel('Find by word').fill('slab')
  await expect
    .poll(() => page.locator('.case-group a').count())
    .toBe(
      cases.filter((c) => JSON.stringify([c.id, c.title, c.summary, c.family]).toLowerCase().includes('slab')).length,
    )
  await page.getByLabel('Find by word').fill('nothing of the kind')
  await page.getByText('No case has all of that').waitFor()
  await page.close()
})

test.each(cases.map(({ id }) => id))(
  'the page of %s offers every field, solves, and shows a call that answers the same',
  async (id) => {
    const described = (await (await fetch(`${portal.url}/v1/cases/${id}`)).json()) as Described
    const page = await browser.context.newPage()
    const faults = watch(page)
    await page.goto(`${portal.url}/cases/${id}`)
    await page.getByRole('region', { name: 'Answer as JSON' }).waitFor()

    await page.getByText('Other ways to give it').click()
    const shown = await page
      .locator('[data-field]')
      .evaluateAll((list) => list.map((e) => e.getAttribute('data-field')))
    const ways = await page.getByRole('group', { name: 'Heat capacity by' }).locator('input').all()
    const names = new Set(shown)
    for (const way of ways) {
      await way.evaluate((input) => (input as unknown as { click(): void }).click())
      for (const name of await page
        .locator('[data-field]')
        .evaluateAll((list) => list.map((e) => e.getAttribute('data-field'))))
        names.add(name)
    }
    expect([...names].sort()).toEqual(described.fields.map(({ name }) => name).sort())
    await page.getByRole('button', { name: 'Back to the example' }).click()
    await page.getByRole('button', { name: 'Solve', exact: true }).click()

    expect(await page.locator('.formula math').count()).toBe(described.formula.length)
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
    const file = path.join(folder, `${id}.mts`)
    await writeFile(file, await snippet(page, 'TypeScript'))
    const { stdout } = await runWithKey(process.execPath, [path.join(root, 'node_modules/tsx/dist/cli.mjs'), file])
    expect(JSON.parse(stdout)).toEqual(answer['result'])
    expect(faults).toEqual([])
    await page.close()
  },
)

test.each(cases.map(({ id }) => id))('the table of %s holds the numbers of its curve', async (id) => {
  const page = await browser.context.newPage()
  await page.goto(`${portal.url}/cases/${id}`)
  await page.getByRole('button', { name: 'Table' }).click()
  const table = page.getByRole('region', { name: 'Temperature by time and depth' })
  await table.waitFor()
  const answer = await answerShown(page)
  const [first] = [(answer['result'] as { temperature: unknown[] }).temperature].flat(3) as number[]
  const decimals = /\.(\d+)/
  const cells = (await table.locator('td').allInnerTexts()).map((text) => text.replace('\u2212', '-'))
  expect(cells.some((cell) => cell === first?.toFixed(decimals.exec(cell)?.[1]?.length ?? 0))).toBe(true)
  await page.close()
})

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
