import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { desk, openWindow, signIn, startBrowser, violations } from '../support/browser'
import { serveDemo, type DemoPlant } from '../support/demo-plant'
import { pdfText } from '../support/paper'
import { arrive } from '../support/walk'

/* What stands around every page: the rule at the top at every width, and the way through it by keyboard alone. */

let demo: DemoPlant
let browser: Browser
const windows = new Map<string, Page>()

async function windowOf(as: 'planner' | 'admin'): Promise<Page> {
  const open = windows.get(as)
  if (open) return open
  const { page } = await openWindow(browser, demo.server.url)
  await signIn(page, demo.person(as).email, demo.person(as).password)
  windows.set(as, page)
  return page
}

beforeAll(async () => {
  [demo, browser] = await Promise.all([serveDemo(), startBrowser()])
})
afterAll(async () => {
  await browser?.close()
  await demo?.stop()
})

/** What of the top rule lies on the name of who is signed in, or outside the window. */
const crowding = (page: Page) => page.locator('header nav > ul > li:visible').evaluateAll((items) => {
  const name = document.querySelector('header .me')?.getBoundingClientRect()
  return items.filter((item) => {
    const place = item.getBoundingClientRect()
    return place.right > innerWidth || (name && place.bottom > name.top && place.top < name.bottom && place.right > name.left)
  }).map(item => item.textContent?.trim())
})

describe('the rule at the top', () => {
  for (const as of ['planner', 'admin'] as const) {
    it(`has room for what a ${as} works with, or folds it into its menu`, async () => {
      const page = await windowOf(as)
      await page.setViewportSize(desk)
      await arrive(page, '/format', /The settings file/)
      const found: string[] = []
      for (const width of [320, 390, 761, 1024, 1180, 1280, 1366, 1440, 1536, 1920, 2560]) {
        await page.setViewportSize({ width, height: 900 })
        await page.evaluate(() => new Promise(resolve => requestAnimationFrame(() => requestAnimationFrame(resolve))))
        const crowded = await crowding(page)
        if (crowded.length > 0) found.push(`${width} px: ${crowded.join(', ')}`)
        const words = await page.locator('header nav > ul > li:visible').allInnerTexts()
        const folds = words.some(word => word.trim() === 'Menu')
        if (folds) await page.getByRole('button', { name: 'Menu' }).click()
        if (await page.getByRole('link', { name: 'Help', exact: true }).filter({ visible: true }).count() !== 1) found.push(`${width} px: no way to Help`)
        if (folds) await page.keyboard.press('Escape')
      }
      expect(found).toEqual([])
    })
  }
})

describe('the open menu', () => {
  it('lets nothing beneath it be hit, and closes where the page is clicked', async () => {
    const page = await windowOf('planner')
    await page.setViewportSize(desk)
    await arrive(page, '/format', /The settings file/)
    const hit = () => page.evaluate(() => document.querySelector('main')?.contains(document.elementFromPoint(300, 700)) === true)
    await page.getByRole('button', { name: 'Menu' }).click()
    await page.getByRole('link', { name: 'Nameplates', exact: true }).waitFor()
    expect(await hit()).toBe(false)
    await page.mouse.click(300, 700)
    await page.getByRole('link', { name: 'Nameplates', exact: true }).waitFor({ state: 'detached' })
    expect(await hit()).toBe(true)
  })
})

describe('on paper', () => {
  it('the board has every axis, and the head of its table on each page of it', async () => {
    const page = await windowOf('planner')
    await page.setViewportSize(desk)
    await arrive(page, '/', /axes could not be restored tonight/)
    const pages = pdfText(await page.pdf({ preferCSSPageSize: true })).split('\f')
    const tagsOn = (text: string) => text.match(/^\s*[A-Z]{3}-\d\d\.[A-Z]\d?\s+(in line|no |\d).*$/gm) ?? []
    const withRows = pages.filter(text => tagsOn(text).length > 0)
    expect(withRows.length).toBeGreaterThan(1)
    expect(withRows.flatMap(tagsOn)).toHaveLength(46)
    for (const text of withRows) expect(text).toMatch(/Tag\W.*Against known-good.*Unit fitted/)
  })
})

describe('by keyboard alone', () => {
  it('signs in', async () => {
    const { page } = await openWindow(browser, demo.server.url)
    const { email, password } = demo.person('technician')
    await page.goto('/sign-in')
    await page.getByLabel('E-mail').waitFor()
    for (let step = 0; step < 5 && !await page.getByLabel('E-mail').evaluate(input => input === document.activeElement); step += 1) await page.keyboard.press('Tab')
    await page.keyboard.type(email)
    await page.keyboard.press('Tab')
    await page.keyboard.type(password)
    await page.keyboard.press('Enter')
    await page.getByRole('heading', { level: 1, name: /axes could not be restored tonight/ }).waitFor()
  })

  it('finds an axis on the board, walks the rows and opens one', async () => {
    const page = await windowOf('planner')
    await page.setViewportSize(desk)
    await arrive(page, '/', /axes could not be restored tonight/)
    await page.getByLabel('Find an axis').focus()
    await page.keyboard.type('lid-02')
    await page.getByText('5 of 46').waitFor()
    const tags = page.getByRole('table', { name: /^Every axis/ }).locator('a.tag')
    expect(await tags.allInnerTexts()).toEqual(['LID-02.C', 'LID-02.G', 'LID-02.R', 'LID-02.X', 'LID-02.Z'])
    for (let step = 0; step < 40 && !await tags.first().evaluate(link => link === document.activeElement); step += 1) await page.keyboard.press('Tab')
    await page.keyboard.press('End')
    await page.waitForFunction(() => document.activeElement?.textContent?.trim() === 'LID-02.Z')
    await page.keyboard.press('Enter')
    await page.getByRole('heading', { level: 1, name: 'LID-02.Z' }).waitFor()
  })

  it('a dialog keeps the focus while it is open, closes with Escape and gives it back', async () => {
    const page = await windowOf('planner')
    await arrive(page, '/axes/LID-02.Z', /LID-02\.Z/)
    const opener = page.getByRole('button', { name: 'Take a kit' })
    await opener.focus()
    await page.keyboard.press('Enter')
    const dialog = page.getByRole('dialog', { name: 'Take a kit' })
    await dialog.waitFor()
    const inside = () => dialog.evaluate(element => element.contains(document.activeElement))
    for (let step = 0; step < 12; step += 1) {
      expect(await inside()).toBe(true)
      await page.keyboard.press(step < 8 ? 'Tab' : 'Shift+Tab')
    }
    expect(await violations(page)).toEqual([])
    await page.keyboard.press('Escape')
    await dialog.waitFor({ state: 'hidden' })
    expect(await opener.evaluate(button => button === document.activeElement)).toBe(true)
  })

  it('the link to the content comes first and leads past the menu', async () => {
    const page = await windowOf('planner')
    await arrive(page, '/units', /units/i)
    await page.evaluate(() => { (document.activeElement as HTMLElement | null)?.blur() })
    await page.keyboard.press('Tab')
    const skip = page.getByRole('link', { name: 'To the content' })
    expect(await skip.evaluate(link => link === document.activeElement)).toBe(true)
    await page.keyboard.press('Enter')
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('main')
  })
})
