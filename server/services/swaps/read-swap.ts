import type { Swap, SwapUnit } from '#shared/api/swaps'
import type { Verdict } from '#shared/diff/types'
import { compareContents } from '#shared/diff/compare'
import { Refusal } from '#shared/errors/refusal'
import { hashesOf } from '#shared/settings/hash'
import { firstMotion } from '#shared/swap/first-motion'
import { taughtMissing } from '#shared/swap/read-back'
import { ownFileFits } from '#shared/swap/rescale'
import { readContent } from '#server/database/content/queries'
import { judgingQueries } from '#server/database/judging/queries'
import { knownGoodQueries } from '#server/database/known-good/queries'
import type { VaultDb } from '#server/database/prepared'
import type { VersionRow } from '#server/database/schema'
import { swapQueries, type NamedReadBack } from '#server/database/swap/queries'
import type { By, SwapRow } from '#server/database/swap/table'
import { unitRows } from '#server/database/unit/queries'
import { diffContextOf, readAgainst } from '../uploads/read-against'
import { sha256 } from '#server/database/sha256'
import { versionRow } from '../versions/read-version'
import { personName } from '../versions/summary'
import { waivedOnWire } from '../waivers/accepted'
import { asLeftOf, attemptsOf, lastCompared, loadCanFall } from './facts'
import { acceptedKeys, readBackOnWire, verdictNow } from './read-back-view'
import { releaseDueAt } from './release-due'
import { fitCase, judgeKit, kitCaseOf, placeOf, type SwapKitCase } from './sides'

/** The swap as it stands, whole: what every step answers. */
export function readSwap(db: VaultDb, id: number, now: string): Swap {
  const row = swapQueries(db).byId.get({ id })
  if (!row) throw new Refusal('not-found', 'There is no such swap.')
  const place = placeOf(db, row.axisId)
  const goes = kitCaseOf(db, row)
  const attempts = attemptsOf(db, row)
  const { facts } = row
  const asLeft = asLeftOf(row, attempts)
  return {
    id: row.id, axisId: row.axisId, tag: place.axis.tag, machine: place.machine.name, line: place.line.name, site: place.site.name, timeZone: place.site.timeZone,
    rev: row.rev, step: row.step, replaced: row.replaced, failure: row.failure, workOrder: row.workOrder, openedAt: row.openedAt, openedBy: nameOf(db, row.openedBy),
    unitOut: unitOnWire(db, row.unitOutId), unitIn: unitOnWire(db, row.unitInId), putBack: row.putBack, loadCanFall: loadCanFall(place, goes?.kit ?? null),
    ...fitOnWire(db, row, goes, now),
    versionId: row.sourceVersionId, source: sourceOnWire(db, row), asFound: asFoundOnWire(db, row), kit: goes && kitOnWire(goes),
    cautions: facts.cautions ? byOnWire(db, facts.cautions) : null,
    safe: facts.safe ? { ...byOnWire(db, facts.safe), blocked: facts.safe.blocked } : null,
    readBacks: swapQueries(db).readBacks.all({ swapId: id }).map(attempt => readBackOnWire(db, attempt)),
    ticks: ticksOnWire(db, row), draft: facts.draft ? { ...byOnWire(db, facts.draft), note: facts.draft.note } : null,
    firstMotion: motionOnWire(db, row, goes), taughtMissing: goes ? taughtOf(db, goes, lastCompared(attempts)) : [],
    running: facts.running ? { ...byOnWire(db, facts.running), note: facts.running.note } : null,
    asLeft: asLeft ? { versionId: asLeft.readBack.versionId ?? 0, number: asLeft.number ?? 0, compare: verdictNow(db, asLeft) ?? 'differs' } : null,
    releaseDueAt: releaseDueAt(row, place.site.releaseHours),
    released: facts.released ? { ...byOnWire(db, facts.released), meaning: facts.released.meaning, note: facts.released.note, carriedOver: facts.released.carriedOver, oldUnitState: facts.released.oldUnitState } : null,
    abandoned: facts.abandoned ? { ...byOnWire(db, facts.abandoned), reason: facts.abandoned.reason } : null,
    log: swapQueries(db).steps.all({ swapId: id }).map(({ rev, at, by, act, text }) => ({ rev, at, by, act, text })),
  }
}

const nameOf = (db: VaultDb, id: number) => personName(db, id) ?? `person ${id}`
const byOnWire = (db: VaultDb, { by, at }: By) => ({ by: nameOf(db, by), at })

export function unitOnWire(db: VaultDb, id: number | null): SwapUnit | null {
  const placed = id === null ? undefined : unitRows(db).placed.get({ id })
  if (!placed) return null
  const { rev: _rev, siteId: _site, madeAt: _made, ...unit } = placed.unit
  return { ...unit, modelKnown: placed.modelKnown === 1 }
}

function fitOnWire(db: VaultDb, { fit, facts, axisId, step }: SwapRow, goes: SwapKitCase | null, now: string): Pick<Swap, 'fit' | 'reasons' | 'unfit' | 'adjustments' | 'forcesConfirmed' | 'checks'> {
  const judgement = goes && judgeKit(db, goes)
  const ended = step === 'released' || step === 'abandoned'
  return {
    fit, reasons: goes && judgement && !ended ? fitCase(db, goes, judgement, now).reasons.map(reason => ({ ...reason, at: [...reason.at] })) : [],
    unfit: facts.unfit ? { ...facts.unfit, enteredBy: nameOf(db, facts.unfit.enteredBy) } : null,
    adjustments: [...goes?.kit.adjustments ?? []], forcesConfirmed: facts.forces ? byOnWire(db, facts.forces) : null,
    checks: goes && judgement ? waivedOnWire(db, axisId, judgement, () => goes.kit.content, now) : [],
  }
}

function kitOnWire({ kit, carry }: SwapKitCase): Swap['kit'] {
  const { content, teach, prove } = kit
  return {
    scribeCode: hashesOf(content, sha256).scribeCode, values: Object.keys(content.setup).length + Object.keys(content.extra).length, moves: content.moves.length,
    teach: [...teach], prove: [...prove], attachmentFits: ownFileFits(carry),
  }
}

const lineOf = (db: VaultDb, version: VersionRow) =>
  ({ versionId: version.id, number: version.number, capturedAt: version.capturedAt, scribeCode: version.scribeCode, serial: unitRows(db).byId.get({ id: version.unitId })?.serial ?? version.file.unit.serial })

function sourceOnWire(db: VaultDb, { sourceVersionId, sourceMarkId, axisId, facts }: SwapRow): Swap['source'] {
  if (sourceVersionId === null) return null
  const inForce = knownGoodQueries(db).inForce.get({ axisId })
  const mark = sourceMarkId !== null && inForce?.mark.id === sourceMarkId ? { by: inForce.by, at: inForce.mark.at } : null
  return { ...lineOf(db, versionRow(db, sourceVersionId)), released: sourceMarkId !== null, mark, chosen: facts.chosen ?? null }
}

/** How long before a swap is opened an as-found file may have come in and still belong to it. */
const asFoundReach = 12 * 60 * 60_000

/** What the old unit held when it was taken out: the newest as-found version of the axis, from twelve hours before the swap on. */
export function asFoundOf(db: VaultDb, { axisId, openedAt }: Pick<SwapRow, 'axisId' | 'openedAt'>): VersionRow | null {
  const found = swapQueries(db).asFound.get({ axisId, since: new Date(Date.parse(openedAt) - asFoundReach).toISOString() })
  return found ? versionRow(db, found.id) : null
}

function asFoundOnWire(db: VaultDb, row: SwapRow): Swap['asFound'] {
  const asFound = asFoundOf(db, row)
  if (!asFound) return null
  const marked = knownGoodQueries(db).inForce.get({ axisId: row.axisId })?.mark.versionId
  return { ...lineOf(db, asFound), compare: marked ? compareVersions(db, versionRow(db, marked), asFound) : null }
}

function compareVersions(db: VaultDb, before: VersionRow, after: VersionRow): Verdict {
  const unit = unitRows(db).byId.get({ id: after.unitId })
  const nameplate = unit && judgingQueries(db).nameplate.get({ model: unit.model })
  const context = unit ? diffContextOf(readAgainst(db, placeOf(db, after.axisId), unit)) : {}
  return compareContents(readContent(db, before.contentId), readContent(db, after.contentId), { sameUnit: before.unitId === after.unitId, context, ...(nameplate ? { nameplate: nameplate.nameplate } : {}) }).verdict
}

function ticksOnWire(db: VaultDb, { facts: { ticks = {} } }: SwapRow): Swap['ticks'] {
  const { kit, lines = [], written, verdict, motion } = ticks
  const named = (act: By | undefined) => act ? byOnWire(db, act) : null
  return {
    kit: named(kit), lines: lines.map(({ line, words, ...act }) => ({ line, words, ...byOnWire(db, act) })), written: named(written),
    verdict: verdict ? { ...byOnWire(db, verdict), attempt: verdict.attempt } : null, motion: named(motion),
  }
}

function motionOnWire(db: VaultDb, { facts }: SwapRow, goes: SwapKitCase | null): Swap['firstMotion'] {
  const motion = facts.firstMotion
  if (!motion) return null
  const tried = new Set(motion.results.map(({ item }) => item))
  const items = goes ? motionItems(goes, motion.speedPercent) : []
  return {
    speedPercent: motion.speedPercent, results: motion.results.map(({ by, ...result }) => ({ ...result, by: nameOf(db, by) })),
    untried: items.map(({ item }) => item).filter(item => !tried.has(item)),
  }
}

export function motionItems({ place, kit, unit: _unit, carry }: SwapKitCase, speedPercent: number) {
  const { nameplate } = carry.into
  return firstMotion({ content: kit.content, flags: place.axis.flags, speedPercent, ...(nameplate ? { nameplate } : {}) })
}

/** Values to be taught that the unit has not shown yet; all of them before it was read back. */
export function taughtOf(db: VaultDb, { kit }: SwapKitCase, last: NamedReadBack | undefined): string[] {
  if (!last || last.readBack.versionId === null) return [...kit.teach]
  const version = versionRow(db, last.readBack.versionId)
  return taughtMissing(kit, readContent(db, version.contentId), acceptedKeys(db, version))
}
