import { createHash } from 'node:crypto'
import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { line } from '../../../server/database/schema'
import { attach } from '../../../server/services/attachments/attach'
import { makeKit } from '../../../server/services/kit/make-kit'
import { folderFile } from '../../../server/services/line-folder/kept-folders'
import { abandonSwap } from '../../../server/services/swaps/ending'
import { swapOf } from '../../../server/services/swaps/list-swaps'
import { pdfText, qrOf, unzipped } from '../../support/paper'
import { plates, swapPlant } from '../../support/swap-plant'

/* What leaves for the unit of a swap: where its code leads, and whether the drive tool's own file may go in. */

let here: ReturnType<typeof swapPlant>
beforeEach(() => {
  here = swapPlant()
})
afterEach(() => here.plant.close())

const origin = 'https://marks.example'
const kit = async (form: 'pdf' | 'zip', serial?: string) => (await makeKit(here.plant.vault, here.tobias, here.axisId, { form, cautionsRead: true, serial }, origin)).kit.bytes
const words = (pdf: Buffer) => pdfText(pdf).replaceAll(/\s+/g, ' ')

describe('the QR code of a sheet', () => {
  it('leads to the swap that it is made for, from the moment that it is opened, and to the axis again when it ended', async () => {
    expect(qrOf(await kit('pdf', 'SN-0002'))).toBe(`${origin}/axes/LID-02.Z`)
    const { id } = here.open()
    expect(qrOf(await kit('pdf'))).toBe(`${origin}/swaps/${id}`)
    here.unitIn(id)
    const sheet = await kit('pdf')
    expect(qrOf(sheet)).toBe(`${origin}/swaps/${id}`)
    expect(words(sheet)).toContain(`leads to swap ${id}`)
    // The new unit counts as fitted by now; the one that came out is the old one all the same.
    expect(words(sheet)).toMatch(/Unit in .*SN-0002.*Unit out .*SN-0001/)
    abandonSwap(here.plant.vault, here.tobias, id, { reason: 'it was the cable', fittedUnitId: here.old })
    const later = await kit('pdf', 'SN-0002')
    expect(qrOf(later)).toBe(`${origin}/axes/LID-02.Z`)
    expect(words(later)).toContain('leads to the axis')
  })

  it('in the folder of a line leads to the axis, and its sheet stays blank, whatever swap is open that night', async () => {
    const { id } = here.open()
    here.unitIn(id, 'SN-0050')
    const lineId = here.plant.vault.db.select().from(line).all()[0]?.id ?? 0
    const parts: Buffer[] = []
    for await (const part of (await folderFile(here.plant.vault, lineId, false, origin)).chunks) parts.push(part)
    const sheet = unzipped(Buffer.concat(parts)).get('LID-02.Z/sheet.pdf') ?? Buffer.alloc(0)
    expect(qrOf(sheet)).toBe(`${origin}/axes/LID-02.Z`)
    expect(words(sheet)).toContain('Thrust limit 60 %')
    expect(words(sheet)).toContain('Unit in Its model, firmware, rated Known-good v1')
  })
})

describe('the drive tool’s own file', () => {
  const own = Buffer.from('what the drive tool saved')
  const attached = () => {
    const path = join(here.plant.vault.folder, 'come')
    writeFileSync(path, own)
    attach(here.plant.vault, here.tobias, here.versionId, { path, size: own.length, sha256: createHash('sha256').update(own).digest('hex'), name: 'lid 02.drv', mediaType: '' }, {})
  }
  const files = async () => {
    const all = unzipped(await kit('zip'))
    return { names: [...all.keys()].sort(), first: all.get('READ-THIS-FIRST.txt')?.toString('utf8') ?? '' }
  }
  /** Attached, and a swap to a new unit of the model. */
  function swapTo(model: string) {
    attached()
    const { id } = here.open()
    here.unitIn(id, 'SN-0300', { model, firmware: '2.4', forcesConfirmed: true, unfit: { by: 'Runa Haldersen', at: new Date(here.plant.now).toISOString(), reason: 'nothing else there' } })
    return id
  }

  it('stands first for another model of the same force base', async () => {
    here.plant.nameplate({ ...plates.press, model: 'HL41-200V' })
    const id = swapTo('HL41-200V')
    const { names, first } = await files()
    expect(names[0]).toBe('0-own-backup-of-SN-0001/1-lid_02.drv')
    expect(first).not.toContain('Do not load')
    expect(swapOf(here.plant.vault, id).kit?.attachmentFits).toBe(true)
  })

  it('stands last and says stop in newtons where 100 % means another force', async () => {
    const id = swapTo('HL50-200V')
    const { names, first } = await files()
    expect(names.filter(name => name.endsWith('.drv'))).toEqual(['9-STOP-values-of-HL40-200V-mean-other-newtons/1-lid_02.drv'])
    expect(first).toContain('Do not load the drive tool’s own file: 100 % in it means 400 N on HL40-200V, and 640 N on HL50-200V. Write the kit instead.')
    expect(swapOf(here.plant.vault, id).kit?.attachmentFits).toBe(false)
  })

  it('stands last where a nameplate does not tell its force base', async () => {
    here.plant.nameplate({ model: 'HL42-200V', axisKind: 'linear', stroke: 200 })
    const id = swapTo('HL42-200V')
    const { names, first } = await files()
    expect(names.filter(name => name.endsWith('.drv'))).toEqual(['9-STOP-values-of-HL40-200V-may-mean-other-newtons/1-lid_02.drv'])
    expect(first).toContain('what 100 % of force means on HL42-200V is not known')
    expect(swapOf(here.plant.vault, id).kit?.attachmentFits).toBe(false)
  })

  it('stands first for a unit of the same model, and for the unit that it was saved on', async () => {
    attached()
    const { id } = here.open()
    here.unitIn(id)
    expect((await files()).names[0]).toBe('0-own-backup-of-SN-0001/1-lid_02.drv')
  })
})
