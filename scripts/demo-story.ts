import type { Actor, PersonActor, TokenActor } from '../server/database/actor'
import type { Vault } from '../server/database/client'
import { listFittings } from '../server/services/axes/read-axis'
import { closeFinding, listFindings } from '../server/services/findings/findings'
import { watchPlace } from '../server/services/letters/own'
import { announceChange } from '../server/services/planned-changes/planned-changes'
import { markKnownGood, markNone } from '../server/services/known-good/mark'
import { makeRule } from '../server/services/rules/rules'
import { endFitting, openFitting } from '../server/services/units/fittings'
import { listUnits } from '../server/services/units/units'
import { storeUpload, type UploadOutcome } from '../server/services/uploads/store-upload'
import { readVersion } from '../server/services/versions/read-version'
import { voidVersion } from '../server/services/versions/void-version'
import { giveWaiver } from '../server/services/waivers/waivers'
import type { WaiverRecord } from '../shared/api/waivers'
import { coverOf } from '../shared/checks/waivers'
import { readSettings } from '../shared/settings/read'
import { writeEntryCsv } from '../shared/settings/entry-table/write-entry'
import type { Content } from '../shared/settings/types'
import { playSwap } from './demo-swap'
import { fixtureBytes, settingsFile, type Act, type FileJson, type Patch, type Plant } from './demo-files'

export interface Cast {
  readonly people: Record<string, PersonActor>
  /** What the script of the engineering station sends with; made anew each year, as tokens end. */
  readonly station: () => TokenActor
  readonly axisIds: Record<string, number>
  readonly siteId: number
}

export interface Told { versions: number, sightings: number, tray: number, marks: number, waivers: number }

const day = 86_400_000

/** Plays every act in its order, the clock set to each; what an act refuses ends the filling. */
export function tellStory(vault: Vault, cast: Cast, plant: Plant, story: readonly Act[], today: Date, setClock: (at: number) => void): Told {
  const told: Told = { versions: 0, sightings: 0, tray: 0, marks: 0, waivers: 0 }
  const files: Record<string, FileJson> = {}
  const newest: Record<string, number> = {}
  const actor = (key: string): Actor => key === 'station' ? cast.station() : person(cast, key)
  const axisId = (tag: string) => cast.axisIds[tag] ?? fail(`no axis ${tag}`)

  const send = (file: FileJson, at: number, by: Actor, tag: string, fields: Parameters<typeof storeUpload>[3], list = false) => {
    const sent = { ...file, exportedAt: new Date(at).toISOString().replace('.000Z', 'Z') }
    const bytes = Buffer.from(JSON.stringify(sent, null, 2))
    if (list) return storeUpload(vault, by, { bytes: ownList(bytes, plant), name: `${tag.toLowerCase()}-list.csv` }, { ...fields, layout: sent.unit.model, capturedAt: sent.exportedAt })
    return storeUpload(vault, by, { bytes, name: `${tag.toLowerCase()}.json` }, fields)
  }
  const note = (outcome: UploadOutcome, tag: string, expected: readonly UploadOutcome['outcome'][]) => {
    if (!expected.includes(outcome.outcome)) fail(`${tag}: ${outcome.outcome}, ${JSON.stringify(outcome).slice(0, 400)}`)
    if (outcome.outcome === 'version') {
      told.versions += 1
      newest[tag] = outcome.answer.version.id
    }
    if (outcome.outcome === 'sighting') told.sightings += 1
    if (outcome.outcome === 'tray' || outcome.outcome === 'unreadable') told.tray += 1
  }

  for (const act of story) {
    const at = instantOf(today, act, plant.site.timeZone)
    if (at > today.getTime()) continue
    setClock(at)
    switch (act.act) {
      case 'nightly': {
        const station = cast.station()
        for (const { tag } of plant.axes) {
          const file = files[tag]
          if (file && !act.skip?.includes(tag)) note(send(file, at - 60_000, station, tag, {}), tag, ['sighting'])
        }
        break
      }
      case 'upload': {
        if ('file' in act) {
          note(storeUpload(vault, actor(act.by), { bytes: fixtureBytes(act.file), name: act.file }, { occasion: act.occasion }), act.file, ['tray', 'unreadable'])
          break
        }
        const before = files[act.axis] ?? settingsFile(act.axis)
        const file = patched(before, act.patch)
        const captured = act.capturedDaysAgo === undefined ? at - 120_000 : at - (act.capturedDaysAgo - act.daysAgo) * day
        const { occasion, reason, workOrder, changedBy, allowedBy } = act
        const kept = newest[act.axis]
        note(send(file, captured, actor(act.by), act.axis, { occasion, ...present({ reason, workOrder, changedBy, allowedBy }) }, act.list), act.axis, ['version'])
        if (act.capturedDaysAgo !== undefined && kept !== undefined) newest[act.axis] = kept
        files[act.axis] = act.undo ? before : file
        break
      }
      case 'mark': {
        markKnownGood(vault, person(cast, act.by), newest[act.axis] ?? fail(`nothing of ${act.axis} to mark`), { meaning: act.meaning ?? 'approved', note: act.note })
        told.marks += 1
        break
      }
      case 'none': {
        markNone(vault, person(cast, act.by), axisId(act.axis), { meaning: 'reviewed', note: act.note })
        break
      }
      case 'waive': {
        giveWaiver(vault, person(cast, act.by), wordsOf(vault, newest[act.axis] ?? fail(`nothing of ${act.axis} to accept`), act, at))
        told.waivers += 1
        break
      }
      case 'void': {
        voidVersion(vault, person(cast, act.by), newest[act.axis] ?? fail(`nothing of ${act.axis} to void`), act.reason)
        break
      }
      case 'fit': {
        const open = listFittings(vault, axisId(act.axis)).items.find(fitting => fitting.to === null) ?? fail(`${act.axis} has no unit`)
        endFitting(vault, person(cast, act.by), open.id, { at: new Date(at - 60_000).toISOString(), unitState: act.oldState })
        const unit = listUnits(vault, person(cast, act.by), { search: act.serial }).items[0] ?? fail(`no unit ${act.serial}`)
        openFitting(vault, person(cast, act.by), { axisId: axisId(act.axis), unitId: unit.id, at: new Date(at).toISOString() })
        break
      }
      case 'close': {
        const auditor = person(cast, act.by)
        for (const { id } of listFindings(vault, auditor, { state: 'explained', limit: 200 }).items) closeFinding(vault, auditor, id, { as: 'accepted', allowedBy: act.allowedBy })
        break
      }
      case 'watch': {
        watchPlace(vault, person(cast, act.by), { scope: 'site', scopeId: cast.siteId, watched: true })
        break
      }
      case 'plan': {
        const until = new Date(at + act.hours * 3_600_000).toISOString()
        announceChange(vault, person(cast, act.by), { axisIds: act.axes.map(axisId), fields: [...act.fields], from: new Date(at).toISOString(), until, reason: act.reason, allowedBy: act.allowedBy })
        break
      }
      case 'swap': {
        const { versions, file } = playSwap(vault, cast, axisId(act.axis), act, at, setClock)
        told.versions += versions.length
        newest[act.axis] = versions.at(-1) ?? fail(`nothing was read back of ${act.axis}`)
        files[act.axis] = file
        break
      }
      case 'rule': {
        const { axis, ...rule } = act.rule
        makeRule(vault, person(cast, act.by), { ...rule, scopeId: axisId(axis) })
        break
      }
    }
  }
  return told
}

/** The file as the drive tool of its model would list it. */
function ownList(bytes: Buffer, { nameplates }: Plant): Buffer {
  const read = readSettings(bytes)
  if (!read.ok) return fail(`a file to be listed cannot be read: ${read.errors[0]?.message ?? ''}`)
  const { file } = read.value
  return Buffer.from(writeEntryCsv(file, nameplates.find(({ model }) => model === file.unit.model) ?? fail(`no nameplate of ${file.unit.model}`)))
}

/** What a planner signs for the stop of a rule, by the content that was looked at. */
function wordsOf(vault: Vault, versionId: number, { rule, days, reason, axis }: Extract<Act, { act: 'waive' }>, at: number): Parameters<typeof giveWaiver>[2] {
  const { axisId, content, checks } = readVersion(vault, versionId)
  const check = checks.find(one => one.rule === rule && one.level === 'stop') ?? fail(`${axis} has no stop of ${rule}`)
  const value = coverOf(check, content as unknown as Content) ?? fail(`a stop of ${rule} needs no waiver`)
  return { axisId, rule, at: check.at, value: value as WaiverRecord['value'], reason, until: new Date(at + days * day).toISOString() }
}

function fail(why: string): never {
  throw new Error(`The demo's story does not hold: ${why}`)
}

const person = (cast: Cast, key: string): PersonActor => cast.people[key] ?? fail(`nobody is ${key}`)

/** Time of day at the plant, whatever the zone of the machine that shows the demo. */
function instantOf(today: Date, { daysAgo, time }: Act, timeZone: string): number {
  const date = new Intl.DateTimeFormat('sv-SE', { timeZone, dateStyle: 'short' }).format(today.getTime() - daysAgo * day)
  const guess = Date.parse(`${date}T${time}:00Z`)
  const shown = new Intl.DateTimeFormat('sv-SE', { timeZone, dateStyle: 'short', timeStyle: 'medium' }).format(guess)
  return 2 * guess - Date.parse(`${shown.replace(' ', 'T')}Z`)
}

function present<Fields extends Record<string, string | undefined>>(fields: Fields): { [Key in keyof Fields]?: string } {
  return Object.fromEntries(Object.entries(fields).filter(([, value]) => value)) as { [Key in keyof Fields]?: string }
}

function patched(file: FileJson, patch: Patch | undefined): FileJson {
  if (!patch) return file
  const insert = patch.insert
  const changed = file.moves.map(move => ({ ...move, ...patch.moves?.[String(move.move)] }))
  const moves = insert === undefined
    ? changed
    : [...changed.map(move => ({ ...move, move: shifted(move.move, insert.before), ...(move.next === undefined ? {} : { next: shifted(move.next, insert.before) }) })), insert.move]
  return { ...file, unit: { ...file.unit, ...patch.unit }, setup: { ...file.setup, ...patch.setup }, moves: moves.sort((a, b) => a.move - b.move) }
}

const shifted = (move: number, from: number) => move >= from ? move + 1 : move
