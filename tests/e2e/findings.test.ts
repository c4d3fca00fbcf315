import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { desk, openWindow, phone, picture, sidewaysScroll, signIn, startBrowser, violations } from '../support/browser'
import { serveDemo, type DemoPlant } from '../support/demo-plant'
import { pdfText } from '../support/paper'
import { downloaded, field, pick } from '../support/walk'

/* The story of the demo plant: a thrust limit raised on a night shift without a word. */

let demo: DemoPlant
let browser: Browser

beforeAll(async () => {
  [demo, browser] = await Promise.all([serveDemo(), startBrowser()])
})
afterAll(async () => {
  await browser?.close()
  await demo?.stop()
})

async function as(key: 'planner' | 'technician' | 'auditor'): Promise<Page> {
  const { page } = await openWindow(browser, demo.server.url)
  const { email, password } = demo.person(key)
  await signIn(page, email, password)
  await page.getByRole('heading', { level: 1, name: /axes could not be restored tonight/ }).waitFor()
  return page
}
const clean = async (page: Page, name: string) => {
  const found: unknown[] = []
  for (const size of [desk, phone]) {
    await page.setViewportSize(size)
    await picture(page, `${name}-${size.width}`)
    found.push(...await violations(page), ...(await sidewaysScroll(page) > 0 ? [`${size.width}: scrolls sideways`] : []))
  }
  await page.setViewportSize(desk)
  return found
}
const title = /^LID-03\.Z thrust limit 38 → 55 % and \d+ more, changed between/

describe('the night shift’s change', () => {
  it('is found by the auditor from the board in four actions, with both versions, the change, the motion and what was allowed', async () => {
    const page = await as('auditor')
    let actions = 0
    const act = async (press: () => Promise<unknown>) => {
      actions += 1
      await press()
    }
    await act(() => page.getByRole('link', { name: /^Explain ?: open findings/ }).click())
    await page.getByRole('heading', { level: 1, name: /findings to be explained/ }).waitFor()
    expect(await clean(page, 'findings')).toEqual([])
    await act(() => page.getByRole('combobox', { name: 'Weight' }).selectOption('harm'))
    await act(() => page.getByRole('link', { name: title }).click())
    await page.getByRole('heading', { level: 1, name: title }).waitFor()
    expect(actions).toBeLessThanOrEqual(4)
    await page.getByRole('heading', { level: 2, name: 'What changed' }).waitFor()
    const changes = page.getByRole('table').filter({ hasText: 'thrust limit' }).first()
    expect((await changes.innerText()).replaceAll(/\s+/g, ' ')).toMatch(/38.*55/)
    await page.getByText(/at most 45 %.*by a rule of the axis\. Jars crack above 300 N/).waitFor()
    const allowed = page.getByRole('region', { name: 'What was allowed' }).or(page.locator('section', { has: page.getByRole('heading', { name: 'What was allowed' }) }))
    expect(await allowed.first().innerText()).toMatch(/Allowed by\s+nobody named/)
    await page.getByRole('heading', { level: 2, name: /^Move \d/ }).waitFor()
    expect(await clean(page, 'finding-open')).toEqual([])
  })

  it('is explained by the technician, who cannot close it, nor can a planner', async () => {
    const page = await as('technician')
    await page.goto('/axes/LID-03.Z')
    await page.getByRole('link', { name: 'a finding was opened' }).last().click()
    await page.getByRole('heading', { level: 1, name: /^LID-03\.Z/ }).waitFor()
    await page.goto('/findings')
    await page.getByRole('link', { name: title }).click()
    await page.getByRole('button', { name: 'Explain it' }).click()
    const form = page.getByRole('form', { name: 'Explain the finding' })
    await form.getByRole('button', { name: 'Put it under my name' }).click()
    await form.getByText(/field needs another look/).waitFor()
    await field(form, 'Why').fill('Lids sat askew after midnight; raised the limit to get through the shift.')
    await field(form, 'Done by').fill('night shift')
    await form.getByRole('button', { name: 'Put it under my name' }).click()
    await page.getByText('Lids sat askew after midnight').waitFor()
    await page.getByText('Tobias Achterberg explained').waitFor()
    expect(await page.getByRole('button', { name: 'Close it' }).count()).toBe(0)
    const planner = await as('planner')
    await planner.goto(page.url())
    await planner.getByText('Explained. An auditor who did not explain it closes it.').waitFor()
    expect(await planner.getByRole('button', { name: 'Close it' }).count()).toBe(0)
  })

  it('is closed by the auditor, signed, and stays readable', async () => {
    const page = await as('auditor')
    await page.goto('/findings')
    await page.getByRole('link', { name: title }).click()
    await page.getByRole('button', { name: 'Close it' }).click()
    const dialog = page.getByRole('dialog', { name: 'Close the finding' })
    await dialog.getByLabel('Allowed by').fill('Runa Haldersen, by phone')
    expect(await violations(page)).toEqual([])
    await dialog.getByRole('textbox', { name: 'Your password' }).fill('not the password')
    await dialog.getByRole('button', { name: 'Sign and close' }).click()
    await dialog.getByRole('alert').waitFor()
    await dialog.getByRole('textbox', { name: 'Your password' }).fill(demo.person('auditor').password)
    await dialog.getByRole('button', { name: 'Sign and close' }).click()
    await page.getByText(/closed it as accepted, allowed by Runa Haldersen, by phone/).waitFor()
    expect(await clean(page, 'finding-closed')).toEqual([])
  })

  it('is printed for the binder: the axis’ audit report has the change, the words, and the signature', async () => {
    const page = await as('auditor')
    await page.goto('/axes/LID-03.Z')
    await page.getByRole('link', { name: 'Audit report' }).click()
    const form = page.getByRole('form', { name: 'Ask for an audit report' })
    await form.getByRole('button', { name: 'Make the report' }).waitFor()
    expect(await clean(page, 'reports')).toEqual([])
    const { name, bytes } = await downloaded(page, () => form.getByRole('button', { name: 'Make the report' }).click())
    expect(name).toBe('audit-report-1.pdf')
    const text = pdfText(bytes)
    for (const words of [/thrust limit +38 % \(243\.2 N\) +55 % \(352 N\)/, /Lids sat askew after midnight/, /closed as accepted, allowed by Runa Haldersen/, /Ines Vollrath +\d+ \w+ \d{4} [\d:]+ CES?T/, /page 1 of \d+/]) expect(text).toMatch(words)
    await page.getByRole('row').filter({ hasText: 'LID-03.Z' }).getByText(/^Ines Vollrath, /).waitFor()
  })

  it('reopened keeps all that was said', async () => {
    const page = await as('auditor')
    await page.goto('/findings')
    await page.getByRole('button', { name: 'Show what was closed' }).click()
    await page.getByRole('link', { name: title }).click()
    await page.getByRole('button', { name: 'Reopen it' }).click()
    const form = page.getByRole('form', { name: 'Reopen the finding' })
    await field(form, 'Why it is not settled').fill('Runa was not asked')
    await form.getByRole('button', { name: 'Reopen it' }).click()
    await page.getByText('Runa was not asked').waitFor()
    await page.getByText('Lids sat askew after midnight').waitFor()
    await page.getByText('open, nobody has said why').waitFor()
  })
})

describe('a planned change', () => {
  it('that was announced explained what came of it', async () => {
    const page = await as('auditor')
    await page.goto('/planned')
    await page.getByText('Retuning after the new belt').waitFor()
    await page.getByRole('link', { name: /^CAS-01\.X/ }).last().click()
    await page.getByRole('heading', { level: 1, name: /^CAS-01\.X/ }).waitFor()
    await page.getByText('Runa Haldersen announced it before it was made').waitFor()
  })

  it('is announced by a planner, and called off', async () => {
    const page = await as('planner')
    await page.goto('/planned')
    await page.getByRole('button', { name: 'Announce a change' }).click()
    const form = page.getByRole('form', { name: 'Announce a change' })
    await field(form, 'Axes').fill('LID-02.Z, lid-04.z')
    await pick(form, /^Field \(needed\)/, 'thrust limit', /\(thrustLimit\)/)
    await field(form, 'At least').fill('40')
    await field(form, 'At most').fill('48')
    await form.getByRole('button', { name: 'Another field with it' }).click()
    await pick(form, /^Field 2/, 'jog speed', /\(jogSpeed\)/)
    await field(form, 'At most of field 2').fill('20')
    await field(form, 'Why').fill('thicker lids from Monday on')
    await field(form, 'Allowed by').fill('Marit Lund')
    await form.getByRole('button', { name: 'Announce it' }).click()
    const row = page.getByRole('row').filter({ hasText: 'thicker lids from Monday on' })
    await row.getByText(/thrust limit, 40 to 48 %; .*jog speed, at most 20 mm\/s/).waitFor()
    expect(await row.getByRole('link').allInnerTexts()).toEqual(['LID-02.Z', 'LID-04.Z'])
    expect(await clean(page, 'planned')).toEqual([])
    await row.getByRole('button', { name: /^call planned change \d+ off$/ }).click()
    const off = page.getByRole('form', { name: 'Call it off' })
    await field(off, 'Why it is called off').fill('old lids after all')
    await off.getByRole('button', { name: 'Call it off' }).click()
    await page.getByText('called off: old lids after all').waitFor()
  })

  it('says which tag is no axis', async () => {
    const page = await as('planner')
    await page.goto('/planned')
    await page.getByRole('button', { name: 'Announce a change' }).click()
    const form = page.getByRole('form', { name: 'Announce a change' })
    await field(form, 'Axes').fill('LID-99.Z')
    await form.getByRole('button', { name: 'Announce it' }).click()
    await form.getByText(/needs? another look/).waitFor()
  })
})
