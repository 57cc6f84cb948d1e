import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import type { Page } from 'playwright-core'

const tags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice']

// The rules as @axe-core/playwright has them. It reads them again, and opens another page, for every look: on sheets
// without frames one reading a page is enough, and several times as fast.
const require = createRequire(createRequire(import.meta.url).resolve('@axe-core/playwright'))
const rules = readFileSync(require.resolve('axe-core/axe.min.js'), 'utf8')

interface Violation {
  id: string
  impact: string
  nodes: { html: string; failureSummary?: string }[]
}

interface Context {
  include?: string[]
  exclude?: string[]
}

async function serious(page: Page, context: Context): Promise<Violation[]> {
  if (page.frames().length > 1) throw new Error(`${page.url()} has frames, which are not looked at`)
  if (!(await page.evaluate<boolean>("typeof axe === 'object'"))) await page.evaluate(rules)
  const options = { resultTypes: ['violations'], runOnly: { type: 'tag', values: tags } }
  const within = Object.keys(context).length > 0 ? JSON.stringify(context) : 'document'
  const violations = await page.evaluate<Violation[]>(
    `axe.run(${within}, ${JSON.stringify(options)}).then(({ violations }) => violations)`,
  )
  return violations.filter(({ impact }) => impact === 'serious' || impact === 'critical')
}

/** Rules broken at level serious or worse inside one part of a page. */
export async function seriousRules(page: Page, part: string): Promise<string[]> {
  return (await serious(page, { include: [part] })).map(({ id }) => id).sort()
}

/** Faults of level serious or worse, each with the elements it is about. */
export async function seriousFaults(page: Page, exclude?: string): Promise<string[]> {
  const found = await serious(page, exclude ? { exclude: [exclude] } : {})
  return found.map(
    ({ id, nodes }) =>
      `${id}: ${nodes.map(({ html, failureSummary }) => `${html.slice(0, 160)} ${failureSummary ?? ''}`).join(' | ')}`,
  )
}
