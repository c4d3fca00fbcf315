import { describe, expect, it } from 'vitest'
import { openWindow, picture, sidewaysScroll, signIn, violations } from '../../support/browser'
import { admin, people } from '../../support/server'
import { gaveBack } from '../../support/swap-floor'
import { downloaded } from '../../support/walk'
import { begin, button, floor, hold, kitOf, later, open, openAgain, pressTwice, read, stepCalled, take, tickAll, upload } from './floor'

/** From a dead unit to a released one. */
export function wholeSwap(): void {
  describe('a whole swap, the network cut in the middle', () => {
    let id = 0
    const serial = 'HL40-25-00958'

    it('begins with three characters of the tag', async () => {
      id = await begin('02z', 'LID-02.Z', 'encoder fault')
      expect(await floor.page.getByRole('heading', { level: 1 }).innerText()).toBe('LID-02.Z')
      expect((await floor.page.getByRole('listitem').filter({ hasText: 'Which axis, what failed' }).innerText())).toMatch(/Whole unit HL40-23-00417, encoder fault/)
    })

    it('takes a spare that fits; one that does not says why and cannot be taken', async () => {
      await open().getByText('HL25-22-00031').waitFor()
      expect(await open().getByRole('radio', { name: /^HL25-22-00031/ }).count()).toBe(0)
      expect(await open().innerText()).toMatch(/HL25-22-00031, HL25-100: .*stroke of 100 mm/)
      expect(await violations(floor.page)).toEqual([])
      await take(serial)
      await stepCalled('Kit').waitFor()
      expect((await read(id)).unitIn?.serial).toBe(serial)
    })

    it('gives the kit only after the cautions, and it says what the read-back must show', async () => {
      expect(await button(/Restore file JSON/).count()).toBe(0)
      await hold(/^Hold: I have read these/)
      await button(/^Restore file JSON/).waitFor()
      const { name, bytes } = await downloaded(floor.page, () => button(/^Restore file JSON/).click())
      expect(name).toContain('LID-02.Z')
      expect((JSON.parse(bytes.toString()) as { unit: { serial: string } }).unit.serial).toBe(serial)
      expect(await floor.page.getByRole('region', { name: 'Scribe code' }).innerText()).toContain((await kitOf(id)).scribeCode)
      await picture(floor.page, 'swap-3')
      await button('I have the kit').click()
      await expect.poll(async () => (await read(id)).ticks.kit?.by).toBe(people.technician.name)
    })

    it('goes on without reception: made safe, written, read back, all waits on the phone', async () => {
      await stepCalled('Make it safe').waitFor()
      await floor.context.setOffline(true)
      await open().getByRole('radio', { name: /^pin/ }).check()
      await pressTwice(/^Hold: all five are done/)
      await stepCalled('Write').waitFor()
      await floor.page.getByText(/No reception since .* 1 entry waits on this device/).waitFor()
      await tickAll()
      await button('Written: go to the read-back').click()
      await stepCalled('Read back').waitFor()
      // The drive beside it was read by mistake.
      await upload(gaveBack(await kitOf(id), { serial: 'HL40-25-00961', at: later(1) }))
      await floor.page.getByText(/Read-back HL40-25-00961\.json waits for reception/).waitFor()
      expect((await read(id)).step).toBe('safe')
      expect(await sidewaysScroll(floor.page)).toBe(0)
      expect(await violations(floor.page)).toEqual([])
      await picture(floor.page, 'swap-6-offline')
    })

    it('survives that the page is closed, and is sent in order when the network is back', async () => {
      const address = floor.page.url()
      await floor.page.close()
      await floor.context.setOffline(false)
      await openAgain(address)
      await open().getByText('Another unit.').waitFor()
      const swap = await read(id)
      expect([swap.safe?.blocked, swap.readBacks.map(({ problem }) => problem)]).toEqual(['pin', ['serial']])
      expect(await floor.page.getByText(/wait on this device/).count()).toBe(0)
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
        await floor.page.waitForFunction(text => document.querySelector<HTMLElement>('[aria-current="step"]')?.innerText !== text, before)
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
      const refused = await floor.server.call('POST', `/api/swaps/${id}/release`, { as: floor.plant.as.technician, body: { meaning: 'approved', password: admin.password } })
      expect(refused.status).toBe(403)
      const { page: planner } = await openWindow(floor.browser, floor.server.url)
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
}
