import type { ChangesAnswer } from '#shared/api/versions'
import { Refusal } from '#shared/errors/refusal'
import { compareContents } from '#shared/diff/compare'
import { diffContents } from '#shared/diff/diff'
import { jsonPatchOf, type PatchOperation } from '#shared/diff/json-patch'
import { diffRenumbered } from '#shared/diff/renumber'
import { textDifference } from '#shared/diff/text'
import { writeCsv } from '#shared/settings/write-csv'
import { seesSite, type Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import type { VersionRow } from '#server/database/schema'
import { unitRows } from '#server/database/unit/queries'
import { diffContextOf } from '../uploads/read-against'
import { changesOnWire } from '../wire'
import { fileOf, versionRow } from './read-version'

/** `before` of any axis that the actor may see, `after` the version in the path. */
interface Pair { readonly before: VersionRow, readonly after: VersionRow }

function pairOf(db: VaultDb, actor: Actor, beforeId: number, afterId: number): Pair {
  const before = versionRow(db, beforeId)
  const place = judgingQueries(db).axis.get({ id: before.axisId })
  if (!place || !seesSite(actor, place.site.id)) throw new Refusal('not-found', 'There is no such version to compare with.')
  return { before, after: versionRow(db, afterId) }
}

/** What differs between two versions, by number and, where that says less, by what the rows do. */
export function versionChanges({ db }: Vault, actor: Actor, beforeId: number, afterId: number): ChangesAnswer {
  const { before, after } = pairOf(db, actor, beforeId, afterId)
  const [was, is] = [fileOf(db, before), fileOf(db, after)]
  const place = judgingQueries(db).axis.get({ id: after.axisId })
  const model = unitRows(db).byId.get({ id: after.unitId })?.model ?? after.model
  const nameplate = judgingQueries(db).nameplate.get({ model }) ?? null
  const context = place ? diffContextOf({ place, nameplate }) : {}
  const { verdict } = compareContents(was, is, { sameUnit: before.unitId === after.unitId, context, ...(nameplate ? { nameplate: nameplate.nameplate } : {}) })
  const told = diffRenumbered(was, is, context)
  return {
    compare: verdict, changes: changesOnWire(diffContents(was, is, context)), renumbered: [...(told?.renumbered ?? [])],
    ...(told ? { told: { pairs: [...told.pairs], changes: changesOnWire(told.changes) } } : {}),
  }
}

/** RFC 6902: applied to the content of `before` it gives that of `after`. */
export function versionPatch({ db }: Vault, actor: Actor, beforeId: number, afterId: number): PatchOperation[] {
  const { before, after } = pairOf(db, actor, beforeId, afterId)
  return jsonPatchOf(fileOf(db, before), fileOf(db, after))
}

/** The two CSV forms, line by line. */
export function versionText({ db }: Vault, actor: Actor, beforeId: number, afterId: number): string {
  const { before, after } = pairOf(db, actor, beforeId, afterId)
  return textDifference(writeCsv(fileOf(db, before)), writeCsv(fileOf(db, after)))
}
