import type { JudgingContext } from '#shared/api/uploads'
import type { JudgeInput } from '#shared/checks/types'
import { seesSite, type Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import { sightingQueries } from '#server/database/sighting/queries'
import { unitRows } from '#server/database/unit/queries'
import { versionQueries } from '#server/database/version/queries'
import { waiverQueries } from '#server/database/waiver/queries'
import { broughtFrom } from '../forces/brought-from'
import { waiverOnWire } from '../waivers/waivers'
import { contentOnWire } from '../wire'
import { placeUnit } from './place-file'
import { readAgainst, type HeldVersion } from './read-against'

const nothing = { axis: null, current: null, knownGood: null, broughtFrom: null, waivers: [], nextNumber: 1, nameplate: null, rules: [] }

/** What the browser reads a file of this serial against before anything is sent: the same as the server would. */
export function judgingContext(vault: Vault, actor: Actor, asked: { serial: string, channel?: number | undefined, capturedAt?: string | undefined }): JudgingContext {
  const { db } = vault
  const unit = unitRows(db).bySerial.get({ serial: asked.serial, channel: asked.channel ?? 0 })
  if (!unit) return { problem: 'serial-unknown', registered: null, ...nothing }
  const now = vault.now()
  const { place } = placeUnit(db, unit, asked.capturedAt ?? now, Date.parse(now))
  const siteId = place?.site.id ?? unit.siteId
  if (siteId !== null && !seesSite(actor, siteId)) return { problem: 'serial-unknown', registered: null, ...nothing }
  const registered = { model: unit.model, serial: unit.serial }
  const nameplate = judgingQueries(db).nameplate.get({ model: unit.model })?.nameplate ?? null
  if (!place) return { problem: 'not-fitted', registered, ...nothing, nameplate }
  const { current, knownGood, rules } = readAgainst(db, place, unit)
  const { id, tag, role, axisKind, flags, duty } = place.axis
  return {
    problem: null, registered, nameplate, rules: rules.map(rule => ({ ...rule })),
    axis: { id, tag, role, axisKind, flags, watched: place.site.watched, duty: duty ?? null, controllerScanMs: place.machine.controllerScanMs },
    current: current && { ...named(current), contentHash: current.hash, capturedAt: current.version.capturedAt, sightings: sightingQueries(db).ofVersion.get({ versionId: current.version.id })?.count ?? 0 },
    knownGood: knownGood && { ...named(knownGood), firmware: knownGood.version.firmware },
    broughtFrom: forcesOnWire(broughtFrom(db, id, unit, current?.version ?? null)),
    waivers: waiverQueries(db).notEnded.all({ axisId: id }).map(waiverOnWire),
    nextNumber: (versionQueries(db).highestNumber.get({ axisId: id })?.number ?? 0) + 1,
  }
}

function forcesOnWire(forces: JudgeInput['broughtFrom']): JudgingContext['broughtFrom'] {
  return forces?.content ? { content: contentOnWire(forces.content), forceBase: forces.forceBase ?? null, rescaled: forces.rescaled } : null
}

const named = ({ version, content }: HeldVersion) => ({ versionId: version.id, number: version.number, content: contentOnWire(content) })
