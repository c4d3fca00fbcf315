import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { letter } from '../../../../server/database/schema'
import { queueOverdueDigests } from '../../../../server/services/letters/overdue-digest'
import { storeUpload } from '../../../../server/services/uploads/store-upload'
import { day, hour, iso, openPlant, settingsFile, start, type Plant } from '../../../support/vault-plant'

let plant: Plant
const letters = () => plant.vault.db.select().from(letter).all()

beforeEach(() => { plant = openPlant() })
afterEach(() => plant.close())

/** Read at the start of the test's time, 07:00 at the plant; due again after so many hours. */
function readAxis(tag: string, uploadEveryHours: number, machineId = plant.machineId): number {
  const axisId = plant.axis(tag, { uploadEveryHours, machineId })
  plant.fit(axisId, plant.unit(`SN-${tag}`), start - day)
  storeUpload(plant.vault, plant.person(`Sender of ${tag}`, ['technician']), { bytes: settingsFile({ serial: `SN-${tag}`, exportedAt: iso(plant.now) }), name: null }, {})
  return axisId
}

describe('the daily list of overdue axes', () => {
  it('is written to planners once a day from six in the morning on, longest overdue first', () => {
    const runa = plant.person('Runa Haldersen', ['planner'])
    readAxis('LID-02.Z', 24)
    readAxis('LID-01.Z', 12)
    expect(queueOverdueDigests(plant.vault)).toBe(0)
    plant.now = start + day + 22 * hour
    expect(new Date(plant.now).getUTCHours()).toBe(4)
    expect(queueOverdueDigests(plant.vault)).toBe(0)
    plant.now += hour
    expect([queueOverdueDigests(plant.vault), queueOverdueDigests(plant.vault)]).toEqual([1, 0])
    expect(letters()).toMatchObject([{ personId: runa.id, title: '2 uploads are overdue, 2026-03-03', cause: '2026-03-03', siteIds: [plant.siteId], path: '/' }])
    expect(letters()[0]?.paragraphs.at(-1)).toBe('- LID-01.Z (Lid press 1, Jars): due since Sun 1 Mar 2026 19:00:00 CET (UTC+1)\n- LID-02.Z (Lid press 1, Jars): due since Mon 2 Mar 2026 07:00:00 CET (UTC+1)')
    plant.now += day
    expect(queueOverdueDigests(plant.vault)).toBe(1)
  })

  it('names only the axes of the reader’s sites, and is none where none of them is overdue', () => {
    const other = plant.machineAt('Other works')
    readAxis('LID-02.Z', 24)
    plant.person('Runa Haldersen', ['planner'], [other.siteId])
    plant.now += 2 * day
    expect(queueOverdueDigests(plant.vault)).toBe(0)
    readAxis('CAP-01.X', 24, other.machineId)
    plant.now += 2 * day
    expect(queueOverdueDigests(plant.vault)).toBe(1)
    expect(letters()).toMatchObject([{ title: '1 upload is overdue, 2026-03-05', siteIds: [other.siteId] }])
    expect(JSON.stringify(letters())).not.toContain('LID-02.Z')
  })
})
