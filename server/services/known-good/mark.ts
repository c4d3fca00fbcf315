import type { meanings } from '#shared/api/versions'
import { blocksKnownGood } from '#shared/checks/blocks'
import { Refusal } from '#shared/errors/refusal'
import { personOf, type Actor } from '#server/database/actor'
import { readJudgement } from '#server/database/check/queries'
import type { Vault, Write } from '#server/database/client'
import { knownGoodQueries } from '#server/database/known-good/queries'
import type { VaultDb } from '#server/database/prepared'
import type { VersionRow } from '#server/database/schema'
import { versionQueries } from '#server/database/version/queries'
import { refreshAxisState } from '../axes/axis-state'
import { differsFromKept, judgeToday, keepJudgement, type Today } from '../judging/judge-again'
import { versionRow } from '../versions/read-version'
import { waived } from '../waivers/accepted'
import { assertFourEyes } from './assert-four-eyes'

export interface MarkWords { readonly meaning: (typeof meanings)[number], readonly note?: string | undefined }

/** From now on the axis is restored to this version. Any version that is not void may be marked, by another than who brought in its harm values. */
export function markKnownGood(vault: Vault, actor: Actor, versionId: number, words: MarkWords): { id: number } {
  return vault.write(actor, (write) => {
    const { db } = vault
    const version = versionRow(db, versionId)
    const marker = markerOf(actor)
    const today = judgeToday(db, version)
    const { against, file } = today
    if (against.place.site.fourEyes) assertFourEyes(db, marker, version, file, against)
    if (versionQueries(db).voidOf.get({ versionId })) throw new Refusal('already-void', `Version ${version.number} is void: it cannot be what the axis is restored to.`)
    assertNoStops(db, write, version, today)
    return putMark(db, write, { axisId: version.axisId, versionId, byPerson: marker, carriedFrom: null }, words)
  })
}

/** The mark goes over to the version that a swap left, which holds the same values on another unit; by the same rules as a new mark. */
export function carryMarkOver(db: VaultDb, write: Write, version: VersionRow, carriedFrom: number, words: MarkWords): void {
  const byPerson = markerOf(write.actor)
  const today = judgeToday(db, version)
  if (today.against.place.site.fourEyes) assertFourEyes(db, byPerson, version, today.file, today.against)
  assertNoStops(db, write, version, today)
  putMark(db, write, { axisId: version.axisId, versionId: version.id, byPerson, carriedFrom }, words)
}

/** Says that no version of the axis is known-good. */
export function markNone(vault: Vault, actor: Actor, axisId: number, words: MarkWords): { id: number } {
  return vault.write(actor, write => putMark(vault.db, write, { axisId, versionId: null, byPerson: markerOf(actor), carriedFrom: null }, words))
}

function markerOf(actor: Actor): number {
  const person = personOf(actor)
  if (actor.kind !== 'person' || person === null) throw new Refusal('signature', 'A mark is signed by a person.')
  return person
}

/** Judged by today's nameplate and rules, waivers set aside; a judgement that differs from the one kept is kept beside it. */
function assertNoStops(db: VaultDb, write: Write, version: VersionRow, today: Today): void {
  const { against, file, judgement } = today
  const blocks = blocksKnownGood(waived(db, version.axisId, judgement, () => file, write.now).judgement, against.place.axis.flags)
  if (blocks.length > 0) {
    const errors = blocks.slice(0, 100).map(({ rule, at, message }) => ({ at: at[0] ?? '', code: rule, message }))
    throw new Refusal('stop-checks', `${blocks.length} ${blocks.length === 1 ? 'check stands' : 'checks stand'} against it: ${blocks[0]?.message ?? ''}`, { errors, more: blocks.length - errors.length })
  }
  if (differsFromKept(today, readJudgement(db, version.id))) keepJudgement(db, write, version.id, today)
}

function putMark(db: VaultDb, write: Write, mark: { axisId: number, versionId: number | null, byPerson: number, carriedFrom: number | null }, { meaning, note }: MarkWords): { id: number } {
  const row = { ...mark, at: write.now, meaning, note: note ?? null }
  const id = knownGoodQueries(db).insert(row)
  write.log({ act: mark.versionId === null ? 'known-good-none' : 'known-good-marked', id, state: { id, ...row }, note: row.note })
  refreshAxisState(db, mark.axisId)
  return { id }
}
