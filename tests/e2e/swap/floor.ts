import type { Browser, BrowserContext, Locator, Page } from 'playwright-core'
import type { Swap, SwapKit } from '../../../shared/api/swaps'
import { openWindow, phone, signIn, startBrowser } from '../../support/browser'
import { admin, people, startServer, type TestServer } from '../../support/server'
import { swapPlantOn, type gaveBack, type SwapPlant } from '../../support/swap-floor'

/*
 * What the walks of a swap have in common: one server, one plant, and the technician's phone of 390 px at night. Made before
 * the first of them (begin), closed after the last (end).
 */
interface Floor { server: TestServer, browser: Browser, plant: SwapPlant, context: BrowserContext, page: Page }
export const floor = {} as Floor

export async function beginFloor(): Promise<void> {
  const [server, browser] = await Promise.all([startServer(), startBrowser()])
  const plant = await swapPlantOn(server)
  for (const [tag, serial] of [['LID-02.Z', 'HL40-23-00417'], ['LID-03.Z', 'HL40-24-00552'], ['LID-04.Z', 'HL40-24-00817'], ['LID-05.Z', 'HL40-24-00990'], ['LID-06.Z', 'HL40-24-01107']] as const) await plant.known(tag, serial)
  for (const [serial, model] of [['HL40-25-00958', 'HL40-200V'], ['HL40-25-00961', 'HL40-200V'], ['HL40-25-00970', 'HL40-200V'], ['HL50-25-01203', 'HL50-200V'], ['HL25-22-00031', 'HL25-100']] as const) await plant.spare(serial, model)
  Object.assign(floor, { server, browser, plant }, await openWindow(browser, server.url, { size: phone, theme: 'night' }))
  await signIn(floor.page, people.technician.email, admin.password)
}
export async function endFloor(): Promise<void> {
  await floor.browser?.close()
  await floor.server?.stop()
}
/** The phone's page once more, in a window of its own. */
export async function openAgain(address: string): Promise<void> {
  floor.page = await floor.context.newPage()
  await floor.page.goto(address)
}

export const open = () => floor.page.locator('[aria-current="step"]')
export const stepCalled = (name: string) => open().getByRole('heading', { name: new RegExp(`\\d ${name}`) })
export const button = (name: string | RegExp, at: Page | Locator = floor.page) => at.getByRole('button', { name })
export const idOf = (at: Page) => Number(/\/swaps\/(\d+)/.exec(at.url())?.[1])
export const read = async (id: number): Promise<Swap> => (await floor.server.call('GET', `/api/swaps/${id}`, { as: floor.plant.as.auditor })).json as unknown as Swap
export const kitOf = async (id: number): Promise<SwapKit> => (await floor.server.call('GET', `/api/swaps/${id}/kit`, { as: floor.plant.as.technician })).json as unknown as SwapKit
export const later = (minutes: number) => new Date(Date.now() + minutes * 60_000).toISOString()

/** Held by the pointer, as a thumb does. */
export async function hold(name: RegExp, at: Page = floor.page): Promise<void> {
  const held = button(name, at)
  await held.scrollIntoViewIfNeeded()
  const box = (await held.boundingBox())!
  await at.mouse.move(box.x + box.width / 2, box.y + box.height / 2)
  await at.mouse.down()
  await at.waitForTimeout(1300)
  await at.mouse.up()
}
/** Pressed twice, as who cannot hold does. */
export async function pressTwice(name: RegExp, at: Page = floor.page): Promise<void> {
  await button(name, at).click()
  await at.waitForTimeout(700)
  await button('Press once more', at).click()
}
export async function begin(letters: string, tag: string, failure: string, part = 'whole unit'): Promise<number> {
  await floor.page.goto('/swaps')
  const start = floor.page.getByRole('region', { name: 'Begin a swap' })
  await start.waitFor()
  if (await button('Begin a swap', start).isVisible()) await button('Begin a swap', start).click()
  await start.getByLabel('Three characters of the tag').fill(letters)
  await start.getByRole('list', { name: 'Axes found' }).getByRole('button', { name: new RegExp(`^${tag}`) }).click()
  await start.getByRole('group', { name: /^Which unit sits there/ }).getByRole('radio').first().check()
  await start.getByRole('group', { name: 'What is replaced?' }).getByRole('radio', { name: part }).check()
  await start.getByLabel('What failed').fill(failure)
  await button(`Begin the swap of ${tag}`, start).click()
  await floor.page.waitForURL(/\/swaps\/\d+$/)
  await stepCalled('With what').waitFor()
  return idOf(floor.page)
}
export async function take(serial: string): Promise<void> {
  await open().getByRole('radio', { name: new RegExp(`^${serial}`) }).check()
  await button(`Take ${serial}`).click()
}
export async function tickAll(): Promise<void> {
  for (const box of await open().getByRole('checkbox').all()) await box.check()
}
export const upload = async (file: ReturnType<typeof gaveBack>) => open().locator('input[type="file"]').first().setInputFiles(file)
