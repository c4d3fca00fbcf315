import type { Browser, BrowserContext, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { openWindow, phone, sidewaysScroll, signIn, startBrowser } from '../support/browser'
import { jsonFile, lidPress } from '../support/lid-press'
import { admin, people, startServer, type TestServer } from '../support/server'
import { plantOn } from '../support/server-plant'
import { drop, pick } from '../support/walk'

/* The technician's evening, on a phone of 390 px. */

let server: TestServer
let browser: Browser
let context: BrowserContext
let page: Page

const known = jsonFile('lid-02.z.json', lidPress())
const files = [
  jsonFile('lid-03.z.json', lidPress({ serial: 'HL40-24-00552' })),
  { ...known, name: 'lid-02.z-again.json' },
  jsonFile('stranger.json', lidPress({ serial: 'HL40-26-01188', exportedAt: '2024-12-09T22:40:00+01:00' })),
  { name: 'torn.json', mimeType: 'application/json', buffer: Buffer.from('{\n  "schema": "witnessmark.axis-settings/1",\n  "unit": { "serial": \n') },
]

beforeAll(async () => {
  [server, browser] = await Promise.all([startServer(), startBrowser()])
  const plant = await plantOn(server)
  await plant.axis('LID-02.Z', 'HL40-23-00417', { flags: ['gravity', 'press'] })
  await plant.axis('LID-03.Z', 'HL40-24-00552', { flags: ['gravity', 'press'] })
  expect((await plant.upload(known.buffer)).status).toBe(201);
  ({ context, page } = await openWindow(browser, server.url, { size: phone }))
  await signIn(page, people.technician.email, admin.password)
})
afterAll(async () => {
  await browser?.close()
  await server?.stop()
})

describe('many files at once', () => {
  it('are read before they are sent, each with what it becomes', async () => {
    await page.getByRole('navigation', { name: 'Main' }).getByRole('link', { name: 'Upload' }).click()
    await drop(page, files)
    await page.getByRole('heading', { level: 1, name: '4 files read. 1 new version, 1 seen again, 2 for the tray' }).waitFor()
    const table = await page.getByRole('table', { name: 'Files, by axis' }).innerText()
    for (const words of ['v1, the first of this axis', 'a sighting of v1: identical', 'This serial is not registered.', 'not readable', 'line 4']) expect(table).toContain(words)
    expect(await sidewaysScroll(page)).toBe(0)
  })

  it('stay in the page while the network is cut, and go through when it is back', async () => {
    await context.setOffline(true)
    await page.getByRole('button', { name: 'Send 4 files' }).click()
    await page.getByText('not stored; the file is still in this page', { exact: false }).first().waitFor()
    const outcome = page.getByRole('region', { name: 'Outcome' })
    expect(await outcome.innerText()).toContain('The vault did not answer')
    await page.getByRole('button', { name: 'Send again what was not stored' }).waitFor()

    await context.setOffline(false)
    await page.getByRole('button', { name: 'Send again what was not stored' }).click()
    await page.getByRole('heading', { level: 1, name: '4 files kept' }).waitFor()
    const words = await outcome.innerText()
    expect(words).toMatch(/1\s+new version: LID-03\.Z v1/)
    expect(words).toMatch(/1\s+seen again: LID-02\.Z v1/)
    expect(words).toMatch(/1\s+in the tray, nothing lost: place stranger\.json/)
    expect(words).toMatch(/1\s+not readable, kept in the tray as it came: mend torn\.json/)
    expect(await sidewaysScroll(page)).toBe(0)
  })

  it('nothing was stored twice', async () => {
    const as = await server.signIn('planner')
    const { json } = await server.call('GET', '/api/axes/tag:LID-03.Z/versions', { as })
    expect((json as unknown as { items: unknown[] }).items).toHaveLength(1)
    const tray = (await server.call('GET', '/api/tray', { as })).json as unknown as { items: { name: string, copies: number }[] }
    expect(tray.items.map(({ name, copies }) => `${name} ${copies}`).sort()).toEqual(['stranger.json 1', 'torn.json 1'])
  })
})

describe('what a technician may not', () => {
  it('a unit that is not registered takes a planner, and the page says so', async () => {
    await page.getByRole('link', { name: 'place stranger.json' }).click()
    const item = page.getByRole('listitem').filter({ hasText: 'HL40-26-01188' })
    await item.getByRole('button', { name: 'The unit was swapped: say where it sits' }).click()
    const form = page.getByRole('form', { name: 'Where HL40-26-01188 belongs' })
    expect(await form.innerText()).toContain('A unit that is not fitted there yet takes a planner.')
    await form.getByRole('combobox', { name: /^Axis/ }).fill('LID-02')
    await form.getByRole('option', { name: /LID-02\.Z/ }).click()
    await form.getByLabel(/^Why/).fill('Swapped at night')
    await form.getByRole('button', { name: 'Put it there' }).click()
    expect(await form.getByRole('alert').innerText()).toContain('Registering and fitting a unit takes a planner')
    expect(await form.getByLabel(/^Why/).inputValue()).toBe('Swapped at night')
  })

  it('a planner puts it there: the unit is registered and fitted, the one before it taken out', async () => {
    const { page: planner } = await openWindow(browser, server.url)
    await signIn(planner, people.planner.email, admin.password)
    await planner.getByRole('link', { name: 'Tray', exact: true }).click()
    const item = planner.getByRole('listitem').filter({ hasText: 'HL40-26-01188' })
    await item.getByRole('button', { name: 'The unit was swapped: say where it sits' }).click()
    const form = planner.getByRole('form', { name: 'Where HL40-26-01188 belongs' })
    await pick(form, /^Axis/, 'LID-02', /LID-02\.Z/)
    await form.getByLabel(/^Why/).fill('Swapped at night, brake did not hold')
    await form.getByRole('button', { name: 'Put it there' }).click()
    await planner.getByRole('heading', { level: 1, name: '1 file waits in the tray' }).waitFor()
    await planner.getByRole('link', { name: 'Look at it' }).click()
    await planner.getByRole('heading', { level: 1, name: /^LID-02\.Z v/ }).waitFor()
    await planner.goto('/axes/LID-02.Z')
    const life = planner.getByRole('table', { name: 'What happened, newest first' })
    expect(await life.innerText()).toMatch(/unit HL40-26-01188 fitted[\s\S]*unit HL40-23-00417 taken out/)
    await planner.context().close()
  })

  it('marking known-good is not offered, and refused where it is asked for all the same', async () => {
    await page.goto('/axes/LID-02.Z/versions/1')
    await page.getByRole('heading', { level: 1, name: 'LID-02.Z v1' }).waitFor()
    expect(await page.getByRole('button', { name: /Mark known-good|Set aside/ }).count()).toBe(0)
    const { json } = await server.call('GET', '/api/axes/tag:LID-02.Z/versions/1', { as: await server.signIn('technician') })
    const { status, json: problem } = await server.call('POST', `/api/versions/${(json as unknown as { id: number }).id}/known-good`, { as: await server.signIn('technician'), body: { meaning: 'approved', password: admin.password } })
    expect([status, problem.code]).toEqual([403, 'role'])
  })

  it('people are kept by administrators', async () => {
    await page.goto('/people')
    await page.getByText('People are kept by administrators.').waitFor()
    expect(await page.getByRole('button', { name: /Register/ }).count()).toBe(0)
  })
})

describe('files that are none', () => {
  const broken = [
    { name: 'huge.json', mimeType: 'application/json', buffer: Buffer.alloc(3 * 1024 * 1024, ' ') },
    { name: 'picture.png', mimeType: 'image/png', buffer: Buffer.from('89504e470d0a1a0a0000000d4948445200000001', 'hex') },
    { name: 'empty.json', mimeType: 'application/json', buffer: Buffer.alloc(0) },
    { name: 'comma.json', mimeType: 'application/json', buffer: Buffer.from('{\n  "schema": "witnessmark.axis-settings/1",,\n}') },
  ]

  it('are told by what is wrong with each, by line and column where there is one', async () => {
    await page.goto('/upload')
    await drop(page, broken)
    await page.getByText('1 not taken in:').waitFor()
    expect(await page.getByText('1 not taken in:').locator('..').innerText()).toMatch(/huge\.json, larger than 2\.1 MB/)
    await page.getByRole('heading', { level: 1, name: '3 files read. 3 for the tray' }).waitFor()
    const rows = page.getByRole('table', { name: 'Files, by axis' })
    expect((await rows.innerText()).match(/not readable/g)).toHaveLength(3)
    expect(await rows.innerText()).toMatch(/line 2, column 43/)
    await page.getByRole('button', { name: 'Leave out picture.png' }).click()
    await page.getByRole('heading', { level: 1, name: '2 files read. 2 for the tray' }).waitFor()
  })

  it('the mended file takes the place of the broken one', async () => {
    const picker = page.waitForEvent('filechooser')
    await page.getByText('Choose the mended file').last().click()
    await (await picker).setFiles({ ...known, name: 'mended.json' })
    await page.getByRole('heading', { level: 1, name: '2 files read. 1 seen again, 1 for the tray' }).waitFor()
  })
})
