import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { Actor, PersonActor } from '../../../server/database/actor'
import { markKnownGood, markNone } from '../../../server/services/known-good/mark'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { readVersion } from '../../../server/services/versions/read-version'
import { voidVersion } from '../../../server/services/versions/void-version'
import type { UploadFields } from '../../../shared/api/uploads'
import type { Problem } from '../../../shared/api/common'
import { CodedError } from '../../../shared/errors/coded'
import { day, minute, openPlant, settingsFile, start, type FileParts, type Plant } from '../../support/vault-plant'

let plant: Plant
let runa: PersonActor
let mira: PersonActor
let tobias: PersonActor
let axisId: number

function stand(options: Parameters<typeof openPlant>[0] = {}) {
  plant = openPlant(options)
  runa = plant.person('Runa Haldersen')
  mira = plant.person('Mira Lindqvist')
  tobias = plant.person('Tobias Achterberg', ['technician'])
  axisId = plant.axis('LID-02.Z')
  plant.fit(axisId, plant.unit('SN-0001'), start - 300 * day)
}
beforeEach(() => stand())
afterEach(() => plant.close())

function store(actor: Actor, setup: object, fields: UploadFields = {}, rest: FileParts = {}): number {
  plant.now += minute
  const outcome = storeUpload(plant.vault, actor, { bytes: settingsFile({ setup, ...rest }), name: null }, fields)
  if (outcome.outcome !== 'version') throw new Error(JSON.stringify(outcome))
  return outcome.answer.version.id
}
const mark = (actor: Actor, versionId: number) => markKnownGood(plant.vault, actor, versionId, { meaning: 'approved' })
function refusal(act: () => unknown): CodedError {
  try {
    act()
  }
  catch (error) {
    if (error instanceof CodedError) return error
    throw error
  }
  throw new Error('Nothing was refused.')
}
const state = () => plant.vault.sqlite.prepare('SELECT status, off_harm, off_motion, off_text, sense, off_since, known_good_version_id, current_version_id FROM axis_state WHERE axis_id = ?').get(axisId)

describe('marking known-good', () => {
  it('puts the axis in line with it, and off when the next file differs', () => {
    const v1 = store(tobias, { thrustLimit: 38 })
    expect(state()).toMatchObject({ status: 'unmarked', current_version_id: v1 })
    mark(runa, v1)
    expect(state()).toMatchObject({ status: 'in-line', known_good_version_id: v1 })
    expect(readVersion(plant.vault, v1).mark).toMatchObject({ by: 'Runa Haldersen', meaning: 'approved', inForce: true })
    const v2 = store(tobias, { thrustLimit: 55, smoothingTime: 4 })
    expect(state()).toMatchObject({ status: 'off', off_harm: 1, off_motion: 1, sense: 'more', known_good_version_id: v1, current_version_id: v2 })
    const since = (state() as { off_since: string }).off_since
    store(tobias, { thrustLimit: 60 })
    expect((state() as { off_since: string }).off_since).toBe(since)
    store(tobias, { thrustLimit: 38 })
    expect(state()).toMatchObject({ status: 'in-line', off_harm: 0, off_since: null })
  })

  it('none is a mark too', () => {
    const v1 = store(tobias, { thrustLimit: 38 })
    mark(runa, v1)
    markNone(plant.vault, runa, axisId, { meaning: 'responsibility', note: 'gripper changed' })
    expect(state()).toMatchObject({ status: 'unmarked', known_good_version_id: null })
    expect(readVersion(plant.vault, v1).mark).toMatchObject({ inForce: false })
    expect(plant.rows()).toMatchObject({ known_good: 2 })
  })

  it('is refused for a void version, and the marked one is not voided', () => {
    const v1 = store(tobias, { thrustLimit: 38 })
    const v2 = store(tobias, { thrustLimit: 55 })
    voidVersion(plant.vault, runa, v2, 'wrong file')
    expect(refusal(() => mark(runa, v2)).code).toBe('already-void')
    expect(refusal(() => voidVersion(plant.vault, runa, v2, 'again')).code).toBe('already-void')
    mark(runa, v1)
    expect(refusal(() => voidVersion(plant.vault, runa, v1, 'oops')).code).toBe('marked')
    expect(readVersion(plant.vault, v2).void).toMatchObject({ by: 'Runa Haldersen', reason: 'wrong file' })
    expect(state()).toMatchObject({ status: 'in-line', current_version_id: v1 })
  })

  it('is refused while a stop check stands, which it lists; a nameplate put right lets it pass and is judged anew', () => {
    plant.nameplate({ model: 'HL40-200V', axisKind: 'linear', stroke: 200 })
    const v1 = store(tobias, { softLimitMin: 0, softLimitMax: 300 })
    const refused = refusal(() => mark(runa, v1))
    expect(refused.code).toBe('stop-checks')
    expect((refused.details as unknown as Problem).errors).toMatchObject([{ code: 'travel-span' }])
    expect(plant.rows()).toMatchObject({ known_good: 0, check_set: 1 })
    plant.vault.sqlite.prepare(`INSERT INTO nameplate_revision (model, revision, nameplate, made_at, made_by) VALUES ('HL40-200V', 2, ?, ?, ?)`)
      .run(JSON.stringify({ model: 'HL40-200V', axisKind: 'linear', stroke: 400 }), new Date(plant.now).toISOString(), runa.id)
    mark(runa, v1)
    expect(readVersion(plant.vault, v1)).toMatchObject({ judged: { nameplateRevision: 2 }, checkCounts: { stop: 0 } })
  })
})

describe('four eyes', () => {
  it('refuses who brought in the harm value, and names field and person', () => {
    const v1 = store(tobias, { thrustLimit: 38, speedLimit: 300 })
    mark(runa, v1)
    const v2 = store(runa, { thrustLimit: 55, speedLimit: 300 })
    const refused = refusal(() => mark(runa, v2))
    expect(refused.code).toBe('four-eyes')
    expect(refused.message).toBe('Thrust limit 38 → 55 % was brought in by Runa Haldersen in version 2. Another planner marks it.')
    expect(refused.details.errors).toMatchObject([{ at: '/setup/thrustLimit', code: 'four-eyes' }])
    expect(mark(mira, v2)).toMatchObject({ id: expect.any(Number) })
  })

  it('goes by changed by before the storer, and by the storer where changed by is free text', () => {
    const v1 = store(tobias, { thrustLimit: 38 })
    mark(runa, v1)
    const byMira = store(runa, { thrustLimit: 50 }, { changedBy: `person:${mira.id}` })
    expect(refusal(() => mark(mira, byMira)).code).toBe('four-eyes')
    mark(runa, byMira)
    const free = store(runa, { thrustLimit: 60 }, { changedBy: 'Mira' })
    expect(refusal(() => mark(runa, free)).code).toBe('four-eyes')
    mark(mira, free)
  })

  it('holds the owner of a token to what the token brought in', () => {
    mark(mira, store(tobias, { thrustLimit: 38 }))
    const v2 = store(plant.token('Nightly export', runa), { thrustLimit: 50 })
    expect(refusal(() => mark(runa, v2)).code).toBe('four-eyes')
    mark(mira, v2)
  })

  it('follows the unbroken run: a later version of one’s own that only carries the value on is no hindrance', () => {
    mark(runa, store(tobias, { thrustLimit: 38 }))
    store(tobias, { thrustLimit: 55 })
    const carried = store(runa, { thrustLimit: 55, smoothingTime: 5 })
    expect(mark(runa, carried)).toMatchObject({ id: expect.any(Number) })
    store(runa, { thrustLimit: 70 })
    store(tobias, { thrustLimit: 38 })
    const back = store(tobias, { thrustLimit: 70 })
    mark(runa, back)
  })

  it('passes over void versions and takes late ones where they stand in time', () => {
    mark(runa, store(tobias, { thrustLimit: 38 }, {}, { exportedAt: new Date(start - 20 * day).toISOString() }))
    const wrong = store(runa, { thrustLimit: 55 }, {}, { exportedAt: new Date(start - 10 * day).toISOString() })
    const right = store(tobias, { thrustLimit: 55 }, { occasion: 'as-found' }, { exportedAt: new Date(start - 5 * day).toISOString() })
    expect(refusal(() => mark(runa, right)).code).toBe('four-eyes')
    voidVersion(plant.vault, mira, wrong, 'wrong axis')
    mark(runa, right)
  })

  it('leaves motion alone, and version 1 where nothing is known-good yet', () => {
    const v1 = store(runa, { thrustLimit: 38 })
    mark(runa, v1)
    mark(runa, store(runa, { thrustLimit: 38, smoothingTime: 3 }))
    stand()
    store(runa, { thrustLimit: 38 })
    const v2 = store(runa, { thrustLimit: 38, jogSpeed: 20 })
    expect(refusal(() => mark(runa, v2)).message).toContain('Jog speed 20 mm/s was brought in by Runa Haldersen in version 2')
  })

  it('may be switched off by the site', () => {
    stand({ fourEyes: false })
    mark(runa, store(tobias, { thrustLimit: 38 }))
    mark(runa, store(runa, { thrustLimit: 55 }))
    expect(state()).toMatchObject({ status: 'in-line' })
  })
})
