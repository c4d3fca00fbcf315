import { describe, expect, it } from 'vitest'
import type { z } from 'zod'
import { axisRef, idParams, idText, instantSchema, listQuery, nameSchema, pageOf, passwordSchema, reasonSchema, serialSchema, tagSchema } from '../../../../shared/api/common'
import { runQuery } from '../../../../shared/api/judging'
import { ownPasswordBody, personBody, setUpBody, signInBody, tokenBody } from '../../../../shared/api/people'
import { axisBody, axisPatch, fittingEndBody, nameplatePatch, ruleBody, siteBody, sitePatch, unitBody, unitPatch } from '../../../../shared/api/places'
import { judgingQuery, trayAssignBody, trayDiscardBody, uploadFields } from '../../../../shared/api/uploads'
import { kitBody, voidBody } from '../../../../shared/api/versions'

/** Each value on its own: those that a shape takes, and those that it refuses. */
function holds(schema: z.ZodType, taken: readonly unknown[], refused: readonly unknown[]): void {
  for (const value of taken) expect(schema.safeParse(value).success, `takes ${JSON.stringify(value)?.slice(0, 80)}`).toBe(true)
  for (const value of refused) expect(schema.safeParse(value).success, `refuses ${JSON.stringify(value)?.slice(0, 80)}`).toBe(false)
}
/** As holds, for one field of a body that is right in all others. */
const field = (schema: z.ZodType, body: object, name: string) => (taken: readonly unknown[], refused: readonly unknown[]) =>
  holds(schema, taken.map(value => ({ ...body, [name]: value })), refused.map(value => ({ ...body, [name]: value })))
const long = (length: number) => 'x'.repeat(length)

describe('what every address and body uses', () => {
  it('an id is a whole number from 1, in an address as text', () => {
    holds(idText, ['1', 1, '9007199254740991'], ['0', '-1', '1.5', '', 'x', null, '1e400'])
    holds(idParams, [{ id: '7' }], [{}, { id: '0' }, { id: '7', also: 1 }])
  })

  it('an axis is named by id or by tag, never by both or by halves', () => {
    holds(axisRef, ['1', '42', 'tag:LID-02.Z', 'tag:a_b', `tag:${long(32)}`, '9'.repeat(16)], ['0', '01', '', 'tag:', 'LID-02.Z', 'tag:LID 02', 'tag:ä', `tag:${long(33)}`, '9'.repeat(17), '1 ', 'tag:a/b'])
  })

  it('a tag and a serial are of signs that fit on a label', () => {
    holds(tagSchema, ['a', 'LID-02.Z', long(32)], ['', long(33), 'LID 02', 'LID/02', 'ß'])
    holds(serialSchema, ['a', 'HL40-2231-0087', 'A/55810', long(64)], ['', long(65), 'HL40 2231', 'A\\1'])
  })

  it('a time has an offset', () => {
    holds(instantSchema, ['2026-11-30T08:15:00Z', '2026-11-30T08:15:00.000Z', '2026-11-30T08:15:00+01:00'], ['2026-11-30T08:15:00', '2026-11-30', '30.11.2026', '2026-02-30T00:00:00Z', 1764490500])
  })

  it('a name, a reason and a password are neither empty nor endless', () => {
    holds(nameSchema, ['a', long(80)], ['', long(81), 5])
    holds(reasonSchema, ['a', long(2000)], ['', long(2001)])
    holds(passwordSchema, ['a', long(256)], ['', long(257)])
  })

  it('a page has from 1 to 200 items, and a cursor or null', () => {
    holds(listQuery, [{}, { limit: '1' }, { limit: '200' }, { cursor: long(200) }], [{ limit: '0' }, { limit: '201' }, { limit: '1.5' }, { cursor: long(201) }, { page: 2 }])
    holds(pageOf(nameSchema), [{ items: [], next: null }, { items: ['a'], next: 'b' }], [{ items: [] }, { items: [''], next: null }])
  })
})

describe('people', () => {
  const person = { name: 'Runa Haldersen', email: 'runa.haldersen@larkfield.example', roles: ['planner'], siteIds: [] }

  it('have a name, an address and at least one role', () => {
    holds(personBody, [person, { ...person, shared: true, password: 'copper kettle under the stairs' }], [{ ...person, rev: 1 }, {}])
    field(personBody, person, 'email')([`${long(60)}@a.example`], ['runa', 'runa@', '@a.example', `${long(260)}@a.example`, ''])
    field(personBody, person, 'roles')([['auditor'], ['technician', 'planner', 'auditor', 'admin']], [[], ['boss'], ['planner', 'planner', 'planner', 'planner', 'planner'], 'planner'])
    field(personBody, person, 'siteIds')([[1, 2]], [[0], ['1'], null])
  })

  it('sign in with what they have, even if it is no address', () => {
    holds(signInBody, [{ email: 'abc', password: 'x' }, { email: 'abc', password: 'x', panel: true }], [{ email: 'ab', password: 'x' }, { email: 'abc', password: '' }, { email: 'abc' }])
    holds(setUpBody, [{ token: 't', name: 'Ines', email: 'i@a.example', password: 'x' }], [{ token: '', name: 'Ines', email: 'i@a.example', password: 'x' }, { token: 't', name: 'Ines', email: 'i', password: 'x' }])
    holds(ownPasswordBody, [{ current: 'a', password: 'b' }], [{ password: 'b' }, { current: '', password: 'b' }])
  })

  it('make tokens that end, for one scope or both', () => {
    const token = { name: 'Night export', scopes: ['upload'], siteIds: [], endsAt: '2027-06-01T00:00:00Z' }
    holds(tokenBody, [token, { ...token, ownerId: 3 }], [{ ...token, endsAt: undefined }, { ...token, ownerId: 0 }])
    field(tokenBody, token, 'scopes')([['read'], ['upload', 'read']], [[], ['sign'], ['upload', 'read', 'read']])
  })
})

describe('places', () => {
  it('a site has terms within a month and ten years', () => {
    holds(siteBody, [{ name: 'Larkfield Preserves', timeZone: 'Europe/Copenhagen' }], [{ name: 'Larkfield Preserves' }, { name: '', timeZone: 'UTC' }])
    field(sitePatch, { rev: 1 }, 'releaseHours')([1, 720], [0, 721, 1.5])
    field(sitePatch, { rev: 1 }, 'knownGoodMonths')([1, 120], [0, 121])
    field(sitePatch, { rev: 1 }, 'watched')([[], ['jogSpeed', 'extra:K-017']], [[long(81)], Array.from({ length: 201 }, () => 'a')])
  })

  it('an axis keeps its kind: a change of it would be another axis', () => {
    const axis = { machineId: 1, tag: 'LID-02.Z', axisKind: 'linear' }
    holds(axisBody, [axis, { ...axis, flags: ['gravity', 'press', 'collision'], role: long(80) }], [{ ...axis, axisKind: 'gantry' }, { ...axis, flags: ['hot'] }, { ...axis, role: long(81) }])
    holds(axisPatch, [{ tag: 'LID-03.Z' }, { uploadEveryHours: null }], [{ axisKind: 'rotary' }])
    field(axisBody, axis, 'uploadEveryHours')([1, 8760, null], [0, 8761, 0.5])
    field(axisBody, axis, 'duty')([null, { moves: [0, 1023], cycleTime: 0.1 }], [{ moves: [], cycleTime: 1 }, { moves: [1024], cycleTime: 1 }, { moves: [0], cycleTime: 0 }, { moves: [0] }])
  })

  it('a unit keeps its serial: another serial is another unit', () => {
    const unit = { serial: 'HL40-2231-0087', model: 'HL40-200V' }
    holds(unitBody, [unit, { ...unit, channel: 1 }, { ...unit, state: 'repair' }], [{ ...unit, channel: 0 }, { ...unit, channel: 65 }, { ...unit, state: 'lost' }, { serial: 'A1' }])
    holds(unitPatch, [{ rev: 1, state: 'scrapped' }, { siteId: null }], [{ serial: 'B2' }, { channel: 2 }, { state: 'lost' }])
    holds(fittingEndBody, [{ at: '2026-11-30T08:15:00Z', unitState: 'failed' }], [{ at: '2026-11-30T08:15:00Z', unitState: 'fitted' }, { unitState: 'failed' }])
  })

  it('a rule narrows one field and says why', () => {
    const rule = { scope: 'axis', scopeId: 1, field: 'jogSpeed', max: 50, reason: 'Guards open while it jogs.' }
    holds(ruleBody, [rule, { ...rule, max: undefined, fixed: true }, { ...rule, min: -5 }], [{ ...rule, reason: '' }, { ...rule, reason: undefined }, { ...rule, scope: 'plant' }, { ...rule, scopeId: 0 }, { ...rule, field: '' }, { ...rule, max: '50' }])
  })

  it('a nameplate is changed member by member, and null clears one (RFC 7396)', () => {
    holds(nameplatePatch, [{}, { rev: 2, maxSpeed: 800 }, { maxSpeed: null }, { dictionary: null }, { dictionary: { 'K-017': null } }, { dictionary: { 'K-017': { unit: 'A', weight: null } } }],
      [{ maxSpeed: 0 }, { maxSpeed: '800' }, { maxspeed: 800 }, { dictionary: { 'K-017': { units: 'A' } } }, { dictionary: { '': null } }, { efficiency: 1.5 }])
  })
})

describe('uploads and versions', () => {
  it('an upload brings what a person adds, each of it or nothing', () => {
    holds(uploadFields, [{}, { occasion: 'as-found', reason: long(2000), workOrder: long(80), changedBy: 'person:3', axis: 'tag:LID-02.Z', decimal: 'comma' }],
      [{ occasion: 'read-back' }, { occasion: 'daily' }, { reason: long(2001) }, { decimal: 'both' }, { capturedAt: '2026-11-30' }, { axis: 'LID-02.Z' }, { colour: 'red' }])
  })

  it('what a file is read against is asked by serial', () => {
    holds(judgingQuery, [{ serial: 'A1' }, { serial: 'A1', channel: '2', capturedAt: '2026-11-30T08:15:00Z' }], [{}, { serial: '' }, { serial: 'A1', channel: '0' }])
  })

  it('a file leaves the tray for an axis, or with a reason', () => {
    holds(trayAssignBody, [{ axisId: 1 }, { axisId: 1, at: '2026-11-30T08:15:00Z', reason: '' }], [{}, { axisId: '1' }, { axisId: 1, at: 'now' }])
    holds(trayDiscardBody, [{ reason: 'A test file.' }], [{}, { reason: '' }])
  })

  it('a run is asked for from the first change that the caller lacks', () => {
    holds(runQuery, [{}, { from: '0' }, { from: '7' }], [{ from: '-1' }, { from: '1.5' }, { from: 'x' }, { since: '1' }])
  })

  it('a version is set aside with a reason and a signature', () => {
    holds(voidBody, [{ reason: 'Wrong axis.', password: 'x' }], [{ reason: 'Wrong axis.' }, { password: 'x' }, { reason: '', password: 'x' }])
  })

  it('a kit is taken in one of two forms, with the word that cautions were read', () => {
    holds(kitBody, [{ form: 'json', cautionsRead: true }, { form: 'csv', cautionsRead: false, serial: 'A1' }, { form: 'pdf', paper: 'Letter', cautionsRead: true }, { form: 'zip', cautionsRead: true }], [{ form: 'docx', cautionsRead: true }, { form: 'pdf', paper: 'A3', cautionsRead: true }, { form: 'json' }, { form: 'json', cautionsRead: 'yes' }])
  })
})
