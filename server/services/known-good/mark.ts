import type { meanings } from '#shared/api/versions'
import { blocksKnownGood } from '#shared/checks/blocks'
import { judge } from '#shared/checks/judge'
import { Refusal } from '#shared/errors/refusal'
import type { Content, SettingsFile } from '#shared/settings/types'
import { personOf, type Actor } from '#server/database/actor'
import { insertJudgement, readJudgement } from '#server/database/check/queries'
import type { Vault, Write } from '#server/database/client'
import { readContent } from '#server/database/content/queries'
import { judgingQueries } from '#server/database/judging/queries'
import { knownGoodQueries } from '#server/database/known-good/queries'
import type { VaultDb } from '#server/database/prepared'
import type { VersionRow } from '#server/database/schema'
import { unitRows } from '#server/database/unit/queries'
import { versionQueries } from '#server/database/version/queries'
import { refreshAxisState } from '../axes/axis-state'
import { judgeInputOf, readAgainst, type ReadAgainst } from '../uploads/read-against'
import { fileOf, versionRow } from '../versions/read-version'
import { assertFourEyes } from './assert-four-eyes'

export interface MarkWords { readonly meaning: (typeof meanings)[number], readonly note?: string | undefined }

/** From now on the axis is restored to this version. Any version that is not void may be marked, by another than who brought in its harm values. */
export function markKnownGood(vault: Vault, actor: Actor, versionId: number, words: MarkWords): { id: number } {
  return vault.write(actor, (write) => {
    const { db } = vault
    const version = versionRow(db, versionId)
    const marker = markerOf(actor)
    const against = againstOf(db, version)
    const file = fileOf(db, version)
    if (against.place.site.fourEyes) assertFourEyes(db, marker, version, file, against)
    if (versionQueries(db).voidOf.get({ versionId })) throw new Refusal('already-void', `Version ${version.number} is void: it cannot be what the axis is restored to.`)
    assertNoStops(db, write, version, file, against)
    return putMark(db, write, { axisId: version.axisId, versionId, byPerson: marker }, words)
  })
}

/** Says that no version of the axis is known-good. */
export function markNone(vault: Vault, actor: Actor, axisId: number, words: MarkWords): { id: number } {
  return vault.write(actor, write => putMark(vault.db, write, { axisId, versionId: null, byPerson: markerOf(actor) }, words))
}

function markerOf(actor: Actor): number {
  const person = personOf(actor)
  if (actor.kind !== 'person' || person === null) throw new Refusal('signature', 'A mark is signed by a person.')
  return person
}

function againstOf(db: VaultDb, version: VersionRow): ReadAgainst {
  const place = judgingQueries(db).axis.get({ id: version.axisId })
  const unit = unitRows(db).byId.get({ id: version.unitId })
  if (!place || !unit) throw new Refusal('not-found', 'The axis or the unit of this version is not there.')
  return readAgainst(db, place, unit)
}

/** Judged by today's nameplate and rules; a judgement that differs from the one kept is kept beside it. */
function assertNoStops(db: VaultDb, write: Write, version: VersionRow, file: SettingsFile, against: ReadAgainst): void {
  const judgement = judge(judgeInputOf(against, file, file.unit, baseContent(db, version)))
  const blocks = blocksKnownGood(judgement, against.place.axis.flags)
  if (blocks.length > 0) {
    const errors = blocks.slice(0, 100).map(({ rule, at, message }) => ({ at: at[0] ?? '', code: rule, message }))
    throw new Refusal('stop-checks', `${blocks.length} ${blocks.length === 1 ? 'check stands' : 'checks stand'} against it: ${blocks[0]?.message ?? ''}`, { errors, more: blocks.length - errors.length })
  }
  if (JSON.stringify(judgement.results) !== JSON.stringify(readJudgement(db, version.id).results)) {
    insertJudgement(db, version.id, judgement, against.nameplate?.id ?? null, write.now)
  }
}

/** What stood before it on the axis: some rules judge the step, not the state. */
function baseContent(db: VaultDb, { baseId }: VersionRow): Content | null {
  const base = baseId === null ? undefined : versionRow(db, baseId)
  return base ? readContent(db, base.contentId) : null
}

function putMark(db: VaultDb, write: Write, mark: { axisId: number, versionId: number | null, byPerson: number }, { meaning, note }: MarkWords): { id: number } {
  const row = { ...mark, at: write.now, meaning, note: note ?? null }
  const id = knownGoodQueries(db).insert(row)
  write.log({ act: mark.versionId === null ? 'known-good-none' : 'known-good-marked', id, state: { id, ...row }, note: row.note })
  refreshAxisState(db, mark.axisId)
  return { id }
}
