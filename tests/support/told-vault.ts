import { readFileSync } from 'node:fs'
import type { PersonActor } from '../../server/database/actor'
import type { Vault } from '../../server/database/client'
import { makeTextKit } from '../../server/services/kit/make-kit'
import { judgeVersion } from '../../server/services/judging/judge-again'
import { markKnownGood, markNone } from '../../server/services/known-good/mark'
import { registerNameplate } from '../../server/services/nameplates/nameplates'
import { registerFirstAdmin } from '../../server/services/people/first-start'
import { changePerson, findPerson, registerPerson } from '../../server/services/people/people'
import { makeToken } from '../../server/services/people/tokens'
import { changeAxis, registerAxis } from '../../server/services/places/axes'
import { registerLine } from '../../server/services/places/lines'
import { registerMachine } from '../../server/services/places/machines'
import { changeSite, registerSite } from '../../server/services/places/sites'
import { askReport } from '../../server/services/reports/reports'
import { endRule, makeRule } from '../../server/services/rules/rules'
import { recordTrailKey } from '../../server/services/trail/key'
import { verifyAndKeep } from '../../server/services/trail/verification'
import { discardFromTray } from '../../server/services/tray/discard'
import { endFitting, openFitting } from '../../server/services/units/fittings'
import { registerUnit } from '../../server/services/units/units'
import { storeUpload, type UploadOutcome } from '../../server/services/uploads/store-upload'
import { voidVersion } from '../../server/services/versions/void-version'
import { endWaiver, giveWaiver } from '../../server/services/waivers/waivers'
import { writeJson } from '../../shared/settings/write-json'
import type { Nameplate } from '../../shared/settings/nameplate'
import type { Setup } from '../../shared/settings/types'
import { lidPress } from './lid-press'

/**
 * A vault in which every act has happened at least once, through the services that the routes call; `wait` moves its clock.
 * The verification at the end leaves a kept checkpoint behind.
 */
export async function tellAll(vault: Vault, wait: (milliseconds: number) => void): Promise<{ admin: PersonActor, planner: PersonActor, axisId: number }> {
  const minute = 60_000
  recordTrailKey(vault)
  const adminId = await registerFirstAdmin(vault, { name: 'Marit Solheim', email: 'marit@larkfield.example', password: 'four jars of quince jelly', plant: 'Larkfield Preserves' })
  const actorOf = (id: number, roles: PersonActor['roles']): PersonActor => ({ kind: 'person', id, name: findPerson(vault, id).name, roles, sites: null, shared: false, session: null, peer: '192.0.2.7' })
  const admin = actorOf(adminId, ['admin'])
  const register = (name: string, roles: ('planner' | 'technician')[]) => actorOf(registerPerson(vault, admin, { name, email: `${name.split(' ')[0]?.toLowerCase() ?? ''}@larkfield.example`, roles, siteIds: [] }, 'no hash').id, roles)
  const planner = register('Runa Haldersen', ['planner'])
  const technician = register('Tobias Achterberg', ['technician'])
  makeToken(vault, admin, { name: 'station 1', scopes: ['upload'], siteIds: [], endsAt: new Date(Date.parse(vault.now()) + 86_400_000).toISOString() })
  changePerson(vault, admin, technician.id, { rev: 1, name: 'Tobias Achterberg-Lund' }, null)

  const { id: siteId } = registerSite(vault, planner, { name: 'Larkfield', timeZone: 'Europe/Berlin' })
  changeSite(vault, planner, siteId, { rev: 1, watched: ['controllerRate'], fourEyes: false })
  const { id: lineId } = registerLine(vault, planner, { siteId, name: 'Jars' })
  const { id: machineId } = registerMachine(vault, planner, { lineId, name: 'LID-02' })
  const { id: axisId } = registerAxis(vault, planner, { machineId, tag: 'LID-02.Z', axisKind: 'linear', flags: [] })
  changeAxis(vault, planner, axisId, { rev: 1, uploadEveryHours: 26 })
  registerNameplate(vault, planner, nameplateOf('HL40-200V'))
  const unit = (serial: string) => registerUnit(vault, planner, { serial, model: 'HL40-200V', firmware: '3.12', state: 'spare', siteId }).id
  const [first, second] = [unit('HL40-23-00417'), unit('HL40-25-01022')]
  const { id: fittingId } = openFitting(vault, planner, { axisId, unitId: first, at: new Date(Date.parse(vault.now()) - minute).toISOString() })
  const rule = makeRule(vault, planner, { scope: 'axis', scopeId: axisId, field: 'thrustLimit', max: 60, reason: 'the lid cracks above 384 N' })
  endRule(vault, planner, makeRule(vault, planner, { scope: 'site', scopeId: siteId, field: 'speedLimit', max: 900, reason: 'noise' }).id, { reason: 'measured: quiet enough' })

  const send = (setup: Partial<Setup>, serial = 'HL40-23-00417'): UploadOutcome => {
    wait(minute)
    const bytes = Buffer.from(writeJson(lidPress({ serial, exportedAt: vault.now(), setup })))
    return storeUpload(vault, technician, { bytes, name: 'lid-02.z.json' }, { reason: 'set up', workOrder: 'WO 4711' })
  }
  const version = (outcome: UploadOutcome): number => {
    if (outcome.outcome !== 'version') throw new Error(`a version was expected, not ${outcome.outcome}`)
    return outcome.answer.version.id
  }
  const one = version(send({}))
  send({})
  const two = version(send({ thrustLimit: 55 }))
  voidVersion(vault, planner, two, 'the wrong drive was plugged in')
  const three = version(send({ thrustLimit: 41, softLimitMax: 150 }))
  judgeVersion(vault, planner, three)
  const waiver = (value: 'travel-placed' | 'travel-span') => giveWaiver(vault, planner, { axisId, rule: value, at: [], value: { level: 'unknown', missing: ['homingMethod'] }, reason: 'measured at the stop', until: new Date(Date.parse(vault.now()) + 30 * 86_400_000).toISOString() }).id
  waiver('travel-placed')
  endWaiver(vault, planner, waiver('travel-span'), { reason: 'not needed' })
  markNone(vault, planner, axisId, { meaning: 'reviewed', note: 'nothing proven yet' })
  markKnownGood(vault, planner, one, { meaning: 'approved', note: 'after the trial run' })
  makeTextKit(vault, technician, axisId, { form: 'json', cautionsRead: true })
  storeUpload(vault, technician, { bytes: Buffer.from('no settings at all'), name: 'notes.txt' }, {})
  discardFromTray(vault, technician, 1, 'a shopping list')
  wait(minute)
  endFitting(vault, planner, fittingId, { at: vault.now(), unitState: 'failed' })
  openFitting(vault, planner, { axisId, unitId: second, at: vault.now() })
  endRule(vault, planner, rule.id, { reason: 'new lids' })
  askReport(vault, planner, { scope: 'axis', scopeId: axisId })
  await verifyAndKeep(vault)
  return { admin, planner, axisId }
}

function nameplateOf(model: string): Nameplate {
  const { nameplates } = JSON.parse(readFileSync(new URL('../../fixtures/larkfield/plant.json', import.meta.url), 'utf8')) as { nameplates: Nameplate[] }
  const found = nameplates.find(nameplate => nameplate.model === model)
  if (!found) throw new Error(`no nameplate of ${model}`)
  return found
}
