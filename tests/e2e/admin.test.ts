import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { openWindow, signIn, startBrowser } from '../support/browser'
import { jsonFile, lidPress } from '../support/lid-press'
import { admin, people, startServer, type TestServer } from '../support/server'
import { plantOn } from '../support/server-plant'
import { field, goTo } from '../support/walk'

let server: TestServer
let browser: Browser
let page: Page
let token = ''

const sends = (bytes: Buffer) => fetch(`${server.url}/api/uploads?name=lid-02.z.json`, { method: 'POST', body: new Uint8Array(bytes), headers: { 'authorization': `Bearer ${token}`, 'content-type': 'application/json' } })

beforeAll(async () => {
  [server, browser] = await Promise.all([startServer(), startBrowser()])
  await (await plantOn(server)).axis('LID-02.Z', 'HL40-23-00417');
  ({ page } = await openWindow(browser, server.url))
  await signIn(page, admin.email, admin.password)
  await goTo(page, 'People')
})
afterAll(async () => {
  await browser?.close()
  await server?.stop()
})

describe('a token of a script', () => {
  it('is shown once', async () => {
    await page.getByRole('button', { name: 'Make a token' }).click()
    const form = page.getByRole('form', { name: 'A new token' })
    await field(form, 'Name').fill('station 2, nightly')
    await form.getByRole('button', { name: 'Make the token' }).click()
    const once = page.getByText('Shown this once; the vault keeps only its hash.').locator('xpath=ancestor::*[@role="status"]')
    token = await once.locator('code').innerText()
    expect(token).toMatch(/^wm_/)
    await once.getByRole('button', { name: 'I have kept it' }).click()
    await page.getByRole('row', { name: /station 2, nightly upload, all sites/ }).waitFor()
    expect(await page.content()).not.toContain(token)
    await page.reload()
    await page.getByRole('row', { name: /station 2, nightly/ }).waitFor()
    expect(await page.content()).not.toContain(token)
  })

  it('uploads, and its name stands beside what it sent', async () => {
    const { buffer } = jsonFile('', lidPress())
    const [made, again] = [await sends(buffer), await sends(jsonFile('', lidPress({ exportedAt: '2024-12-03T04:10:00+01:00' })).buffer)]
    expect([made.status, again.status]).toEqual([201, 200])
    const { version } = await made.json() as { version: { storedBy: string } }
    expect(version.storedBy).toContain('station 2, nightly')
  })

  it('never signs', async () => {
    const { status } = await server.call('POST', '/api/versions/1/known-good', { as: token, body: { meaning: 'approved', password: admin.password } })
    expect([401, 403]).toContain(status)
  })

  it('is ended at once', async () => {
    await page.getByRole('row', { name: /station 2, nightly/ }).getByRole('button', { name: 'end' }).click()
    await page.getByRole('button', { name: 'End station 2, nightly at once' }).click()
    await page.getByRole('row', { name: /station 2, nightly.*ended/ }).waitFor()
    expect((await sends(jsonFile('', lidPress()).buffer)).status).toBe(401)
  })
})

describe('people', () => {
  it('an address that is taken is told at the field', async () => {
    await page.getByRole('button', { name: 'Register a person' }).click()
    const form = page.getByRole('form', { name: 'A new person' })
    await field(form, 'Name').fill('Another Runa')
    await field(form, 'E-mail').fill(people.planner.email)
    await form.getByLabel('planner: registers, marks known-good').check()
    await form.getByRole('button', { name: 'Register the person' }).click()
    await form.getByText(/already|taken|in use/i).first().waitFor()
    await form.getByRole('button', { name: 'Leave it' }).click()
  })

  it('who leaves is signed out at once and may not come back; the name stays', async () => {
    const { page: theirs } = await openWindow(browser, server.url)
    await signIn(theirs, people.technician.email, admin.password)
    await page.getByRole('row', { name: /Tobias Achterberg/ }).getByRole('button', { name: 'end' }).click()
    await page.getByRole('button', { name: 'End the account of Tobias Achterberg' }).click()
    await page.getByRole('row', { name: /Tobias Achterberg ended/ }).waitFor()

    await theirs.getByRole('link', { name: 'Units' }).first().click()
    await theirs.waitForURL('**/sign-in?to=**')
    await theirs.getByLabel('E-mail').fill(people.technician.email)
    await theirs.getByLabel('Password', { exact: true }).fill(admin.password)
    await theirs.getByRole('button', { name: 'Sign in' }).click()
    await theirs.getByRole('alert').waitFor()
  })

  it('an administrator reads the plant and is told whose work the rest is', async () => {
    await page.goto('/upload')
    await page.getByText('Uploading is for technicians and planners.', { exact: false }).waitFor()
    await page.goto('/axes/LID-02.Z/versions/1')
    await page.getByRole('heading', { level: 1, name: 'LID-02.Z v1' }).waitFor()
    expect(await page.getByRole('button', { name: /Mark known-good|Set aside/ }).count()).toBe(0)
    await page.goto('/places')
    await page.getByText('Planners register and edit places.', { exact: false }).waitFor()
  })
})
