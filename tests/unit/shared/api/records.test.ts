import { describe, expect, it } from 'vitest'
import type { z } from 'zod'
import { attentionSchema, boardAxis, healthSchema, logEntrySchema, type Attention, type BoardAxis } from '../../../../shared/api/board'
import { problemSchema, type Problem } from '../../../../shared/api/common'
import { runSchema, type JudgingRun } from '../../../../shared/api/judging'
import { meSchema, personSchema, tokenSchema, type Me, type Person, type Token } from '../../../../shared/api/people'
import {
  fittingBody, fittingSchema, lineBody, machineBody, nameplateBody, placeQuery, ruleEndBody, ruleSchema, siteSchema, unitQuery, unitSchema, type Fitting, type Rule, type Site, type Unit,
} from '../../../../shared/api/places'
import { previewAnswer, trayItem, uploadTray, type TrayItem } from '../../../../shared/api/uploads'
import {
  asOfQuery, axisSchema, changeSchema, changesQuery, fileQuery, knownGoodBody, lifeEvent, versionRef, versionSchema, type Axis, type LifeEvent, type VersionSummary,
} from '../../../../shared/api/versions'
import { waiverBody, waiverEndBody, waiverSchema, type WaiverRecord } from '../../../../shared/api/waivers'
import { travels, type Travelling } from '../../../support/travelling'

/*
 * One record of each kind as it travels; those of swaps, findings, letters, history and trail stand in a file of their own.
 */

const at = '2026-11-30T08:15:00.000Z'
const hash = 'c4e62043335fbe676734ef78d0edd99b10c05e7591df9684f5954e438bcaf72f'
const counts = { harm: 1, motion: 2, text: 0 }
const levels = { stop: 0, warn: 1, note: 2, unknown: 9 }

const version: Partial<VersionSummary> = {
  id: 7, axisId: 2, axisTag: 'LID-02.Z', unitId: 3, serial: 'HL40-2231-0087', number: 4, occasion: 'as-found', capturedAt: at, receivedAt: at, clockDoubtful: false, late: false, current: true,
  void: null, baseId: null, baseNumber: null, contentHash: hash, copyHash: hash, scribeCode: 'RKK20-GSKBY', storedBy: 'Tobias Achterberg', changedBy: null, allowedBy: null, reason: null, workOrder: null,
  firmware: null, model: 'HL40-200V', changes: counts, checks: levels, sightings: 0, lastSeenAt: null, mark: null,
}
const axis: Partial<Axis> = {
  id: 2, rev: 1, tag: 'LID-02.Z', axisKind: 'linear', role: '', flags: ['gravity'], bus: '', uploadEveryHours: null, duty: null, machine: { id: 1, name: 'Lid press 2' }, line: { id: 1, name: 'Jar line 1' },
  site: { id: 1, name: 'Larkfield Preserves', timeZone: 'Europe/Copenhagen' }, status: 'never-read', off: counts, sense: null, knownGood: null, unit: null, current: null, lastUploadAt: null, overdueSince: null,
  checks: levels, versions: 0, sightings: 0,
}
const board: Partial<BoardAxis> = {
  id: 2, tag: 'LID-02.Z', role: 'lid press', site: 'Larkfield Preserves', line: 'Jar line 1', machine: 'Lid press 2', machineId: 1, timeZone: 'Europe/Copenhagen', serial: null, model: null, status: 'off',
  off: counts, sense: 'more', lastUploadAt: null, overdueSince: null, knownGood: null, current: { versionId: 7, number: 4 }, checks: levels,
}
const attention: Partial<Attention> = { kind: 'off-known-good', count: 1, since: at, items: [{ axisId: 2, tag: 'LID-02.Z', versionId: 7, knownGoodId: null, findingId: null, text: 'Thrust limit 38 → 55 %', since: null }] }
const me: Partial<Me> = { id: 1, name: 'Runa Haldersen', email: 'runa@larkfield.example', roles: ['planner'], sites: [{ id: 1, name: 'Larkfield Preserves', timeZone: 'UTC' }], plant: 'Larkfield Preserves', empty: false, shared: false }
const person: Partial<Person> = { id: 1, rev: 1, name: 'Runa Haldersen', email: 'runa@larkfield.example', roles: ['planner'], siteIds: [], shared: false, endedAt: null, hasPassword: true, lastSignInAt: null }
const token: Partial<Token> = { id: 1, name: 'Night export', scopes: ['upload'], siteIds: [], endsAt: at, endedAt: null, ownerId: 1, ownerName: 'Runa Haldersen', madeAt: at, lastUsedAt: null }
const site: Partial<Site> = { id: 1, rev: 1, name: 'Larkfield Preserves', timeZone: 'UTC', fourEyes: true, releaseHours: 24, knownGoodMonths: 24, watched: [] }
const unit: Partial<Unit> = { id: 3, rev: 1, serial: 'HL40-2231-0087', channel: null, model: 'HL40-200V', firmware: null, actuatorSerial: null, actuatorModel: null, location: '', state: 'spare', siteId: null, axis: null, modelKnown: true }
const fitting: Partial<Fitting> = { id: 1, axisId: 2, axisTag: 'LID-02.Z', unitId: 3, serial: 'HL40-2231-0087', from: at, to: null }
const rule: Partial<Rule> = { id: 1, scope: 'axis', scopeId: 2, scopeName: 'LID-02.Z', field: 'jogSpeed', min: null, max: 50, fixed: null, reason: 'guard', madeAt: at, madeBy: 'Runa Haldersen', endedAt: null, endedBy: null, endReason: null }
const waiver: Partial<WaiverRecord> = {
  id: 1, axisId: 2, rule: 'travel-span', at: ['/setup/softLimitMax'], value: { level: 'stop', values: [{ place: '/setup/softLimitMax', value: 205 }] }, reason: 'bracket ordered', until: at, by: 'Runa Haldersen', givenAt: at,
  endedAt: null, endedBy: null, endReason: null,
}
const tray: Partial<TrayItem> = {
  id: 1, problem: 'unreadable', detail: 'The file cannot be read.', errors: [{ at: '/setup/jogSpeed', code: 'number-range', message: 'x' }], more: 0, name: null, bytes: 12, sha256: hash, receivedAt: at, sentBy: 'Tobias Achterberg',
  serial: null, model: null, capturedAt: null, siteId: null, copies: 1, guess: null,
}
const life: Partial<LifeEvent> = { at, kind: 'mark', versionId: 7, number: 4, by: 'Runa Haldersen', text: null, serial: null, changes: null, occasion: null, sightings: null }
const run: Partial<JudgingRun> = { id: 1, done: 0, of: 4, changed: [], problem: null }
const problem: Partial<Problem> = { type: 'urn:witnessmark:problem:input', title: 'Not as it should be', status: 422, detail: 'x', code: 'input' }

const records: readonly Travelling[] = [
  { what: 'a version', schema: versionSchema, record: version, nullable: ['void', 'baseId', 'baseNumber', 'changedBy', 'allowedBy', 'reason', 'workOrder', 'firmware', 'lastSeenAt', 'mark'] },
  { what: 'an axis', schema: axisSchema, record: axis, nullable: ['uploadEveryHours', 'duty', 'sense', 'knownGood', 'unit', 'current', 'lastUploadAt', 'overdueSince'] },
  { what: 'an axis of the board', schema: boardAxis, record: board, nullable: ['serial', 'model', 'sense', 'lastUploadAt', 'overdueSince', 'knownGood', 'current'] },
  { what: 'a line of what needs someone', schema: attentionSchema, record: attention, nullable: ['since'] },
  { what: 'who is asking', schema: meSchema, record: me, nullable: [] },
  { what: 'a person', schema: personSchema, record: person, nullable: ['endedAt', 'lastSignInAt'] },
  { what: 'a token', schema: tokenSchema, record: token, nullable: ['endedAt', 'lastUsedAt'] },
  { what: 'a site', schema: siteSchema, record: site, nullable: [] },
  { what: 'a unit', schema: unitSchema, record: unit, nullable: ['channel', 'firmware', 'actuatorSerial', 'actuatorModel', 'siteId', 'axis'] },
  { what: 'a fitting', schema: fittingSchema, record: fitting, nullable: ['to'] },
  { what: 'a site rule', schema: ruleSchema, record: rule, nullable: ['min', 'max', 'fixed', 'endedAt', 'endedBy', 'endReason'] },
  { what: 'a waiver', schema: waiverSchema, record: waiver, nullable: ['endedAt', 'endedBy', 'endReason'] },
  { what: 'a file in the tray', schema: trayItem, record: tray, nullable: ['name', 'serial', 'model', 'capturedAt', 'siteId', 'guess'] },
  { what: 'an event of a life', schema: lifeEvent, record: life, nullable: ['versionId', 'number', 'text', 'serial', 'changes', 'occasion', 'sightings'] },
  { what: 'a run of judging', schema: runSchema, record: run, nullable: ['problem'] },
  { what: 'a problem', schema: problemSchema, record: problem, nullable: ['current'], optional: ['errors', 'more', 'tray', 'current'] },
  { what: 'an entry of the log', schema: logEntrySchema, record: { seq: 1, leaf: '{}', hash }, nullable: [] },
  { what: 'the health of the vault', schema: healthSchema, record: { status: 'ok', schema: 3, writable: true, lettersWaitingSince: null }, nullable: ['lettersWaitingSince'] },
  { what: 'what went to the tray', schema: uploadTray, record: { tray: 1, problem: 'not-fitted', detail: 'x' }, nullable: [] },
]

describe.each(records)('$what as it travels', travels)

const long = (length: number) => 'x'.repeat(length)
/** Each value in its field, the rest of the body being right. */
function field(schema: z.ZodType, body: object, name: string, taken: readonly unknown[], refused: readonly unknown[]): void {
  const takes = (value: unknown) => schema.safeParse(value === undefined ? Object.fromEntries(Object.entries(body).filter(([key]) => key !== name)) : { ...body, [name]: value }).success
  expect(taken.map(takes), `${name} takes ${JSON.stringify(taken).slice(0, 120)}`).toEqual(taken.map(() => true))
  expect(refused.map(takes), `${name} refuses ${JSON.stringify(refused).slice(0, 120)}`).toEqual(refused.map(() => false))
}

const ids = [[1, Number.MAX_SAFE_INTEGER], [0, -1, 1.5, '1', null, Number.MAX_SAFE_INTEGER + 1, undefined]] as const
const names = [['a', long(80)], ['', long(81), 5, null, undefined]] as const
const reasons = [['a', long(2000)], ['', long(2001), null, undefined]] as const
const passwords = [['a', long(256)], ['', long(257), null, undefined]] as const
const times = [[at, '2026-11-30T08:15:00+01:00', '1996-12-19T16:39:57-08:00'], ['2026-11-30', 'now', 1764490500, '2026-02-30T08:15:00Z', '2026-11-30T24:00:00Z', null, undefined]] as const

describe('what is sent to register and to sign', () => {
  it('a line and a machine have a name and the place above them', () => {
    field(lineBody, { siteId: 1, name: 'a' }, 'siteId', ...ids)
    field(lineBody, { siteId: 1, name: 'a' }, 'name', ...names)
    field(machineBody, { lineId: 1, name: 'a' }, 'lineId', ...ids)
    field(machineBody, { lineId: 1, name: 'a' }, 'name', ...names)
  })

  it('a fitting joins one axis and one unit at a time', () => {
    const body = { axisId: 1, unitId: 1, at }
    field(fittingBody, body, 'axisId', ...ids)
    field(fittingBody, body, 'unitId', ...ids)
    field(fittingBody, body, 'at', ...times)
  })

  it('a nameplate has a model, a kind and a stroke, and of the rest what is known', () => {
    const body = { model: 'HL40-200V', axisKind: 'linear', stroke: 200 }
    field(nameplateBody, body, 'model', ['a', long(64)], ['', long(65), 5, undefined])
    field(nameplateBody, body, 'axisKind', ['linear', 'rotary'], ['gantry', null, undefined])
    field(nameplateBody, body, 'stroke', [0.001, 1e6], [0, -1, '200', null, undefined])
    field(nameplateBody, body, 'efficiency', [0.5, 1, undefined], [0, 1.01, -0.1])
    field(nameplateBody, body, 'forceBase', ['rated-thrust', 'peak-thrust', undefined], ['thrust', null])
    field(nameplateBody, body, 'rev', [], [1])
  })

  it('a mark has a meaning and a password, and a note where there is one', () => {
    const body = { meaning: 'approved', password: 'a' }
    field(knownGoodBody, body, 'meaning', ['reviewed', 'approved', 'responsibility'], ['fine', '', null, undefined])
    field(knownGoodBody, body, 'note', ['', long(2000), undefined], [long(2001), null])
    field(knownGoodBody, body, 'password', ...passwords)
  })

  it('a waiver names a rule, its places and what it covers, with reason, end and password', () => {
    const body = { axisId: 1, rule: 'travel-span', at: [], value: { level: 'unknown', missing: [] }, reason: 'a', until: at, password: 'a' }
    field(waiverBody, body, 'axisId', ...ids)
    field(waiverBody, body, 'rule', ['a', long(80)], ['', long(81), null, undefined])
    field(waiverBody, body, 'at', [['/setup/jogSpeed', long(200)], Array.from({ length: 1000 }, () => 'a')], [[long(201)], Array.from({ length: 1001 }, () => 'a'), '/setup', undefined])
    field(waiverBody, body, 'reason', ...reasons)
    field(waiverBody, body, 'until', ...times)
    field(waiverBody, body, 'password', ...passwords)
    const covering = (value: unknown) => ({ level: 'stop', values: [{ place: '/setup/jogSpeed', value }] })
    field(waiverBody, body, 'value', [5, true, 'a', null, [1, 2], ['a'], { value: 1, unit: 'A' }].map(covering), [
      covering({ value: 1 }), covering([1, 'a']), covering(long(4001)), covering(undefined), { level: 'warn', values: [] }, { level: 'stop' }, { level: 'unknown' }, { level: 'stop', values: [], missing: [] }, undefined,
    ])
    field(waiverEndBody, { reason: 'a', password: 'a' }, 'reason', ...reasons)
    field(waiverEndBody, { reason: 'a', password: 'a' }, 'password', ...passwords)
    field(ruleEndBody, { reason: 'a' }, 'reason', ...reasons)
  })
})

describe('what is asked', () => {
  it('comes as text, and is whole where it is a number', () => {
    field(placeQuery, {}, 'siteId', ['1', '42', undefined], ['0', '-1', '1.5', 'x'])
    field(placeQuery, {}, 'limit', ['1', '200', undefined], ['0', '201', 'x'])
    field(unitQuery, {}, 'search', ['', long(80), undefined], [long(81)])
    field(unitQuery, {}, 'state', ['spare', 'fitted', 'failed', 'repair', 'scrapped', undefined], ['lost', ''])
    field(changesQuery, { against: '1' }, 'against', ['1'], ['0', 'x', undefined])
    field(changesQuery, { against: '1' }, 'form', ['json-patch', 'text', undefined], ['list', ''])
    field(fileQuery, { form: 'json' }, 'form', ['json', 'csv', 'entry', 'original'], ['pdf', undefined])
    field(asOfQuery, { at }, 'at', ...times)
    field(versionRef, { id: '1', number: '1' }, 'id', ['1', 'tag:LID-02.Z'], ['LID-02.Z', '0', undefined])
    field(versionRef, { id: '1', number: '1' }, 'number', ['1', '99'], ['0', '-1', 'x', undefined])
  })
})

describe('one of several answers', () => {
  it('is told by its outcome, and has just what belongs to that', () => {
    const preview = [{ outcome: 'tray', problem: 'not-fitted', detail: 'x' }, { outcome: 'sighting', axis: { id: 1, tag: 'A' }, number: 4 }]
    for (const one of preview) expect(previewAnswer.safeParse(one).success).toBe(true)
    for (const one of [{ outcome: 'lost' }, { outcome: 'sighting', problem: 'not-fitted', detail: 'x' }, { outcome: 'tray', axis: { id: 1, tag: 'A' }, number: 4 }, {}]) expect(previewAnswer.safeParse(one).success).toBe(false)
  })

  it('a change has a value before, after, or both, of each kind that a setting has', () => {
    const change = { at: '/setup/jogSpeed', section: 'setup', field: 'jogSpeed', weight: 'harm', watched: true }
    for (const value of [5, true, 'a', { value: 5, unit: 'A' }]) expect(changeSchema.parse({ ...change, before: value, after: value })).toEqual({ ...change, before: value, after: value })
    for (const [key, wrong] of [['weight', 'heavy'], ['section', 'notes'], ['before', null], ['before', [1]], ['row', 1.5], ['affects', ['1']], ['watched', 'yes']] as const) {
      expect(changeSchema.safeParse({ ...change, [key]: wrong }).success, key).toBe(false)
    }
  })
})
