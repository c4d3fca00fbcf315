import jsonPatch from 'fast-json-patch'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { plantFile } from '../../scripts/demo-files'
import { openWindow, signIn, startBrowser } from '../support/browser'
import { csvFile, inserted, jsonFile, lidPress, type PickedFile } from '../support/lid-press'
import { pdfText } from '../support/paper'
import { admin, people, startServer, type TestServer } from '../support/server'
import { plantOn } from '../support/server-plant'
import { downloaded } from '../support/walk'

/* The auditor reads everything and changes nothing. */

let server: TestServer
let browser: Browser
let page: Page

const first = lidPress()
const files: PickedFile[] = [
  jsonFile('lid-02.z.json', first),
  csvFile('nacht.csv', {
    ...lidPress({ exportedAt: '2024-12-04T02:10:00+01:00', setup: { thrustLimit: 52 } }),
    moves: inserted(first.moves, { move: 3, label: 'Hold lid', kind: 'absolute', target: 103, speed: 20, acceleration: 300 }),
  }),
]

beforeAll(async () => {
  [server, browser] = await Promise.all([startServer(), startBrowser()])
  const plant = await plantOn(server)
  await plant.axis('LID-02.Z', 'HL40-23-00417', { flags: ['gravity', 'press'] })
  await plant.post('/api/nameplates', plantFile().nameplates.find(plate => plate.model === 'HL40-200V'))
  const [one, two] = files as [PickedFile, PickedFile]
  expect((await plant.upload(one.buffer, '?occasion=commissioning')).status).toBe(201)
  const { json } = await server.call('GET', '/api/axes/tag:LID-02.Z/versions/1', { as: plant.as.planner })
  expect((await server.call('POST', `/api/versions/${(json as unknown as { id: number }).id}/known-good`, { as: plant.as.planner, body: { meaning: 'approved', note: 'Accepted with the line', password: admin.password } })).status).toBe(201)
  expect((await plant.upload(two.buffer, '?changedBy=Night+shift&name=nacht.csv', { type: 'text/csv' })).status).toBe(201);
  ({ page } = await openWindow(browser, server.url))
  await signIn(page, people.auditor.email, admin.password)
})
afterAll(async () => {
  await browser?.close()
  await server?.stop()
})

describe('what the auditor reads', () => {
  it('the life of the axis: what happened, when, by whom', async () => {
    await page.getByRole('link', { name: 'LID-02.Z', exact: true }).first().click()
    await page.getByRole('heading', { level: 1, name: 'LID-02.Z' }).waitFor()
    const life = page.getByRole('table', { name: 'What happened, newest first' })
    const words = await life.innerText()
    expect(words).toMatch(/v2[\s\S]*Tobias Achterberg/)
    expect(words).toMatch(/v1 marked known-good[\s\S]*Runa Haldersen[\s\S]*Accepted with the line/)
    expect(words).toContain('unit HL40-23-00417 fitted')
    expect(await page.getByText('off its known-good by').innerText()).toContain('harm')
  })

  it('one value over all versions: who changed it, and what it stands against', async () => {
    const over = page.getByRole('region', { name: 'A value over time' })
    await over.getByLabel('Which value').selectOption('thrustLimit')
    const steps = over.getByRole('table', { name: 'Each change, newest first' })
    await steps.getByText('Night shift').waitFor()
    expect(await steps.innerText()).toMatch(/1[\s\S]*38[\s\S]*52[\s\S]*Night shift[\s\S]*v1 to v2[\s\S]*first reading/)
    expect(await over.getByRole('img').getAttribute('aria-label')).toMatch(/^Thrust limit of LID-02\.Z: 38 % of rated from .*, 52 % of rated since .*\. Known-good is 38 % of rated, v1\. .*Nameplate: at most 250\.$/)
    await over.getByText('What it stands against').click()
    expect(await over.getByRole('table', { name: 'Known-good values and limits' }).innerText()).toMatch(/known-good v1[\s\S]*38 % of rated[\s\S]*nameplate[\s\S]*at most 250 % of rated/)
    await over.getByLabel('Where').selectOption('move 2')
    await over.getByText('Target of move 2: never changed in 2 versions').waitFor()
  })

  it('who changed the thrust limit on the night shift: found from the board in four actions, and taken away on paper', async () => {
    await page.goto('/')
    await page.getByRole('navigation', { name: 'Main' }).getByRole('link', { name: 'History' }).click()
    await page.getByLabel('What', { exact: true }).selectOption('thrustLimit')
    const row = page.getByRole('table', { name: 'Each change, newest first' }).getByRole('row').filter({ hasText: 'thrust limit' })
    await row.getByText('Night shift').waitFor()
    expect(await row.innerText()).toMatch(/LID-02\.Z[\s\S]*thrust limit[\s\S]*38[\s\S]*52[\s\S]*Night shift[\s\S]*stored by Tobias Achterberg[\s\S]*Nobody named[\s\S]*no reason given[\s\S]*finding \d+, open[\s\S]*v1 to v2/)
    await row.getByRole('link', { name: 'thrust limit' }).click()
    await page.getByRole('heading', { name: 'Thrust limit, LID-02.Z' }).waitFor()
    expect(await page.getByRole('img', { name: /^Thrust limit of LID-02\.Z/ }).getAttribute('aria-label')).toContain('Known-good is 38 %')
    const pdf = await downloaded(page, () => page.getByRole('link', { name: 'PDF for the binder' }).click())
    const paper = pdfText(pdf.bytes)
    expect(paper).toMatch(/Who changed the thrust limit on LID-02\.Z[\s\S]*Checkpoint of the log[\s\S]*Night shift[\s\S]*page 1 of 1/)
    const csv = await downloaded(page, () => page.getByRole('link', { name: 'CSV', exact: true }).click())
    expect(csv.bytes.toString()).toMatch(/setup,,thrustLimit,38,52,%[\s\S]*# lines,1/)
    await page.goto('/')
    await page.getByRole('link', { name: 'LID-02.Z', exact: true }).first().click()
    await page.getByRole('heading', { level: 1, name: 'LID-02.Z' }).waitFor()
  })

  it('a version, and its file in both forms', async () => {
    await page.getByRole('table', { name: 'What happened, newest first' }).getByRole('link', { name: /^v2/ }).click()
    await page.getByRole('heading', { level: 1, name: 'LID-02.Z v2' }).waitFor()
    const json = await downloaded(page, () => page.getByRole('link', { name: 'As JSON' }).click())
    expect(JSON.parse(json.bytes.toString())).toMatchObject({ schema: 'witnessmark.axis-settings/1', setup: { thrustLimit: 52 } })
    const csv = await downloaded(page, () => page.getByRole('link', { name: 'As CSV' }).click())
    expect(csv.bytes.toString()).toContain('setup,,thrustLimit,52,%')
  })

  it('the file as it came, byte for byte', async () => {
    for (const [index, file] of files.entries()) {
      await page.goto(`/axes/LID-02.Z/versions/${index + 1}`)
      const original = await downloaded(page, () => page.getByRole('link', { name: 'As it came, byte for byte' }).click())
      expect(original.bytes.equals(file.buffer)).toBe(true)
    }
  })

  it('the changes, by weight and by what rows do', async () => {
    await page.goto('/axes/LID-02.Z/versions/2')
    await page.getByRole('link', { name: 'Compare with known-good v1' }).click()
    await page.getByText('Moves 3–7 became 4–8.').waitFor()
    const harm = page.getByRole('table', { name: 'Changed values by weight' })
    expect(await harm.innerText()).toMatch(/thrust limit[\s\S]*38[\s\S]*52[\s\S]*\+14/i)
    expect(await page.getByRole('region', { name: 'The two versions' }).innerText()).toContain('Night shift')
  })

  it('the plain text difference and a JSON Patch that leads from one content to the other', async () => {
    const [text] = await Promise.all([page.context().waitForEvent('page'), page.getByRole('link', { name: 'Text difference' }).click()])
    await text.waitForLoadState()
    const shown = await text.innerText('body')
    expect(shown).toContain('-setup,,thrustLimit,38,%')
    expect(shown).toContain('+setup,,thrustLimit,52,%')
    await text.close()

    const patch = await downloaded(page, () => page.getByRole('link', { name: 'JSON Patch' }).click())
    const as = await server.signIn('auditor')
    const [before, after] = await Promise.all([1, 2].map(async number => ((await server.call('GET', `/api/axes/tag:LID-02.Z/versions/${number}`, { as })).json as unknown as { content: object }).content))
    expect(jsonPatch.applyPatch(before, JSON.parse(patch.bytes.toString()), true, false).newDocument).toEqual(after)
  })
})

describe('what the auditor is not offered', () => {
  const offered = async (address: string, ready: string) => {
    await page.goto(address)
    await page.getByText(ready).first().waitFor()
    return page.getByRole('main').locator('button, a.btn').allInnerTexts()
  }

  it('on the axis and the version: no kit, no upload, no mark, nothing set aside', async () => {
    const forbidden = /kit|upload|mark|set aside/i
    expect((await offered('/axes/LID-02.Z', 'Its life')).filter(word => forbidden.test(word))).toEqual([])
    expect((await offered('/axes/LID-02.Z/versions/2', 'The file')).filter(word => forbidden.test(word))).toEqual([])
  })

  it('in the registers: read, not register, edit or end', async () => {
    const forbidden = /register|edit|end|make|fit|change/i
    expect((await offered('/places', 'To be read here.')).filter(word => forbidden.test(word))).toEqual([])
    expect((await offered('/units', 'HL40-23-00417')).filter(word => forbidden.test(word))).toEqual([])
    expect((await offered('/nameplates', 'Models')).filter(word => forbidden.test(word))).toEqual([])
    expect((await offered('/rules', 'Rules that hold')).filter(word => forbidden.test(word))).toEqual([])
  })

  it('upload, tray and people say whose work they are, and the menu leaves them out', async () => {
    expect(await offered('/upload', 'You may read, not upload.')).toEqual([])
    expect(await offered('/tray', 'The tray is worked through by technicians and planners.')).toEqual([])
    expect(await offered('/people', 'People are kept by administrators.')).toEqual([])
    expect(await page.getByRole('navigation', { name: 'Main' }).getByRole('link').allInnerTexts()).toEqual(['Board', 'Swaps', 'Units', 'Findings', 'Planned', 'History', 'Trail', 'Places', 'Nameplates', 'Rules', 'Format', 'Interface', 'Help'])
  })
})
