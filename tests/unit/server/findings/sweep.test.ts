import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { letter } from '../../../../server/database/schema'
import { closeFinding, explainFinding, listFindings } from '../../../../server/services/findings/findings'
import { raiseDamage, raiseReadBack, raiseUnfit } from '../../../../server/services/findings/causes'
import { raiseOff, raiseUnwaived, tellOverdue } from '../../../../server/services/findings/sweep'
import { markKnownGood } from '../../../../server/services/known-good/mark'
import { judgeVersion } from '../../../../server/services/judging/judge-again'
import { watchPlace } from '../../../../server/services/letters/own'
import { makeRule } from '../../../../server/services/rules/rules'
import { endWaiver, giveWaiver } from '../../../../server/services/waivers/waivers'
import { judgingQueries } from '../../../../server/database/judging/queries'
import { openFindingsPlant, type FindingsPlant } from '../../../support/findings-plant'
import { day, hour, iso } from '../../../support/vault-plant'

let plant: FindingsPlant
beforeEach(() => { plant = openFindingsPlant({ marked: true }) })
afterEach(() => plant.close())

const findings = (cause: string) => listFindings(plant.vault, plant.ines, {}).items.filter(one => one.cause === cause)
const settle = (id: number) => {
  explainFinding(plant.vault, plant.tobias, id, { text: 't' })
  closeFinding(plant.vault, plant.ines, id, { as: 'accepted', allowedBy: 'Marit' })
}
const raised = { thrustLimit: 55, speedLimit: 500 }

describe('an axis off its known-good', () => {
  it('is a finding once it is off for longer than the site allows, and takes later versions that are off', () => {
    plant.upload(raised, { fields: { reason: 'trial' } })
    plant.now += 23 * hour
    expect(raiseOff(plant.vault)).toBe(0)
    plant.now += hour
    expect([raiseOff(plant.vault), raiseOff(plant.vault)]).toEqual([1, 0])
    expect(findings('off-known-good')).toMatchObject([{ weight: 'harm', title: 'LID-02.Z v2 is off known-good v1 by 1 harm, longer than the site allows', versions: [{ number: 2, baseNumber: 1 }] }])
    plant.upload({ ...raised, thrustLimit: 57 }, { fields: { reason: 'trial' } })
    expect(findings('off-known-good')).toMatchObject([{ versions: [{ number: 2 }, { number: 3 }] }])
  })

  it('is none once it is closed, until it goes off anew or another version is marked', () => {
    plant.upload(raised)
    plant.now += 25 * hour
    raiseOff(plant.vault)
    settle(findings('off-known-good')[0]!.id)
    plant.now += 5 * day
    expect(raiseOff(plant.vault)).toBe(0)
    plant.upload({ thrustLimit: 38, speedLimit: 500 })
    plant.upload(raised)
    plant.now += 25 * hour
    expect(raiseOff(plant.vault)).toBe(1)
    expect(findings('off-known-good')).toHaveLength(2)
  })

  it('is none where it is in line again, or marked', () => {
    const { version } = plant.upload(raised)
    markKnownGood(plant.vault, plant.runa, version.id, { meaning: 'approved' })
    plant.now += 5 * day
    expect(raiseOff(plant.vault)).toBe(0)
  })
})

describe('a waiver', () => {
  const give = () => {
    const { id } = makeRule(plant.vault, plant.runa, { scope: 'axis', scopeId: plant.axisId, field: 'thrustLimit', max: 45, reason: 'jars crack' })
    return giveWaiver(plant.vault, plant.runa, {
      axisId: plant.axisId, rule: 'site-rule', at: ['/setup/thrustLimit'], reason: 'trial', until: iso(plant.now + 10 * day),
      value: { level: 'stop', values: [{ place: 'ruleId', value: id }, { place: '/setup/thrustLimit', value: 55 }] },
    }).id
  }

  it('that ran out leaves a stop that is a finding, once', () => {
    give()
    plant.upload(raised)
    expect(raiseUnwaived(plant.vault)).toBe(0)
    plant.now += 11 * day
    expect([raiseUnwaived(plant.vault), raiseUnwaived(plant.vault)]).toEqual([1, 0])
    expect(findings('stop-check')).toMatchObject([{ state: 'open', versions: [{ number: 2 }] }])
    settle(findings('stop-check')[0]!.id)
    expect(raiseUnwaived(plant.vault)).toBe(0)
  })

  it('given for a stop that is open explains it, by who signed', () => {
    const { id } = makeRule(plant.vault, plant.runa, { scope: 'axis', scopeId: plant.axisId, field: 'thrustLimit', max: 45, reason: 'jars crack' })
    plant.upload(raised)
    const covers = (value: number) => giveWaiver(plant.vault, plant.runa, {
      axisId: plant.axisId, rule: 'site-rule', at: ['/setup/thrustLimit'], reason: 'trial', until: '2026-06-01T00:00:00Z',
      value: { level: 'stop', values: [{ place: 'ruleId', value: id }, { place: '/setup/thrustLimit', value }] },
    })
    covers(54)
    expect(findings('stop-check')).toMatchObject([{ state: 'open' }])
    covers(55)
    expect(findings('stop-check')).toMatchObject([{ state: 'explained', explanations: [{ by: 'Runa Haldersen', text: 'Accepted until 2026-06-01 by a waiver: trial' }] }])
  })

  const underRule = () => {
    const { id } = makeRule(plant.vault, plant.runa, { scope: 'axis', scopeId: plant.axisId, field: 'thrustLimit', max: 45, reason: 'jars crack' })
    plant.upload(raised)
    return giveWaiver(plant.vault, plant.runa, {
      axisId: plant.axisId, rule: 'site-rule', at: ['/setup/thrustLimit'], reason: 'trial', until: '2026-06-01T00:00:00Z',
      value: { level: 'stop', values: [{ place: 'ruleId', value: id }, { place: '/setup/thrustLimit', value: 55 }] },
    }).id
  }

  it('that explained a finding and is taken back opens it again, with its words', () => {
    const id = underRule()
    plant.now += day
    endWaiver(plant.vault, plant.runa, id, { reason: 'no trial any more' })
    expect(findings('stop-check')).toMatchObject([{ state: 'open', acts: [
      { kind: 'explained', text: 'Accepted until 2026-06-01 by a waiver: trial' },
      { kind: 'reopened', by: 'Runa Haldersen', text: 'The waiver that explained it was taken back: no trial any more' },
    ] }])
  })

  it('that is taken back leaves explained what another has explained too, and closed what is closed', () => {
    const id = underRule()
    explainFinding(plant.vault, plant.tobias, findings('stop-check')[0]!.id, { text: 'Lids stood proud.' })
    endWaiver(plant.vault, plant.runa, id, { reason: 'no trial any more' })
    expect(findings('stop-check')).toMatchObject([{ state: 'explained' }])
    closeFinding(plant.vault, plant.ines, findings('stop-check')[0]!.id, { as: 'accepted', allowedBy: 'Marit Lund' })
    expect(findings('stop-check')).toMatchObject([{ state: 'closed' }])
  })

  it('that was taken back does so at once', () => {
    const id = give()
    plant.upload(raised)
    expect(findings('stop-check')).toEqual([])
    endWaiver(plant.vault, plant.runa, id, { reason: 'no trial any more' })
    expect(findings('stop-check')).toMatchObject([{ state: 'open' }])
  })
})

describe('judging again', () => {
  it('makes one finding of a new rule of the site, with a list of the axes that it hits', () => {
    const other = plant.axis('LID-03.Z')
    plant.fit(other, plant.unit('SN-2'), plant.now - day)
    const second = plant.upload({ thrustLimit: 50 }, { serial: 'SN-2' }).version
    const first = plant.upload(raised).version
    makeRule(plant.vault, plant.runa, { scope: 'site', scopeId: plant.siteId, field: 'thrustLimit', max: 45, reason: 'jars crack' })
    judgeVersion(plant.vault, plant.runa, first.id)
    judgeVersion(plant.vault, plant.runa, second.id)
    judgeVersion(plant.vault, plant.runa, second.id)
    expect(findings('stop-check')).toMatchObject([{ weight: 'harm', versions: [{ tag: 'LID-02.Z' }, { tag: 'LID-03.Z' }] }])
  })

  it('makes none of stops that stood before, and none of a version that is not current', () => {
    makeRule(plant.vault, plant.runa, { scope: 'site', scopeId: plant.siteId, field: 'thrustLimit', max: 45, reason: 'jars crack' })
    const old = plant.upload(raised).version
    const [stop] = findings('stop-check')
    settle(stop!.id)
    judgeVersion(plant.vault, plant.runa, old.id)
    plant.upload({ thrustLimit: 38, speedLimit: 500 })
    makeRule(plant.vault, plant.runa, { scope: 'site', scopeId: plant.siteId, field: 'thrustLimit', max: 44, reason: 'jars crack more' })
    judgeVersion(plant.vault, plant.runa, old.id)
    expect(findings('stop-check')).toHaveLength(1)
  })
})

describe('what others cause', () => {
  const raise = (work: Parameters<typeof plant.vault.write>[1]) => plant.vault.write(plant.tobias, work as never) as { id: number, state: string }
  const place = () => judgingQueries(plant.vault.db).axis.get({ id: plant.axisId })!

  it('a read-back that differs, one finding an attempt', () => {
    const { version, changes } = plant.upload(raised)
    const told = changes as never
    const one = (attempt: number) => raise(write => raiseReadBack(plant.vault.db, write, place(), { swapId: 4, attempt, versionId: version.id, changes: told }))
    expect([one(1).id, one(1).id, one(2).id]).toEqual([2, 2, 3])
    expect(findings('read-back')[1]).toMatchObject({ weight: 'harm', title: 'LID-02.Z: read-back 1 differs from the kit: thrust limit 38 → 55 %', versions: [{ versionId: version.id }] })
  })

  it('an unfit unit that goes in', () => {
    raise(write => raiseUnfit(plant.vault.db, write, place(), { swapId: 4, unitIn: 'A5502', why: ['Firmware 2.1 is older than 2.4.', 'No brake.'] }))
    expect(findings('unfit')).toMatchObject([{ title: 'LID-02.Z: a swap goes on with unit A5502, which does not fit: Firmware 2.1 is older than 2.4 and 1 more', versions: [{ versionId: null, number: null }] }])
  })

  it('tells who watches once, by the letter of whoever raised it', () => {
    const maud = plant.person('Maud Verhagen', ['auditor'])
    for (const who of [plant.ines, maud]) watchPlace(plant.vault, who, { scope: 'axis', scopeId: plant.axisId, watched: true })
    raise(write => raiseUnfit(plant.vault.db, write, place(), { swapId: 4, unitIn: 'A5502', why: [] }, () => [plant.ines.id]))
    expect(plant.vault.db.select().from(letter).all()).toMatchObject([{ personId: maud.id, kind: 'finding-opened' }])
  })

  it('damage that a verification found, about the vault itself', () => {
    const damage = () => raise(write => raiseDamage(plant.vault.db, write, { record: 'version 7', says: 'is not what entry 12 says' }))
    expect(damage().id).toBe(damage().id)
    expect(findings('verification')).toMatchObject([{ axisId: null, tag: null, versions: [], weight: 'harm' }])
  })
})

describe('a finding past its day', () => {
  it('is told once to who watches', () => {
    watchPlace(plant.vault, plant.ines, { scope: 'site', scopeId: plant.siteId, watched: true })
    plant.upload(raised)
    expect(tellOverdue(plant.vault)).toBe(0)
    plant.now += 7 * day
    expect([tellOverdue(plant.vault), tellOverdue(plant.vault)]).toEqual([1, 0])
    expect(plant.vault.db.select().from(letter).all().map(({ kind }) => kind)).toEqual(['watched-change', 'finding-overdue'])
  })

  it('is told to nobody once it is closed', () => {
    watchPlace(plant.vault, plant.ines, { scope: 'site', scopeId: plant.siteId, watched: true })
    settle(plant.upload(raised).findings[0]!.id)
    plant.now += 8 * day
    expect(tellOverdue(plant.vault)).toBe(0)
  })
})
