import type { BrowserContext, Locator, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Swap } from '../../../shared/api/swaps'
import { openWindow, phone, picture, sidewaysScroll, signIn, violations } from '../../support/browser'
import { cutLineTo, type CutLine } from '../../support/cut-line'
import { admin, people } from '../../support/server'
import { gaveBack } from '../../support/swap-floor'
import { button, floor, kitOf, later, pressTwice, read } from './floor'

const stepAt = (at: Page) => at.locator('[aria-current="step"]')
const heading = (at: Page, name: string) => stepAt(at).getByRole('heading', { name: new RegExp(`\\d ${name}`) })
const line = (at: Page, label: RegExp): Locator => stepAt(at).getByRole('checkbox', { name: label })
const ticked = async (at: Page) => (await Promise.all((await stepAt(at).getByRole('checkbox').all()).map(box => box.isChecked()))).filter(Boolean).length

/** How many lines are ticked in the copy of a swap that a device keeps. */
const linesKept = (at: Page, id: number) => at.evaluate(name => new Promise<number>((resolve) => {
  const asked = indexedDB.open('witnessmark')
  asked.onsuccess = () => {
    const row = asked.result.transaction('copies').objectStore('copies').get(name) as IDBRequest<{ value: Swap } | undefined>
    row.onsuccess = () => resolve(row.result?.value.ticks.lines.length ?? 0)
  }
}), `/api/swaps/${id}`)

/** A phone whose line is truly cut, for its pages and for its service worker, and a second device beside it. */
export function withoutReception(): void {
  describe('a phone without reception, and a second device', () => {
    let cable: CutLine
    let context: BrowserContext
    let page: Page
    let id = 0
    const serial = 'HL40-25-00970'

    beforeAll(async () => {
      cable = await cutLineTo(floor.server.url);
      ({ context, page } = await openWindow(floor.browser, cable.url, { size: phone, theme: 'night' }))
      await signIn(page, people.technician.email, admin.password)
    })
    afterAll(async () => {
      await context?.close()
      await cable?.cut()
    })

    it('opens the swap from the list and keeps what it is made of', async () => {
      await page.goto('/swaps')
      await page.getByRole('link', { name: /^LID-06\.Z/ }).click()
      await heading(page, 'Kit').waitFor()
      id = Number(/\/swaps\/(\d+)/.exec(page.url())?.[1])
      await button('I have the kit', page).click()
      await heading(page, 'Make it safe').waitFor()
      await stepAt(page).getByRole('radio', { name: /^pin/ }).check()
      await pressTwice(/^Hold: all five are done/, page)
      await heading(page, 'Write').waitFor()
      await line(page, /^Reset/).check()
      await page.evaluate(async () => { await navigator.serviceWorker.ready })
      await page.waitForFunction(async () => (await caches.keys()).some(name => name.startsWith('witnessmark-shell-')))
      const { paths, answers } = await page.evaluate(async () => {
        const [name = ''] = await caches.keys()
        const cache = await caches.open(name)
        const kept = await cache.keys()
        const texts = await Promise.all(kept.map(async request => (await cache.match(request))?.text() ?? ''))
        return { paths: kept.map(({ url }) => new URL(url).pathname), answers: texts.join('\n') }
      })
      expect(paths).toContain('/swaps')
      // The shell is the same for everybody: no answer of the vault, no name, no tag.
      expect(paths.filter(path => path.startsWith('/api'))).toEqual([])
      expect(answers).not.toMatch(/Achterberg|LID-06\.Z|HL40-25-00970/)
    })

    it('a reload in the middle shows it as last seen, with what waits, and goes on', async () => {
      await expect.poll(() => linesKept(page, id)).toBe(1)
      await cable.cut()
      await line(page, /^Clear/).check()
      await page.getByText(/No reception since .* 1 entry waits on this device/).waitFor()
      await page.reload()
      await heading(page, 'Write').waitFor()
      await page.getByText(/Shown as last seen \d\d:\d\d CES?T\. What another device did since is not here yet\./).waitFor()
      expect(await ticked(page)).toBe(2)
      await line(page, /^Write \d+ values/).check()
      await page.getByText(/2 entries wait on this device/).waitFor()
      expect(await sidewaysScroll(page)).toBe(0)
      expect(await violations(page)).toEqual([])
      await picture(page, 'swap-5-reload-offline')
    })

    it('the list opens too, and a swap that was never opened here says that there is no copy', async () => {
      await page.goto('/swaps')
      await page.getByText(/What stands below is as last seen/).waitFor()
      await page.getByRole('link', { name: /^LID-06\.Z/ }).waitFor()
      await page.goto(`/swaps/${id + 1000}`)
      await page.getByText('This device has no copy of this swap').waitFor()
      expect(await violations(page)).toEqual([])
      await page.goto(`/swaps/${id}`)
      await heading(page, 'Write').waitFor()
    })

    it('a second device goes on at the same line, and the phone shows what it did and asks', async () => {
      const { context: other, page: panel } = await openWindow(floor.browser, floor.server.url, { size: { width: 320, height: 700 } })
      await signIn(panel, people.planner.email, admin.password)
      await panel.goto(`/swaps/${id}`)
      await heading(panel, 'Write').waitFor()
      await stepAt(panel).getByText(/^done \d\d:\d\d CES?T, Tobias Achterberg$/).waitFor()
      expect(await ticked(panel)).toBe(1)
      await line(panel, /^Restart/).check()
      await expect.poll(async () => (await read(id)).ticks.lines.map(({ by }) => by)).toEqual(['Tobias Achterberg', 'Runa Haldersen'])
      expect(await sidewaysScroll(panel)).toBe(0)
      expect(await violations(panel)).toEqual([])
      await picture(panel, 'swap-5-second-device')
      await other.close()

      await cable.mend()
      const told = page.getByRole('alert', { name: 'Not taken' })
      await told.waitFor({ timeout: 30_000 })
      expect(await told.innerText()).toMatch(/Another device went on\. Yours was not taken: Clear[\s\S]*Runa Haldersen: Done: Restart the drive\.[\s\S]*1 entry of yours waits behind it/)
      expect(await violations(page)).toEqual([])
      await picture(page, 'swap-5-conflict')
      await button('Send mine all the same', told).click()
      await told.waitFor({ state: 'detached' })
      await expect.poll(async () => (await read(id)).ticks.lines.map(({ line: name }) => name)).toEqual(['reset', 'restart', 'clear', 'values'])
      expect(await ticked(page)).toBe(4)
    })

    it('a read-back of 1.8 MiB waits through a reload without reception, and is compared when it is back', async () => {
      for (const box of await stepAt(page).getByRole('checkbox').all()) await box.check()
      await button('Written: go to the read-back', page).click()
      await heading(page, 'Read back').waitFor()
      await expect.poll(async () => (await read(id)).ticks.written !== null).toBe(true)
      const file = gaveBack(await kitOf(id), { serial, at: later(2) })
      const padded = Buffer.concat([file.buffer, Buffer.alloc(Math.floor(1.8 * 1024 * 1024) - file.buffer.byteLength, ' ')])
      await cable.cut()
      const tooLarge = Buffer.alloc(2 * 1024 * 1024 + 1, ' ')
      await stepAt(page).locator('input[type="file"]').first().setInputFiles({ ...file, name: 'whole-plant.json', buffer: tooLarge })
      await stepAt(page).getByText(/whole-plant\.json is over 2 MiB/).waitFor()
      await stepAt(page).locator('input[type="file"]').first().setInputFiles({ ...file, buffer: padded })
      await page.getByText(/Read-back HL40-25-00970\.json waits for reception/).waitFor()
      await page.reload()
      await page.getByText(/Read-back HL40-25-00970\.json waits for reception/).waitFor()
      expect((await read(id)).readBacks).toEqual([])
      await cable.mend()
      await stepAt(page).getByText(/^(Same|Identical)$/).waitFor({ timeout: 30_000 })
      await button('Go to first motion', page).click()
      await heading(page, 'First motion').waitFor()
    })

    it('a fault told twice for one move stands twice, and a note that was begun is found by another device', async () => {
      for (const words of ['went the other way', 'stops at 90 mm']) {
        await button(/^Fault$/, stepAt(page)).click()
        await stepAt(page).getByLabel('What happened').fill(words)
        await button('Keep the fault', stepAt(page)).click()
        await stepAt(page).getByText(`“${words}”`).waitFor()
      }
      expect(await stepAt(page).getByText(/fault .*Tobias Achterberg: “(went the other way|stops at 90 mm)”/).count()).toBe(2)
      expect(await violations(page)).toEqual([])
      await picture(page, 'swap-7-faults')
      for (const { item } of (await kitOf(id)).firstMotion) {
        await button(/^As it should$/, stepAt(page)).click()
        await expect.poll(async () => (await read(id)).firstMotion?.results.some(result => result.item === item && result.outcome === 'ok')).toBe(true)
      }
      await heading(page, 'Running').waitFor()
      await stepAt(page).getByLabel('For the day shift').fill('Lamp of X4 is dim.')
      await stepAt(page).getByLabel('For the day shift').blur()
      await stepAt(page).getByText(/Kept .*another device finds it too\./).waitFor()
      expect((await read(id)).draft).toMatchObject({ note: 'Lamp of X4 is dim.', by: 'Tobias Achterberg' })
      const as = floor.plant.as.planner
      expect((await floor.server.call('POST', `/api/swaps/${id}/note`, { as, body: { note: 'Lamp of X4 is dim: plug loose.' } })).status).toBe(200)
      await expect.poll(async () => stepAt(page).getByLabel('For the day shift').inputValue(), { timeout: 15_000 }).toBe('Lamp of X4 is dim: plug loose.')
      expect(await violations(page)).toEqual([])
      await picture(page, 'swap-8-note')
    })

    it('leaves nothing of it on the phone after the sign-out', async () => {
      const copies = () => page.evaluate(() => new Promise<number>((resolve) => {
        const asked = indexedDB.open('witnessmark')
        asked.onsuccess = () => { asked.result.transaction('copies').objectStore('copies').count().onsuccess = ({ target }) => resolve((target as IDBRequest<number>).result) }
      }))
      expect(await copies()).toBeGreaterThan(3)
      await button('Menu', page).click()
      await button('Sign out', page).click()
      await page.waitForURL(/\/sign-in/)
      await expect.poll(copies).toBe(0)
      await cable.cut()
      await page.goto(`/swaps/${id}`)
      await page.getByText('This device has no copy of this swap').waitFor()
      expect(await page.locator('body').innerText()).not.toMatch(/LID-06\.Z|Achterberg/)
    })
  })
}
