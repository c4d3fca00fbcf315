import type { z } from 'zod'
import type { missingKeysBody, readBackProblems, readBackQuery, ReadBackAnswer, Swap } from '#shared/api/swaps'
import { Refusal, type RefusalCode } from '#shared/errors/refusal'
import type { readSettings } from '#shared/settings/read'
import type { FormatError, ReadOutcome, SettingsFile } from '#shared/settings/types'
import { hashesOf } from '#shared/settings/hash'
import { compareReadBack } from '#shared/swap/read-back'
import type { PersonActor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import type { VaultDb } from '#server/database/prepared'
import { swapQueries, type NamedReadBack } from '#server/database/swap/queries'
import type { SwapRow } from '#server/database/swap/table'
import { raiseReadBack } from '../findings/causes'
import { timesOf } from '../uploads/clock'
import { sha256 } from '#server/database/sha256'
import { ingest } from '../uploads/ingest'
import { millisecondsOf } from '../uploads/place-file'
import { planVersion, readSent } from '../uploads/plan-upload'
import { diffContextOf, readAgainst } from '../uploads/read-against'
import { sourceOf, type SentFile, type Source } from '../uploads/store-parts'
import { storeVersion } from '../uploads/store-version'
import { versionSummary } from '../versions/summary'
import { changesOnWire } from '../wire'
import { acceptedKeys, readBackOnWire } from './read-back-view'
import { readSwap } from './read-swap'
import { kitCaseOf, type SwapKitCase } from './sides'
import { openSwapRow, takerOf, takeStep } from './take-step'

type Query = z.output<typeof readBackQuery>
type Problem = (typeof readBackProblems)[number]

export type ReadBackOutcome
  = | { readonly ok: true, readonly answer: ReadBackAnswer }
    /** The attempt is kept, so the refusal is answered, not thrown. */
    | { readonly ok: false, readonly refusal: Refusal }

/** What the new unit holds, against the kit. Every attempt is kept: those of the wrong unit, the wrong model and unreadable ones too. */
export function readBackUnit(vault: Vault, actor: PersonActor, id: number, sent: SentFile, query: Query): ReadBackOutcome {
  const { db } = vault
  const serial = kitCaseOf(db, openRow(db, id))?.unit.serial
  const read = readSent(db, sent.bytes, { decimal: query.decimal, layout: query.layout, firmware: query.firmware, capturedAt: query.capturedAt, ...(serial === undefined ? {} : { serial }) })
  return vault.write(actor, (write): ReadBackOutcome => {
    const before = openSwapRow(db, write, id, query.rev, 'read-back')
    const goes = kitCaseOf(db, before)
    if (!goes) throw new Refusal('no-known-good', 'There is nothing to compare the unit with.')
    const source = once(sourceOf(db, write, sent, query))
    const attempts = swapQueries(db).readBacks.all({ swapId: id })
    const wrong = wrongWith(read, goes, attempts, source.sha256)
    if (!read.ok || wrong) return turnedAway(db, write, before, attempts, source, wrong ?? { problem: 'unreadable', code: 'settings-unreadable', words: 'The file cannot be read.' })
    return compared(db, write, before, goes, attempts, source, read.value, query)
  })
}

function openRow(db: VaultDb, id: number): SwapRow {
  const row = swapQueries(db).byId.get({ id })
  if (!row) throw new Refusal('not-found', 'There is no such swap.')
  return row
}

/** The bytes are stored once, whoever asks for their id. */
function once(source: Source): Source {
  let id: number | undefined
  return { ...source, uploadId: () => id ??= source.uploadId() }
}

interface Wrong { readonly problem: Problem, readonly code: RefusalCode, readonly words: string, readonly errors?: readonly FormatError[], readonly more?: number }

function wrongWith(read: ReadOutcome, { unit, place }: SwapKitCase, attempts: readonly NamedReadBack[], hash: string): Wrong | undefined {
  const same = attempts.find(({ readBack }) => readBack.sha256 === hash)
  if (same) return { problem: 'twice', code: 'read-back-twice', words: `This is the very file of attempt ${same.readBack.attempt}, from ${same.readBack.at.slice(11, 16)} UTC. Read the unit out again and send the new file.` }
  if (!read.ok) {
    const errors = read.errors.map(error => ({ ...error, at: error.at.toWellFormed(), message: error.message.toWellFormed() }))
    return { problem: 'unreadable', code: 'settings-unreadable', words: errors[0]?.message ?? 'The file cannot be read.', errors, more: read.more }
  }
  const { file } = read.value
  const ofUnit = file.unit.serial.toLowerCase() === unit.serial.toLowerCase() && (file.unit.channel ?? null) === unit.channel
  if (!ofUnit) return { problem: 'serial', code: 'read-back-serial', words: `The file is of ${identity(file)}; the unit in is ${identity({ unit: { serial: unit.serial, ...(unit.channel === null ? {} : { channel: unit.channel }) } })}. Read out the unit at ${place.axis.tag}, or correct which unit went in.` }
  if (file.unit.model !== unit.model || file.axisKind !== place.axis.axisKind) {
    return { problem: 'model', code: 'read-back-model', words: `The file says ${file.unit.model}, ${file.axisKind}; ${unit.serial} is registered as ${unit.model} on a ${place.axis.axisKind} axis. Look at the plate: either the file or the register is wrong.` }
  }
  return undefined
}

const identity = ({ unit: { serial, channel } }: { unit: Pick<SettingsFile['unit'], 'serial' | 'channel'> }) => channel === undefined ? serial : `${serial}, channel ${channel}`

function turnedAway(db: VaultDb, write: Write, before: SwapRow, attempts: readonly NamedReadBack[], source: Source, { problem, code, words, errors, more }: Wrong): ReadBackOutcome {
  const attempt = attempts.length + 1
  insertAttempt(db, write, before, { attempt, source, problem, detail: words, versionId: null, verdict: null, compared: null, kitCode: null })
  takeStep(db, write, before, {}, { act: 'read-back', text: `Read-back ${attempt} turned away: ${words}`, said: { attempt, problem } })
  return { ok: false, refusal: new Refusal(code, words, { current: readSwap(db, before.id, write.now), ...(errors ? { errors, more } : {}) }) }
}

type Attempt = Pick<NamedReadBack['readBack'], 'attempt' | 'problem' | 'detail' | 'versionId' | 'verdict' | 'compared' | 'kitCode'> & { readonly source: Source }

function insertAttempt(db: VaultDb, write: Write, { id: swapId, rev, facts }: SwapRow, { source, ...attempt }: Attempt): void {
  const row = { ...attempt, swapId, rev: rev + 1, uploadId: source.uploadId(), sha256: source.sha256, afterFirstMotion: facts.firstMotion !== undefined, at: write.now, byPerson: takerOf(write) }
  const id = swapQueries(db).insertReadBack(row)
  write.log({ act: 'read-back-received', id, state: JSON.parse(JSON.stringify({ id, ...row })) as object, note: attempt.detail })
}

type Read = Extract<ReturnType<typeof readSettings>, { ok: true }>['value']

function compared(db: VaultDb, write: Write, before: SwapRow, goes: SwapKitCase, attempts: readonly NamedReadBack[], source: Source, read: Read, query: Query): ReadBackOutcome {
  const { place, unit, kit, carry } = goes
  const attempt = attempts.length + 1
  const against = readAgainst(db, place, unit)
  const ingested = ingest(read, against.nameplate?.nameplate.dictionary)
  // What was read before the unit came in cannot be what was written after: such a clock is doubtful.
  const knownSince = Date.parse(before.facts.since?.at ?? before.openedAt)
  const times = timesOf(millisecondsOf(query.capturedAt ?? read.file.exportedAt), Date.parse(write.now), knownSince)
  const planned = planVersion(db, { ok: true, unit, place, times }, against, ingested)
  const { layout } = query
  const stored = storeVersion(db, write, source, { occasion: 'read-back', reason: `Read-back ${attempt} of swap ${before.id}: ${before.failure}`, workOrder: before.workOrder ?? undefined, layout }, planned)
  const { nameplate } = carry.into
  const comparison = compareReadBack(kit, ingested.content, {
    sameUnit: carry.ownValues, accepted: acceptedKeys(db, { model: read.file.unit.model, firmware: read.file.unit.firmware ?? null }),
    context: diffContextOf(against), ...(nameplate ? { nameplate } : {}),
  }, sha256)
  insertAttempt(db, write, before, { attempt, source, problem: null, detail: null, versionId: stored.version.id, verdict: comparison.verdict, compared: comparison, kitCode: hashesOf(kit.content, sha256).scribeCode })
  takeStep(db, write, before, {}, { act: 'read-back', text: `Read-back ${attempt}, version ${stored.version.number}: ${verdictWords(comparison)}`, said: { attempt, versionId: stored.version.id, verdict: comparison.verdict } })
  const { differences, aside, missingKeys, verdict } = comparison
  if (verdict === 'differs') raiseReadBack(db, write, place, { swapId: before.id, attempt, versionId: stored.version.id, changes: differences })
  return {
    ok: true, answer: {
      ...readSwap(db, before.id, write.now), attempt, version: versionSummary(db, stored.version.id), compare: verdict,
      differences: changesOnWire(differences), aside: changesOnWire(aside), missingKeys: [...missingKeys],
    },
  }
}

function verdictWords({ verdict, differences, missingKeys, rowsMissing }: ReturnType<typeof compareReadBack>): string {
  if (verdict !== 'differs') return verdict === 'identical' ? 'identical.' : 'the same.'
  const open = missingKeys.filter(({ accepted }) => !accepted)
  const rows = rowsMissing.length === 0 ? '' : ` The table was written in part: ${rowsMissing.length} ${rowsMissing.length === 1 ? 'row is' : 'rows are'} missing.`
  return `${differences.length} values differ${open.length === 0 ? '' : `, ${open.length} keys are missing`}.${rows}`
}

/** Keys that this firmware has no place for; holds for every unit of the model and firmware. What weighs harm takes a planner. */
export function acceptMissingKeys(vault: Vault, actor: PersonActor, id: number, { rev, keys, reason, allowedBy }: z.output<typeof missingKeysBody>): Swap {
  return vault.write(actor, (write) => {
    const { db } = vault
    const before = openSwapRow(db, write, id, rev, 'first-motion')
    const last = swapQueries(db).readBacks.all({ swapId: id }).findLast(({ readBack }) => readBack.versionId !== null)
    const version = last && versionSummary(db, last.readBack.versionId ?? 0)
    const named = version && last ? readBackOnWire(db, last).missingKeys : []
    const unknown = keys.filter(key => !named.some(missing => missing.key === key))
    if (!version || unknown.length > 0) throw refused('/keys', 'not-found', `Not missing in the last read-back: ${unknown.join(', ')}.`)
    if (version.firmware === null) throw refused('/keys', 'missing', 'The file does not say which firmware runs: nothing can be accepted for it.')
    const harm = named.filter(({ key, weight }) => weight === 'harm' && keys.includes(key))
    if (harm.length > 0 && allowedBy === undefined && !actor.roles.includes('planner')) throw refused('/allowedBy', 'missing', `${harm.map(({ key }) => key).join(', ')} can hurt someone: say which planner allows to go without.`)
    const { model, firmware } = version
    const known = acceptedKeys(db, { model, firmware })
    for (const key of keys.filter(each => !known.includes(each))) {
      const row = { model, firmware, key, swapId: id, at: write.now, byPerson: takerOf(write), allowedBy: allowedBy ?? null, reason }
      const gapId = swapQueries(db).insertGap(row)
      write.log({ act: 'firmware-gap-accepted', id: gapId, state: { id: gapId, ...row }, note: reason })
    }
    takeStep(db, write, before, {}, { act: 'missing-keys', text: `${model} ${firmware} has no ${keys.join(', ')}: accepted. ${reason}`, said: { keys, reason, allowedBy } })
    return readSwap(db, id, write.now)
  })
}

const refused = (at: string, code: string, message: string) => new Refusal('input', message, { errors: [{ at, code, message }] })
