import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { Finding } from '../../../../shared/api/findings'
import { letter, person } from '../../../../server/database/schema'
import { listFindings, readFinding } from '../../../../server/services/findings/findings'
import { watchPlace } from '../../../../server/services/letters/own'
import { makeRule } from '../../../../server/services/rules/rules'
import { giveWaiver } from '../../../../server/services/waivers/waivers'
import { storeUpload } from '../../../../server/services/uploads/store-upload'
import { voidVersion } from '../../../../server/services/versions/void-version'
import { openFindingsPlant, type FindingsPlant } from '../../../support/findings-plant'
import { day, hour, iso, settingsFile, start } from '../../../support/vault-plant'

let plant: FindingsPlant
beforeEach(() => { plant = openFindingsPlant() })
afterEach(() => plant.close())

const all = (): Finding[] => listFindings(plant.vault, plant.ines, {}).items
const raised = { thrustLimit: 55, speedLimit: 500 }

describe('a watched change', () => {
  it('opens a finding with both versions and the change, in the words of the trade', () => {
    const { findings, version } = plant.upload(raised)
    expect(findings).toEqual([{ id: 1, state: 'open' }])
    expect(readFinding(plant.vault, 1)).toMatchObject({
      state: 'open', cause: 'watched-change', weight: 'harm', axisId: plant.axisId, tag: 'LID-02.Z', timeZone: 'Europe/Berlin',
      title: 'LID-02.Z thrust limit 38 → 55 %, changed between 1 Mar 2026 08:00 (v1) and 1 Mar 2026 09:00 CET (v2)',
      openedAt: iso(plant.now), dueAt: iso(plant.now + 7 * day), overdue: false,
      changes: [{ field: 'thrustLimit', before: 38, after: 55 }],
      versions: [{ axisId: plant.axisId, tag: 'LID-02.Z', versionId: version.id, number: 2, baseNumber: 1 }],
      explanations: [], closure: null, acts: [], more: 0,
    })
  })

  it('opens none for the first version, for what is not watched, and for a late one', () => {
    expect(all()).toEqual([])
    plant.upload({ ...raised, thrustLimit: 38, smoothingTime: 900 })
    expect(plant.upload({ thrustLimit: 70, speedLimit: 500 }, { at: start + 30 * 60_000 }).findings).toEqual([])
    expect(all()).toEqual([])
  })

  it('opens one for a field that only this site watches', () => {
    plant.close()
    plant = openFindingsPlant({ watched: ['smoothingTime'] })
    expect(plant.upload({ thrustLimit: 38, speedLimit: 500, smoothingTime: 900 }).findings).toEqual([{ id: 1, state: 'open' }])
  })

  it('was made after the version before was last seen', () => {
    plant.now += 5 * hour
    storeUpload(plant.vault, plant.tobias, { bytes: settingsFile({ serial: 'SN-1', exportedAt: iso(plant.now), setup: { thrustLimit: 38, speedLimit: 500 } }), name: null }, {})
    plant.upload(raised)
    expect(all()[0]?.title).toMatch(/changed between 1 Mar 2026 13:00 \(v1\) and 1 Mar 2026 14:00 CET \(v2\)$/)
  })

  it('of a version that is set aside as a wrong upload is explained by that', () => {
    const { version } = plant.upload(raised)
    voidVersion(plant.vault, plant.runa, version.id, 'file of another drive')
    expect(readFinding(plant.vault, 1)).toMatchObject({ state: 'explained', explanations: [{ by: 'Runa Haldersen', text: 'Set aside as a wrong upload: file of another drive' }] })
  })

  it.each(['routine', 'as-found', 'as-left', 'commissioning'] as const)('whatever the occasion: %s', (occasion) => {
    expect(plant.upload(raised, { fields: { occasion } }).findings).toHaveLength(1)
  })

  it('is one finding a version, however many values changed, the weightiest by name', () => {
    plant.upload({ thrustLimit: 55, speedLimit: 700 })
    expect(all()).toHaveLength(1)
    expect(all()[0]?.title).toMatch(/^LID-02\.Z (thrust|speed) limit .* and 1 more, changed between/)
  })

  it('a row put in is one row, not every value behind it', () => {
    plant.close()
    plant = openFindingsPlant({ watched: ['target'] })
    const moves = [1, 2, 3].map(move => ({ move, kind: 'absolute', target: 10 * move, speed: 100, acceleration: 500 }))
    plant.upload({ thrustLimit: 38, speedLimit: 500 }, { parts: { moves } })
    const inserted = [{ move: 1, kind: 'absolute', target: 5, speed: 50, acceleration: 500 }, ...moves.map(one => ({ ...one, move: one.move + 1 }))]
    plant.upload({ thrustLimit: 38, speedLimit: 500 }, { parts: { moves: inserted } })
    const rows = all()[0]?.changes.map(({ row }) => row)
    expect(new Set(rows)).toEqual(new Set([1]))
  })

  it('is gone with the write that was to store it', () => {
    plant.vault.sqlite.exec(`CREATE TRIGGER breaks BEFORE INSERT ON finding_state BEGIN SELECT RAISE(ABORT, 'broken off'); END`)
    const before = plant.rows()
    expect(() => plant.upload(raised)).toThrow('broken off')
    expect(plant.rows()).toEqual(before)
  })
})

describe('explained at once', () => {
  it.each([
    ['a reason', { reason: 'new lids, 0.3 mm thicker' }, 'new lids, 0.3 mm thicker'],
    ['a work order', { workOrder: 'WO-4471' }, 'Work order WO-4471'],
  ])('where a named person gave %s for this axis', (_, fields, text) => {
    expect(plant.upload(raised, { fields }).findings).toEqual([{ id: 1, state: 'explained' }])
    expect(readFinding(plant.vault, 1).explanations).toMatchObject([{ by: 'Tobias Achterberg', text }])
  })

  it('names who made the change beside who said so', () => {
    plant.upload(raised, { fields: { reason: 'new lids', changedBy: `person:${plant.runa.id}`, workOrder: 'WO-1' } })
    expect(readFinding(plant.vault, 1).explanations).toMatchObject([{ by: 'Tobias Achterberg', madeBy: 'Runa Haldersen', workOrder: 'WO-1' }])
  })

  it('not by a script, not by one reason for many files, not by a shared account, not by nothing', () => {
    const state = (options: Parameters<FindingsPlant['upload']>[1], thrustLimit: number) => plant.upload({ thrustLimit, speedLimit: 500 }, options).findings[0]?.state
    const fields = { reason: 'nightly' }
    expect(state({ by: plant.token('nightly', plant.runa), fields }, 50)).toBe('open')
    expect(state({ fields: { ...fields, together: 'yes' } }, 51)).toBe('open')
    plant.vault.db.update(person).set({ shared: true }).run()
    expect(state({ fields }, 52)).toBe('open')
    plant.vault.db.update(person).set({ shared: false }).run()
    expect(state({ fields: { reason: '', workOrder: '' } }, 53)).toBe('open')
    expect(state({ fields }, 54)).toBe('explained')
  })
})

describe('a stop check', () => {
  const rule = (max: number) => makeRule(plant.vault, plant.runa, { scope: 'axis', scopeId: plant.axisId, field: 'thrustLimit', max, reason: 'jars crack' })

  it('opens a finding that names it; the next version under the same stop is added to it', () => {
    rule(45)
    expect(plant.upload(raised, { fields: { reason: 'trial' } }).findings).toEqual([{ id: 1, state: 'explained' }, { id: 2, state: 'open' }])
    const { version, findings } = plant.upload({ ...raised, smoothingTime: 800 })
    expect(findings).toEqual([{ id: 2, state: 'open' }])
    const stop = readFinding(plant.vault, 2)
    expect(stop).toMatchObject({ cause: 'stop-check', weight: 'harm', versions: [{ number: 2 }, { number: 3, versionId: version.id }] })
    expect(stop.title).toBe('LID-02.Z: Thrust limit 55 % is above the 45 % allowed on this axis: jars crack.')
  })

  it('opens none where a waiver covers it', () => {
    const { id } = rule(45)
    giveWaiver(plant.vault, plant.runa, {
      axisId: plant.axisId, rule: 'site-rule', at: ['/setup/thrustLimit'], reason: 'trial', until: iso(plant.now + 30 * day),
      value: { level: 'stop', values: [{ place: 'ruleId', value: id }, { place: '/setup/thrustLimit', value: 55 }] },
    })
    const stored = plant.upload(raised)
    expect(stored.checks.some(({ level }) => level === 'stop')).toBe(true)
    expect(all().map(({ cause }) => cause)).toEqual(['watched-change'])
  })
})

describe('a file sent for another axis', () => {
  beforeEach(() => { plant.axis('CAP-01.X') })
  const fields = { axis: 'tag:CAP-01.X' }

  it('goes where its serial sits, and a finding says so; once, however often it comes', () => {
    plant.upload({ thrustLimit: 38, speedLimit: 500, smoothingTime: 700 }, { fields })
    plant.upload({ thrustLimit: 38, speedLimit: 500, smoothingTime: 710 }, { fields })
    expect(all()).toMatchObject([{ cause: 'axis-disagrees', weight: 'motion', title: 'A file sent for CAP-01.X holds the serial of the unit at LID-02.Z: it was stored at LID-02.Z', versions: [{ number: 2 }, { number: 3 }] }])
  })

  it('also where its content is known already', () => {
    plant.now += hour
    storeUpload(plant.vault, plant.tobias, { bytes: settingsFile({ serial: 'SN-1', exportedAt: iso(plant.now), setup: { thrustLimit: 38, speedLimit: 500 } }), name: null }, fields)
    expect(all()).toMatchObject([{ cause: 'axis-disagrees', versions: [{ number: 1 }] }])
  })

  it('does not say the tag of an axis that the sender may not see', () => {
    const other = plant.machineAt('Other works')
    plant.axis('SECRET-9', { machineId: other.machineId })
    const bound = plant.person('Bound Technician', ['technician'], [plant.siteId])
    plant.upload({ thrustLimit: 38, speedLimit: 500, smoothingTime: 700 }, { by: bound, fields: { axis: 'tag:secret-9' } })
    expect(all()[0]?.title).toContain('A file sent for tag:secret-9 holds')
  })

  it('and none where it names its own', () => {
    plant.upload({ thrustLimit: 38, speedLimit: 500, smoothingTime: 700 }, { fields: { axis: 'tag:lid-02.z' } })
    expect(all()).toEqual([])
  })
})

describe('letters', () => {
  const letters = () => plant.vault.db.select().from(letter).orderBy(letter.id).all().map(({ personId, kind, title, path }) => ({ personId, kind, title, path }))

  it('tell of a watched change in one letter, with its finding', () => {
    watchPlace(plant.vault, plant.ines, { scope: 'axis', scopeId: plant.axisId, watched: true })
    plant.upload(raised)
    expect(letters()).toEqual([{ personId: plant.ines.id, kind: 'watched-change', title: 'LID-02.Z: thrust limit 38 → 55 %', path: '/findings/1' }])
  })

  it('tell of any other finding that is opened', () => {
    watchPlace(plant.vault, plant.ines, { scope: 'axis', scopeId: plant.axisId, watched: true })
    plant.axis('CAP-01.X')
    plant.upload({ thrustLimit: 38, speedLimit: 500, smoothingTime: 700 }, { fields: { axis: 'tag:CAP-01.X' } })
    expect(letters()).toMatchObject([{ kind: 'finding-opened', path: '/findings/1' }])
  })
})
