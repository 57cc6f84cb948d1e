import type { Page } from 'playwright-core'

/** What a page complained about: errors, console errors and violations of the content policy. */
export function watch(page: Page): string[] {
  const faults: string[] = []
  page.on('pageerror', (error) => faults.push(`error: ${error.message}`))
  page.on('console', (message) => {
    if (message.type() === 'error' || message.text().includes('Content Security Policy'))
      faults.push(`console: ${message.text().slice(0, 300)} (${message.location().url})`)
  })
  return faults
}
