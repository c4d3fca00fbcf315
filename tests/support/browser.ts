import { AxeBuilder } from '@axe-core/playwright'
import { existsSync, mkdirSync } from 'node:fs'
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core'

const path = [process.env.CHROMIUM_PATH, '/usr/bin/chromium', '/usr/bin/chromium-browser'].find(candidate => candidate && existsSync(candidate))

export const desk = { width: 1440, height: 1000 }
export const phone = { width: 390, height: 844 }
export const themes = ['day', 'night'] as const
export type Theme = (typeof themes)[number]

/** A real Chromium. Without its background services: a test machine has no way out. */
export async function startBrowser(): Promise<Browser> {
  if (!path) throw new Error('No Chromium found: npm test installs it, or set CHROMIUM_PATH')
  return chromium.launch({ executablePath: path, args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--disable-component-update', '--disable-sync', '--no-first-run'] })
}

/** A window of its own with its own cookies, as another person at another machine has. */
export async function openWindow(browser: Browser, origin: string, options: { size?: { width: number, height: number }, theme?: Theme } = {}): Promise<{ context: BrowserContext, page: Page }> {
  const context = await browser.newContext({
    baseURL: origin, viewport: options.size ?? desk, acceptDownloads: true, locale: 'en-GB', timezoneId: 'Europe/Berlin', reducedMotion: 'reduce',
    colorScheme: options.theme === 'night' ? 'dark' : 'light',
  })
  context.setDefaultTimeout(15_000)
  return { context, page: await context.newPage() }
}

/** Signs in through the page, as a person does. */
export async function signIn(page: Page, email: string, password: string): Promise<void> {
  await page.goto('/sign-in')
  await page.getByLabel('E-mail').fill(email)
  await page.getByLabel('Password', { exact: true }).fill(password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL(url => !url.pathname.startsWith('/sign-in'))
}

const everyRule = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice']
/** The rules whose answer hangs on colours: all that another light can change on a page that stays the same. */
const colourRules = ['color-contrast', 'link-in-text-block']

/** What axe finds against WCAG 2.2 A and AA and its best practices, one line a violation; on the whole page, or within one part of it. */
export async function violations(page: Page, rules: 'all' | 'colours' = 'all', within?: string): Promise<string[]> {
  // Without frames of other origins the older way says the same and takes half the time.
  const axe = new AxeBuilder({ page }).setLegacyMode(true).options({ resultTypes: ['violations'], runOnly: rules === 'all' ? everyRule : { type: 'rule', values: colourRules } })
  const found = await (within === undefined ? axe : axe.include(within)).analyze()
  return found.violations.map(violation => `${violation.id}: ${violation.nodes.map(node => node.target.join(' ')).slice(0, 3).join(' | ')}`)
}

/** Whether the page scrolls sideways, by how many pixels. */
export async function sidewaysScroll(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)
}

/** A picture of the whole page, where `SCREENSHOTS` names a folder for them. */
export async function picture(page: Page, name: string): Promise<void> {
  const folder = process.env.SCREENSHOTS
  if (!folder) return
  mkdirSync(folder, { recursive: true })
  await page.screenshot({ path: `${folder}/${name}.png`, fullPage: true })
}
