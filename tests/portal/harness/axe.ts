import { AxeBuilder } from '@axe-core/playwright'
import type { Page } from 'playwright-core'

/** Faults of level serious or worse, each with the elements it is about. */
export async function seriousFaults(page: Page, exclude?: string): Promise<string[]> {
  const builder = new AxeBuilder({ page })
    .options({ resultTypes: ['violations'] })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'])
  const { violations } = await (exclude ? builder.exclude(exclude) : builder).analyze()
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .map(
      ({ id, nodes }) =>
        `${id}: ${nodes.map(({ html, failureSummary }) => `${html.slice(0, 160)} ${failureSummary ?? ''}`).join(' | ')}`,
    )
}
