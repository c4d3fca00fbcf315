import type { Browser, BrowserContext, Locator, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Swap, SwapKit } from '../../shared/api/swaps'
import { openWindow, phone, picture, sidewaysScroll, signIn, startBrowser, violations } from '../support/browser'
import { admin, people, startServer, type TestServer } from '../support/server'
import { gaveBack, swapPlantOn, type SwapPlant } from '../support/swap-floor'
import { downloaded } from '../support/walk'

/* From a dead unit to a released one, on a phone of 390 px at night, as a tired technician does it. */

let server: TestServer
let browser: Browser
let plant: SwapPlant
let context: BrowserContext
let page: Page

const open = () => page.locator('[aria-current="step"]')
const stepCalled = (name: string) => open().getByRole('heading', { name: new RegExp(`\\d ${name}`) })
const button = (name: string | RegExp, at: Page | Locator = page) => at.getByRole('button', { name })
const idOf = (at: Page) => Number(/\/swaps\/(\d+)/.exec(at.url())?.[1])
const read = async (id: number): Promise<Swap> => (await server.call('GET', `/api/swaps/${id}`, { as: plant.as.auditor })).json as unknown as Swap
const kitOf = async (id: number): Promise<SwapKit> => (await server.call('GET', `/api/swaps/${id}/kit`, { as: plant.as.technician })).json as unknown as SwapKit
const later = (minutes: number) => new Date(Date.now() + minutes * 60_000).toISOString()

/** Held by the pointer, as a thumb does. */
async function hold(name: RegExp, at: Page = page): Promise<void> {
  const held = button(name, at)
  await held.scrollIntoViewIfNeeded()
  const box = (await held.boundingBox())!
  await at.mouse.move(box.x + box.width / 2, box.y + box.height / 2)
  await at.mouse.down()
  await at.waitForTimeout(1300)
  await at.mouse.up()
}
/** Pressed twice, as who cannot hold does. */
async function pressTwice(name: RegExp, at: Page = page): Promise<void> {
  await button(name, at).click()
  await at.waitForTimeout(700)
  await button('Press once more', at).click()
}
async function begin(letters: string, tag: string, failure: string, part = 'whole unit'): Promise<number> {
  await page.goto('/swaps')
  const start = page.getByRole('region', { name: 'Begin a swap' })
  await start.waitFor()
  if (await button('Begin a swap', start).isVisible()) await button('Begin a swap', start).click()
  await start.getByLabel('Three characters of the tag').fill(letters)
  await start.getByRole('list', { name: 'Axes found' }).getByRole('button', { name: new RegExp(`^${tag}`) }).click()
  await start.getByRole('group', { name: /^Which unit sits there/ }).getByRole('radio').first().check()
  await start.getByRole('group', { name: 'What is replaced?' }).getByRole('radio', { name: part }).check()
  await start.getByLabel('What failed').fill(failure)
  await button(`Begin the swap of ${tag}`, start).click()
  await page.waitForURL(/\/swaps\/\d+$/)
  await stepCalled('With what').waitFor()
  return idOf(page)
}
async function take(serial: string): Promise<void> {
  await open().getByRole('radio', { name: new RegExp(`^${serial}`) }).check()
  await button(`Take ${serial}`).click()
}
async function tickAll(): Promise<void> {
  for (const box of await open().getByRole('checkbox').all()) await box.check()
}
const upload = async (file: ReturnType<typeof gaveBack>) => open().locator('input[type="file"]').first().setInputFiles(file)

beforeAll(async () => {
  [server, browser] = await Promise.all([startServer(), startBrowser()])
  plant = await swapPlantOn(server)
  for (const [tag, serial] of [['LID-02.Z', 'HL40-23-00417'], ['LID-03.Z', 'HL40-24-00552'], ['LID-04.Z', 'HL40-24-00817'], ['LID-05.Z', 'HL40-24-00990']] as const) await plant.known(tag, serial)
  for (const [serial, model] of [['HL40-25-00958', 'HL40-200V'], ['HL40-25-00961', 'HL40-200V'], ['HL50-25-01203', 'HL50-200V'], ['HL25-22-00031', 'HL25-100']] as const) await plant.spare(serial, model);
  ({ context, page } = await openWindow(browser, server.url, { size: phone, theme: 'night' }))
  await signIn(page, people.technician.email, admin.password)
})
afterAll(async () => {
  await browser?.close()
  await server?.stop()
})

describe('a whole swap, the network cut in the middle', () => {
  let id = 0
  const serial = 'HL40-25-00958'

  it('begins with three characters of the tag', async () => {
    id = await begin('02z', 'LID-02.Z', 'encoder fault')
    expect(await page.getByRole('heading', { level: 1 }).innerText()).toBe('LID-02.Z')
    expect((await page.getByRole('listitem').filter({ hasText: 'Which axis, what failed' }).innerText())).toMatch(/Whole unit HL40-23-00417, encoder fault/)
  })

  it('takes a spare that fits; one that does not says why and cannot be taken', async () => {
    await open().getByText('HL25-22-00031').waitFor()
    expect(await open().getByRole('radio', { name: /^HL25-22-00031/ }).count()).toBe(0)
    expect(await open().innerText()).toMatch(/HL25-22-00031, HL25-100: .*stroke of 100 mm/)
    expect(await violations(page)).toEqual([])
    await take(serial)
    await stepCalled('Kit').waitFor()
    expect((await read(id)).unitIn?.serial).toBe(serial)
  })

  it('gives the kit only after the cautions, and it says what the read-back must show', async () => {
    expect(await button(/Restore file JSON/).count()).toBe(0)
    await hold(/^Hold: I have read these/)
    await button(/^Restore file JSON/).waitFor()
    const { name, bytes } = await downloaded(page, () => button(/^Restore file JSON/).click())
    expect(name).toContain('LID-02.Z')
    expect((JSON.parse(bytes.toString()) as { unit: { serial: string } }).unit.serial).toBe(serial)
    expect(await page.getByRole('region', { name: 'Scribe code' }).innerText()).toContain((await kitOf(id)).scribeCode)
    await picture(page, 'swap-3')
    await button('I have the kit').click()
  })

  it('goes on without reception: made safe, written, read back, all waits on the phone', async () => {
    await stepCalled('Make it safe').waitFor()
    await context.setOffline(true)
    await open().getByRole('radio', { name: /^pin/ }).check()
    await pressTwice(/^Hold: all five are done/)
    await stepCalled('Write').waitFor()
    await page.getByText(/No reception since .* 1 entry waits on this device/).waitFor()
    await tickAll()
    await button('Written: go to the read-back').click()
    await stepCalled('Read back').waitFor()
    // The drive beside it was read by mistake.
    await upload(gaveBack(await kitOf(id), { serial: 'HL40-25-00961', at: later(1) }))
    await page.getByText(/Read-back HL40-25-00961\.json waits for reception/).waitFor()
    expect((await read(id)).step).toBe('safe')
    expect(await sidewaysScroll(page)).toBe(0)
    expect(await violations(page)).toEqual([])
    await picture(page, 'swap-6-offline')
  })

  it('survives that the page is closed, and is sent in order when the network is back', async () => {
    const address = page.url()
    await page.close()
    await context.setOffline(false)
    page = await context.newPage()
    await page.goto(address)
    await open().getByText('Another unit.').waitFor()
    const swap = await read(id)
    expect([swap.safe?.blocked, swap.readBacks.map(({ problem }) => problem)]).toEqual(['pin', ['serial']])
    expect(await page.getByText(/wait on this device/).count()).toBe(0)
  })

  it('compares the right unit: what differs is written again, then it is in line', async () => {
    const kit = await kitOf(id)
    await upload(gaveBack(kit, { serial, at: later(2), setup: { softLimitMax: 180 } }))
    await open().getByText('Differs').waitFor()
    expect(await open().innerText()).toMatch(/Soft limit, max setup[\s\S]*185\s*mm[\s\S]*the drive holds 180/)
    await upload(gaveBack(kit, { serial, at: later(3) }))
    await open().getByText(/^(Same|Identical)$/).waitFor()
    const codes = await open().locator('.codes b').allInnerTexts()
    expect(codes).toEqual([kit.scribeCode, kit.scribeCode])
    await button('Go to first motion').click()
    await stepCalled('First motion').waitFor()
  })

  it('moves slowly, item by item; a fault is told and repeated', async () => {
    await button(/^Fault$/, open()).click()
    await open().getByLabel('What happened').fill('went the other way')
    await button('Keep the fault', open()).click()
    await open().getByText('“went the other way”').waitFor()
    const items = (await kitOf(id)).firstMotion
    for (const _ of items) {
      const before = await open().innerText()
      await button(/^As it should$/, open()).click()
      await page.waitForFunction(text => document.querySelector<HTMLElement>('[aria-current="step"]')?.innerText !== text, before)
      if (await stepCalled('Running').isVisible()) break
    }
    await stepCalled('Running').waitFor()
    const { firstMotion, log } = await read(id)
    expect(new Set(firstMotion?.results.filter(({ outcome }) => outcome === 'ok').map(({ item }) => item)).size).toBe(items.length)
    expect(log.filter(({ text }) => text.includes('went the other way'))).toHaveLength(1)
  })

  it('runs, not released, with the as-left and a note for the day', async () => {
    await upload(gaveBack(await kitOf(id), { serial, at: later(4) }))
    await open().getByText(/is the as-left/).waitFor()
    await open().getByLabel('For the day shift').fill('Please look at the lid height of the first 50 jars.')
    await button('It runs: hand over').click()
    await stepCalled('Release').waitFor()
    expect(await open().innerText()).toContain('A planner signs, by day.')
  })

  it('is refused to the technician, and signed by a planner: the mark moves', async () => {
    const refused = await server.call('POST', `/api/swaps/${id}/release`, { as: plant.as.technician, body: { meaning: 'approved', password: admin.password } })
    expect(refused.status).toBe(403)
    const { page: planner } = await openWindow(browser, server.url)
    await signIn(planner, people.planner.email, admin.password)
    await planner.goto(`/swaps/${id}`)
    await planner.getByText(/^Handed over by Tobias Achterberg: Please look at the lid height/).waitFor()
    await button('Sign and release', planner).click()
    const dialog = planner.getByRole('dialog', { name: 'Release LID-02.Z' })
    await dialog.getByRole('radio', { name: 'to repair' }).check()
    await dialog.getByLabel('Your password', { exact: true }).fill(admin.password)
    await button('Sign and release', dialog).click()
    await planner.getByText(/The mark moved from v1 to v\d/).first().waitFor()
    expect(await violations(planner)).toEqual([])
    await planner.context().close()
    const swap = await read(id)
    expect([swap.step, swap.released?.carriedOver, swap.unitOut?.state]).toEqual(['released', true, 'repair'])
  })
})

describe('a unit with another rated thrust', () => {
  it('keeps the newtons: the percentages are confirmed by name before there is a kit', async () => {
    const id = await begin('05z', 'LID-05.Z', 'brake does not hold')
    await take('HL50-25-01203')
    await open().getByText('The newtons stay, the percentages change').waitFor()
    // 38 % of 640 N are 243.2 N, and 243.2 N of 800 N are 30.4 %.
    expect(await open().innerText()).toMatch(/Thrust limit setup\s*243\.2 N[\s\S]*38[\s\S]*30\.4/)
    expect(await sidewaysScroll(page)).toBe(0)
    await picture(page, 'swap-2-adjust')
    await hold(/^Hold: the newtons are right, Tobias Achterberg/)
    await stepCalled('Kit').waitFor()
    expect((await read(id)).forcesConfirmed?.by).toBe(people.technician.name)
  })
})

describe('only the drive', () => {
  it('goes in by its serial from the plate; the actuator stays', async () => {
    const id = await begin('03z', 'LID-03.Z', 'drive dead', 'drive only')
    await open().getByRole('radio', { name: /^Another serial/ }).check()
    await open().getByLabel('Serial of the new unit').fill('HL40-26-03001')
    await open().getByRole('combobox', { name: 'Model' }).fill('HL40-200V')
    await open().getByLabel(/^Firmware/).fill('3.12')
    await button('Take HL40-26-03001').click()
    await stepCalled('Kit').waitFor()
    await pressTwice(/^Hold: I have read these/)
    await button('I have the kit').click()
    await open().getByText('Fit the drive.').waitFor()
    const swap = await read(id)
    expect([swap.replaced, swap.unitIn?.serial, swap.step]).toEqual(['drive', 'HL40-26-03001', 'safe'])
  })
})

describe('an unfit unit, and the way back', () => {
  let id = 0
  it('of a model that nobody knows goes in only with a planner’s name and reason', async () => {
    id = await begin('04z', 'LID-04.Z', 'encoder fault')
    await open().getByRole('radio', { name: /^Another serial/ }).check()
    await open().getByLabel('Serial of the new unit').fill('XK-1')
    await open().getByRole('combobox', { name: 'Model' }).fill('XK-200')
    await button('Take XK-1').click()
    await open().getByText('does not fit.').waitFor()
    const go = button(/^go on with XK-1$|^Hold: go on with XK-1$/)
    expect(await go.isDisabled()).toBe(true)
    await open().getByLabel('The planner who allows it').fill('Runa Haldersen')
    await open().getByLabel('Why it goes in all the same').fill('no other in the house')
    await pressTwice(/^Hold: go on with XK-1$/)
    await stepCalled('Kit').waitFor()
    expect((await read(id)).unfit).toMatchObject({ by: 'Runa Haldersen', reason: 'no other in the house' })
  })

  it('the old unit goes back by a button', async () => {
    await button('Put the old unit back').click()
    const dialog = page.getByRole('dialog', { name: 'Put the old unit back' })
    expect(await violations(page)).toEqual([])
    await dialog.getByLabel('Why').fill('the plug was loose')
    await button('Put HL40-24-00817 back', dialog).click()
    await page.getByText('The old unit is back in.').waitFor()
    const swap = await read(id)
    expect([swap.putBack, swap.unitIn?.serial]).toEqual([true, 'HL40-24-00817'])
  })
})

describe('two devices on one swap', () => {
  it('what one did while the other had no reception is shown, and the person decides', async () => {
    await page.goto('/swaps')
    await page.getByRole('link', { name: /^LID-03\.Z/ }).click()
    await stepCalled('Make it safe').waitFor()
    const id = idOf(page)
    await context.setOffline(true)
    await open().getByRole('radio', { name: /^prop/ }).check()
    await pressTwice(/^Hold: all five are done/)
    await stepCalled('Write').waitFor()
    const other = await server.call('POST', `/api/swaps/${id}/safe`, { as: plant.as.planner, body: { confirmed: true, blocked: 'lowered' } })
    expect(other.status).toBe(200)
    await context.setOffline(false)
    const told = page.getByRole('alert', { name: 'Not taken' })
    await told.waitFor({ timeout: 30_000 })
    expect(await told.innerText()).toMatch(/Another device went on\. Yours was not taken: made safe, prop[\s\S]*Runa Haldersen/)
    expect(await violations(page)).toEqual([])
    await picture(page, 'swap-conflict')
    await button('Leave mine out', told).click()
    await told.waitFor({ state: 'detached' })
    expect((await read(id)).safe?.blocked).toBe('lowered')
  })
})

describe('who may not', () => {
  it('an auditor reads every step and is offered none', async () => {
    const { page: auditor } = await openWindow(browser, server.url, { size: { width: 320, height: 700 } })
    await signIn(auditor, people.auditor.email, admin.password)
    await auditor.goto('/swaps')
    await auditor.getByRole('link', { name: /^LID-05\.Z/ }).click()
    await auditor.getByText('A technician or a planner does this step.').waitFor()
    expect(await button(/Abandon|Put the old|I have the kit/, auditor).count()).toBe(0)
    expect(await sidewaysScroll(auditor)).toBe(0)
    await auditor.context().close()
  })
})

describe('the way there', () => {
  it('leads from the axis, and says there that a swap is open', async () => {
    await page.goto('/axes/LID-05.Z')
    await page.getByText(/Swap open since/).waitFor()
    expect(await button('Swap the unit').count()).toBe(0)
    await page.getByRole('link', { name: /^Go on with swap/ }).click()
    await stepCalled('Kit').waitFor()
    await page.goto('/axes/LID-02.Z')
    await page.getByRole('link', { name: 'Swap the unit' }).click()
    await page.getByRole('group', { name: /^Which unit sits there/ }).waitFor()
  })
})
