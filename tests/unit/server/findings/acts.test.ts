import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { PersonActor } from '../../../../server/database/actor'
import { closeFinding, explainFinding, listFindings, readFinding, reopenFinding } from '../../../../server/services/findings/findings'
import { voidVersion } from '../../../../server/services/versions/void-version'
import { parseLeaf } from '../../../../shared/trail/entry'
import { codeOf } from '../../../support/codes'
import { openFindingsPlant, type FindingsPlant } from '../../../support/findings-plant'
import { day, iso } from '../../../support/vault-plant'

let plant: FindingsPlant
/** A harm finding (thrust limit 38 → 55 %) with id 1. */
beforeEach(() => {
  plant = openFindingsPlant()
  plant.upload({ thrustLimit: 55, speedLimit: 500 })
})
afterEach(() => plant.close())

const explain = (by: PersonActor, text = 'to get through the shift') => explainFinding(plant.vault, by, 1, { text })
const accept = (by: PersonActor, allowedBy = 'Marit Lund') => closeFinding(plant.vault, by, 1, { as: 'accepted', allowedBy })
const putRight = (versionId: number) => closeFinding(plant.vault, plant.ines, 1, { as: 'put-right', versionId })

describe('explaining', () => {
  it('says who, what, who did it and when; more may be said', () => {
    explainFinding(plant.vault, plant.tobias, 1, { text: 'to get through the shift', by: 'night shift', at: '2026-03-01T01:00:00+01:00', workOrder: 'WO-7' })
    expect(explain(plant.runa, 'agreed by phone')).toMatchObject({
      state: 'explained', explanations: [
        { kind: 'explained', at: iso(plant.now), by: 'Tobias Achterberg', text: 'to get through the shift', madeBy: 'night shift', madeAt: '2026-03-01T00:00:00.000Z', workOrder: 'WO-7' },
        { by: 'Runa Haldersen', text: 'agreed by phone', madeBy: null, madeAt: null, workOrder: null },
      ],
    })
  })

  it('takes a person of the register, and refuses one that there is not', () => {
    expect(explainFinding(plant.vault, plant.tobias, 1, { text: 't', by: `person:${plant.runa.id}` }).explanations).toMatchObject([{ madeBy: 'Runa Haldersen' }])
    expect(codeOf(() => explainFinding(plant.vault, plant.tobias, 1, { text: 't', by: 'person:99' }))).toBe('input')
  })

  it('is not done from a shared account, nor on what is closed or not there', () => {
    expect(codeOf(() => explain({ ...plant.tobias, shared: true }))).toBe('role')
    explain(plant.tobias)
    accept(plant.ines)
    expect(codeOf(() => explain(plant.tobias))).toBe('finding-closed')
    expect(codeOf(() => explainFinding(plant.vault, plant.tobias, 9, { text: 't' }))).toBe('not-found')
  })
})

describe('closing', () => {
  it('accepts what was explained, and keeps who allowed it', () => {
    explain(plant.tobias)
    expect(accept(plant.ines)).toMatchObject({ state: 'closed', closure: { kind: 'closed', by: 'Ines Okafor', at: iso(plant.now), as: 'accepted', allowedBy: 'Marit Lund', version: null } })
    expect(codeOf(() => accept(plant.ines))).toBe('finding-closed')
  })

  it('never before somebody explained, and never by who did', () => {
    expect(codeOf(() => accept(plant.ines))).toBe('not-explained')
    explain(plant.tobias)
    explain(plant.ines)
    expect(codeOf(() => accept(plant.ines))).toBe('four-eyes')
    expect(accept(plant.person('Maud Verhagen', ['auditor'])).state).toBe('closed')
  })

  it('of what can hurt is for auditors; the rest is for planners too', () => {
    explain(plant.tobias)
    expect(codeOf(() => accept(plant.runa))).toBe('role')
    plant.axis('CAP-01.X')
    const { findings } = plant.upload({ thrustLimit: 55, speedLimit: 500, smoothingTime: 700 }, { fields: { axis: 'tag:CAP-01.X' } })
    const id = findings[0]!.id
    explainFinding(plant.vault, plant.tobias, id, { text: 'station 2 was set up wrongly' })
    expect(closeFinding(plant.vault, plant.runa, id, { as: 'accepted', allowedBy: 'Runa' }).state).toBe('closed')
  })

  it('counts an upload’s reason as an explanation of who sent it', () => {
    const both = plant.person('Lone Planner', ['planner', 'auditor', 'technician'])
    const { findings } = plant.upload({ thrustLimit: 60, speedLimit: 500 }, { by: both, fields: { reason: 'new lids' } })
    expect(codeOf(() => closeFinding(plant.vault, both, findings[0]!.id, { as: 'accepted', allowedBy: 'x' }))).toBe('four-eyes')
  })

  it('says what is missing', () => {
    explain(plant.tobias)
    expect(codeOf(() => closeFinding(plant.vault, plant.ines, 1, { as: 'accepted' }))).toBe('input')
    expect(codeOf(() => closeFinding(plant.vault, plant.ines, 1, { as: 'put-right' }))).toBe('input')
    expect(codeOf(() => accept(plant.ines, 'person:77'))).toBe('input')
  })
})

describe('put right', () => {
  beforeEach(() => { explain(plant.tobias) })

  it('names a later version of the axis that no longer holds it', () => {
    const { version } = plant.upload({ thrustLimit: 38, speedLimit: 500 }, { fields: { reason: 'back' } })
    expect(putRight(version.id)).toMatchObject({ state: 'closed', closure: { as: 'put-right', allowedBy: null, version: { id: version.id, tag: 'LID-02.Z', number: 3 } } })
  })

  it('takes none that still holds it, that came before, that is void, or that is of another axis', () => {
    const still = plant.upload({ thrustLimit: 55, speedLimit: 500, smoothingTime: 900 }).version
    const [first] = plant.vault.sqlite.prepare('SELECT id FROM version WHERE number = 1').pluck().all() as [number]
    expect(codeOf(() => putRight(still.id))).toBe('still-stands')
    expect(codeOf(() => putRight(first))).toBe('input')
    const wrong = plant.upload({ thrustLimit: 38, speedLimit: 500 }, { fields: { reason: 'wrong drive' } }).version
    voidVersion(plant.vault, plant.runa, wrong.id, 'wrong drive')
    expect(codeOf(() => putRight(wrong.id))).toBe('input')
    const other = plant.axis('CAP-01.X')
    plant.fit(other, plant.unit('SN-2'), plant.now - day)
    expect(codeOf(() => putRight(plant.upload({ thrustLimit: 38 }, { serial: 'SN-2' }).version.id))).toBe('input')
    expect(readFinding(plant.vault, 1).state).toBe('explained')
  })
})

describe('reopening', () => {
  it('keeps all that was said, and gives it a new day', () => {
    explain(plant.tobias)
    accept(plant.ines)
    expect(codeOf(() => reopenFinding(plant.vault, plant.runa, 9, { text: 't' }))).toBe('not-found')
    plant.now += 3 * day
    expect(reopenFinding(plant.vault, plant.runa, 1, { text: 'Marit says she allowed nothing' })).toMatchObject({
      state: 'open', closure: null, dueAt: iso(plant.now + 7 * day), explanations: [{ text: 'to get through the shift' }], acts: [{ kind: 'explained' }, { kind: 'closed', allowedBy: 'Marit Lund' }, { kind: 'reopened', text: 'Marit says she allowed nothing' }],
    })
    expect(codeOf(() => reopenFinding(plant.vault, plant.runa, 1, { text: 't' }))).toBe('finding-open')
    expect(codeOf(() => accept(plant.ines))).toBe('not-explained')
  })

  it('is refused while another finding of the cause is open', () => {
    plant.axis('CAP-01.X')
    const send = (smoothingTime: number) => plant.upload({ thrustLimit: 55, speedLimit: 500, smoothingTime }, { fields: { axis: 'tag:CAP-01.X' } }).findings[0]!.id
    const first = send(700)
    explainFinding(plant.vault, plant.tobias, first, { text: 't' })
    closeFinding(plant.vault, plant.ines, first, { as: 'accepted', allowedBy: 'x' })
    const second = send(710)
    expect(second).not.toBe(first)
    expect(codeOf(() => reopenFinding(plant.vault, plant.runa, first, { text: 't' }))).toBe('finding-open')
  })
})

describe('the list', () => {
  it('is filtered by state, axis, site and weight, newest first, in pages', () => {
    const other = plant.axis('CAP-01.X')
    plant.fit(other, plant.unit('SN-2'), plant.now - day)
    plant.upload({ thrustLimit: 20 }, { serial: 'SN-2' })
    plant.upload({ thrustLimit: 30 }, { serial: 'SN-2', fields: { reason: 'lighter lids' } })
    const ids = (query: Parameters<typeof listFindings>[2], by: PersonActor = plant.ines) => listFindings(plant.vault, by, query).items.map(({ id }) => id)
    expect(ids({})).toEqual([2, 1])
    expect([ids({ state: 'open' }), ids({ state: 'explained' }), ids({ state: 'closed' })]).toEqual([[1], [2], []])
    expect([ids({ axis: 'tag:cap-01.x' }), ids({ axis: String(plant.axisId) }), ids({ axis: 'tag:NONE' })]).toEqual([[2], [1], []])
    expect([ids({ site: plant.siteId }), ids({ site: 99 }), ids({ weight: 'text' })]).toEqual([[2, 1], [], []])
    const page = listFindings(plant.vault, plant.ines, { limit: 1 })
    expect([page.items[0]?.id, ids({ cursor: page.next! })]).toEqual([2, [1]])
    const { siteId } = plant.machineAt('Other works')
    expect(ids({}, plant.person('Bound Auditor', ['auditor'], [siteId]))).toEqual([])
  })

  it('says what is overdue', () => {
    plant.now += 7 * day + 1
    expect(listFindings(plant.vault, plant.ines, {}).items).toMatchObject([{ overdue: true }])
  })
})

describe('the log', () => {
  it('has an entry for each, with the whole of what was stored', () => {
    explain(plant.tobias)
    accept(plant.ines)
    reopenFinding(plant.vault, plant.runa, 1, { text: 'why?' })
    const entries = (plant.vault.sqlite.prepare('SELECT leaf FROM log ORDER BY seq').pluck().all() as string[]).map(parseLeaf).filter(({ subject }) => subject.kind.startsWith('finding'))
    expect(entries.map(({ act, subject }) => [act, subject.id])).toEqual([['finding-opened', 1], ['finding-version-added', 1], ['finding-explained', 1], ['finding-closed', 2], ['finding-reopened', 3]])
    expect(entries[3]).toMatchObject({ actor: { name: 'Ines Okafor' }, state: { findingId: 1, kind: 'closed', closeAs: 'accepted', allowedBy: 'Marit Lund', byPerson: plant.ines.id } })
  })
})
