import { describe, expect, it } from 'vitest'
import { openWindow, picture, sidewaysScroll, signIn, violations } from '../../support/browser'
import { admin, people } from '../../support/server'
import { begin, button, floor, hold, idOf, open, pressTwice, read, stepCalled, take } from './floor'

/** Other units, other ways out, other people. */
export function otherSwaps(): void {
  describe('a unit with another rated thrust', () => {
    it('keeps the newtons: the percentages are confirmed by name before there is a kit', async () => {
      const id = await begin('05z', 'LID-05.Z', 'brake does not hold')
      await take('HL50-25-01203')
      await open().getByText('The newtons stay, the percentages change').waitFor()
      // 38 % of 640 N are 243.2 N, and 243.2 N of 800 N are 30.4 %.
      expect(await open().innerText()).toMatch(/Thrust limit setup\s*243\.2 N[\s\S]*38[\s\S]*30\.4/)
      expect(await sidewaysScroll(floor.page)).toBe(0)
      await picture(floor.page, 'swap-2-adjust')
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
      const dialog = floor.page.getByRole('dialog', { name: 'Put the old unit back' })
      expect(await violations(floor.page)).toEqual([])
      await dialog.getByLabel('Why').fill('the plug was loose')
      await button('Put HL40-24-00817 back', dialog).click()
      await floor.page.getByText('The old unit is back in.').waitFor()
      const swap = await read(id)
      expect([swap.putBack, swap.unitIn?.serial]).toEqual([true, 'HL40-24-00817'])
    })
  })

  describe('two devices on one swap', () => {
    it('what one did while the other had no reception is shown, and the person decides', async () => {
      await floor.page.goto('/swaps')
      await floor.page.getByRole('link', { name: /^LID-03\.Z/ }).click()
      await stepCalled('Make it safe').waitFor()
      const id = idOf(floor.page)
      await floor.context.setOffline(true)
      await open().getByRole('radio', { name: /^prop/ }).check()
      await pressTwice(/^Hold: all five are done/)
      await stepCalled('Write').waitFor()
      const other = await floor.server.call('POST', `/api/swaps/${id}/safe`, { as: floor.plant.as.planner, body: { confirmed: true, blocked: 'lowered' } })
      expect(other.status).toBe(200)
      await floor.context.setOffline(false)
      const told = floor.page.getByRole('alert', { name: 'Not taken' })
      await told.waitFor({ timeout: 30_000 })
      expect(await told.innerText()).toMatch(/Another device went on\. Yours was not taken: made safe, prop[\s\S]*Runa Haldersen/)
      expect(await violations(floor.page)).toEqual([])
      await picture(floor.page, 'swap-conflict')
      await button('Leave mine out', told).click()
      await told.waitFor({ state: 'detached' })
      expect((await read(id)).safe?.blocked).toBe('lowered')
    })
  })

  describe('who may not', () => {
    it('an auditor reads every step and is offered none', async () => {
      const { page: auditor } = await openWindow(floor.browser, floor.server.url, { size: { width: 320, height: 700 } })
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
      await floor.page.goto('/axes/LID-05.Z')
      await floor.page.getByText(/Swap open since/).waitFor()
      expect(await button('Swap the unit').count()).toBe(0)
      await floor.page.getByRole('link', { name: /^Go on with swap/ }).click()
      await stepCalled('Kit').waitFor()
      await floor.page.goto('/axes/LID-02.Z')
      await floor.page.getByRole('link', { name: 'Swap the unit' }).click()
      await floor.page.getByRole('group', { name: /^Which unit sits there/ }).waitFor()
    })
  })
}
