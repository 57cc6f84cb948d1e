import { AxeBuilder } from '@axe-core/playwright'
import type { Page } from 'playwright-core'

const tags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice']

async function serious(page: Page, within: (builder: AxeBuilder) => AxeBuilder) {
  const builder = new AxeBuilder({ page }).options({ resultTypes: ['violations'] }).withTags(tags)
  const { violations } = await within(builder).analyze()
  return violations.filter(({ impact }) => impact === 'serious' || impact === 'critical')
}

/** Rules broken at level serious or worse inside one part of a page. */
export async function seriousRules(page: Page, part: string): Promise<string[]> {
  return (await serious(page, (builder) => builder.include(part))).map(({ id }) => id).sort()
}

/** Faults of level serious or worse, each with the elements it is about. */
export async function seriousFaults(page: Page, exclude?: string): Promise<string[]> {
  const found = await serious(page, (builder) => (exclude ? builder.exclude(exclude) : builder))
  return found.map(
    ({ id, nodes }) =>
      `${id}: ${nodes.map(({ html, failureSummary }) => `${html.slice(0, 160)} ${failureSummary ?? ''}`).join(' | ')}`,
  )
}
