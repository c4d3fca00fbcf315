import type { UploadFields } from '#shared/api/uploads'
import { Refusal } from '#shared/errors/refusal'
import type { FormatError } from '#shared/settings/types'
import type { SiteBounds } from '#server/database/actor'
import type { Write } from '#server/database/client'
import type { VaultDb } from '#server/database/prepared'
import type { TrayProblem } from '#server/database/schema'
import { trayQueries } from '#server/database/tray/queries'
import { millisecondsOf } from '../uploads/place-file'
import type { Ingested } from '../uploads/ingest'
import { storeContent, storeUploadBytes, type SentFile } from '../uploads/store-parts'
import { guessAxis, guessByTag } from './guess'

export const trayLimits = { files: 2000, bytes: 512 * 1024 * 1024 }

export interface ToKeep {
  readonly problem: TrayProblem
  readonly detail: string
  readonly errors: readonly FormatError[]
  readonly more: number
  /** The site that the unit names, where it does. */
  readonly siteId: number | null
  /** null: the file could not be read. */
  readonly ingested: Ingested | null
}

/** Keeps a file that has no axis, or cannot be read, with what is wrong and where it probably belongs. Answers its tray id. */
export function keepInTray(db: VaultDb, write: Write, sent: SentFile, fields: UploadFields, kept: ToKeep): number {
  const named = guessByTag(db, write.actor, fields.axis)
  const guess = named ?? (kept.ingested ? guessAxis(db, write.actor, kept.ingested.file, kept.ingested.content) : null)
  const siteId = kept.siteId ?? named?.siteId ?? onlySite(write.actor.sites)
  refuseWhenFull(db, siteId, sent.bytes.length)
  const { unit } = kept.ingested?.file ?? {}
  const row = {
    uploadId: storeUploadBytes(db, write, sent, fields),
    problem: kept.problem, detail: kept.detail, errors: [...kept.errors], more: kept.more, fields, siteId,
    serial: unit?.serial ?? null, channel: unit?.channel ?? null, model: unit?.model ?? null,
    capturedAt: kept.ingested ? new Date(millisecondsOf(fields.capturedAt ?? kept.ingested.file.exportedAt)).toISOString() : null,
    contentId: kept.ingested ? storeContent(db, write, kept.ingested) : null,
    guessAxisId: guess?.axisId ?? null, guessWhy: guess?.why ?? null,
  }
  const id = trayQueries(db).insert(row)
  write.log({ act: 'tray-kept', id, state: { id, ...row, errors: row.errors.map(error => ({ ...error })) } })
  return id
}

const onlySite = (sites: SiteBounds) => (sites?.length === 1 ? sites[0] ?? null : null)

function refuseWhenFull(db: VaultDb, siteId: number | null, size: number): void {
  const load = trayQueries(db).load.get({ siteId: siteId ?? 0 })
  if (!load || (load.files < trayLimits.files && (load.bytes ?? 0) + size <= trayLimits.bytes)) return
  throw new Refusal('tray-full', `The tray holds ${load.files} files already; at most 2,000 files and 512 MiB wait at a site. This file was not kept: work through the tray, then send it again.`)
}
