import { afterAll, describe, expect, it } from 'vitest'
import { parseLeaf, type Entry } from '../../../shared/trail/entry'
import { personState } from '../../../server/database/person/queries'
import { tokenState } from '../../../server/database/token/queries'
import * as schema from '../../../server/database/schema'
import { registerFirstAdmin } from '../../../server/services/people/first-start'
import { setOwnPassword } from '../../../server/services/people/own-password'
import { changePerson, registerPerson } from '../../../server/services/people/people'
import { chooseLetter, watchPlace } from '../../../server/services/letters/own'
import { makeToken, stopToken } from '../../../server/services/people/tokens'
import { registerNameplate, reviseNameplate } from '../../../server/services/nameplates/nameplates'
import { recordLabel } from '../../../server/services/labels/print-label'
import { changeAxis } from '../../../server/services/places/axes'
import { changeLine } from '../../../server/services/places/lines'
import { changeMachine } from '../../../server/services/places/machines'
import { changeSite } from '../../../server/services/places/sites'
import { endRule, makeRule } from '../../../server/services/rules/rules'
import { endWaiver, giveWaiver } from '../../../server/services/waivers/waivers'
import { endFitting, openFitting } from '../../../server/services/units/fittings'
import { changeUnit } from '../../../server/services/units/units'
import { smallPlant } from '../../support/plant'
import { freshVault } from '../../support/vault'

const { vault, remove } = freshVault()
afterAll(remove)

/** An entry carries the whole new state of its subject, so the newest one about it is the row as it is now. */
describe('each row equals the newest entry about it', async () => {
  const adminId = await registerFirstAdmin(vault, { name: 'Ines Okafor', email: 'ines@larkfield.example', password: 'copper kettle under the stairs', plant: 'Larkfield' })
  const admin = { kind: 'person', id: adminId, name: 'Ines Okafor', roles: ['admin'], sites: null, shared: false, session: null, peer: '' } as const
  const { planner, ...ids } = smallPlant(vault)
  const other = registerPerson(vault, admin, { name: 'Tobias', email: 't@larkfield.example', roles: ['technician'], siteIds: [] }, 'scrypt$1$a$b').id
  changePerson(vault, admin, other, { rev: 1, roles: ['technician', 'planner'], siteIds: [ids.siteId] }, null)
  setOwnPassword(vault, { ...admin, id: other }, 'scrypt$1$c$d')
  const endsAt = new Date(Date.now() + 86_400_000).toISOString()
  makeToken(vault, admin, { name: 'a', scopes: ['read'], siteIds: [], endsAt })
  stopToken(vault, admin, makeToken(vault, admin, { name: 'b', scopes: ['upload'], siteIds: [], endsAt, ownerId: other }).id)
  changeSite(vault, planner, ids.siteId, { rev: 1, watched: ['dwell'], fourEyes: false })
  changeLine(vault, planner, ids.lineId, { rev: 1, name: 'Jar line A' })
  changeMachine(vault, planner, ids.machineId, { rev: 1, name: 'Lid press A' })
  changeAxis(vault, planner, ids.axisId, { rev: 1, duty: { moves: [0], cycleTime: 900.5 }, flags: ['gravity'] })
  changeUnit(vault, planner, ids.unitId, { rev: 1, firmware: '2.14', location: 'Cabinet 4' })
  const fitting = openFitting(vault, planner, { axisId: ids.axisId, unitId: ids.unitId, at: vault.now() }).id
  endFitting(vault, planner, fitting, { at: vault.now(), unitState: 'repair' })
  openFitting(vault, planner, { axisId: ids.axisId, unitId: ids.unitId, at: vault.now() })
  const nameplate = registerNameplate(vault, planner, { model: 'HL40-200V', axisKind: 'linear', stroke: 200 }).id
  reviseNameplate(vault, planner, nameplate, { rev: 1, stroke: 200.5 })
  const rule = makeRule(vault, planner, { scope: 'axis', scopeId: ids.axisId, field: 'thrustLimit', max: 40, reason: 'r' }).id
  makeRule(vault, planner, { scope: 'axis', scopeId: ids.axisId, field: 'extra:K', fixed: 'B', reason: 'r' })
  endRule(vault, planner, rule, { reason: 'gone' })
  const waiver = () => giveWaiver(vault, planner, { axisId: ids.axisId, rule: 'travel-span', at: ['/setup/softLimitMax'], value: { level: 'unknown', missing: ['softLimitMax'] }, reason: 'r', until: endsAt }).id
  waiver()
  endWaiver(vault, planner, waiver(), { reason: 'known now' })

  watchPlace(vault, planner, { scope: 'axis', scopeId: ids.axisId, watched: true })
  watchPlace(vault, planner, { scope: 'site', scopeId: ids.siteId, watched: true })
  watchPlace(vault, planner, { scope: 'axis', scopeId: ids.axisId, watched: false })
  chooseLetter(vault, planner, { kind: 'finding-opened', wanted: false })

  recordLabel(vault, planner, ids.axisId, { size: '50x25' })
  const entries = vault.db.select().from(schema.log).all().map(({ leaf }) => parseLeaf(leaf))
  const newest = new Map<string, Entry>()
  for (const entry of entries) newest.set(`${entry.subject.kind} ${entry.subject.id}`, entry)
  const statesOf = (kind: string) => Object.fromEntries([...newest].filter(([key]) => key.startsWith(`${kind} `)).map(([key, { state }]) => [key.slice(kind.length + 1), state]))
  const byId = <Row extends { id: number }>(rows: readonly Row[]) => Object.fromEntries(rows.map(row => [row.id, row]))
  const wrote = (row: { id: number }) => row.id !== planner.id

  it.each([
    ['person', byId(vault.db.select().from(schema.person).all().filter(wrote).map(personState))],
    ['token', byId(vault.db.select().from(schema.token).all().map(tokenState))],
    ['site', byId(vault.db.select().from(schema.site).all())],
    ['line', byId(vault.db.select().from(schema.line).all())],
    ['machine', byId(vault.db.select().from(schema.machine).all())],
    ['axis', byId(vault.db.select().from(schema.axis).all())],
    ['unit', byId(vault.db.select().from(schema.unit).all())],
    ['fitting', byId(vault.db.select().from(schema.fitting).all())],
    ['nameplate', byId(vault.db.select().from(schema.nameplateRevision).all())],
    ['watch', byId(vault.db.select().from(schema.watch).all())],
    ['letter-choice', byId(vault.db.select().from(schema.letterChoice).all())],
    ['label-print', byId(vault.db.select().from(schema.labelPrint).all())],
    ['setting', Object.fromEntries(vault.db.select().from(schema.setting).all().map(row => [row.key, row]))],
  ])('%s', (kind, rows) => {
    expect(Object.keys(rows).length).toBeGreaterThan(0)
    expect(statesOf(kind)).toEqual(rows)
  })

  it('waiver, with its end', () => {
    const ends = new Map(vault.db.select().from(schema.waiverEnd).all().map(end => [end.waiverId, end]))
    const rows = byId(vault.db.select().from(schema.waiver).all().map((row) => {
      const end = ends.get(row.id)
      return { ...row, endedAt: end?.at ?? null, ...(end === undefined ? {} : { endedByPerson: end.byPerson, endReason: end.reason }) }
    }))
    expect(Object.keys(rows)).toHaveLength(2)
    expect(statesOf('waiver')).toEqual(rows)
  })

  it('rule, with its end', () => {
    const ends = new Map(vault.db.select().from(schema.ruleEnd).all().map(end => [end.ruleId, end]))
    const rows = byId(vault.db.select().from(schema.rule).all().map((row) => {
      const end = ends.get(row.id)
      return { ...row, endedAt: end?.at ?? null, ...(end === undefined ? {} : { endedByPerson: end.byPerson, endReason: end.reason }) }
    }))
    expect(statesOf('rule')).toEqual(rows)
  })

  it('and entries follow each other in time', () => {
    const times = entries.map(({ at }) => at)
    expect(times).toEqual(times.toSorted())
  })
})
