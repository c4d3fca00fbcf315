import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { openVault } from '../../server/database/client'
import { tellWatchers } from '../../server/services/letters/queue'
import { postActor } from '../../server/services/letters/send'
import { desk, openWindow, phone, picture, sidewaysScroll, signIn, startBrowser, violations } from '../support/browser'
import { admin, people, startServer, type TestServer } from '../support/server'
import { plantOn } from '../support/server-plant'
import { pick } from '../support/walk'

/* An auditor chooses letters and watches an axis; the letter that this brings is read by the administrator. */

const folder = mkdtempSync(join(tmpdir(), 'witnessmark-'))
let server: TestServer
let browser: Browser
let axisId: number

const asPerson = async (email: string): Promise<Page> => {
  const { page } = await openWindow(browser, server.url)
  await signIn(page, email, admin.password)
  return page
}

beforeAll(async () => {
  [server, browser] = await Promise.all([startServer({ folder, seeded: true }), startBrowser()])
  const plant = await plantOn(server)
  axisId = (await plant.axis('LID-02.Z', 'HL40-23-00417')).axisId
  await plant.axis('LID-03.Z', 'HL40-23-00418')
})
afterAll(async () => {
  await browser?.close()
  await server?.stop()
  rmSync(folder, { recursive: true, force: true })
})

describe('an auditor', () => {
  it('watches an axis from its page, a second one and the site from the list, and declines a kind', async () => {
    const page = await asPerson(people.auditor.email)
    await page.goto('/axes/LID-02.Z')
    await page.getByRole('button', { name: 'Watch', exact: true }).click()
    await page.getByRole('button', { name: 'Watched', pressed: true }).waitFor()
    await page.getByRole('button', { name: new RegExp(`^${people.auditor.name}`) }).click()
    await page.getByRole('link', { name: 'My letters' }).click()
    await page.getByRole('heading', { level: 1, name: 'My letters' }).waitFor()
    await page.getByRole('link', { name: 'LID-02.Z' }).waitFor()
    await page.getByRole('button', { name: 'Watch an axis' }).click()
    const form = page.getByRole('form', { name: 'Watch an axis' })
    await pick(form, /^Axis/, 'lid-03', /LID-03\.Z/)
    await form.getByRole('button', { name: 'Watch it' }).click()
    await page.getByRole('link', { name: 'LID-03.Z' }).waitFor()
    await page.getByLabel('Larkfield Preserves: every axis').check()
    const declined = page.getByLabel('A swapped unit runs longer than the site allows without being released.')
    await declined.uncheck()
    await page.reload()
    await page.getByRole('link', { name: 'LID-03.Z' }).waitFor()
    expect([await declined.isChecked(), await page.getByLabel('Larkfield Preserves: every axis').isChecked()]).toEqual([false, true])
    await page.getByRole('button', { name: 'Watch LID-03.Z no more' }).click()
    await page.getByRole('link', { name: 'LID-03.Z' }).waitFor({ state: 'detached' })
    for (const size of [desk, phone]) {
      await page.setViewportSize(size)
      await picture(page, `my-letters-${size.width}`)
      expect([await violations(page), await sidewaysScroll(page)]).toEqual([[], 0])
    }
  })
})

describe('the administrator', () => {
  it('reads what was written, and sends it again', async () => {
    await server.stop()
    const vault = openVault(folder)
    vault.write(postActor, write => tellWatchers(vault.db, write, 'swap-released', axisId, { swapId: 7, at: write.now, by: 'Runa Haldersen', unitOut: 'HL40-23-00417', unitIn: 'HL40-25-00914', knownGood: 12 }))
    vault.close()
    server = await startServer({ folder })
    const page = await asPerson(admin.email)
    await page.goto('/letters')
    await page.getByRole('heading', { level: 1, name: 'No letter waits' }).waitFor()
    await page.getByRole('button', { name: 'read “LID-02.Z: swap released”' }).click()
    await page.getByText('Unit out HL40-23-00417, unit in HL40-25-00914. Known-good is v12.').waitFor()
    await page.getByText('/swaps/7 of your Witnessmark').waitFor()
    for (const size of [desk, phone]) {
      await page.setViewportSize(size)
      await picture(page, `letter-read-${size.width}`)
      expect([await violations(page), await sidewaysScroll(page)]).toEqual([[], 0])
    }
    await page.setViewportSize(desk)
    await page.getByRole('button', { name: 'send “LID-02.Z: swap released” again' }).click()
    await page.getByRole('button', { name: 'send “LID-02.Z: swap released” again', disabled: false }).waitFor()
    await page.getByRole('combobox', { name: 'Outcome' }).selectOption({ label: 'failed' })
    await page.getByText('No letter of this outcome.').waitFor()
  })
})
