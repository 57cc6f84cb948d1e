import type { Page } from 'playwright-core'
import type { Portal } from './portal.ts'

/** Signs in as one of the demo's people, through the form. */
export async function signInAs(page: Page, { url, demo }: Portal, role: string): Promise<void> {
  const person = demo?.signIns.find((one) => one.role === role)
  if (!person) throw new Error(`the demo has no ${role}`)
  const staff = role === 'support'
  await page.goto(`${url}${staff ? '/staff' : ''}/sign-in`)
  await page.getByLabel('Mail address').fill(person.mail)
  await page.getByLabel('Password').fill(person.password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL(staff ? '**/staff' : '**/keys')
}
