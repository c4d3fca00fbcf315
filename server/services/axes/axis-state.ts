import { compareContents } from '#shared/diff/compare'
import { diffRenumbered } from '#shared/diff/renumber'
import { countByWeight } from '#shared/diff/summary'
import type { Comparison, FieldChange } from '#shared/diff/types'
import { attachmentQueries } from '#server/database/attachment/queries'
import { countReceived, readAxisState, replaceAxisState } from '#server/database/axis-state/queries'
import { readLevelCounts } from '#server/database/check/queries'
import { judgingQueries } from '#server/database/judging/queries'
import { labelQueries } from '#server/database/label/queries'
import { knownGoodQueries } from '#server/database/known-good/queries'
import type { VaultDb } from '#server/database/prepared'
import type { AxisStateRow, KnownGoodRow, VersionRow } from '#server/database/schema'
import { unitRows } from '#server/database/unit/queries'
import { versionQueries } from '#server/database/version/queries'
import { diffContextOf, readAgainst, type ReadAgainst } from '../uploads/read-against'
import { acceptedUntil } from '../waivers/accepted'

/** Derives the state row of an axis anew; called after every act that touches the axis, within the same write. */
export function refreshAxisState(db: VaultDb, axisId: number): void {
  const mark = knownGoodQueries(db).inForce.get({ axisId })?.mark ?? null
  const current = versionQueries(db).current.get({ axisId }) ?? null
  const open = judgingQueries(db).openAtAxis.get({ axisId })
  const { versions, sightings, lastUploadAt } = countReceived(db, axisId)
  const counts = current && readLevelCounts(db, current.id)
  replaceAxisState(db, {
    axisId, ...statusOf(db, axisId, current, mark), versions, sightings, lastUploadAt, ...(counts ?? noChecks), accepted: current ? acceptedUntil(db, current) : [],
    knownGoodId: mark?.id ?? null, knownGoodVersionId: mark?.versionId ?? null,
    backups: mark?.versionId ? attachmentQueries(db).backups.get({ versionId: mark.versionId })?.count ?? 0 : 0,
    labelTag: labelQueries(db).newest.get({ axisId })?.tag ?? null,
    currentVersionId: current?.id ?? null, fittingId: open?.fitting.id ?? null,
  })
}

const noChecks = { stop: 0, warn: 0, note: 0, unknown: 0 }

type Status = Pick<AxisStateRow, 'status' | 'offHarm' | 'offMotion' | 'offText' | 'offSince' | 'sense'>
const nothingOff = { offHarm: 0, offMotion: 0, offText: 0, offSince: null, sense: null } as const

function statusOf(db: VaultDb, axisId: number, current: VersionRow | null, mark: KnownGoodRow | null): Status {
  if (!current) return { status: 'never-read', ...nothingOff }
  if (!mark?.versionId) return { status: 'unmarked', ...nothingOff }
  if (mark.versionId === current.id) return { status: 'in-line', ...nothingOff }
  const comparison = againstKnownGood(db, axisId, current)
  if (comparison?.verdict !== 'differs') return { status: 'in-line', ...nothingOff }
  const off = countByWeight(comparison.told)
  const earlier = readAxisState(db, axisId)
  const stays = earlier?.status === 'off' && earlier.knownGoodId === mark.id
  const since = mark.at > current.receivedAt ? mark.at : current.receivedAt
  return { status: 'off', offHarm: off.harm, offMotion: off.motion, offText: off.text, offSince: stays ? earlier.offSince : since, sense: senseOf(comparison) }
}

/** The current version of an axis, which was read from that unit, against its known-good in force; null where either is missing. */
export function againstKnownGood(db: VaultDb, axisId: number, { unitId }: Pick<VersionRow, 'unitId'>): ToldComparison | null {
  const place = judgingQueries(db).axis.get({ id: axisId })
  const unit = unitRows(db).byId.get({ id: unitId })
  return place && unit ? compareWithKnownGood(readAgainst(db, place, unit)) : null
}

/** A comparison with its differences as they are told: rows renumbered are not rows rewritten. */
interface ToldComparison extends Comparison { readonly told: readonly FieldChange[] }

function compareWithKnownGood(against: ReadAgainst): ToldComparison | null {
  const { knownGood, current, nameplate } = against
  if (!knownGood || !current) return null
  const context = diffContextOf(against)
  const comparison = compareContents(knownGood.content, current.content, {
    sameUnit: knownGood.version.unitId === current.version.unitId, context, ...(nameplate ? { nameplate: nameplate.nameplate } : {}),
  })
  return { ...comparison, told: diffRenumbered(knownGood.content, current.content, context)?.changes ?? comparison.differences }
}

/** Whether the weightiest numeric difference goes up or down; differences come sorted by weight. */
function senseOf({ told }: ToldComparison): 'more' | 'less' | null {
  const first = told.find(({ delta }) => delta !== undefined && delta !== 0)
  return first?.delta === undefined ? null : first.delta > 0 ? 'more' : 'less'
}
