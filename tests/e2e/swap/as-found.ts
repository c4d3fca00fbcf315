import { PNG } from 'pngjs'
import { describe, expect, it } from 'vitest'
import { picture, sidewaysScroll, violations } from '../../support/browser'
import { jsonFile, lidPress } from '../../support/lid-press'
import { begin, button, floor, later, open, pressTwice, read, stepCalled, take } from './floor'

const lookAt = (title: string) => floor.page.getByRole('button', { name: new RegExp(`^Look at it ?: ${title}`) }).click()
const step = (title: string) => floor.page.getByRole('list', { name: 'Steps of the swap' }).getByRole('listitem').filter({ has: floor.page.getByRole('heading', { name: new RegExp(`\\d ${title}`) }) })
const plate = () => ({ name: 'plate.png', mimeType: 'image/png', buffer: PNG.sync.write(new PNG({ width: 40, height: 30 })) })

/** What the old unit still tells, and what was kept with the version that goes back. */
export function foundAsItWas(): void {
  describe('a unit that still talks', () => {
    let id = 0

    it('a photo of its plate and its file as found are kept; what differs stands in two columns', async () => {
      id = await begin('06z', 'LID-06.Z', 'lid sits too high')
      await lookAt('Which axis, what failed')
      const first = step('Which axis, what failed')
      await first.locator('input[type="file"][accept="image/*"]').setInputFiles(plate())
      await first.getByText(/plate\.png, .* is kept/).waitFor()
      const found = lidPress({ serial: 'HL40-24-01107', exportedAt: later(0), setup: { softLimitMax: 180 } })
      await first.locator('input[type="file"]').first().setInputFiles(jsonFile('found.json', found))
      await first.getByText('Known-good above, as found below').waitFor()
      expect(await first.innerText()).toMatch(/Soft limit, max setup[\s\S]*185[\s\S]*180/)
      expect(await sidewaysScroll(floor.page)).toBe(0)
      expect(await violations(floor.page)).toEqual([])
      await picture(floor.page, 'swap-1-as-found')
    })

    it('somebody decides by name which goes back, and may decide anew until the new unit is safe', async () => {
      const first = step('Which axis, what failed')
      const decide = async (which: RegExp, why: string) => {
        await first.getByRole('radio', { name: which }).check()
        await first.getByLabel('Who decides').fill('Runa Haldersen')
        await first.getByLabel('Why').fill(why)
        await button('Keep the decision', first).click()
        await first.getByText(new RegExp(`decided by Runa Haldersen: ${why}`)).waitFor()
      }
      await decide(/^v2, as found/, 'the new lids are lower')
      expect((await read(id)).source).toMatchObject({ number: 2, released: false })
      await decide(/^v1, the known-good/, 'the lids are as they were')
      expect((await read(id)).source).toMatchObject({ number: 1, released: true, chosen: { decidedBy: 'Runa Haldersen' } })
    })

    it('a backup of the drive’s own tool, attached to that version, stands first in the kit', async () => {
      const { source, tag } = await read(id)
      await floor.page.goto(`/axes/${tag}/versions/${source!.number}`)
      await button(/^Attach/).first().click()
      const dialog = floor.page.getByRole('dialog', { name: 'Attach to v1' })
      await dialog.getByLabel('File', { exact: true }).setInputFiles({ name: 'lid-06.drv', mimeType: 'application/octet-stream', buffer: Buffer.from('backup of an invented drive') })
      await button('Attach it', dialog).click()
      await floor.page.getByText('lid-06.drv').waitFor()
      await floor.page.goto(`/swaps/${id}`)
      await take('HL40-25-00970')
      await stepCalled('Kit').waitFor()
      await pressTwice(/^Hold: I have read these/)
      const backups = open().getByRole('region', { name: 'The drive tool’s own file' })
      await backups.waitFor()
      expect(await backups.innerText()).toMatch(/lid-06\.drv[\s\S]*own values of HL40-24-01107/)
      expect(await violations(floor.page)).toEqual([])
      await picture(floor.page, 'swap-3-backup')
    })
  })
}
