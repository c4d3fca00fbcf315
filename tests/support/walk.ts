import { readFileSync } from 'node:fs'
import type { Locator, Page } from 'playwright-core'

/** An input of a form by the words of its label, whatever unit or "(needed)" stands behind them. */
export function field(form: Locator, label: string): Locator {
  const words = label.replaceAll(/[.*+?^${}()|[\]\\]/g, '\\$&')
  return form.getByLabel(new RegExp(`^${words}(, [^(]+)?( \\(needed\\))?$`))
}

/** Chooses from a list that is found by typing, as a person does: some letters, then the line. */
export async function pick(form: Locator, label: RegExp, letters: string, line: RegExp): Promise<void> {
  await form.getByRole('combobox', { name: label }).fill(letters)
  await form.getByRole('option', { name: line }).click()
}

/** Hands files to the drop field of the upload page. */
export async function drop(page: Page, files: Parameters<Locator['setInputFiles']>[0]): Promise<void> {
  await page.getByLabel('choose', { exact: true }).setInputFiles(files)
}

/** The bytes that a press of something brings into the downloads, and under which name. */
export async function downloaded(page: Page, press: () => Promise<void>): Promise<{ name: string, bytes: Buffer }> {
  const [download] = await Promise.all([page.waitForEvent('download'), press()])
  return { name: download.suggestedFilename(), bytes: readFileSync(await download.path()) }
}

export interface Trouble { readonly told: () => string[], readonly forget: () => void }

/** Keeps what the console calls an error, what a script throws, and what the content policy blocks. */
export async function watchTrouble(page: Page): Promise<Trouble> {
  const told: string[] = []
  page.on('console', (message) => { if (message.type() === 'error') told.push(`console: ${message.text()}`) })
  page.on('pageerror', (error) => { told.push(`thrown: ${error.message}`) })
  await page.exposeFunction('keepPolicyBreach', (breach: string) => { told.push(`policy: ${breach}`) })
  await page.addInitScript(() => {
    const keep = (window as unknown as { keepPolicyBreach: (breach: string) => void }).keepPolicyBreach
    document.addEventListener('securitypolicyviolation', event => keep(`${event.violatedDirective} ${event.blockedURI}`))
  })
  return { told: () => [...told], forget: () => { told.length = 0 } }
}

/** The page is read: its answer stands at its head and nothing is being read any more. */
export async function arrive(page: Page, address: string, ready: RegExp): Promise<void> {
  await page.goto(address)
  await page.getByRole('heading', { level: 1, name: ready }).waitFor()
  await page.getByRole('status').filter({ hasText: /^Reading/ }).first().waitFor({ state: 'detached' })
}

/** Opens a page by its word in the rule at the top, or in the menu where it does not fit the rule. */
export async function goTo(page: Page, word: string): Promise<void> {
  const rule = page.getByRole('navigation', { name: 'Main' })
  await rule.getByRole('link', { name: 'Board', exact: true }).waitFor()
  const link = rule.getByRole('link', { name: word, exact: true }).filter({ visible: true })
  if (await link.count() === 0) await page.getByRole('button', { name: 'Menu' }).click()
  await link.click()
}
