import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { Actor, PersonActor } from '../../../server/database/actor'
import { assignFromTray } from '../../../server/services/tray/assign'
import { discardFromTray } from '../../../server/services/tray/discard'
import { listTray, trayFile } from '../../../server/services/tray/list'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import type { UploadFields } from '../../../shared/api/uploads'
import { day, iso, minute, openLidPlant, settingsFile, start, type FileParts, type Plant } from '../../support/vault-plant'

let plant: Plant
let runa: PersonActor
let tobias: PersonActor
let axisId: number

beforeEach(() => {
  ({ plant, runa, tobias, axisId } = openLidPlant({ unit: null }))
})
afterEach(() => plant.close())

function keep(parts: FileParts = {}, fields: UploadFields = {}, actor: Actor = tobias): number {
  plant.now += minute
  const outcome = storeUpload(plant.vault, actor, { bytes: settingsFile(parts), name: 'night.json' }, fields)
  if (outcome.outcome !== 'tray') throw new Error(JSON.stringify(outcome))
  return outcome.answer.tray
}
const list = (actor: Actor = runa) => listTray(plant.vault, actor, {}).items

describe('the tray', () => {
  it('groups equal content of one serial and stands for its oldest file', () => {
    const first = keep({ setup: { jogSpeed: 5 } })
    keep({ setup: { jogSpeed: 5 }, exportedAt: iso(start + minute) })
    const other = keep({ setup: { jogSpeed: 6 } })
    expect(list().map(({ id, copies, serial, name, sentBy }) => ({ id, copies, serial, name, sentBy }))).toEqual([
      { id: first, copies: 2, serial: 'SN-0001', name: 'night.json', sentBy: 'Tobias Achterberg' },
      { id: other, copies: 1, serial: 'SN-0001', name: 'night.json', sentBy: 'Tobias Achterberg' },
    ])
  })

  it('is paged', () => {
    const ids = [1, 2, 3].map(speed => keep({ setup: { jogSpeed: speed } }))
    const page = listTray(plant.vault, runa, { limit: 2 })
    expect(page.items.map(({ id }) => id)).toEqual(ids.slice(0, 2))
    expect(listTray(plant.vault, runa, { limit: 2, cursor: page.next ?? '' })).toMatchObject({ items: [{ id: ids[2] }], next: null })
  })

  it('gives the file back byte for byte', () => {
    const bytes = settingsFile({ setup: { jogSpeed: 5 } })
    expect(trayFile(plant.vault, keep({ setup: { jogSpeed: 5 } })).bytes.equals(bytes)).toBe(true)
  })

  it('shows a file to those of its site; one that names no site to all who may upload', () => {
    const west = plant.machineAt('Larkfield West')
    const local = plant.person('Mira Lindqvist', ['technician'], [plant.siteId])
    const far = plant.person('Jon Aas', ['technician'], [west.siteId])
    keep({ setup: { jogSpeed: 1 } }, {}, local)
    const open = keep({ setup: { jogSpeed: 2 } })
    expect(list(local)).toHaveLength(2)
    expect(list(far).map(({ id }) => id)).toEqual([open])
  })

  it('keeps the sender’s axis as its guess, and takes its site from it', () => {
    keep({}, { axis: 'tag:lid-02.z' })
    expect(list()).toMatchObject([{ siteId: plant.siteId, guess: { axisId, tag: 'LID-02.Z', why: 'named by the sender' } }])
  })
})

describe('discarding', () => {
  it('sets the whole group aside, once, and keeps the bytes', () => {
    const first = keep()
    keep()
    discardFromTray(plant.vault, runa, first, 'test file')
    expect(list()).toEqual([])
    expect(plant.rows()).toMatchObject({ tray: 2, tray_settled: 2, upload: 2 })
    expect(() => discardFromTray(plant.vault, runa, first, 'again')).toThrow(expect.objectContaining({ code: 'tray-settled' }))
    expect(trayFile(plant.vault, first).bytes.length).toBeGreaterThan(0)
  })
})

describe('assigning', () => {
  it('registers and fits an unknown unit, stores the version by its sender, and its equals as sightings', () => {
    const first = keep({ setup: { thrustLimit: 38 }, exportedAt: iso(start - day) }, { reason: 'weekly round', workOrder: 'WO 12' })
    keep({ setup: { thrustLimit: 38 }, exportedAt: iso(start) })
    const assigned = assignFromTray(plant.vault, runa, first, { axisId, at: iso(start - 30 * day) })
    expect(assigned).toMatchObject({ version: { axisId, number: 1, serial: 'SN-0001', storedBy: 'Tobias Achterberg', reason: 'weekly round', workOrder: 'WO 12', clockDoubtful: false } })
    expect(plant.rows()).toMatchObject({ unit: 1, fitting: 1, version: 1, sighting: 1, tray_settled: 2 })
    expect(list()).toEqual([])
    expect(plant.vault.sqlite.prepare('SELECT state FROM unit').pluck().get()).toBe('fitted')
  })

  it('takes a planner where the unit is unknown or sits elsewhere; nothing is stored otherwise', () => {
    const id = keep()
    const before = plant.rows()
    expect(() => assignFromTray(plant.vault, tobias, id, { axisId })).toThrow(expect.objectContaining({ code: 'role' }))
    expect(plant.rows()).toEqual(before)
  })

  it('needs no planner once the unit was fitted meanwhile', () => {
    const id = keep({ setup: { thrustLimit: 38 } })
    plant.fit(axisId, plant.unit('SN-0001'), start - day)
    expect(assignFromTray(plant.vault, tobias, id, { axisId })).toMatchObject({ version: { number: 1 } })
  })

  it('swaps the unit that sat there, when it is told why', () => {
    const old = plant.unit('SN-OLD')
    plant.fit(axisId, old, start - 100 * day)
    const id = keep({ exportedAt: iso(start) })
    expect(() => assignFromTray(plant.vault, runa, id, { axisId })).toThrow(expect.objectContaining({ code: 'input', message: expect.stringContaining('SN-OLD') as string }))
    assignFromTray(plant.vault, runa, id, { axisId, at: iso(start - minute), reason: 'encoder fault' })
    expect(plant.vault.sqlite.prepare('SELECT to_at FROM fitting WHERE unit_id = ?').pluck().get(old)).toBe(iso(start - minute))
    expect(plant.vault.sqlite.prepare('SELECT state FROM unit WHERE id = ?').pluck().get(old)).toBe('repair')
  })

  it('is refused for a file that cannot be read, an axis of another kind, and a settled file', () => {
    const broken = storeUpload(plant.vault, tobias, { bytes: Buffer.from('{'), name: null }, {})
    if (broken.outcome !== 'unreadable') throw new Error(broken.outcome)
    expect(() => assignFromTray(plant.vault, runa, Number(broken.refusal.details.tray), { axisId })).toThrow(expect.objectContaining({ code: 'settings-unreadable' }))
    const rotary = plant.axis('TAB-01.R', { kind: 'rotary' })
    const id = keep()
    expect(() => assignFromTray(plant.vault, runa, id, { axisId: rotary })).toThrow(expect.objectContaining({ code: 'axis-kind' }))
    expect(plant.rows()).toMatchObject({ unit: 0, fitting: 0 })
    assignFromTray(plant.vault, runa, id, { axisId })
    expect(() => assignFromTray(plant.vault, runa, id, { axisId })).toThrow(expect.objectContaining({ code: 'tray-settled' }))
  })
})
