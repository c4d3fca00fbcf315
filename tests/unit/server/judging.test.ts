import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { JudgingRun } from '../../../shared/api/judging'
import type { PersonActor } from '../../../server/database/actor'
import { readAxis } from '../../../server/services/axes/read-axis'
import { judgeVersion } from '../../../server/services/judging/judge-again'
import { beginRun, readRun } from '../../../server/services/judging/runs'
import { endRule, makeRule } from '../../../server/services/rules/rules'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { readVersion } from '../../../server/services/versions/read-version'
import { parseLeaf } from '../../../shared/trail/entry'
import { codeOf } from '../../support/codes'
import { day, iso, minute, openPlant, settingsFile, start, type Plant } from '../../support/vault-plant'

let plant: Plant
let runa: PersonActor
const faults: unknown[] = []

beforeEach(() => {
  plant = openPlant()
  runa = plant.person('Runa Haldersen')
  faults.length = 0
})
afterEach(() => { if (plant.vault.sqlite.open) plant.close() })

function storeAt(tag: string, setup: object, machineId = plant.machineId): { axisId: number, versionId: number } {
  const axisId = plant.axis(tag, { machineId })
  plant.fit(axisId, plant.unit(`SN-${tag}`), start - 300 * day)
  plant.now += minute
  const outcome = storeUpload(plant.vault, runa, { bytes: settingsFile({ serial: `SN-${tag}`, setup }), name: null }, {})
  if (outcome.outcome !== 'version') throw new Error(JSON.stringify(outcome))
  return { axisId, versionId: outcome.answer.version.id }
}
const rule = (max: number) => makeRule(plant.vault, runa, { scope: 'site', scopeId: plant.siteId, field: 'thrustLimit', max, reason: 'lids crack' }).id
const begin = (actor = runa) => beginRun(plant.vault, actor, error => faults.push(error)).id
async function finished(id: number, actor = runa): Promise<JudgingRun> {
  for (;;) {
    const run = readRun(plant.vault, actor, id)
    if (run.done === run.of || run.problem !== null) return run
    await new Promise((resolve) => { setImmediate(resolve) })
  }
}

describe('judging one version again', () => {
  it('goes by the rules of today and keeps the judgement before', () => {
    const { axisId, versionId } = storeAt('LID-01.Z', { thrustLimit: 50 })
    rule(40)
    expect(readVersion(plant.vault, versionId).checkCounts.stop).toBe(0)
    const answer = judgeVersion(plant.vault, runa, versionId)
    expect(answer).toMatchObject({ changed: true, judged: { judgedAt: iso(plant.now) } })
    expect(answer.checks.filter(({ level }) => level === 'stop').map(({ rule: id, waived }) => [id, waived])).toEqual([['site-rule', null]])
    expect(readVersion(plant.vault, versionId)).toMatchObject({ checks: answer.checks, checkCounts: { stop: 1 } })
    expect(readAxis(plant.vault, axisId).checks.stop).toBe(1)
    expect(plant.vault.sqlite.prepare('SELECT stop FROM check_set WHERE version_id = ? ORDER BY id').pluck().all(versionId)).toEqual([0, 1])
  })

  it('keeps one more where nothing changed, and says so', () => {
    const { versionId } = storeAt('LID-01.Z', { thrustLimit: 50 })
    expect(judgeVersion(plant.vault, runa, versionId).changed).toBe(false)
    expect(plant.rows()).toMatchObject({ check_set: 2 })
    expect(codeOf(() => judgeVersion(plant.vault, runa, 99))).toBe('not-found')
  })

  it('is logged as the judgement that was kept', () => {
    const { versionId } = storeAt('LID-01.Z', { thrustLimit: 50 })
    judgeVersion(plant.vault, runa, versionId)
    const entry = parseLeaf(plant.vault.sqlite.prepare('SELECT leaf FROM log ORDER BY seq DESC LIMIT 1').pluck().get() as string)
    expect(entry).toMatchObject({ act: 'version-judged', subject: { kind: 'check-set', id: 2 }, state: { versionId, stop: 0, nameplateRevisionId: null } })
  })
})

describe('judging every axis again', () => {
  it('lists once what a new rule hits, and stores only what changed', async () => {
    const hit = storeAt('LID-01.Z', { thrustLimit: 50 })
    storeAt('LID-02.Z', { thrustLimit: 30 })
    const both = storeAt('LID-03.Z', { thrustLimit: 60, softLimitMin: 5, softLimitMax: 1 })
    rule(40)
    const run = await finished(begin())
    expect(run).toMatchObject({ done: 3, of: 3, problem: null })
    expect(run.changed.map(({ tag, axisId, versionId, number }) => [tag, axisId, versionId, number])).toEqual([['LID-01.Z', hit.axisId, hit.versionId, 1], ['LID-03.Z', both.axisId, both.versionId, 1]])
    expect(run.changed.map(({ before, after, stops }) => [before.stop, after.stop, stops])).toEqual([[0, 1, 1], [1, 2, 2]])
    expect(run.changed[0]?.message).toMatch(/40/)
    expect(run.changed[1]?.message).toMatch(/60/)
    expect(plant.rows()).toMatchObject({ check_set: 5 })
    expect(readAxis(plant.vault, hit.axisId).checks.stop).toBe(1)
    expect(readRun(plant.vault, runa, run.id, 1).changed.map(({ tag }) => tag)).toEqual(['LID-03.Z'])
  })

  it('changes nothing the second time, and lists what ended with a rule', async () => {
    storeAt('LID-01.Z', { thrustLimit: 50 })
    const id = rule(40)
    await finished(begin())
    expect((await finished(begin())).changed).toEqual([])
    expect(plant.rows()).toMatchObject({ check_set: 2 })
    endRule(plant.vault, runa, id, { reason: 'new lids' })
    expect((await finished(begin())).changed.map(({ before, after, stops, message }) => [before.stop, after.stop, stops, message])).toEqual([[1, 0, 0, null]])
  })

  it('takes current versions only, of the sites of who asks', async () => {
    storeAt('LID-01.Z', { thrustLimit: 50 })
    const other = plant.machineAt('Northfield')
    storeAt('NOR-01.Z', { thrustLimit: 50 }, other.machineId)
    plant.axis('NEW-01.X')
    const mira = plant.person('Mira Lindqvist', ['planner'], [other.siteId])
    expect((await finished(begin(mira), mira)).of).toBe(1)
    expect((await finished(begin())).of).toBe(2)
  })

  it('keeps a judgement by a new revision of the nameplate, and does not list what says the same', async () => {
    const { versionId } = storeAt('LID-01.Z', { thrustLimit: 50, softLimitMin: 0, softLimitMax: 100 })
    plant.nameplate({ model: 'HL40-200V', axisKind: 'linear', stroke: 200 })
    await finished(begin())
    plant.vault.sqlite.prepare(`INSERT INTO nameplate_revision (model, revision, nameplate, made_at, made_by) VALUES ('HL40-200V', 2, ?, ?, ?)`)
      .run(JSON.stringify({ model: 'HL40-200V', axisKind: 'linear', stroke: 210 }), iso(plant.now), runa.id)
    expect((await finished(begin())).changed).toEqual([])
    expect(readVersion(plant.vault, versionId).judged.nameplateRevision).toBe(2)
  })

  it('lets others in between its slices, and runs follow one another', async () => {
    for (let index = 0; index < 40; index += 1) storeAt(`AX-${index}`, { thrustLimit: 50 })
    rule(40)
    const first = begin()
    const second = begin()
    expect(second).toBeGreaterThan(first)
    const seen: [number, number][] = []
    while (readRun(plant.vault, runa, second).done < 40) {
      await new Promise((resolve) => { setImmediate(resolve) })
      seen.push([readRun(plant.vault, runa, first).done, readRun(plant.vault, runa, second).done])
    }
    expect(new Set(seen.map(([done]) => done))).toEqual(new Set([0, 16, 32, 40]))
    expect(seen.filter(([done, later]) => done < 40 && later > 0)).toEqual([])
    expect(readRun(plant.vault, runa, first).changed).toHaveLength(40)
    expect(readRun(plant.vault, runa, second).changed).toEqual([])
  })

  it('is told to who began it, and unknown runs are not there', async () => {
    const mira = plant.person('Mira Lindqvist')
    const id = begin()
    expect(codeOf(() => readRun(plant.vault, mira, id))).toBe('not-found')
    expect(codeOf(() => readRun(plant.vault, runa, id + 1))).toBe('not-found')
    expect(await finished(id)).toMatchObject({ done: 0, of: 0 })
  })

  it('says when it broke off, and keeps what it judged', async () => {
    for (let index = 0; index < 20; index += 1) storeAt(`AX-${index}`, { thrustLimit: 50 })
    rule(40)
    plant.vault.sqlite.exec(`CREATE TEMP TRIGGER full BEFORE INSERT ON check_set WHEN (SELECT count(*) FROM check_set) >= 36 BEGIN SELECT RAISE(ABORT, 'no room'); END`)
    const run = await finished(begin())
    expect(run).toMatchObject({ done: 16, of: 20, problem: 'The run broke off. What it judged is kept; begin again.' })
    expect(run.changed).toHaveLength(16)
    expect(String(faults[0])).toContain('no room')
    plant.vault.sqlite.exec('DROP TRIGGER full')
    expect((await finished(begin())).changed).toHaveLength(4)
  })
})
